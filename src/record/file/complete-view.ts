import { rootShape, type Shape, shapeOf } from '../shapes.ts'
import { defaultTeamCard } from '../team-card.ts'
import type { Problem } from './problem.ts'
import { type AttributeOf, fieldOfReading } from './reading-field.ts'
import { contradicts, valueOfRaw } from './reading-value.ts'

type Node = Record<string, unknown>

/** What is completed, and what stands in the way. The completed view still has to be validated. */
export interface Completed {
  view: Node
  problems: Problem[]
}

/**
 * Fills in what a person who writes a view by hand may leave out: empty lists and maps, ids (from the place in the
 * file, so that reading twice gives the same), values and bounds of readings (from their raw text), and the parts of
 * the team card that have a default.
 */
export function completeView(view: Node, attributeOf: AttributeOf): Completed {
  const problems: Problem[] = []
  const completed = completeNode(view, rootShape, { list: '', id: '', path: 'view' }, attributeOf, problems)
  if (isNode(view.team)) completed.team = completeTeam(view.team)
  return { view: completed, problems }
}

/** A team card with judging's defaults where it says nothing. */
export function completeTeam(card: Node): Node {
  const part = (key: 'robot' | 'handler' | 'leash') =>
    card[key] === undefined || isNode(card[key]) ? { ...defaultTeamCard[key], ...card[key] } : card[key]
  const { name, revision, date } = defaultTeamCard
  const robot = part('robot')
  if (isNode(robot) && isNode(robot.senses)) robot.senses = { ...defaultTeamCard.robot.senses, ...robot.senses }
  if (isNode(robot) && isNode(robot.friction)) robot.friction = { ...defaultTeamCard.robot.friction, ...robot.friction }
  return { name, revision, date, ...card, robot, handler: part('handler'), leash: part('leash') }
}

interface Where {
  /** The list it stands in: 'segments', 'features' ... */
  list: string
  /** Its own id. */
  id: string
  path: string
}

function completeNode(node: Node, shape: Shape, where: Where, attributeOf: AttributeOf, problems: Problem[]): Node {
  const { list, id, path } = where
  const child = (value: unknown, inList: string, index: string): unknown => {
    const childShape = shapeOf(inList)
    if (!isNode(value) || !childShape) return value
    const own = value.id ?? [id, inList, index].filter((part) => part !== '').join('/')
    const at = { list: inList, id: String(own), path: [path, inList, index].filter((part) => part !== '').join('/') }
    const filled = inList.startsWith('readings/')
      ? completeReading({ ...value, id: own }, list, node.kind, inList.slice(9), at.path, attributeOf, problems)
      : { ...value, id: own }
    return completeNode(filled, childShape, at, attributeOf, problems)
  }
  const children = (value: unknown, inList: string): unknown =>
    Array.isArray(value) ? value.map((one, i) => child(one, inList, String(i))) : value
  const full: Node = { ...node }
  // A list would pass for a map with numbers as names.
  for (const map of ['words', 'readings'])
    if (Array.isArray(full[map]))
      problems.push({
        path: `${path}/${map}`,
        expected: `${map} by name`,
        found: 'a list',
        whatToDo: 'Write an object: what is answered or measured, then its value.',
      })
  if (shape.words) full.words ??= {}
  if (shape.states) full.states ??= []
  if (shape.readings) {
    full.readings ??= {}
    if (isNode(full.readings))
      full.readings = Object.fromEntries(
        Object.entries(full.readings).map(([quantity, taken]) => [quantity, children(taken, `readings/${quantity}`)]),
      )
  }
  for (const inList of shape.lists ?? []) full[inList] = children(full[inList] ?? [], inList)
  for (const inList of shape.sparse ?? []) if (full[inList] !== undefined) full[inList] = children(full[inList], inList)
  for (const inList of shape.single ?? [])
    if (full[inList] !== undefined) full[inList] = child(full[inList], inList, '')
  return full
}

function completeReading(
  reading: Node,
  list: string,
  kind: unknown,
  quantity: string,
  path: string,
  attributeOf: AttributeOf,
  problems: Problem[],
): Node {
  const { raw, value, bound } = reading
  if (typeof raw !== 'string') return reading
  const field = fieldOfReading(list, typeof kind === 'string' ? kind : undefined, quantity, attributeOf)
  if (value === undefined) {
    const read = field
      ? valueOfRaw(raw, field)
      : {
          ok: false as const,
          expected: `a value in SI beside the raw text: what ${quantity} is measured in is not known here`,
          found: raw,
        }
    if (read.ok && (bound === undefined || bound === read.bound))
      return { ...reading, value: read.value, bound: read.bound }
    const { expected, found } = read.ok ? { expected: read.bound, found: String(bound) } : read
    problems.push({
      path: `${path}/${read.ok ? 'bound' : 'raw'}`,
      expected,
      found,
      whatToDo: 'Write the reading as it was taken, with its unit.',
    })
    return { ...reading, value: 0, bound: 'exact' }
  }
  const kept = { ...reading, bound: bound ?? boundOf(raw) }
  if (field && typeof value === 'number' && contradicts(raw, { value, bound: String(kept.bound) }, field, [field.unit]))
    problems.push(contradiction(path, raw, value))
  return kept
}

/** A raw text and a value that disagree: nobody can tell which was read. */
export function contradiction(path: string, raw: string, value: number): Problem {
  return {
    path,
    expected: `the value of "${raw}"`,
    found: String(value),
    whatToDo: 'Look at what was written down at the venue, correct the other, or leave the value out.',
  }
}

function boundOf(raw: string): string {
  const first = raw.trim()[0]
  return first === '>' ? 'above' : first === '<' ? 'below' : 'exact'
}

export function isNode(value: unknown): value is Node {
  return typeof value === 'object' && value !== null && !Array.isArray(value)
}
