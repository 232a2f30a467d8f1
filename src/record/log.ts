import * as v from 'valibot'
import { type Fact, type FactDraft, type FactId, factId } from './facts.ts'
import { jsonFault, sameJson } from './json.ts'
import { emptyPlaces, type Places, place, readPlacement } from './placement.ts'
import { addToSlot, emptySlot, headsIn, type Slot } from './slot.ts'

/**
 * The facts of one survey in memory. It grows in place and forgets nothing; a view folded from it never changes.
 * Change it through `appendDrafts` and `mergeFacts` alone.
 */
export interface FactLog {
  readonly survey: string
  /** The device that writes here: keeps its own run of a list together. */
  device: string
  /** Facts of each device, number n at index n - 1. */
  readonly devices: Map<string, Fact[]>
  /** Entity, then field. */
  readonly entities: Map<string, Map<string, Slot>>
  readonly places: Places
  /** Entities whose view is out of date; the fold empties it. */
  readonly touched: Set<string>
}

/** What the writer of facts adds to a draft. `clock`: ISO time. */
export interface Stamp {
  device: string
  clock: string
  person?: string
}

export interface Refused {
  fact: unknown
  why: 'malformed' | 'other-survey' | 'gap' | 'fork'
  /** Where in the fact. */
  path: string
  expected: string
  found: string
  whatToDo: string
}

export interface Merged {
  /** Facts that were new here, in the order they were taken in. */
  added: Fact[]
  refused: Refused[]
}

const short = v.pipe(v.string(), v.minLength(1), v.maxLength(400))

/** One fact as it comes from outside. Its value is checked apart, by `jsonFault`. */
export const factSchema = v.looseObject({
  survey: short,
  device: short,
  n: v.pipe(v.number(), v.safeInteger(), v.minValue(1)),
  clock: v.pipe(
    v.string(),
    v.maxLength(40),
    v.regex(/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}/, 'a time like 2026-11-30T10:15:00Z'),
  ),
  person: v.exactOptional(v.pipe(v.string(), v.maxLength(400))),
  entity: short,
  field: short,
  value: v.unknown(),
  replaces: v.array(short),
})

export function emptyLog(survey: string, device = 'here'): FactLog {
  return { survey, device, devices: new Map(), entities: new Map(), places: emptyPlaces(), touched: new Set() }
}

/**
 * Stamps the drafts with the device's next numbers and takes them in; returns the facts. For a log that no store
 * stands behind: with a store, its `append` hands out the numbers and `mergeFacts` takes the facts in.
 * A draft that is no JSON (NaN, undefined) breaks a promise: throws, and nothing is taken in.
 */
export function appendDrafts(log: FactLog, drafts: readonly FactDraft[], stamp: Stamp): Fact[] {
  assertDrafts(drafts)
  log.device = stamp.device
  let n = log.devices.get(stamp.device)?.length ?? 0
  const facts = drafts.map((draft) => stampDraft(log.survey, draft, stamp, ++n))
  for (const fact of facts) take(log, fact)
  placeAnew(log, facts)
  return facts
}

export function stampDraft(survey: string, draft: FactDraft, stamp: Stamp, n: number): Fact {
  const { entity, field, value, replaces } = draft
  const { device, clock, person } = stamp
  return { survey, device, n, clock, ...(person === undefined ? {} : { person }), entity, field, value, replaces }
}

/** Throws where a draft's value is no JSON: what the record cannot keep must not look saved. */
export function assertDrafts(drafts: readonly FactDraft[]): void {
  for (const draft of drafts) {
    const fault = jsonFault(draft.value)
    if (fault)
      throw new Error(`record/no-json: ${draft.field} ${fault.path}: expected ${fault.expected}, found ${fault.found}`)
  }
}

/**
 * Takes in facts from elsewhere, in any order, as often as they come. A gap in a device's numbers, another content under
 * a number already here, or a malformed fact is refused as a value; the others are taken.
 */
export function mergeFacts(log: FactLog, facts: readonly unknown[]): Merged {
  const merged: Merged = { added: [], refused: [] }
  const readable: Fact[] = []
  for (const fact of facts) {
    const refusal = malformedFact(log.survey, fact)
    if (refusal) merged.refused.push(refusal)
    else readable.push(fact as Fact)
  }
  return takeInOrder(log, readable, merged)
}

/** As `mergeFacts`, for facts that went through its gate before: what this phone's own store kept. */
export function loadFacts(log: FactLog, facts: readonly Fact[]): Merged {
  return takeInOrder(log, [...facts], { added: [], refused: [] })
}

