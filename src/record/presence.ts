import type { Fact } from './facts.ts'
import { type FactLog, headsOf, seenBy } from './log.ts'
import { childrenOf, listsOf } from './placement.ts'

/**
 * A removal says how far its author had seen each device, so that an edit made elsewhere at the same time is told from one
 * made before. An edit that no removal has seen keeps the entity in view, as a conflict: nothing is lost by a removal.
 */
export interface Removal {
  gone: true
  seen: [device: string, n: number][]
}

export function removalNow(log: FactLog): Removal {
  return { gone: true, seen: seenBy(log) }
}

export type Presence = 'present' | 'removed' | 'removed-and-edited'

/** Whether the entity itself is shown; a parent's removal is asked of the parent. */
export function presenceOf(log: FactLog, entity: string): Presence {
  const heads = headsOf(log, entity, 'gone')
  const removals = heads.filter((head) => readRemoval(head.value))
  if (removals.length === 0) return 'present'
  if (removals.length < heads.length) return 'removed-and-edited'
  return removals.some((head) => sawAll(log, entity, head)) ? 'removed' : 'removed-and-edited'
}

/** Removed, and nobody has edited it since. */
export function isGone(log: FactLog, entity: string): boolean {
  return presenceOf(log, entity) === 'removed'
}

/** The facts about an entity and all that stands in it. */
export function* factsWithin(log: FactLog, entity: string, visited = new Set<string>()): Generator<Fact> {
  if (visited.has(entity)) return
  visited.add(entity)
  for (const slot of log.entities.get(entity)?.values() ?? []) yield* slot.facts
  for (const list of listsOf(log.places, entity))
    for (const child of childrenOf(log.places, entity, list)) yield* factsWithin(log, child, visited)
}

function sawAll(log: FactLog, entity: string, head: Fact): boolean {
  const seen = new Map(readRemoval(head.value)?.seen ?? null)
  // A bare `true`, without how far it had seen, hides what is there.
  if (seen.size === 0) return true
  for (const fact of factsWithin(log, entity)) {
    if (fact.field === 'gone' || fact.n <= (seen.get(fact.device) ?? 0)) continue
    // Facts before it in the same step were its author's own.
    if (fact.device === head.device && fact.clock === head.clock && fact.n < head.n) continue
    return false
  }
  return true
}

function readRemoval(value: unknown): Removal | null {
  if (value === true) return { gone: true, seen: [] }
  if (typeof value !== 'object' || value === null) return null
  const { gone, seen } = value as Record<string, unknown>
  if (gone !== true) return null
  const pairs = Array.isArray(seen) ? seen : []
  return {
    gone: true,
    seen: pairs.filter((pair): pair is [string, number] => Array.isArray(pair) && pair.length === 2),
  }
}
