import type { Metres } from '../../../units/quantity.ts'
import type { StripPart, StripView } from './layout-part.ts'

/** Two scales: one along, a larger one across, and the columns of the drawing. Pixels, pixels per metre. */
export interface StripScale {
  along: number
  across: number
  /** The strip stays between these. */
  band: { left: number; right: number }
  /** The words stand between these. */
  words: { left: number; right: number }
}

/** Wider than this is drawn at this, with open sides: the words beside it give the value. */
export const widestDrawn: Metres = 3
/** An open part reaches at least this far ahead of you. */
const leastAhead: Metres = 6
/** Half a metre is the least that can be seen and touched. */
const leastDrawn: Metres = 0.5
/** Nobody has measured it yet: drawn dashed at a plain corridor's width. */
const unmeasuredWidth: Metres = 1.2

/**
 * Scales for a box, the same from the first part of a walk to its last: 20 m fit ahead of you, or the whole walk where
 * it is shorter; three metres across fill half to two thirds of the band.
 */
export function stripScale(view: StripView, parts: readonly StripPart[]): StripScale {
  const walk = parts.reduce((sum, part) => sum + drawnLength(part), 0)
  const margin = 8
  const words = Math.min(Math.max(view.width * 0.4, view.text * 7), view.text * 20, view.width * 0.6)
  const band = { left: 34, right: Math.max(view.width - margin - words - 22, 90) }
  return {
    along: Math.min(Math.max((view.height * 0.72) / Math.min(Math.max(walk, 8), 20), 8), 26),
    across: Math.min(((band.right - band.left) * 0.62) / widestDrawn, 60),
    band,
    words: { left: view.width - margin - words, right: view.width - margin },
  }
}

/** Length to draw: measured, or far enough ahead to show what is already listed on an open part. */
export function drawnLength(part: StripPart): Metres {
  if (part.length !== null) return Math.max(part.length, leastDrawn)
  return Math.max(leastAhead, ...part.items.map((item) => (item.along ?? 0) + 1))
}

/** Width to draw. */
export function drawnWidth(part: StripPart): Metres {
  return Math.min(part.width ?? unmeasuredWidth, widestDrawn)
}
