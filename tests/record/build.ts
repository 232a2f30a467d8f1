import type { Fact, FactDraft } from '../../src/record/facts.ts'
import { foldSurvey } from '../../src/record/fold.ts'
import { allFacts, appendDrafts, emptyLog, type FactLog, mergeFacts } from '../../src/record/log.ts'
import { addReading, addSegment, addWalk, addZone, nameVenue } from '../../src/record/operations/index.ts'
import type { Reading, Segment } from '../../src/record/survey.ts'

/** A phone in a test: its log, its own clock, and the person who holds it. */
export interface Phone {
  log: FactLog
  person: string
  tick: number
}

export function phone(device: string, person = device): Phone {
  return { log: emptyLog('venue-1', device), person, tick: 0 }
}

/** Does one named operation on a phone, as the app does: drafts from the log as it stands, then stamped. */
export function act(on: Phone, operation: (log: FactLog) => FactDraft[]): Fact[] {
  const second = String(on.tick++ % 60).padStart(2, '0')
  const minute = String(Math.floor(on.tick / 60) % 60).padStart(2, '0')
  const stamp = { device: on.log.device, clock: `2026-03-01T10:${minute}:${second}.000Z`, person: on.person }
  return appendDrafts(on.log, operation(on.log), stamp)
}

/** A tape reading of one metre unless told otherwise. */
export function tape(id: string, value = 1, more: Partial<Reading> = {}): Reading {
  return { id, raw: `${value} m`, value, bound: 'exact', instrument: 'tape', ...more }
}

/** A venue with one walk `w`, a zone `z`, and segments `s1`, `s2`. */
export function smallVenue(device = 'a', person = 'Ada'): Phone {
  const one = phone(device, person)
  act(one, (log) => nameVenue(log, { name: 'Harbour Hall' }))
  act(one, (log) => addZone(log, { id: 'z', name: 'Foyer', outdoors: false }))
  act(one, (log) => addWalk(log, { id: 'w', name: 'Door to desk' }))
  act(one, (log) => addSegment(log, 'w', { id: 's1', name: 'Foyer', zone: 'z', ledBy: 'robot' }))
  act(one, (log) => addSegment(log, 'w', { id: 's2', name: 'Corridor', zone: 'z', ledBy: 'robot' }))
  act(one, (log) => addReading(log, 's1', 'length', tape('s1-length', 12)))
  return one
}

/** Another phone that has everything the first one has. */
export function copyOf(one: Phone, device: string, person: string): Phone {
  const other = phone(device, person)
  mergeFacts(other.log, allFacts(one.log))
  return { ...other, tick: one.tick }
}

/** Each phone takes in what the others have. */
export function exchange(...phones: Phone[]): void {
  const facts = phones.map((one) => allFacts(one.log))
  for (const one of phones) {
    const { refused } = mergeFacts(one.log, facts.flat())
    if (refused.length > 0) throw new Error(JSON.stringify(refused[0]))
  }
}

/** The segments of the first walk as the phone shows them. */
export function segmentsOf(one: Phone): Segment[] {
  return foldSurvey(one.log).view.walks[0]?.segments ?? []
}
