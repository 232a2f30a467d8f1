import type { Verdict } from '../../../judge/result.ts'
import type { Metres, Radians } from '../../../units/quantity.ts'

/** One part of a walk as the strip map draws it: numbers and words, no record. */
export interface StripPart {
  id: string
  /** 1 for the first part of the walk. */
  number: number
  /** First line beside the strip. */
  title: string
  /** Measured length; null while the part is open. */
  length: Metres | null
  /** Least clear width; null: not measured, drawn dashed. */
  width: Metres | null
  /** Change of direction at the end, left positive; null: straight on. */
  turn: Radians | null
  /** Words of the turn, for example "right 90°". */
  turnText: string | null
  /** Null while answers are missing: no verdict word, no pattern. */
  verdict: Verdict | null
  items: StripItem[]
}

/** A thing on the part, drawn as a mark with words on a leader line. */
export interface StripItem {
  id: string
  text: string
  /** From the part's start; null: not said, drawn at the middle. */
  along: Metres | null
  side: 'left' | 'right' | 'centre' | 'across'
  /** From the walking line; null: at the strip's own side. */
  offset: Metres | null
  mark: 'caution' | 'stop' | 'note'
}

/** Where to draw: the map's box in CSS pixels and the size of its words. */
export interface StripView {
  width: number
  height: number
  /** Size of the words beside the strip, px. */
  text: number
  /** Index of the part whose start you stand at. */
  current: number
}

export interface Point {
  x: number
  y: number
}
