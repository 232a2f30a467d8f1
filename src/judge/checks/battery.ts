import { kind } from '../../catalogue/kinds.ts'
import type { Walk } from '../../record/survey.ts'
import { type Finding, finding, ratioOf, stateOf } from '../finding.ts'
import { read, type Setting } from '../setting.ts'

/** Seconds a pause, a door and a lift take; common practice, no source. */
const pauseSeconds = 10
const doorSeconds = 20
const liftSeconds = 90
/** Reserve on what is needed, and the part of the rated time that is counted on. */
const reserve = 1.3
const counted = 0.7
/** A segment whose length nobody measured counts as the longest there is. */
const longest = 25
/** Pace of a part that somebody else leads. */
const ledPace = 0.455

/** Walking, pauses and doors, with a reserve, for 70 % of the rated minutes. Common practice. */
export function battery(setting: Setting, walk: Walk, pace: number | null, pauses: number): Finding {
  const lengths = walk.segments.map((one) => ({ one, length: read(setting, one, 'length', 'high') }))
  let low = 0
  let high = 0
  for (const { one, length } of lengths) {
    const speed = one.ledBy === 'robot' && pace ? pace : ledPace
    low += Math.max(0, length?.low ?? longest) / speed
    high += Math.min(Number.MAX_SAFE_INTEGER, length?.high ?? longest) / speed
  }
  const features = walk.segments.flatMap((one) => one.features)
  const doors = features.filter((one) => kind(one.kind)?.aspect === 'door' && one.kind !== 'lift').length
  const lifts = features.filter((one) => one.kind === 'lift').length
  const stops = pauses * pauseSeconds + doors * doorSeconds + lifts * liftSeconds
  const demand = { low: (low + stops) * reserve, high: (high + stops) * reserve }
  const capacity = setting.team.card.robot.batteryMinutes * 60 * counted
  const ratio = ratioOf(demand, { low: capacity, high: capacity })
  const raw = stateOf(ratio)
  return finding({
    id: 'battery',
    feature: walk.id,
    subject: `Battery on ${walk.name}`,
    detail: () => `${Math.ceil(demand.high / 60)} min with reserve for ${Math.floor(capacity / 60)} min`,
    harm: 'comfort',
    source: 'common practice',
    raw,
    demand: demand.high,
    capacity,
    ratio,
    caution: raw === 'passes' ? null : 'The battery is just enough. Turn back where the sheet says so.',
    from: lengths.map(({ length }) => length),
  })
}
