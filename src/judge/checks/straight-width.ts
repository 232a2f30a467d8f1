import { kind } from '../../catalogue/kinds.ts'
import type { Interval } from '../../record/interval.ts'
import { type Finding, finding, ratioOf, roomState } from '../finding.ts'
import { read } from '../setting.ts'
import { nameOf, type Site } from '../site.ts'
import { mmNeeded, mmThere } from '../words.ts'

/** Above the clearance needed on a straight a room check is a caution to this much more, metres a side. */
export const band = 0.05
/** A narrower place shorter than this is judged as a pinch only. */
export const pinchLength = 0.6
/** What an occupied chair takes beyond its chair-back line. */
const occupied = 0.85

/**
 * The clear width of a robot-led stretch against the envelope with its clearance either side. A room check: it goes by
 * the metres left a side. Common practice.
 */
export function straightWidth(site: Site): Finding[] {
  if (!site.led) return []
  const { setting, segment, width } = site
  const found: Finding[] = []
  if (width) {
    const at = segment.readings.width?.find((one) => one.id === width.ids[0])?.at
    found.push(judged(site, segment.id, `Width ${at ? placed(at) : `at ${segment.name}`}`, width, 0))
  }
  for (const feature of segment.features) {
    if (!kind(feature.kind)?.feeds.includes('straight-width')) continue
    const clear = read(setting, feature, 'clearWidth', 'low')
    if (!clear) continue
    const length = read(setting, feature, 'length', 'high')
    if (length && length.high < pinchLength) continue
    const counted = feature.readings.clearWidth?.filter((one) => clear.ids.includes(one.id)) ?? []
    const inUse = counted.every((one) => one.found === 'in-use')
    const taken = feature.kind === 'seats-facing' && !inUse ? occupied : 0
    found.push(judged(site, feature.id, `Width at ${nameOf(feature)}`, clear, taken))
  }
  return [...found, ...lengthy(site)]
}

/** Openings and obstructions too long to be a pinch only: what they leave is a narrow stretch. */
function lengthy(site: Site): Finding[] {
  const { setting, segment, width } = site
  return segment.features.flatMap((feature) => {
    const subject = `Width at ${nameOf(feature)}`
    if (feature.kind === 'obstruction') {
      const depth = read(setting, feature, 'depth', 'high')
      const length = read(setting, feature, 'length', 'high')
      if (!depth || !width || (length && length.high < pinchLength)) return []
      const left = { ...width, low: width.low - depth.high, high: width.high - depth.low }
      return [{ ...judged(site, feature.id, subject, left, 0), told: width.told || depth.told }]
    }
    const thick = read(setting, feature, 'wallThickness', 'high')
    const clear = read(setting, feature, 'clearWidth', 'low')
    if (!thick || thick.high < pinchLength || !clear) return []
    return kind(feature.kind)?.feeds.includes('turn') ? [judged(site, feature.id, subject, clear, 0)] : []
  })
}

/** "lockers" is at the lockers; "between the pillars" says it itself. */
function placed(at: string): string {
  if (/^(at|between|under|beside|past|near|by|behind|over|opposite|in|on) /i.test(at)) return at
  return /^(the|a|an|\d)/i.test(at) ? `at ${at}` : `at the ${at}`
}

function judged({ setting }: Site, feature: string, subject: string, width: Interval, taken: number): Finding {
  const { envelope, card } = setting.team
  const need = card.leash.clearanceStraight
  const there = { low: width.low - taken, high: width.high - taken }
  const demand = envelope + 2 * need
  const raw = roomState({ low: (there.low - envelope) / 2, high: (there.high - envelope) / 2 }, need, band)
  return finding({
    id: 'straight-width',
    feature,
    subject,
    detail: () => `${mmThere(there.low)} for ${mmNeeded(demand)} with clearance`,
    harm: 'trap',
    source: 'common practice',
    raw,
    demand,
    capacity: there.low,
    ratio: ratioOf({ low: demand, high: demand }, there),
    caution: raw === 'tight' ? 'Narrow: single file, arms in.' : null,
    from: [width],
    strict: true,
  })
}
