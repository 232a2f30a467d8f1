import type { Interval } from '../record/interval.ts'
import type { Feature, Segment } from '../record/survey.ts'
import type { Metres } from '../units/quantity.ts'
import { free, type Lacking, type Pinch, type PinchSite, type Read, width } from './pinch.ts'
import { framed, leadAfter, leadBefore } from './pinch-lead.ts'

/** A bend of less is straight on. */
const gentlest = Math.PI / 12
const sharpest = (Math.PI * 5) / 6
const square = Math.PI / 2
/** What a corner measured square by 3-4-5 or plan may cost, measured on corners of 1.0 to 1.5 m. */
const squareCost: Metres = 0.003

/** How near the end of its part a side door stands that makes the turn there. */
const doorAtEnd: Metres = 1

/** A turn through a door in the side wall is the door's: the same hand, about square, and at the part's end. */
export function isThroughDoor(segment: Segment, turn: Feature, read: Read): boolean {
  const angle = read(turn, 'angle', 'size')?.value
  if (angle === undefined || Math.abs(angle) < Math.PI / 3 || Math.abs(angle) > (Math.PI * 2) / 3) return false
  const hand = angle > 0 ? 'left' : 'right'
  const end = read(segment, 'length', 'low')?.value
  const isHere = ({ along }: Feature) => along === undefined || end === undefined || end - along <= doorAtEnd
  return segment.features.some((one) => framed.has(one.kind) && one.words.position?.says === hand && isHere(one))
}

/** A turn or U-turn at the end of its segment; null where it asks no corner. */
export function ofTurn(site: PinchSite, turn: Feature): Pinch | Lacking | null {
  const { read, segment, after } = site
  // Turning to face something at the end of a walk asks no corner; going round a wall end or into a way measured does.
  if (!after && turn.kind === 'turn' && !turn.readings.widthAfter) return null
  const before = read(turn, 'widthBefore', 'low') ?? read(segment, 'width', 'low')
  const past = read(turn, 'widthAfter', 'low') ?? (after ? read(after, 'width', 'low') : null)
  if (!before) return { feature: turn, lacking: 'clear width before the corner' }
  if (!past) return { feature: turn, lacking: 'clear width after the corner' }
  const widths = { w1: width(before), w2: width(past) }
  const lead = leadBefore(site, null)
  const leadBack = leadAfter(site, null)
  if (turn.kind === 'u-turn') {
    const k = read(turn, 'wallThickness', 'both')
    const e = read(turn, 'endDistance', 'low')
    if (!k) return { feature: turn, lacking: 'thickness of the wall' }
    if (!e) return { feature: turn, lacking: 'distance from the wall end' }
    return {
      feature: turn,
      widths: { ...widths, e: width(e) },
      free: { k: free(k) },
      from: [before, past, k, e],
      leadBack,
      offLow: 0,
      build: ({ w1 = 0, w2 = 0, k = 0, e = 0 }) => ({ kind: 'uturn', w1, w2, k, e, lead }),
    }
  }
  const angle = read(turn, 'angle', 'size')
  if (!angle) return { feature: turn, lacking: 'angle' }
  const ends = [Math.abs(angle.low), Math.abs(angle.value), Math.abs(angle.high)]
  const least = angle.low <= 0 && angle.high >= 0 ? 0 : Math.min(...ends)
  const most = Math.max(...ends)
  if (most < gentlest) return null
  if (most > sharpest + 1e-9) return { feature: turn, lacking: 'a turn of over 150 degrees: enter it as a U-turn' }
  const squared = isSquare(turn, angle, before, past)
  const bend = squared
    ? { low: square, value: square, high: square }
    : { low: Math.max(gentlest, least), value: Math.max(gentlest, Math.abs(angle.value)), high: most }
  return {
    feature: turn,
    widths,
    free: { angle: bend },
    from: [before, past, angle],
    leadBack,
    // Pinned under a right angle it costs nothing.
    offLow: squared && most > square - 1e-9 ? squareCost : 0,
    build: ({ w1 = 0, w2 = 0, angle = 0 }) => ({ kind: 'turn', w1, w2, angle, lead }),
  }
}

/** Measured square by 3-4-5 or plan (as it was taken, whatever its pin), in corners no narrower than those on which its cost was measured. */
function isSquare(turn: Feature, angle: Interval, before: Interval, after: Interval): boolean {
  const by = (turn.readings.angle ?? []).filter((one) => angle.ids.includes(one.id))
  return (
    by.length > 0 &&
    by.every((one) => one.instrument === 'square' && Math.abs(Math.abs(one.value) - square) < 1e-3) &&
    before.low >= 1 &&
    after.low >= 1
  )
}
