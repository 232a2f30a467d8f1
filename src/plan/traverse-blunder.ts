import type { Point } from '../geometry/scene.ts'
import type { Metres, Radians } from '../units/quantity.ts'
import { misclosure, type Traverse, wrap } from './traverse.ts'

/** One reading that, were it alone wrong, would explain a misclosure. A hint where to measure again, never a correction. */
export interface Suspect {
  /** 'length' of the course, or the 'turn' at its end. */
  reading: 'length' | 'turn'
  /** Index of the course. */
  course: number
  /** What the reading has too much: metres, or radians (left positive). */
  excess: number
  /** The misclosure that would remain with it put right. */
  remains: Metres
}

/**
 * Suspects for one blunder, the least remaining misclosure first.
 *
 * A wrong length shifts all that follows along its own course: the course nearest in direction to the misclosure
 * remains with linear x |sin(angle between)|. A wrong turn swings all that follows about its station: that station lies
 * on the perpendicular bisector of the line from the known end to the end reached, and what remains is the difference
 * of its distances to both. Both methods: common surveying practice, no source.
 * Courses along one line cannot be told apart: all of them come first. Turns that would be
 * wrong by more than 90° and lengths of which nothing would be left are not offered. Empty for a traverse that closes exactly.
 */
export function suspects(traverse: Traverse, knownEnd: Point): Suspect[] {
  const { x, y, linear } = misclosure(traverse, knownEnd)
  const reached = traverse.points.at(-1)
  if (reached === undefined || linear === 0) return []
  const found: Suspect[] = []
  for (const [course, { length }] of traverse.courses.entries()) {
    const heading = traverse.headings[course] ?? 0
    const excess = x * Math.cos(heading) + y * Math.sin(heading)
    const across = Math.abs(y * Math.cos(heading) - x * Math.sin(heading))
    if (excess < length) found.push({ reading: 'length', course, excess, remains: across })
    const station = traverse.points[course + 1]
    // The turn after the last course moves no station.
    if (station === undefined || course === traverse.courses.length - 1) continue
    const turn = turnSuspect(station, reached, knownEnd)
    if (turn) found.push({ reading: 'turn', course, ...turn })
  }
  // To the micrometre, so that rounding does not shuffle courses along one line out of their order.
  return found.sort((a, b) => Math.round(1e6 * a.remains) - Math.round(1e6 * b.remains))
}

function turnSuspect(station: Point, reached: Point, known: Point): { excess: Radians; remains: Metres } | null {
  const [fromReached, fromKnown] = [polar(station, reached), polar(station, known)]
  const excess = wrap(fromReached.direction - fromKnown.direction)
  if (fromReached.distance === 0 || fromKnown.distance === 0 || Math.abs(excess) > Math.PI / 2) return null
  return { excess, remains: Math.abs(fromReached.distance - fromKnown.distance) }
}

function polar(from: Point, to: Point): { distance: Metres; direction: Radians } {
  return { distance: Math.hypot(to.x - from.x, to.y - from.y), direction: Math.atan2(to.y - from.y, to.x - from.x) }
}

/**
 * The misclosure that the instruments themselves allow (k = 2): a length's uncertainty as it stands, a turn's times the
 * distance from its station to the end, joined as the root of the sum of squares. With phone headings the turns swamp
 * the tape: such a loop tests its turns. A misclosure within it is no sign of a blunder.
 * @param uncertainty of each course's length and of the turn at its end, expanded; one for each course.
 */
export function expectedMisclosure(
  traverse: Traverse,
  uncertainty: readonly { length: Metres; turn: Radians }[],
): Metres {
  const end = traverse.points.at(-1)
  if (end === undefined || uncertainty.length !== traverse.courses.length)
    throw new RangeError('one uncertainty for each course')
  let squares = 0
  for (const [i, { length, turn }] of uncertainty.entries()) {
    const station = traverse.points[i + 1] ?? end
    squares += length ** 2 + (turn * polar(station, end).distance) ** 2
  }
  return Math.sqrt(squares)
}
