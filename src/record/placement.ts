import { compareOrder, type OrderKey, readOrderKey } from './order.ts'

/** The entity that stands for the venue itself. */
export const root = '@venue'

/** Where an entity stands: in which list of which parent, and where in it. Kept in its field `in`. */
export interface Placement {
  parent: string
  /** 'walks', 'segments', 'features', 'turn', 'readings/width' ... */
  list: string
  order: OrderKey
}

/** Every entity's placement, and each parent's lists in order. */
export interface Places {
  readonly of: Map<string, Placement>
  readonly lists: Map<string, Map<string, Siblings>>
}

interface Siblings {
  readonly ids: Set<string>
  /** Null until somebody asks for the order again. */
  sorted: readonly string[] | null
}

export function emptyPlaces(): Places {
  return { of: new Map(), lists: new Map() }
}

/** The placement kept in a fact, or null where it cannot be read. */
export function readPlacement(value: unknown): Placement | null {
  if (typeof value !== 'object' || value === null) return null
  const { parent, list, order } = value as Record<string, unknown>
  const key = readOrderKey(order)
  return typeof parent === 'string' && typeof list === 'string' && key ? { parent, list, order: key } : null
}

/** Puts the entity where `placement` says (null: nowhere) and takes it from where it was. */
export function place(places: Places, entity: string, placement: Placement | null): void {
  const before = places.of.get(entity)
  if (before) {
    const siblings = siblingsOf(places, before)
    siblings.ids.delete(entity)
    siblings.sorted = null
  }
  if (!placement) {
    places.of.delete(entity)
    return
  }
  places.of.set(entity, placement)
  const siblings = siblingsOf(places, placement)
  siblings.ids.add(entity)
  const last = siblings.sorted?.at(-1)
  // Nearly every entity comes last: then the order stands, one longer.
  if (siblings.sorted && last !== undefined && compareOrder(orderOf(places, last), placement.order) < 0)
    siblings.sorted = [...siblings.sorted, entity]
  else siblings.sorted = null
}

/** Ids in one list of a parent, in order, removed ones among them. */
export function childrenOf(places: Places, parent: string, list: string): readonly string[] {
  const siblings = places.lists.get(parent)?.get(list)
  if (!siblings) return []
  siblings.sorted ??= [...siblings.ids].sort((a, b) => {
    return compareOrder(orderOf(places, a), orderOf(places, b)) || (a < b ? -1 : 1)
  })
  return siblings.sorted
}

/** Names of a parent's lists, sorted. */
export function listsOf(places: Places, parent: string): string[] {
  return [...(places.lists.get(parent)?.keys() ?? [])].sort()
}

function orderOf(places: Places, entity: string): OrderKey {
  return (places.of.get(entity) as Placement).order
}

function siblingsOf(places: Places, { parent, list }: Placement): Siblings {
  const lists = places.lists.get(parent) ?? new Map<string, Siblings>()
  places.lists.set(parent, lists)
  const siblings = lists.get(list) ?? { ids: new Set<string>(), sorted: null }
  lists.set(list, siblings)
  return siblings
}
