import { instrument } from '../record/instruments.ts'
import type { Reading, Segment, SurveyView, Walk } from '../record/survey.ts'
import type { Metres } from '../units/quantity.ts'
import { layTraverse, type Misclosure, misclosure } from './traverse.ts'
import { expectedMisclosure, type Suspect, suspects } from './traverse-blunder.ts'

/** What a loop tells about its own readings. A note for the surveyor before leaving; it blocks nothing and enters no verdict. */
export type LoopNote =
  | { known: false; missing: { segment: string; reading: 'length' | 'turn' }[] }
  | {
      known: true
      misclosure: Misclosure
      /** What the instruments allow, k = 2. */
      allowed: Metres
      /** Empty while the misclosure is within what is allowed. `reading` ids are the readings used. */
      suspects: (Suspect & { segment: string; readings: string[] })[]
    }

interface Measured {
  value: number
  uncertainty: number
  readings: string[]
}

/**
 * The loop closed on its start, from the last exact length of each segment and the last exact angle of each turn; a
 * segment without a turn goes straight on. Null for a walk that is no loop or has no segments.
 * @param changed expanded uncertainties by instrument, as the survey has them under `instruments`.
 */
export function loopNote(walk: Walk, changed: SurveyView['instruments'] = {}): LoopNote | null {
  if (walk.loop !== true || walk.segments.length === 0) return null
  const missing: { segment: string; reading: 'length' | 'turn' }[] = []
  const courses = walk.segments.map((segment, i) => {
    const typed = last(segment.readings.length, changed)
    // A file can hold a length below nothing: it is as good as none.
    const length = typed && typed.value >= 0 ? typed : null
    // The turn after the last course moves no station.
    const turn = i === walk.segments.length - 1 ? straight : turnOf(segment, changed)
    if (!length) missing.push({ segment: segment.id, reading: 'length' })
    if (!turn) missing.push({ segment: segment.id, reading: 'turn' })
    return { segment: segment.id, length: length ?? straight, turn: turn ?? straight }
  })
  if (missing.length > 0) return { known: false, missing }
  const start = { x: 0, y: 0 }
  const traverse = layTraverse(
    courses.map(({ length, turn }) => ({ length: length.value, turn: turn.value })),
    start,
    walk.heading ?? 0,
  )
  const allowed = expectedMisclosure(
    traverse,
    courses.map(({ length, turn }) => ({ length: length.uncertainty, turn: turn.uncertainty })),
  )
  const closure = misclosure(traverse, start)
  const named = closure.linear <= allowed ? [] : suspects(traverse, start)
  return {
    known: true,
    misclosure: closure,
    allowed,
    suspects: named.flatMap((suspect) => {
      const course = courses[suspect.course]
      return course ? [{ ...suspect, segment: course.segment, readings: course[suspect.reading].readings }] : []
    }),
  }
}

const straight: Measured = { value: 0, uncertainty: 0, readings: [] }

function turnOf(segment: Segment, changed: NonNullable<SurveyView['instruments']>): Measured | null {
  return segment.turn ? last(segment.turn.readings.angle, changed) : straight
}

/** Never a mean: the last reading stands for the plan, as the surveyor's latest look. */
function last(readings: readonly Reading[] = [], changed: NonNullable<SurveyView['instruments']>): Measured | null {
  const reading = readings.findLast(({ bound }) => bound === 'exact')
  if (!reading) return null
  const row = changed[reading.instrument] ?? instrument(reading.instrument)
  if (!row) return null
  return {
    value: reading.value,
    uncertainty: row.absolute + row.relative * Math.abs(reading.value),
    readings: [reading.id],
  }
}
