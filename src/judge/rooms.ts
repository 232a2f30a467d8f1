import type { Scene, SceneForm } from '../geometry/scene.ts'
import type { Bodies, ClearanceAnswer, Motion, Planner } from '../leash/answer.ts'
import type { Dimension, OwnScene, Pinch } from '../plan/pinch.ts'
import { buildScene, reverseForm } from '../plan/scenes.ts'
import type { Metres } from '../units/quantity.ts'
import type { StopsReckoned } from './checks/stop.ts'
import { roomState } from './finding.ts'
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

/** Held taut all the way, and with planned pauses; the second repeats the first where pauses were not asked for. */
export interface Rooms {
  taut: Room
  slack: Room
}

/** What a run has solved already. */
export interface RoomSolver {
  /**
   * Room at the ends of every width, at both ends and the value of every other measure, and at both separations.
   * @param separations least first.
   */
  room(pinch: Pinch, separations: readonly Metres[], ask: Ask): Rooms
  /** Windows of segments that nothing but reaction and slope tells apart, by those. */
  grids: Map<string, Grid>
  stops: StopsReckoned
}

export interface Ask {
  /** Planned pauses may be used: the handler is shown to stand, and this is a place for it. */
  slack: boolean
  /** Clearance that is needed, and the caution band above it. */
  need: Metres
  band: Metres
  /** The way back. */
  back: boolean
}

/** How far a standing handler may be moved during a pause. */
const drift: Metres = 0.1
/** Up to a right angle, and at most a little past it: there the value at a right angle bounds the optimistic end. */
const boundedBySquare = (Math.PI * 95) / 180
const square = Math.PI / 2
/** Widths of searched scenes are rounded to this, down for the certified end and up for the other, so that they are met again. */
const grain: Metres = 0.01
/** Above what any pinch leaves. */
const beyondUse: Metres = 10

type Question = SceneForm | OwnScene
type Ends = (dim: Dimension, end: 'low' | 'high') => Metres

export function roomSolver(planner: Planner, bodies: Bodies): RoomSolver {
  const known = new Map<string, Rooms>()

  function solve(form: Question, separation: Metres, ask: Ask): Rooms {
    const key = `${form.kind === 'own' ? form.key : Object.values(form).join(' ')} ${separation} ${ask.slack} ${ask.need}`
    const before = known.get(key)
    if (before) return before
    const scene = form.kind === 'own' ? form.draw(separation) : drawn(form, separation)
    // A pinch that cannot be drawn is one that nobody can pass, and nobody knows.
    const room = scene
      ? roomsIn(planner(scene, bodies, separation, { pausesAt: ask.need, drift, slack: ask.slack }))
      : { taut: unknown, slack: unknown }
    known.set(key, room)
    return room
  }

  function drawn(form: SceneForm, separation: Metres): Scene | null {
    const built = buildScene(form, bodies, separation)
    return built.ok ? built.scene : null
  }

  /** @param searched scenes without a closed form: the optimistic end, a search too, is then taken at the longest separation alone, which bounds the least of both. */
  function over(pinch: Pinch, separations: readonly Metres[], ask: Ask, ends: Ends, searched: boolean): Rooms {
    const taut = new Bracket()
    const slack = new Bracket()
    for (const free of combinations(pinch.free)) {
      const narrow = asked(pinch, { ...at(pinch.widths, 'low', ends), ...free }, ask)
      const wide = asked(pinch, { ...at(pinch.widths, 'high', ends), ...bounding(free) }, ask)
      const there = separations.map((separation) => solve(narrow, separation, ask))
      const hoped = (searched ? separations.slice(-1) : separations).map((one) => solve(wide, one, ask))
      for (const [bracket, mode] of [
        [taut, 'taut'],
        [slack, 'slack'],
      ] as const) {
        for (const one of there) bracket.certify(one[mode])
        bracket.hope(hoped.map((one) => one[mode].high))
      }
    }
    return { taut: taut.room(pinch.offLow), slack: slack.room(pinch.offLow) }
  }

  return {
    grids: new Map(),
    stops: new Map(),
    room(pinch, separations, ask) {
      const searched = isSearched(pinch)
      if (searched) {
        const coarse = over(pinch, separations, ask, rounded, searched)
        if (isSettled(coarse, ask)) return coarse
      }
      return over(pinch, separations, ask, (dim, end) => dim[end], searched)
    },
  }
}

/** The scene in the walk's direction, or the way back with its own run-up. */
function asked(pinch: Pinch, dims: Record<string, number>, { back }: Ask): Question {
  const form = pinch.build(dims)
  return back && form.kind !== 'own' ? reverseForm({ ...form, lead: pinch.leadBack }) : form
}

const unknown: Room = { low: null, high: beyondUse, pauses: 0, nearest: null }

/** The worst certified room of all tried, and the best that can be hoped for. */
class Bracket {
  private worst: Room = { low: Number.POSITIVE_INFINITY, high: null, pauses: 0, nearest: null }
  private most: Metres | null = null

  certify(room: Room): void {
    if (this.worst.low === null) return
    if (room.low === null || room.low < this.worst.low) this.worst = room
  }

  /** Optimistic ends of one combination at each separation: the least of them is what it allows. */
  hope(ends: readonly (Metres | null)[]): void {
    if (ends.some((one) => one === null)) return
    const least = Math.min(...(ends as Metres[]))
    if (this.most === null || least > this.most) this.most = least
  }

  room(offLow: Metres): Room {
    const { low, pauses, nearest } = this.worst
    return { low: low === null ? null : low - offLow, high: this.most, pauses, nearest }
  }
}

/** Turns up to a right angle and openings in line have a closed form; every other scene is searched. */
function isSearched(pinch: Pinch): boolean {
  const form = pinch.build({ ...at(pinch.widths, 'low', (dim, end) => dim[end]), ...combinations(pinch.free).at(-1) })
  return form.kind !== 'indoor' && !(form.kind === 'turn' && form.angle <= square + 1e-9)
}

/** A rounded answer holds where exact widths cannot give another state. */
function isSettled({ taut, slack }: Rooms, ask: Ask): boolean {
  const state = roomState(taut, ask.need, ask.band)
  if (state === 'passes' || (state === 'fails' && !ask.slack)) return true
  if (state !== 'fails') return false
  const paused = roomState(slack, ask.need, ask.band)
  return paused === 'passes' || paused === 'fails'
}

const rounded: Ends = (dim, end) =>
  end === 'low'
    ? Math.max(grain, Math.floor(dim.low / grain + 1e-9) * grain)
    : Math.ceil(dim.high / grain - 1e-9) * grain

/** Only a certified motion counts at the low end; the planner's cap on work leaves its free bounds at the high one. */
function roomsIn(answer: ClearanceAnswer): Rooms {
  return {
    taut: { low: answer.mTaut, high: answer.mTautHigh, pauses: 0, nearest: null },
    slack: {
      low: answer.mSlack,
      high: answer.mSlackHigh,
      pauses: answer.pauses ?? 0,
      nearest: nearestSlack(answer.motion),
    },
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

function at(dims: Readonly<Record<string, Dimension>>, end: 'low' | 'high', ends: Ends): Record<string, number> {
  return Object.fromEntries(Object.entries(dims).map(([letter, dim]) => [letter, ends(dim, end)]))
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
