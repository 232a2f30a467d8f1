import type { Point } from '../geometry/scene.ts'
import type { Metres, Radians } from '../units/quantity.ts'

/**
 * A traverse: the walk laid out by dead reckoning from lengths and turns. Terms as in any surveying text; latitude and
 * departure of those texts are the y and x of a course here (y axis north), and an azimuth A is the heading 90° - A.
 */
export interface Course {
  /** Measured along the ground; not negative. */
  length: Metres
  /** Change of direction at its end, left positive. That of the last course counts in the angular misclosure alone. */
  turn: Radians
}

export interface Traverse {
  courses: readonly Course[]
  /** Stations: the start, then the end of each course. One more than there are courses. */
  points: Point[]
  /** Direction of each course, anticlockwise from the x axis, not wrapped. */
  headings: Radians[]
  perimeter: Metres
}

/**
 * Lays the courses out from a start.
 * @param heading of the first course, anticlockwise from the x axis.
 * @throws RangeError on a length or turn that is not finite, or a negative length: no reading reaches here unread.
 */
export function layTraverse(courses: readonly Course[], start: Point, heading: Radians): Traverse {
  const points: Point[] = [start]
  const headings: Radians[] = []
  let { x, y } = start
  let perimeter = 0
  let towards = heading
  for (const { length, turn } of courses) {
    if (!(length >= 0) || !Number.isFinite(length + turn + towards + x + y))
      throw new RangeError(`a course of ${length} m with a turn of ${turn} rad`)
    x += length * Math.cos(towards)
    y += length * Math.sin(towards)
    points.push({ x, y })
    headings.push(towards)
    perimeter += length
    towards += turn
  }
  return { courses, points, headings, perimeter }
}

export interface Misclosure {
  /** Where the traverse ends less where it should end. */
  x: Metres
  y: Metres
  linear: Metres
  /** Direction of the misclosure, anticlockwise from the x axis; 0 where there is none. */
  direction: Radians
  /** The n of 1:n, perimeter over linear misclosure; null where it closes exactly. */
  precision: number | null
}

/** Misclosure on the known end: the start again for a loop, another known point for a link traverse. */
export function misclosure({ points, perimeter }: Traverse, knownEnd: Point): Misclosure {
  const end = points.at(-1) ?? knownEnd
  const x = end.x - knownEnd.x
  const y = end.y - knownEnd.y
  const linear = Math.hypot(x, y)
  return { x, y, linear, direction: Math.atan2(y, x), precision: linear === 0 ? null : perimeter / linear }
}

/** What the turns of a loop miss whole circles by, in (-pi, pi], left positive. The last course must carry the turn back into the first. */
export function angularMisclosure(courses: readonly Course[]): Radians {
  return wrap(courses.reduce((sum, course) => sum + course.turn, 0))
}

export interface Adjusted {
  /** Stations after adjustment; the last is the known end. */
  points: Point[]
  /** Each course between its adjusted stations. */
  courses: { length: Metres; heading: Radians }[]
}

/**
 * Compass rule (Bowditch): each course takes its share, by length, of the misclosure, with the sign turned. A traverse
 * without length has no shares and is left as it is.
 */
export function adjustByCompassRule(traverse: Traverse, knownEnd: Point): Adjusted {
  const { x, y } = misclosure(traverse, knownEnd)
  let walked = 0
  const points = traverse.points.map((point, i) => {
    walked += i === 0 ? 0 : (traverse.courses[i - 1]?.length ?? 0)
    const share = traverse.perimeter === 0 ? 0 : walked / traverse.perimeter
    return { x: point.x - x * share, y: point.y - y * share }
  })
  const courses = points.slice(1).map((to, i) => {
    const from = points[i] ?? to
    return { length: Math.hypot(to.x - from.x, to.y - from.y), heading: Math.atan2(to.y - from.y, to.x - from.x) }
  })
  return { points, courses }
}

/** An angle brought to (-pi, pi]. */
export function wrap(angle: Radians): Radians {
  const turned = angle - 2 * Math.PI * Math.round(angle / (2 * Math.PI))
  return turned <= -Math.PI ? turned + 2 * Math.PI : turned
}
