import type { Item } from '../../../record/answers.ts'
import type { Segment } from '../../../record/survey.ts'
import type { Metres } from '../../../units/quantity.ts'

/** The plain stretch card as data: which button writes which answers, and when a button or the whole card is off. */

export interface PlainButton {
  id: string
  label: string
  group: 'floor' | 'robot'
  /** One answer for each item it names; `says` null: what the part before said. */
  writes: readonly { item: Item; says: string | null; how: 'swept' | 'inherited' }[]
}

export const plainButtons: readonly PlainButton[] = [
  {
    id: 'step',
    label: 'No step, slope or cross-fall',
    group: 'floor',
    writes: [{ item: 'step', says: 'none', how: 'swept' }],
  },
  { id: 'edge', label: 'No edge within 3 m', group: 'floor', writes: [{ item: 'edge', says: 'none', how: 'swept' }] },
  {
    id: 'surface',
    label: 'Surface as before and dry',
    group: 'floor',
    writes: [
      { item: 'finish', says: null, how: 'inherited' },
      { item: 'wetness', says: 'dry', how: 'swept' },
    ],
  },
  {
    id: 'slots',
    label: 'No slots over 13 mm',
    group: 'floor',
    writes: [{ item: 'slots', says: 'none', how: 'swept' }],
  },
  { id: 'door', label: 'No door or gate', group: 'floor', writes: [{ item: 'door', says: 'none', how: 'swept' }] },
  {
    id: 'sensing',
    label: 'No glass, mirror, dark or shiny floor, rope, low sun',
    group: 'robot',
    writes: [{ item: 'sensing', says: 'none', how: 'swept' }],
  },
]

/** Faster than this nobody walks and looks: common practice, no source. */
const quickestSweep = 1.5
const asBeforeLasts = 60 * 60 * 1000

/** A sweep confirmed sooner after the card opened than the length can be walked. Metres, milliseconds. */
export function isTooQuick(length: Metres, openedAt: number, now: number): boolean {
  return now - openedAt < (length / quickestSweep) * 1000
}

/** One part in five asks the floor items one at a time. `index` counts from 0. */
export function asksSingly(index: number): boolean {
  return index % 5 === 4
}

/** Words that a button repeats from the part before, or why it may not. */
export type AsBefore = { says: string } | { refused: string }

/** "As before" holds within one hour, one zone and one finish. `now` in ms. */
export function finishAsBefore(part: Segment, before: Segment | undefined, now: number): AsBefore {
  if (!before) return { refused: 'This is the first part: say its finish.' }
  if (part.zone !== undefined && before.zone !== part.zone) return { refused: 'Another zone: say its finish.' }
  const finish = before.words.finish
  if (!finish || finish.says === 'unknown') return { refused: 'The finish of the part before is not known: say it.' }
  if (finish.time === undefined || now - Date.parse(finish.time) > asBeforeLasts)
    return { refused: 'The part before was looked at over an hour ago: say the finish.' }
  if (before.features.some((one) => endsSurface(one.kind)))
    return { refused: 'A mat or a change of floor lies before this part: say the finish.' }
  return { says: finish.says }
}

/** The zone of the part before, within the hour, or why it may not be taken over. */
export function zoneAsBefore(part: Segment, before: Segment | undefined, now: number): AsBefore {
  if (!before?.zone) return { refused: 'The part before has no zone: choose one.' }
  if (part.zone !== undefined && part.zone !== before.zone) return { refused: 'This part lies in another zone.' }
  const latest = Math.max(
    ...Object.values(before.words)
      .map((word) => (word.time ? Date.parse(word.time) : Number.NaN))
      .filter(Number.isFinite),
    0,
  )
  if (now - latest > asBeforeLasts)
    return { refused: 'The part before was looked at over an hour ago: choose the zone.' }
  return { says: before.zone }
}

/** The shoreline of the part before, within the hour, where the way goes straight on; or why it may not be taken over. */
export function shorelineAsBefore(before: Segment | undefined, now: number): AsBefore {
  const shoreline = before?.words.shoreline
  if (!before || !shoreline) return { refused: 'The part before has no shoreline: say it.' }
  if (before.turn) return { refused: 'The walk turns between the parts: say the shoreline.' }
  if (shoreline.time === undefined || now - Date.parse(shoreline.time) > asBeforeLasts)
    return { refused: 'The part before was looked at over an hour ago: say the shoreline.' }
  return { says: shoreline.says }
}

/** A surface ends at a mat, at a grating, where it is wet or loose. */
function endsSurface(kind: string): boolean {
  return ['floor-edge', 'grating', 'wet-patch', 'loose-ground'].includes(kind)
}
