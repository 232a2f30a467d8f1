import type { Interval } from '../../record/interval.ts'
import type { Feature } from '../../record/survey.ts'
import { limit } from '../../standards/packs.ts'
import { epsilon, type Finding, finding, ratioOf, stateOf } from '../finding.ts'
import { read } from '../setting.ts'
import { helpLedOtherwise, nameOf, type Site } from '../site.ts'
import { mmNeeded, mmThere } from '../words.ts'

const sills = new Set(['lift-sill', 'bridge-plate', 'landing'])

/**
 * Slots against the robot's own; a lift sill, bridge plate or landing against the gap it was shown to cross with a
 * person on the leash. Over the pack's slot a caution at the reading itself, and so is a slot that runs along the way.
 */
export function gap(site: Site): Finding[] {
  const { setting } = site
  const { robot } = setting.team.card
  return site.segment.features.flatMap((feature) => {
    if (feature.kind === 'grating') {
      const slot = read(setting, feature, 'slot', 'high')
      return slot ? [judged(site, feature, slot, robot.slot, feature.words.direction?.says === 'along')] : []
    }
    if (feature.kind === 'gap') {
      const wide = read(setting, feature, 'gap', 'high')
      const sill = sills.has(feature.words.place?.says ?? '')
      return wide ? [judged(site, feature, wide, sill ? robot.sillGap : robot.slot, false)] : []
    }
    if (feature.kind !== 'lift') return []
    const sill = read(setting, feature, 'sillGap', 'high')
    return sill ? [judged(site, feature, sill, robot.sillGap, false)] : []
  })
}

function judged(site: Site, feature: Feature, wide: Interval, capacity: number, along: boolean): Finding {
  const most = limit(site.setting.pack, 'slot')
  const ratio = ratioOf({ low: Math.max(0, wide.low), high: wide.high }, { low: capacity, high: capacity })
  const state = stateOf(ratio)
  const over = along || wide.value > most.value + epsilon
  const help = helpLedOtherwise(site, feature)
  return finding({
    id: 'gap',
    feature: feature.id,
    subject: `Gap at ${nameOf(feature)}`,
    detail: () => `${mmNeeded(wide.high)}${along ? ' along the way' : ''} for ${mmThere(capacity)} the robot crosses`,
    harm: 'trap',
    source: over ? most.clause : 'common practice',
    raw: state === 'passes' && over ? 'tight' : state,
    demand: wide.high,
    capacity,
    ratio,
    caution: over || state !== 'passes' ? 'Gap underfoot. Stop, and find both its edges with your foot.' : null,
    from: [wide],
    // A grid is the surface's; a gap is a step, a sill a door.
    strict: feature.kind !== 'grating',
    ...(help ? { help } : {}),
  })
}
