import type { FactDraft } from '../facts.ts'
import { sameJson } from '../json.ts'
import { currentValue, type FactLog } from '../log.ts'
import { childrenOf, listsOf } from '../placement.ts'
import { isGone } from '../presence.ts'
import type { Segment } from '../survey.ts'
import { clearWord } from './answer.ts'
import { create, moveAll, moveBehind, set, setKey } from './draft.ts'
import { remove } from './removal.ts'

export type SegmentFields = Pick<Segment, 'id' | 'name' | 'zone' | 'ledBy' | 'note'>

/** A new stretch at the walk's end, or behind the segment `after` (null: as the first). Nothing of it is answered. */
export function addSegment(
  log: FactLog,
  walk: string,
  { id, ...fields }: SegmentFields,
  after?: string | null,
): FactDraft[] {
  return create(log, id, walk, 'segments', fields, after)
}

/** A plain field of a segment: name, zone, ledBy, note; undefined clears it. */
export function setSegmentField(
  log: FactLog,
  segment: string,
  field: keyof SegmentFields,
  value: unknown,
): FactDraft[] {
  return [setKey(log, segment, field, value)]
}

/** Puts a segment behind another one of the walk (null: first), with all that stands in it. */
export function moveSegment(log: FactLog, walk: string, segment: string, after: string | null): FactDraft[] {
  return [moveBehind(log, segment, walk, 'segments', after)]
}

/**
 * Cuts a segment `at` metres from its start. The features from there on and the turn go with the new stretch, which has
 * nothing answered: answers to overhead, edge, step and door are never inherited. The length of the whole no longer
 * tells either: its readings are removed and both stretches are measured again.
 */
export function splitSegment(log: FactLog, segment: string, cut: SegmentFields & { at: number }): FactDraft[] {
  const walk = log.places.of.get(segment)
  if (!walk) throw new Error(`record/no-such-entity: ${segment}`)
  const { at, ...fields } = cut
  const beyond = present(log, segment, 'features').filter((id) => alongOf(log, id) >= at)
  return [
    ...addSegment(log, walk.parent, fields, segment),
    ...moveAll(log, beyond, cut.id, 'features'),
    ...beyond.map((id) => setKey(log, id, 'along', alongOf(log, id) - at)),
    ...moveAll(log, present(log, segment, 'turn'), cut.id, 'turn'),
    ...present(log, segment, 'readings/length').flatMap((id) => remove(log, id)),
  ]
}

/**
 * Makes one segment of two that follow one another: features and readings of the second go to the first, `length` metres
 * (the first one's) further along. An answer stays only where both gave the same; the rest are asked again.
 * Lengths are measured again, and the turn between the two is gone.
 */
export function joinSegments(log: FactLog, first: string, second: string, length: number): FactDraft[] {
  const items = new Set([first, second].flatMap((id) => wordsOf(log, id)))
  const differ = [...items].filter((item) => !sameJson(saidOf(log, first, item), saidOf(log, second, item)))
  const features = present(log, second, 'features')
  const readings = listsOf(log.places, second).filter(
    (list) => list.startsWith('readings/') && list !== 'readings/length',
  )
  return [
    ...moveAll(log, features, first, 'features'),
    ...features.map((id) => setKey(log, id, 'along', alongOf(log, id) + length)),
    ...readings.flatMap((list) => moveAll(log, present(log, second, list), first, list)),
    // Else it would count as a repeat at the place of the first one's last reading.
    ...readings.flatMap((list) =>
      present(log, second, list)
        .slice(0, 1)
        .map((id) => set(log, id, 'place', 'another')),
    ),
    ...present(log, first, 'turn').flatMap((id) => remove(log, id)),
    ...moveAll(log, present(log, second, 'turn'), first, 'turn'),
    ...present(log, first, 'readings/length').flatMap((id) => remove(log, id)),
    ...differ.flatMap((item) => clearWord(log, first, item)),
    ...remove(log, second),
  ]
}

/** Removed entities stay where they are: moving one would bring it back. */
function present(log: FactLog, parent: string, list: string): string[] {
  return childrenOf(log.places, parent, list).filter((id) => !isGone(log, id))
}

function alongOf(log: FactLog, feature: string): number {
  const along = currentValue(log, feature, 'along')
  return typeof along === 'number' ? along : 0
}

function wordsOf(log: FactLog, entity: string): string[] {
  const fields = [...(log.entities.get(entity)?.keys() ?? [])]
  return fields.filter((field) => field.startsWith('word/')).map((field) => field.slice(5))
}

/** What an item says, apart from who said it and when. */
function saidOf(log: FactLog, entity: string, item: string): unknown {
  const answer = currentValue(log, entity, `word/${item}`) as { says?: unknown; how?: unknown } | null | undefined
  return [answer?.says ?? null, answer?.how ?? null]
}
