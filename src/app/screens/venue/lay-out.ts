import type { SegmentResult, Verdict } from '../../../judge/result.ts'
import { layTraverse } from '../../../plan/traverse.ts'
import type { SurveyView, Walk } from '../../../record/survey.ts'
import { lengthOf, turnAngle } from '../../components/strip/strip-words.ts'

export interface At {
  x: number
  y: number
}

/** One part of a walk on the plan. */
export interface Leg {
  number: number
  from: At
  to: At
  /** Null: not judged as it is now. */
  verdict: Verdict | null
}

export interface Laid {
  legs: Leg[]
  /** Where the reckoning had to stop or to guess, in words; empty: nowhere. */
  notes: string[]
}

/**
 * A walk on the plan by dead reckoning from lengths and turns. Where nobody gave its first direction, it is turned so
 * that its end lies towards the place it leads to, and says so. It stops before the first part without a length.
 */
export function layOut(view: SurveyView, walk: Walk, results: readonly SegmentResult[]): Laid {
  const notes: string[] = []
  const open = walk.segments.findIndex((segment) => lengthOf(segment) === null)
  const known = open < 0 ? walk.segments : walk.segments.slice(0, open)
  if (open >= 0) notes.push(`Part ${open + 1} has no length yet: the drawing stops before it.`)
  const courses = known.map((segment, i) => {
    const angle = segment.turn ? turnAngle(segment.turn) : 0
    if (angle === null && i < known.length - 1)
      notes.push(`The turn after part ${i + 1} was not measured: drawn straight on.`)
    return { length: Math.max(0, lengthOf(segment) ?? 0), turn: angle ?? 0 }
  })
  const [from, to] = [placeAt(view, walk.from), placeAt(view, walk.to)]
  if (!from) notes.push('The start is not placed on the plan: drawn from its corner.')
  const start = from ?? { x: 0, y: 0 }
  let heading = walk.heading ?? 0
  if (walk.heading === undefined && courses.length > 0) {
    const end = layTraverse(courses, { x: 0, y: 0 }, 0).points.at(-1)
    const turned = to && end && Math.hypot(end.x, end.y) > 0.1 && Math.hypot(to.x - start.x, to.y - start.y) > 0.1
    if (turned) heading = Math.atan2(to.y - start.y, to.x - start.x) - Math.atan2(end.y, end.x)
    notes.push(
      turned ? 'Its first direction is not given: turned towards its end.' : 'Its first direction is not given.',
    )
  }
  const { points } = layTraverse(courses, start, heading)
  return {
    legs: known.map((segment, i) => ({
      number: i + 1,
      from: points[i] ?? start,
      to: points[i + 1] ?? start,
      verdict: results.find((one) => one.id === segment.id)?.verdict ?? null,
    })),
    notes,
  }
}

export function placeAt(view: SurveyView, id: string | undefined): At | null {
  const place = view.places.find((one) => one.id === id)
  return place?.x !== undefined && place.y !== undefined ? { x: place.x, y: place.y } : null
}
