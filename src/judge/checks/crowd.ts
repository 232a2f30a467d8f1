import { type Finding, finding, ratioOf, stateOf } from '../finding.ts'
import { helpAt, type Site } from '../site.ts'
import { mmNeeded, mmThere } from '../words.ts'

/** One oncoming person. */
const oncoming = 0.9

/**
 * The crowd of the hour. From band 2 a caution and, where the flow is two-way, the width for one oncoming person;
 * band 3 only with help. Common practice.
 */
export function crowd(site: Site): Finding[] {
  const { around, segment, setting, width } = site
  if (!site.led || around.crowd === null || around.crowd < 2) return []
  const demand = setting.team.envelope + 2 * setting.team.card.leash.clearanceStraight + oncoming
  const ratio = around.twoWay && width ? ratioOf({ low: demand, high: demand }, width) : null
  const state = ratio === null ? 'tight' : stateOf(ratio)
  const raw = state === 'passes' ? 'tight' : state
  const caution = 'People may cross the leash. Slow.'
  const found = [
    finding({
      id: 'crowd',
      feature: segment.id,
      subject: `Crowd on ${segment.name}`,
      detail: () =>
        ratio && width
          ? `${mmThere(width.low)} for ${mmNeeded(demand)} with one oncoming person`
          : 'people may cross the leash',
      harm: 'road',
      source: 'common practice',
      raw,
      demand: ratio ? demand : null,
      capacity: ratio && width ? width.low : null,
      ratio,
      caution,
      from: ratio ? [width] : [],
      help: helpAt(site),
    }),
  ]
  if (around.crowd === 3)
    found.push(
      finding({
        id: 'crowd',
        feature: segment.id,
        subject: `Crowd on ${segment.name}`,
        detail: () => 'packed at these hours',
        harm: 'road',
        source: 'common practice',
        raw: 'needs-help',
        caution,
        help: helpAt(site),
      }),
    )
  return found
}
