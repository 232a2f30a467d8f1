import { kind } from '../../catalogue/kinds.ts'
import { type Interval, magnitude } from '../../record/interval.ts'
import type { Feature } from '../../record/survey.ts'
import { limit } from '../../standards/packs.ts'
import { epsilon, type Finding, finding, ratioOf, stateOf } from '../finding.ts'
import { read } from '../setting.ts'
import { helpLedOtherwise, nameOf, type Site } from '../site.ts'
import { mmNeeded, mmThere } from '../words.ts'

/** Where a kind keeps the height of its step. */
const heights: Readonly<Record<string, string>> = { lift: 'sillStep' }

/**
 * One step against the robot's riser, at the unsafe end. Over the pack's lip a caution, over its bevel limit a caution
 * "step", both at the reading itself; a ridge with flanks of 1:2 or flatter has no lip and is judged by its height.
 */
export function level(site: Site): Finding[] {
  return site.segment.features.flatMap((feature) => {
    const row = kind(feature.kind)
    if (!row?.feeds.includes('level')) return []
    const height = read(site.setting, feature, heights[feature.kind] ?? heightOf(row.aspect), 'high')
    return height ? [judged(site, feature, magnitude(height))] : []
  })
}

function heightOf(aspect: string | null): string {
  return aspect === 'door' ? 'threshold' : 'height'
}

function judged(site: Site, feature: Feature, height: Interval): Finding {
  const { setting } = site
  const riser = setting.team.card.robot.riser
  const ratio = ratioOf({ low: Math.max(0, height.low), high: height.high }, { low: riser, high: riser })
  const lip = limit(setting.pack, 'lip')
  const bevel = limit(setting.pack, 'bevel')
  const flat = feature.kind === 'ridge' && feature.words.flank?.says === 'yes'
  const steep = feature.kind === 'ridge' && !flat
  const step = height.value > bevel.value + epsilon
  const over = step || (!flat && height.value > lip.value + epsilon)
  const state = stateOf(ratio)
  const help = helpLedOtherwise(site, feature)
  return finding({
    id: 'level',
    feature: feature.id,
    subject: `Step at ${nameOf(feature)}`,
    detail: () => `${mmNeeded(height.high)}${steep ? ' up and down again' : ''} for ${mmThere(riser)} the robot takes`,
    harm: 'fall',
    source: step ? bevel.clause : over ? lip.clause : 'common practice',
    raw: state === 'passes' && over ? 'tight' : state,
    demand: height.high,
    capacity: riser,
    ratio,
    caution:
      over || state !== 'passes' ? (step ? 'Step. Stop, and find it with your foot.' : 'Small lip. Slow.') : null,
    from: [height],
    strict: true,
    ...(help ? { help } : {}),
  })
}
