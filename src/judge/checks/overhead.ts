import { kind } from '../../catalogue/kinds.ts'
import type { Interval } from '../../record/interval.ts'
import type { Feature } from '../../record/survey.ts'
import { limit } from '../../standards/packs.ts'
import { epsilon, type Finding, finding, ratioOf } from '../finding.ts'
import type { HelpState } from '../help.ts'
import { read } from '../setting.ts'
import { helpAt, helpLedOtherwise, nameOf, type Site } from '../site.ts'
import { mmNeeded, mmThere } from '../words.ts'

/** Room over the strike height below which a head may still be hit; the band of a door head is half of it. */
const room = 0.1
const doorBand = 0.05

/**
 * The lowest point over the handler's line against what this handler strikes. Under the strike height it fails; within
 * 0.10 m above it (a door head 0.05 m), or under the pack's headroom at the reading itself, a caution.
 */
export function overhead(site: Site): Finding[] {
  const { setting, segment } = site
  const found: Finding[] = []
  const swept = read(setting, segment, 'overhead', 'low')
  // A part led otherwise has its guide's warning; on a robot-led one nothing settles what strikes a head.
  const help = site.led ? undefined : helpAt(site)
  if (swept) found.push(judged(site, segment.id, `Overhead on ${segment.name}`, swept, false, help))
  for (const feature of segment.features) {
    if (!kind(feature.kind)?.feeds.includes('overhead')) continue
    const lowest = read(setting, feature, lowestOf(feature), 'low')
    if (!lowest) continue
    const head = lowestOf(feature) === 'headHeight' && feature.kind !== 'narrowing'
    found.push(
      judged(site, feature.id, `Overhead at ${nameOf(feature)}`, lowest, head, helpLedOtherwise(site, feature)),
    )
  }
  return found
}

function lowestOf(feature: Feature): string {
  return kind(feature.kind)?.aspect === 'overhead' ? 'lowest' : 'headHeight'
}

function judged(
  { setting }: Site,
  feature: string,
  subject: string,
  lowest: Interval,
  doorHead: boolean,
  help: HelpState | undefined,
): Finding {
  const { strike } = setting.team
  const headroom = limit(setting.pack, 'headroom')
  const under = !doorHead && lowest.value < headroom.value - epsilon
  const raw =
    lowest.high < strike - epsilon
      ? 'fails'
      : lowest.low < strike - epsilon
        ? 'unsure'
        : lowest.low < strike + (doorHead ? doorBand : room) - epsilon || under
          ? 'tight'
          : 'passes'
  const left = { low: room + lowest.low - strike, high: room + lowest.high - strike }
  return finding({
    id: 'overhead',
    feature,
    subject,
    detail: () => `${mmThere(lowest.low)} for ${mmNeeded(strike)} at which a head strikes`,
    harm: 'head',
    source: under ? headroom.clause : 'common practice',
    raw,
    demand: room,
    capacity: left.low,
    ratio: ratioOf({ low: room, high: room }, left),
    caution: raw === 'passes' ? null : 'Low overhead. Slow, forearm up before your face.',
    from: [lowest],
    strict: true,
    ...(help ? { help } : {}),
  })
}
