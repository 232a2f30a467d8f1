import { kind } from '../../catalogue/kinds.ts'
import { featuresOf } from './help.ts'
import type { Scope } from './scope.ts'

/** Days an answer holds, as the judge ages it (its `stale` gaps; a test holds the two together). */
const itemDays: Readonly<Record<string, number>> = {
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
const peopleDays = 60

interface Timed {
  time?: string
}

/** The last day on which everything dated that this walk rests on still holds. null: nothing is dated. */
export function validUntil(scope: Scope): string | null {
  const ends: string[] = []
  const add = (findings: readonly Timed[], days: number): void => {
    for (const { time } of findings) if (time) ends.push(dayAfter(time.slice(0, 10), days))
  }
  for (const segment of scope.walk.segments) {
    for (const [item, answer] of Object.entries(segment.words)) add([answer], itemDays[item] ?? structureDays)
    add(Object.values(segment.readings).flat(), structureDays)
    for (const feature of featuresOf(segment)) {
      const days = kind(feature.kind)?.staleDays ?? structureDays
      add([...Object.values(feature.words), ...Object.values(feature.readings).flat()], days)
    }
    if (segment.ledBy !== 'robot') continue
    const zone = scope.view.zones.find((one) => one.id === segment.zone)
    for (const seen of zone?.observations ?? []) {
      const { crowd, noise, flow } = seen.words
      const people = [crowd, noise, flow].filter((answer) => answer !== undefined)
      add([...people, ...(seen.readings.noise ?? [])], peopleDays)
    }
  }
  for (const { result } of scope.stretches) if (result.override) ends.push(result.override.until)
  return ends.sort()[0] ?? null
}

function dayAfter(day: string, life: number): string {
  const [year = 0, month = 1, date = 1] = day.split('-').map(Number)
  return new Date(Date.UTC(year, month - 1, date + life)).toISOString().slice(0, 10)
}
