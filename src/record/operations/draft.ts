import type { FactDraft } from '../facts.ts'
import { factId } from '../facts.ts'
import { type FactLog, headsOf } from '../log.ts'
import { orderBetween } from '../order.ts'
import { childrenOf, type Placement } from '../placement.ts'
import { fieldOfKey } from '../shapes.ts'

/** Sets a field in place of every head it has now. */
export function set(log: FactLog, entity: string, field: string, value: unknown): FactDraft {
  return { entity, field, value, replaces: headsOf(log, entity, field).map(factId) }
}

/** Sets a plain field of the view; undefined clears it. */
export function setKey(log: FactLog, entity: string, key: string, value: unknown): FactDraft {
  return set(log, entity, fieldOfKey(key), value === undefined ? null : value)
}

/** Plain fields of the view, those that are given. */
export function setKeys(log: FactLog, entity: string, fields: object): FactDraft[] {
  return Object.entries(fields)
    .filter(([, value]) => value !== undefined)
    .map(([key, value]) => setKey(log, entity, key, value))
}

/**
 * A new entity at the end of a list, or behind `after` (null: first). The id is the caller's and must be new.
 * Several entities made from the same state of the log stand in the order of their ids.
 */
export function create(
  log: FactLog,
  id: string,
  parent: string,
  list: string,
  fields: object,
  after?: string | null,
): FactDraft[] {
  if (log.entities.get(id)?.has('in')) throw new Error(`record/id-taken: ${id}`)
  return [
    { entity: id, field: 'in', value: placementIn(log, parent, list, after), replaces: [] },
    ...setKeys(log, id, fields),
  ]
}

/** Puts an entity that is there into a list, behind `after` (null: first). */
export function moveBehind(log: FactLog, id: string, parent: string, list: string, after: string | null): FactDraft {
  return set(log, id, 'in', placementIn(log, parent, list, after, id))
}

/** Puts entities, in their order, at the end of another list. */
export function moveAll(log: FactLog, ids: readonly string[], parent: string, list: string): FactDraft[] {
  let { order } = placementIn(log, parent, list)
  return ids.map((id, i) => {
    if (i > 0) order = orderBetween(order, null, log.device)
    return set(log, id, 'in', { parent, list, order })
  })
}

function placementIn(log: FactLog, parent: string, list: string, after?: string | null, moving?: string): Placement {
  // Removed neighbours count: they may come back.
  const siblings = childrenOf(log.places, parent, list).filter((id) => id !== moving)
  const index = after === undefined ? siblings.length : after === null ? 0 : siblings.indexOf(after) + 1
  if (after && index === 0) throw new Error(`record/no-such-entity: ${after} in ${list} of ${parent}`)
  const orderOf = (id: string | undefined) => (id === undefined ? null : (log.places.of.get(id)?.order ?? null))
  return { parent, list, order: orderBetween(orderOf(siblings[index - 1]), orderOf(siblings[index]), log.device) }
}