function takeInOrder(log: FactLog, facts: Fact[], merged: Merged): Merged {
  facts.sort((a, b) => (a.device === b.device ? a.n - b.n : a.device < b.device ? -1 : 1))
  for (const fact of facts) {
    const known = log.devices.get(fact.device) ?? []
    const same = known[fact.n - 1]
    if (same) {
      if (!sameJson(same, fact)) merged.refused.push(forked(fact, same))
    } else if (fact.n > known.length + 1) {
      merged.refused.push(gapped(fact, known.length + 1))
    } else {
      take(log, fact)
      merged.added.push(fact)
    }
  }
  placeAnew(log, merged.added)
  return merged
}

/** Facts of one field that nobody has replaced: none, one, or rivals. */
export function headsOf(log: FactLog, entity: string, field: string): readonly Fact[] {
  const slot = log.entities.get(entity)?.get(field)
  return slot ? headsIn(slot) : []
}

/** The value of a field, the first of its rivals where there are several; undefined where nobody gave one. */
export function currentValue(log: FactLog, entity: string, field: string): unknown {
  return headsOf(log, entity, field)[0]?.value
}

/** The fact of that id, or undefined. */
export function factOf(log: FactLog, id: FactId): Fact | undefined {
  const cut = id.lastIndexOf(':')
  return log.devices.get(id.slice(0, cut))?.[Number(id.slice(cut + 1)) - 1]
}

/** Every fact here, by device and number. */
export function allFacts(log: FactLog): Fact[] {
  return [...log.devices.keys()].sort().flatMap((device) => log.devices.get(device) as Fact[])
}

/** How far this log has seen each device: pairs of device and its highest number. */
export function seenBy(log: FactLog): [device: string, n: number][] {
  return [...log.devices].map(([device, facts]): [string, number] => [device, facts.length]).sort()
}

function take(log: FactLog, fact: Fact): void {
  const facts = log.devices.get(fact.device)
  if (facts) facts.push(fact)
  else log.devices.set(fact.device, [fact])
  const slots = log.entities.get(fact.entity) ?? new Map<string, Slot>()
  log.entities.set(fact.entity, slots)
  const slot = slots.get(fact.field) ?? emptySlot()
  slots.set(fact.field, slot)
  addToSlot(slot, fact)
  log.touched.add(fact.entity)
}

/** Puts the entities that new facts have placed where those say. */
function placeAnew(log: FactLog, facts: readonly Fact[]): void {
  const moved = new Set(facts.filter((fact) => fact.field === 'in').map((fact) => fact.entity))
  for (const entity of moved) {
    const before = log.places.of.get(entity)
    if (before) log.touched.add(before.parent)
    const placements = headsOf(log, entity, 'in').map((head) => readPlacement(head.value))
    const placement = placements.find((one) => one !== null) ?? null
    place(log.places, entity, placement)
    if (placement) log.touched.add(placement.parent)
  }
}

/** Why a fact from outside cannot belong to `survey` whatever else is held: its shape, its survey, no JSON; null: it can. */
export function malformedFact(survey: string, fact: unknown): Refused | null {
  const whatToDo = 'Get the file or the facts again from the phone that wrote them.'
  const read = v.safeParse(factSchema, fact, { abortEarly: true })
  if (!read.success) {
    const issue = read.issues[0]
    const path = v.getDotPath(issue)?.replaceAll('.', '/') ?? ''
    return { fact, why: 'malformed', path, expected: issue.expected ?? 'a fact', found: issue.received, whatToDo }
  }
  if (read.output.survey !== survey)
    return { fact, why: 'other-survey', path: 'survey', expected: survey, found: read.output.survey, whatToDo }
  const fault = jsonFault(fact)
  return fault && { fact, why: 'malformed', ...fault, whatToDo }
}

function gapped(fact: Fact, next: number): Refused {
  return {
    fact,
    why: 'gap',
    path: 'n',
    expected: `fact ${next} of ${fact.device}`,
    found: `fact ${fact.n}`,
    whatToDo: 'Send the facts before it first; nothing after the gap was taken.',
  }
}

function forked(fact: Fact, same: Fact): Refused {
  return {
    fact,
    why: 'fork',
    path: '',
    expected: `what ${factId(fact)} says here: ${same.entity} ${same.field}`,
    found: 'other content under the same number: a copied or restored phone',
    whatToDo: 'Give the copied phone a new device id and enter again what only it holds.',
  }
}
