import type { Interval } from '../../record/interval.ts'
import { type Finding, finding, ratioOf, stateOf } from '../finding.ts'
import { read } from '../setting.ts'
import type { Site } from '../site.ts'
import { floorClass } from './floor-class.ts'

/**
 * The handler's own footing on a wet floor: 36 + 100 tan(alpha) for the pendulum value (UK Slip Resistance Group; for
 * slopes HSE). Without a value it is not known on a smooth floor, a caution on any other.
 */
export function slip(site: Site): Finding[] {
  if (!site.led || !site.wet) return []
  const { setting, segment } = site
  const holders = [segment, ...segment.features.filter((one) => one.readings.pendulum !== undefined)]
  const values = holders
    .map((one) => ({ id: one.id, value: read(setting, one, 'pendulum', 'low') }))
    .filter((one): one is { id: string; value: Interval } => one.value !== null)
  const found = values.map(({ id, value }) => judged(site, id, value))
  return values.some((one) => one.id === segment.id) || !isOpen(site) ? found : [...found, withoutValue(site)]
}

/** Whether some wet floor has no value of its own: all of it, or a patch. A grid's value is the grid's. */
function isOpen({ segment, wetAround }: Site): boolean {
  const patches = segment.features.filter((one) => one.kind === 'wet-patch' || one.kind === 'loose-ground')
  return wetAround || patches.some((one) => one.readings.pendulum === undefined)
}

function judged({ segment, slope }: Site, feature: string, value: Interval): Finding {
  const demand = { low: 36 + 100 * slope.gentlest, high: 36 + 100 * slope.steepest }
  const ratio = ratioOf(demand, value)
  const raw = stateOf(ratio)
  return finding({
    id: 'slip',
    feature: feature === segment.id ? (segment.features.find((one) => one.kind === 'ramp')?.id ?? feature) : feature,
    subject: `Footing on ${segment.name}, wet`,
    detail: () => `pendulum value ${Math.floor(value.low)} for ${Math.ceil(demand.high)}`,
    harm: 'fall',
    source: 'UKSRG, 36 + 100 tan(alpha)',
    raw,
    demand: demand.high,
    capacity: value.low,
    ratio,
    caution: raw === 'passes' ? null : 'Slippery when wet. Short steps. If it slides, stop.',
    from: [value, ...slope.from],
  })
}

function withoutValue({ segment }: Site): Finding {
  const smooth = floorClass(segment) === 'smooth'
  return finding({
    id: 'slip',
    feature: segment.id,
    subject: `Footing on ${segment.name}, wet`,
    detail: () => 'no pendulum value',
    harm: 'fall',
    source: 'UKSRG, 36 + 100 tan(alpha)',
    raw: smooth ? 'unsure' : 'tight',
    caution: 'Slippery when wet. Short steps. If it slides, stop.',
  })
}
