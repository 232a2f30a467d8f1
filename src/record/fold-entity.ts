import * as v from 'valibot'
import { type Fact, factId } from './facts.ts'
import { foldAnswer, signed } from './fold-answer.ts'
import { canonical, isReservedKey } from './json.ts'
import { type FactLog, headsOf } from './log.ts'
import { childrenOf, listsOf, root } from './placement.ts'
import { presenceOf } from './presence.ts'
import { keyOfField, requiredKeys, rootShape, type Shape, shapeOf } from './shapes.ts'
import { compareFacts, headsIn } from './slot.ts'
import {
  type Answer,
  type Conflict,
  reading as readingSchema,
  type SetAside,
  type StateMark,
  stateMark,
  states,
} from './survey.ts'

export interface Issues {
  conflicts: Conflict[]
  setAside: SetAside[]
}

export interface Folded {
  /** The view's object; null where the entity is removed or cannot be shown. */
  node: object | null
  issues: Issues | null
}

type Node = Record<string, unknown>

/** Builds one entity's part of the view; `fold` gives those of its children. */
export function foldEntity(log: FactLog, entity: string, fold: (child: string) => Folded): Folded {
  const issues: Issues = { conflicts: [], setAside: [] }
  const list = log.places.of.get(entity)?.list ?? ''
  const shape: Shape | undefined = entity === root ? rootShape : shapeOf(list)
  const aside = (field: string, expected: string, found: string) =>
    issues.setAside.push({ entity, field, expected, found })
  const done = (node: object | null): Folded => ({
    node,
    issues: issues.conflicts.length + issues.setAside.length > 0 ? issues : null,
  })
  if (!shape) {
    aside('in', 'a list of the view', list)
    return done(null)
  }
  const presence = entity === root ? 'present' : presenceOf(log, entity)
  if (presence === 'removed') return done(null)
  if (presence === 'removed-and-edited') issues.conflicts.push(conflict(entity, 'gone', headsOf(log, entity, 'gone')))
  const node = shape.whole
    ? foldWhole(log, entity, shape, issues, aside)
    : foldFields(log, entity, shape, issues, aside)
  if (!node) return done(null)
  if (shape.photos) addPhotos(log, entity, node)
  if (shape.words) node.words = foldWords(log, entity, issues, aside)
  if (shape.states) node.states = foldStates(log, entity, aside)
  if (shape.readings) node.readings = foldReadings(log, entity, fold)
  for (const name of shape.lists ?? []) node[name] = nodesOf(log, entity, name, fold)
  for (const name of shape.sparse ?? []) {
    const nodes = nodesOf(log, entity, name, fold)
    if (nodes.length > 0) node[name] = nodes
  }
  for (const name of shape.single ?? []) {
    const ids = childrenOf(log.places, entity, name).filter((id) => fold(id).node)
    const first = ids[0]
    if (first === undefined) continue
    node[name] = fold(first).node
    if (ids.length > 1)
      issues.conflicts.push({
        ...conflict(
          entity,
          name,
          ids.flatMap((id) => headsOf(log, id, 'in')),
        ),
        field: name,
      })
  }
  return done(node)
}

type Aside = (field: string, expected: string, found: string) => void

function foldFields(log: FactLog, entity: string, shape: Shape, issues: Issues, aside: Aside): Node | null {
  const { entries } = shape.schema
  const node: Node = { ...(entity === root ? {} : { id: entity }), ...shape.defaults }
  for (const [field, slot] of log.entities.get(entity) ?? []) {
    const distinct = withoutEchoes(headsIn(slot))
    if (field === 'in' && distinct.length > 1) issues.conflicts.push(conflict(entity, field, distinct))
    const key = keyOfField(field)
    const value = distinct[0]?.value
    if (key === null || key === 'id' || isReservedKey(key)) continue
    if (distinct.length > 1) issues.conflicts.push(conflict(entity, field, distinct))
    const schema = Object.hasOwn(entries, key) ? entries[key] : undefined
    if (!schema) {
      node[key] = value
    } else if (value !== null) {
      const read = v.safeParse(schema, value)
      if (read.success) node[key] = value
      else aside(field, read.issues[0].expected ?? key, read.issues[0].received)
    }
  }
  const absent = requiredKeys(shape).find((key) => node[key] === undefined)
  if (absent === undefined) return node
  aside(absent, absent, 'nothing yet')
  return null
}

