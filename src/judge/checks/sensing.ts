import { kind } from '../../catalogue/kinds.ts'
import { type Draft, epsilon, type Finding, finding } from '../finding.ts'
import { read } from '../setting.ts'
import { helpAt, helpLedOtherwise, nameOf, type Site } from '../site.ts'
import { isEdge } from './edge.ts'
import { slopeFrom } from './slope.ts'

/**
 * What the robot does not sense, by the flags of its card; what it does when the handle is let go; rain. Common
 * practice. A rope right across is the helper's: the robot may pass under it.
 */
export function sensing(site: Site): Finding[] {
  if (!site.led) return []
  const { setting, segment } = site
  const { robot } = setting.team.card
  const found: Finding[] = []
  for (const feature of segment.features) {
    const row = kind(feature.kind)
    const seen =
      (feature.kind === 'glass' && robot.senses.glass) || (feature.kind === 'dark-floor' && robot.senses.darkFloor)
    const low = feature.kind === 'overhang' || feature.kind === 'under-stair'
    const hidden =
      row?.aspect === 'sensing' ||
      isOverPlane(site, feature) ||
      (low && !robot.senses.overhangs && isUnderHead(site, feature))
    if (!hidden || seen) continue
    const across = feature.kind === 'rope' && feature.words.place?.says !== 'beside'
    const help = helpLedOtherwise(site, feature) ?? (across ? helpAt(site, feature) : undefined)
    found.push(
      one({
        feature: feature.id,
        subject: `Sensing at ${nameOf(feature)}`,
        detail: () => (row?.unsensed ?? 'the robot senses under it').replace(/\.$/, ''),
        harm: row?.harm ?? 'trap',
        raw: across ? 'needs-help' : 'tight',
        caution: 'The robot may slow or stop. Then stand still.',
        ...(help ? { help } : {}),
      }),
    )
  }
  return [...found, ...letGo(site), ...rain(site)]
}

/** A table top or shelf under which the robot senses nothing. */
function isOverPlane({ setting }: Site, feature: Site['segment']['features'][number]): boolean {
  if (feature.kind !== 'obstruction') return false
  const lowest = read(setting, feature, 'height', 'high')
  return lowest !== null && lowest.high > setting.team.card.robot.sensingPlane + epsilon
}

function isUnderHead({ setting }: Site, feature: Site['segment']['features'][number]): boolean {
  const lowest = read(setting, feature, 'lowest', 'low')
  return lowest !== null && lowest.low < setting.team.strike + 0.1 - epsilon
}

/** A robot that may go on when let go: a caution; with help near an edge, on a slope over 1:20 or in a crowd. */
function letGo(site: Site): Finding[] {
  const { setting, segment, slope, around } = site
  const { onLetGo } = setting.team.card.robot
  if (onLetGo === 'stops') return []
  const risky = segment.features.some(isEdge) || slope.read > slopeFrom + epsilon || (around.crowd ?? 3) >= 2
  return [
    one({
      feature: segment.id,
      subject: `Letting go on ${segment.name}`,
      detail: () => (onLetGo === 'unknown' ? 'what the robot does then is not known' : 'the robot then goes on'),
      harm: 'trap',
      raw: risky ? 'needs-help' : 'tight',
      caution: 'If you let go, the robot may move. Stand still.',
      ...(risky ? { help: helpAt(site) } : {}),
    }),
  ]
}

/** Outdoors and wet, a robot without a rain rating fails; where nobody said that a zone is indoors it may rain. */
function rain({ setting, segment, zone, wet }: Site): Finding[] {
  if (zone?.outdoors === false || !wet || setting.team.card.robot.rainRating?.trim()) return []
  return [
    one({
      feature: segment.id,
      subject: `Rain on ${segment.name}`,
      detail: () => 'the robot has no rain rating',
      harm: 'trap',
      raw: 'fails',
    }),
  ]
}

function one(draft: Omit<Draft, 'id' | 'source'>): Finding {
  return finding({ id: 'sensing', source: 'common practice', ...draft })
}
