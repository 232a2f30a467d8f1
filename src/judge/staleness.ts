import { kind } from '../catalogue/kinds.ts'
import type { Item } from '../record/answers.ts'
import type { Gap } from './gap.ts'
import type { Harm } from './result.ts'
import { featuresOf, nameOf, type Site } from './site.ts'

/** Days after which an answer in words no longer holds; levels and structure a year, doors, mats and planting half. */
const itemDays: Readonly<Record<Item, number>> = {
  overhead: 180,
  step: 365,
  edge: 365,
  finish: 180,
  wetness: 365,
  slots: 365,
  door: 180,
  sensing: 180,
  shoreline: 365,
  'end-sign': 180,
}
const structureDays = 365
/** Crowd, noise and their hours. */
const peopleDays = 60

/** What was seen too long ago to hold on the day judged for. A time in the future counts as today's. */
export function stale(site: Site): Gap[] {
  const { segment, setting, zone, led } = site
  const found: Gap[] = []
  const look = (time: string | undefined, days: number, what: () => string, harm: Harm, readings: string[] = []) => {
    if (time === undefined || time.slice(0, 10) >= firstFresh(setting.on, days)) return
    const text = `${what()} is of ${time.slice(0, 10)}: too long ago.`
    found.push({ kind: 'stale', text, readings, harm, blocks: true })
  }
  // A floor found wet was wet that day: it is judged dry too, with its condition, so only what lasts ages here.
  for (const item of Object.keys(segment.words)) {
    const days = itemDays[item as Item]
    if (days !== undefined) look(segment.words[item]?.time, days, () => `${segment.name}: ${item}`, 'fall')
  }
  for (const quantity of Object.keys(segment.readings))
    for (const one of segment.readings[quantity] ?? [])
      look(one.time, structureDays, () => `${segment.name}: ${quantity}`, 'trap', [one.id])
  for (const feature of featuresOf(site)) {
    const row = kind(feature.kind)
    if (!row) continue
    const what = (attribute: string) => () => `${nameOf(feature)}: ${attribute}`
    for (const [attribute, answer] of Object.entries(feature.words))
      look(answer.time, row.staleDays, what(attribute), row.harm)
    for (const [attribute, readings] of Object.entries(feature.readings))
      for (const one of readings) look(one.time, row.staleDays, what(attribute), row.harm, [one.id])
  }
  if (!led || !zone) return found
  for (const one of site.around.seen) {
    for (const item of ['crowd', 'noise', 'flow'])
      look(one.words[item]?.time, peopleDays, () => `${zone.name}: ${item}`, 'road')
    for (const meter of one.readings.noise ?? [])
      look(meter.time, peopleDays, () => `${zone.name}: noise`, 'comfort', [meter.id])
  }
  return found
}

const known = new Map<string, string>()

/** The first ISO date that is no more than `days` before `on`. */
function firstFresh(on: string, days: number): string {
  const key = `${on} ${days}`
  const before = known.get(key)
  if (before !== undefined) return before
  const [year = 0, month = 1, day = 1] = on.split('-').map(Number)
  const first = new Date(Date.UTC(year, month - 1, day - days)).toISOString().slice(0, 10)
  known.set(key, first)
  return first
}