/** A reading or an override: written once, whole; fields beside it add to it. */
function foldWhole(log: FactLog, entity: string, shape: Shape, issues: Issues, aside: Aside): Node | null {
  const field = shape.whole as string
  const slots = log.entities.get(entity)
  // No fact takes another's place here: a second one under the same id is told, never dropped.
  const written = withoutEchoes([...(slots?.get(field)?.facts ?? [])].sort(compareFacts))
  const fact = written[0]
  if (!fact) {
    aside(field, field, 'nothing yet')
    return null
  }
  if (written.length > 1) issues.conflicts.push(conflict(entity, field, written))
  const value = fact.value as object
  const node: Node = { ...(shape.schema === readingSchema ? signed(value, fact) : value), id: entity }
  for (const [name, slot] of slots ?? []) {
    const key = keyOfField(name)
    const value = headsIn(slot)[0]?.value ?? null
    if (key === null || value === null || isReservedKey(key)) continue
    // What was read stays as it was read.
    if (!Object.hasOwn(node, key) || key === 'safeSide' || key === 'place') node[key] = value
  }
  const read = v.safeParse(shape.schema as unknown as v.GenericSchema, node)
  if (read.success) return node
  const issue = read.issues[0]
  aside(`${field}/${v.getDotPath(issue) ?? ''}`, issue.expected ?? field, issue.received)
  return null
}

function foldWords(log: FactLog, entity: string, issues: Issues, aside: Aside): Node {
  const words: Node = {}
  for (const field of fieldsUnder(log, entity, 'word/')) {
    const heads = headsOf(log, entity, field)
    const { answer, refused } = foldAnswer(heads)
    if (refused) aside(field, refused.expected, refused.found)
    if (answer) words[field.slice(5)] = answer
    if ((answer as Answer | null)?.rivals) issues.conflicts.push(conflict(entity, field, heads))
  }
  return words
}

function foldStates(log: FactLog, entity: string, aside: Aside): StateMark[] {
  const marks: StateMark[] = []
  for (const field of fieldsUnder(log, entity, 'state/'))
    for (const head of headsOf(log, entity, field)) {
      if (head.value === null) continue
      const read = v.safeParse(stateMark, head.value)
      if (read.success) marks.push(head.value as StateMark)
      else aside(field, read.issues[0].expected ?? 'a state', read.issues[0].received)
    }
  const rank = (mark: StateMark) => states.indexOf(mark.state)
  return marks.sort((a, b) => (a.date < b.date ? -1 : a.date > b.date ? 1 : rank(a) - rank(b)))
}

function foldReadings(log: FactLog, entity: string, fold: (child: string) => Folded): Node {
  const readings: Node = {}
  for (const list of listsOf(log.places, entity)) {
    const quantity = list.startsWith('readings/') ? list.slice(9) : ''
    if (quantity === '' || isReservedKey(quantity)) continue
    const nodes = nodesOf(log, entity, list, fold)
    if (nodes.length > 0) readings[quantity] = nodes
  }
  return readings
}

function addPhotos(log: FactLog, entity: string, node: Node): void {
  const added = fieldsUnder(log, entity, 'photo/').filter((field) => headsOf(log, entity, field)[0]?.value === true)
  const photos = [...((node.photos as string[] | undefined) ?? []), ...added.map((field) => field.slice(6))]
  if (photos.length > 0) node.photos = [...new Set(photos)]
}

function nodesOf(log: FactLog, parent: string, list: string, fold: (child: string) => Folded): object[] {
  return childrenOf(log.places, parent, list)
    .map((id) => fold(id).node)
    .filter((node) => node !== null)
}

/** Names of the entity's fields with a prefix, sorted, those that no object can carry left out. */
function fieldsUnder(log: FactLog, entity: string, prefix: string): string[] {
  const fields: string[] = []
  for (const field of log.entities.get(entity)?.keys() ?? [])
    if (field.startsWith(prefix) && !isReservedKey(field.slice(prefix.length))) fields.push(field)
  return fields.length > 1 ? fields.sort() : fields
}

/** Heads that say the same are one version. */
function withoutEchoes(heads: readonly Fact[]): readonly Fact[] {
  if (heads.length < 2) return heads
  const said = new Set<string>()
  return heads.filter(({ value }) => {
    const text = canonical(value)
    return !said.has(text) && said.add(text)
  })
}

function conflict(entity: string, field: string, heads: readonly Fact[]): Conflict {
  return {
    entity,
    field,
    versions: heads.map((fact) => ({
      fact: factId(fact),
      value: fact.value,
      ...(fact.person === undefined ? {} : { person: fact.person }),
      clock: fact.clock,
    })),
  }
}
