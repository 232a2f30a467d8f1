import type { Scene, SceneForm } from '../geometry/scene.ts'
import type { Bodies, ClearanceAnswer, Motion, Planner } from '../leash/answer.ts'
import type { Dimension, OwnScene, Pinch } from '../plan/pinches.ts'
import { buildScene, reverseForm } from '../plan/scenes.ts'
import type { Metres } from '../units/quantity.ts'
import type { StopsReckoned } from './checks/stop.ts'
import type { Grid } from './window.ts'

/** Room a side at a pinch: [certified, optimistic]. Null: no motion at that end. */
export interface Room {
  low: Metres | null
  high: Metres | null
  /** Slack pauses of the certified motion. */
  pauses: number
  /** Least distance from handler to attachment while the leash hangs slack in it; null: never, or no motion. */
  nearest: Metres | null
}

/** How far a standing handler may be moved during a pause. */
const drift: Metres = 0.1
/** Up to a right angle, and at most a little past it: there the value at a right angle bounds the optimistic end. */
const boundedBySquare = (Math.PI * 95) / 180
const square = Math.PI / 2

/** Solves pinches, each scene once for a run. */
export interface RoomSolver {
  /**
   * Room at the ends of every width, at both ends and the value of every other measure, and at both separations.
   * @param slack whether planned pauses may be used (the handler is shown to stand, and this is a place for it).
   * @param pausesAt clearance at which pauses are counted.
   */
  room(pinch: Pinch, separations: readonly Metres[], ask: Ask): Room
  /** Windows of segments that nothing but reaction and slope tells apart, by those. */
  grids: Map<string, Grid>
  /** Stops already reckoned. */
  stops: StopsReckoned
}

export interface Ask {
  slack: boolean
  pausesAt: Metres
  back: boolean
}

export function roomSolver(planner: Planner, bodies: Bodies): RoomSolver {
  const known = new Map<string, Room>()

  function solve(form: SceneForm | OwnScene, separation: Metres, ask: Ask): Room {
    const asked = form.kind !== 'own' && ask.back ? reverseForm(form) : form
    const key = `${asked.kind === 'own' ? asked.key : Object.values(asked).join(' ')} ${separation} ${ask.slack} ${ask.pausesAt}`
    const before = known.get(key)
    if (before) return before
    const scene = asked.kind === 'own' ? asked.draw(separation) : drawn(asked, separation)
    // A pinch that cannot be drawn is one that nobody can pass, and nobody knows.
    const room = scene
      ? roomIn(planner(scene, bodies, separation, options(ask)), ask)
      : { low: null, high: freeBound, pauses: 0, nearest: null }
    known.set(key, room)
    return room
  }

  function drawn(form: SceneForm, separation: Metres): Scene | null {
    const built = buildScene(form, bodies, separation)
    return built.ok ? built.scene : null
  }

  return {
    grids: new Map(),
    stops: new Map(),
    room(pinch, separations, ask) {
      let low: Room = { low: Number.POSITIVE_INFINITY, high: null, pauses: 0, nearest: null }
      let most: Metres | null = null
      for (const free of combinations(pinch.free)) {
        const narrow = pinch.build({ ...ends(pinch.widths, 'low'), ...free })
        const wide = pinch.build({ ...ends(pinch.widths, 'high'), ...bounding(free) })
        let best: Metres | null = Number.POSITIVE_INFINITY
        for (const separation of separations) {
          const there = solve(narrow, separation, ask)
          if (lesser(there.low, low.low)) low = there
          const hoped = solve(wide, separation, ask)
          best = best === null || hoped.high === null ? null : Math.min(best, hoped.high)
        }
        if (best !== null && (most === null || best > most)) most = best
      }
      const certified = low.low === null ? null : low.low - pinch.offLow
      return { low: certified, high: most, pauses: low.pauses, nearest: low.nearest }
    },
  }
}

const freeBound: Metres = 10

function options(ask: Ask) {
  return { pausesAt: ask.pausesAt, drift, slack: ask.slack }
}

/** Only a certified motion counts at the low end; the planner's cap on work leaves its free bounds at the high one. */
function roomIn(answer: ClearanceAnswer, ask: Ask): Room {
  if (!ask.slack) return { low: answer.mTaut, high: answer.mTautHigh, pauses: 0, nearest: null }
  return {
    low: answer.mSlack,
    high: answer.mSlackHigh,
    pauses: answer.pauses ?? 0,
    nearest: nearestSlack(answer.motion),
  }
}

function nearestSlack(motion: Motion | null): Metres | null {
  let nearest: Metres | null = null
  const samples = motion?.samples ?? []
  for (let i = 0; i + 5 < samples.length; i += 6) {
    if (samples[i + 5] !== 1) continue
    const apart = Math.hypot((samples[i] ?? 0) - (samples[i + 3] ?? 0), (samples[i + 1] ?? 0) - (samples[i + 4] ?? 0))
    if (nearest === null || apart < nearest) nearest = apart
  }
  return nearest
}

function lesser(a: Metres | null, b: Metres | null): boolean {
  if (b === null) return false
  return a === null || a < b
}

function ends(dims: Readonly<Record<string, Dimension>>, end: 'low' | 'high'): Record<string, number> {
  return Object.fromEntries(Object.entries(dims).map(([letter, dim]) => [letter, dim[end]]))
}

/** Just past a right angle the optimistic end is taken at the right angle, where a closed form bounds it. */
function bounding(free: Record<string, number>): Record<string, number> {
  const { angle } = free
  return angle !== undefined && angle > square && angle <= boundedBySquare ? { ...free, angle: square } : free
}

/** Every free measure at its low end, value and high end, each combination once. */
function combinations(free: Readonly<Record<string, Dimension>>): Record<string, number>[] {
  let all: Record<string, number>[] = [{}]
  for (const [letter, { low, value, high }] of Object.entries(free)) {
    const tried = [...new Set([low, value, high])]
    all = all.flatMap((one) => tried.map((end) => ({ ...one, [letter]: end })))
  }
  return all
}
