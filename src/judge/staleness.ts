import { kind } from '../catalogue/kinds.ts'
import type { Item } from '../record/answers.ts'
import type { Gap } from './gap.ts'
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
  const look = (time: string | undefined, days: number, text: string, harm: Gap['harm'], readings: string[] = []) => {
    if (time === undefined || daysBetween(time.slice(0, 10), setting.on) <= days) return
    found.push({
      kind: 'stale',
      text: `${text} is of ${time.slice(0, 10)}: too long ago.`,
      readings,
      blocks: true,
      ...(harm ? { harm } : {}),
    })
  }
  for (const [item, answer] of Object.entries(segment.words)) {
    const days = itemDays[item as Item]
    if (days !== undefined) look(answer.time, days, `${segment.name}: ${item}`, 'fall')
  }
  // A floor found wet was wet that day; what dries is judged dry with its condition, so only width and levels age here.
  for (const [quantity, readings] of Object.entries(segment.readings))
    for (const one of readings) look(one.time, structureDays, `${segment.name}: ${quantity}`, 'trap', [one.id])
  for (const feature of featuresOf(site)) {
    const row = kind(feature.kind)
    if (!row) continue
    const name = nameOf(feature)
    for (const [attribute, answer] of Object.entries(feature.words))
      look(answer.time, row.staleDays, `${name}: ${attribute}`, row.harm)
    for (const [attribute, readings] of Object.entries(feature.readings))
      for (const one of readings) look(one.time, row.staleDays, `${name}: ${attribute}`, row.harm, [one.id])
  }
  if (!led || !zone) return found
  for (const one of zone.observations)
    for (const item of ['crowd', 'noise']) look(one.words[item]?.time, peopleDays, `${zone.name}: ${item}`, 'road')
  return found
}

/** Whole days from one ISO date to another. */
export function daysBetween(from: string, to: string): number {
  return Math.round((dayNumber(to) - dayNumber(from)) / 86_400_000)
}

function dayNumber(iso: string): number {
  const [year = 0, month = 1, day = 1] = iso.split('-').map(Number)
  return Date.UTC(year, month - 1, day)
}
