import { kind } from '../../../catalogue/kinds.ts'
import type { Aspect, Item } from '../../../record/answers.ts'
import { items } from '../../../record/answers.ts'
import type { FactDraft } from '../../../record/facts.ts'
import type { FactLog } from '../../../record/log.ts'
import { clearWord, setWord } from '../../../record/operations/answer.ts'
import { addFeature } from '../../../record/operations/feature.ts'
import { remove } from '../../../record/operations/removal.ts'
import type { Feature, Segment } from '../../../record/survey.ts'
import type { Recorder } from './recorder.ts'

/** The item that says "none" or "listed" for an aspect, if it has one. */
export function listedItem(aspect: Aspect | null): Item | null {
  const found = Object.entries(items).find(
    ([, row]) => row.aspect === aspect && (row.says as readonly string[] | null)?.includes('listed'),
  )
  return found ? (found[0] as Item) : null
}

/** The features of a part that answer an aspect. */
/**
 * What a new thing of a kind answers in words: its aspect's "listed", except on the ground, where a grating answers the
 * slots and a wet patch the wetness.
 */
function answeredBy(kindId: string): { item: Item; says: string } | null {
  if (kindId === 'wet-patch') return { item: 'wetness', says: 'wet' }
  const row = kind(kindId)
  if (row?.aspect === 'surface' && kindId !== 'grating') return null
  const item = listedItem(row?.aspect ?? null)
  return item && { item, says: 'listed' }
}

export function featuresOf(segment: Segment, aspect: Aspect | null): Feature[] {
  return segment.features.filter((one) => kind(one.kind)?.aspect === aspect)
}

/** A new thing on the part; its aspect is answered "listed" in the same commit. */
export function addListed(recorder: Recorder, log: FactLog, id: string, kindId: string): FactDraft[] {
  const { segment } = recorder
  const answered = answeredBy(kindId)
  return [
    ...addFeature(log, segment.id, { id, kind: kindId }),
    ...(answered && segment.words[answered.item]?.says !== answered.says
      ? setWord(log, segment.id, answered.item, recorder.answer(answered.says, 'swept'))
      : []),
  ]
}

/** Takes a thing away; with the last one of its aspect the answer "listed" goes too, and the aspect is asked again. */
export function removeListed(log: FactLog, segment: Segment, feature: Feature): FactDraft[] {
  const aspect = kind(feature.kind)?.aspect ?? null
  const item = answeredBy(feature.kind)?.item
  const last = featuresOf(segment, aspect).every((one) => one.id === feature.id || answeredBy(one.kind)?.item !== item)
  return [
    ...remove(log, feature.id),
    ...(item && last && segment.words[item]?.says === 'listed' ? clearWord(log, segment.id, item) : []),
  ]
}
