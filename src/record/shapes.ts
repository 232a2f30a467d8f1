import type * as v from 'valibot'
import {
  feature,
  floor,
  observation,
  override,
  place,
  reading,
  type StateMark,
  segment,
  surveyView,
  walk,
  zone,
} from './survey.ts'

/**
 * How each kind of entity is written in facts: which of its view's keys are plain fields, and which are lists of
 * entities. One table serves the fold (facts to view) and the reading of a hand-written view (view to facts).
 */
export interface Shape {
  schema: { readonly entries: Readonly<Record<string, v.GenericSchema>> }
  /** Answers in words, each a field `word/<item>`. */
  words?: true
  /** Readings by quantity, each an entity in the list `readings/<quantity>`. */
  readings?: true
  /** Marks of a walk's state, each a field `state/...`. */
  states?: true
  /** Photos, each a field `photo/<id>`, so that two people add theirs at once. */
  photos?: true
  /** Kept whole in one field of this name, which is only ever written once. */
  whole?: string
  /** Lists of entities within. */
  lists?: readonly string[]
  /** Lists shown only where they hold something. */
  sparse?: readonly string[]
  /** Lists of which the view shows one entity. */
  single?: readonly string[]
  /** What the view shows while a required field has not arrived; a field missing here sets the entity aside. */
  defaults?: Readonly<Record<string, unknown>>
}

/** List an entity stands in -> its shape. Readings stand in `readings/<quantity>`. */
export const shapes = {
  floors: { schema: floor, defaults: { name: '' } },
  zones: { schema: zone, words: true, lists: ['observations'], defaults: { name: '' } },
  observations: { schema: observation, words: true, readings: true },
  places: { schema: place, defaults: { name: '' } },
  walks: {
    schema: walk,
    words: true,
    states: true,
    lists: ['segments'],
    sparse: ['overrides'],
    defaults: { name: '' },
  },
  overrides: { schema: override, whole: 'override' },
  segments: {
    schema: segment,
    words: true,
    readings: true,
    lists: ['features'],
    single: ['turn'],
    // Led by the robot asks the most: the strict reading of a segment whose leader has not arrived.
    defaults: { name: '', ledBy: 'robot' },
  },
  // A thing whose kind has not arrived, or that this version cannot read, stays in view: no kind of the catalogue.
  features: { schema: feature, words: true, readings: true, photos: true, defaults: { kind: 'unknown' } },
  turn: { schema: feature, words: true, readings: true, photos: true, defaults: { kind: 'unknown' } },
  readings: { schema: reading, whole: 'reading', photos: true },
} as const satisfies Record<string, Shape>

export const rootShape = {
  schema: surveyView,
  lists: ['floors', 'zones', 'places', 'walks'],
  defaults: { name: '' },
} as const satisfies Shape

/** The shape of what stands in a list, or undefined for a list this version does not know. */
export function shapeOf(list: string): Shape | undefined {
  const name = list.startsWith('readings/') ? 'readings' : list
  return Object.hasOwn(shapes, name) ? shapes[name as keyof typeof shapes] : undefined
}

/** Keys of a view that are lists or maps, never plain fields. */
const composed = new Set([
  'id',
  'readings',
  'words',
  'features',
  'turn',
  'segments',
  'states',
  'overrides',
  'observations',
  'floors',
  'zones',
  'places',
  'walks',
])

/** Field names with a meaning of their own in the log. */
const structural = new Set(['in', 'gone', 'reading', 'override', 'photos'])

/** The field in which a view's key is kept: itself, or under `own/` where the log has another use for the name. */
export function fieldOfKey(key: string): string {
  return structural.has(key) || composed.has(key) || key.includes('/') ? `own/${key}` : key
}

/** The field of a walk's state mark. Marks of the same state, day and name share one: marking twice is one mark. */
export function fieldOfMark({ state, date, name }: StateMark): string {
  return `state/${state}/${date}/${name}`.slice(0, 400)
}

/** The view's key that a field is shown as, or null where the field is no plain one. */
export function keyOfField(field: string): string | null {
  if (!field.includes('/')) return structural.has(field) || composed.has(field) ? null : field
  if (field.startsWith('own/')) return field.slice(4)
  return field.startsWith('word/') || field.startsWith('state/') || field.startsWith('photo/') ? null : field
}

const required = new WeakMap<object, readonly string[]>()

/** Plain keys without which a view of that shape is none. */
export function requiredKeys({ schema: { entries } }: Shape): readonly string[] {
  const known = required.get(entries)
  if (known) return known
  const keys = Object.keys(entries).filter((key) => keyOfField(key) !== null && entries[key]?.type !== 'exact_optional')
  required.set(entries, keys)
  return keys
}
