import type { FactDraft } from '../facts.ts'
import { currentValue, type FactLog } from '../log.ts'
import { childrenOf } from '../placement.ts'
import { isGone } from '../presence.ts'
import type { Feature, Help } from '../survey.ts'
import { create, set, setKey, setKeys } from './draft.ts'
import { remove } from './removal.ts'

export type FeatureFields = Pick<Feature, 'id' | 'kind' | 'name' | 'along' | 'side' | 'offset' | 'ledBy' | 'note'>

/** A thing on the way. `along`: metres from the segment's start; `offset`: metres from the walking line. */
export function addFeature(log: FactLog, segment: string, { id, ...fields }: FeatureFields): FactDraft[] {
  return create(log, id, segment, 'features', fields)
}

/**
 * The change of direction at a segment's end. A turn of the same id is changed in its place, another one removed;
 * null removes it: straight on.
 */
export function setTurn(log: FactLog, segment: string, turn: FeatureFields | null): FactDraft[] {
  const before = childrenOf(log.places, segment, 'turn')
  const others = before.filter((id) => id !== turn?.id && !isGone(log, id)).flatMap((id) => remove(log, id))
  if (!turn) return others
  const { id, ...fields } = turn
  if (!before.includes(id)) return [...others, ...create(log, id, segment, 'turn', fields)]
  const back = isGone(log, id) ? [set(log, id, 'gone', false)] : []
  return [...others, ...back, ...setKeys(log, id, fields)]
}

/** A plain field of a feature or turn: kind, name, along, side, offset, ledBy, note; undefined clears it. */
export function setFeatureField(
  log: FactLog,
  feature: string,
  field: keyof FeatureFields,
  value: unknown,
): FactDraft[] {
  return [setKey(log, feature, field, value)]
}

/** The helper's act at a segment, feature or turn; undefined clears it. */
export function setHelp(log: FactLog, holder: string, help: Help | undefined): FactDraft[] {
  return [setKey(log, holder, 'help', help)]
}

/** Adds a photo to a feature, turn or reading. */
export function addPhoto(log: FactLog, holder: string, photo: string): FactDraft[] {
  return currentValue(log, holder, `photo/${photo}`) === true ? [] : [set(log, holder, `photo/${photo}`, true)]
}
