import { type Fact, type FactId, factId } from './facts.ts'

/** All facts of one field of one entity, and which of them nobody has replaced. */
export interface Slot {
  readonly facts: Fact[]
  readonly replaced: Set<FactId>
  /** Worked out when it is asked for: a field that a thousand facts are added to is sorted once. */
  heads: readonly Fact[] | null
}

export function emptySlot(): Slot {
  return { facts: [], replaced: new Set(), heads: null }
}

/** Adds a fact, whether those it replaces have arrived or not. A fact cannot replace itself. */
export function addToSlot(slot: Slot, fact: Fact): void {
  const own = factId(fact)
  slot.facts.push(fact)
  for (const id of fact.replaces) if (id !== own) slot.replaced.add(id)
  slot.heads = null
}

/** The facts nobody has replaced, by clock, device, number, so that every phone shows rivals in the same order. */
export function headsIn(slot: Slot): readonly Fact[] {
  if (slot.heads) return slot.heads
  const heads =
    slot.replaced.size === 0 ? slot.facts.slice() : slot.facts.filter((one) => !slot.replaced.has(factId(one)))
  // Facts that replace one another in a ring can only be forged: keep them all as rivals, lose none.
  slot.heads = (heads.length > 0 ? heads : slot.facts.slice()).sort(compareFacts)
  return slot.heads
}

export function compareFacts(a: Fact, b: Fact): number {
  if (a.clock !== b.clock) return a.clock < b.clock ? -1 : 1
  if (a.device !== b.device) return a.device < b.device ? -1 : 1
  return a.n - b.n
}
