import type { Point } from '../../geometry/scene.ts'
import { layTraverse } from '../../plan/traverse.ts'
import type { Feature, Reading, Segment, SurveyView, Walk } from '../../record/survey.ts'

/** A segment on the plan, or in words why it has no place there. */
export type Laid =
  | {
      placed: true
      from: Point
      to: Point
      heading: number
      length: number
      /** It comes after a U-turn, whose lanes lie on each other here: how far apart they are is not along the way. */
      doubled: boolean
    }
  | { placed: false; why: string; length: number | null }

export interface LaidWalk {
  segments: Map<string, Laid>
  /** False: it starts at 0, 0 along the x axis because the survey does not say where or which way. */
  onPlan: boolean
}

/**
 * A walk as dead reckoning has it: each segment as long as its last exact tape length, each turn by its last exact angle, a
 * segment without a turn straight on, a U-turn without one half a circle. Nothing is adjusted, so lengths stay those of the
 * tape. Past the first missing length or angle nothing has a place.
 */
export function layWalk(walk: Walk, view: SurveyView): LaidWalk {
  const start = view.places.find(({ id }) => id === walk.from)
  const onPlan = start?.x !== undefined && start.y !== undefined && walk.heading !== undefined
  let from: Point = onPlan ? { x: start?.x ?? 0, y: start?.y ?? 0 } : { x: 0, y: 0 }
  let heading = onPlan ? (walk.heading ?? 0) : 0
  let lost: string | null = null
  let doubled = false
  const segments = new Map<string, Laid>()
  for (const segment of walk.segments) {
    const length = lengthOf(segment)
    lost ??= length === null ? `the length of "${segment.name}" is not known` : null
    if (lost !== null || length === null) {
      segments.set(segment.id, { placed: false, why: lost ?? '', length })
      continue
    }
    const turn = segment.turn ? turnOf(segment.turn) : 0
    const { points } = layTraverse([{ length, turn: turn ?? 0 }], from, heading)
    const to = points[1] ?? from
    segments.set(segment.id, { placed: true, from, to, heading, length, doubled })
    from = to
    heading += turn ?? 0
    doubled ||= segment.turn?.kind === 'u-turn'
    if (turn === null) lost = `the turn after "${segment.name}" is not known`
  }
  return { segments, onPlan }
}

/** Where a thing stands on its segment; null where nobody recorded how far along. Left of travel is positive across. */
export function placeOn(laid: Laid, feature: Feature): Point | null {
  if (!laid.placed || feature.along === undefined) return null
  const side = feature.side === 'left' ? 1 : feature.side === 'right' ? -1 : 0
  const across = side * Math.abs(feature.offset ?? 0)
  const cos = Math.cos(laid.heading)
  const sin = Math.sin(laid.heading)
  return { x: laid.from.x + feature.along * cos - across * sin, y: laid.from.y + feature.along * sin + across * cos }
}

function lengthOf({ readings }: Segment): number | null {
  const length = lastExact(readings.length)
  return length !== null && length >= 0 ? length : null
}

function turnOf(turn: Feature): number | null {
  return lastExact(turn.readings.angle) ?? (turn.kind === 'u-turn' ? Math.PI : null)
}

/** Never a mean: the last reading stands for the plan, as in the note on a loop. */
function lastExact(readings: readonly Reading[] = []): number | null {
  return readings.findLast(({ bound }) => bound === 'exact')?.value ?? null
}
