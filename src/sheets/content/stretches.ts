import type { SegmentResult } from '../../judge/result.ts'
import type { LedBy, Segment } from '../../record/survey.ts'
import type { Metres } from '../../units/quantity.ts'
import { roleOf } from './help.ts'
import type { Scope } from './scope.ts'

/** Segments that are one piece of the walk to its reader: one led by the robot, or all in a row led by the same person. */
export interface Stretch {
  ledBy: LedBy
  /** Who helps, where somebody is to. */
  role: string | null
  segments: Segment[]
  results: SegmentResult[]
  /** null: a length is missing. */
  length: Metres | null
}

export function stretchesOf(scope: Scope): Stretch[] {
  const stretches: Stretch[] = []
  for (const { segment, result } of scope.stretches) {
    const role = roleOf(segment.help)
    const last = stretches.at(-1)
    const length = lengthOf(segment)
    if (last && segment.ledBy !== 'robot' && last.ledBy === segment.ledBy && last.role === role) {
      last.segments.push(segment)
      last.results.push(result)
      last.length = last.length === null || length === null ? null : last.length + length
    } else stretches.push({ ledBy: segment.ledBy, role, segments: [segment], results: [result], length })
  }
  return stretches
}

/** Of two readings the first counts: it is only walked. */
export function lengthOf(segment: Segment): Metres | null {
  return segment.readings.length?.[0]?.value ?? null
}
