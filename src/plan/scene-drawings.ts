import type { Point, Scene, SceneForm } from '../geometry/scene.ts'
import type { Metres } from '../units/quantity.ts'

/** How far a drawing reaches: handler before the feature, entry and exit lengths, metres. */
export interface Reach {
  before: Metres
  entry: Metres
  exit: Metres
}

export interface Drawing {
  polygon: Point[]
  holes: Point[][]
  start: Scene['start']
  goal: Scene['goal']
  walls: string[]
}

type Form<K extends SceneForm['kind']> = Extract<SceneForm, { kind: K }>

/** How far past the feature the handler must come, metres. */
const past = 0.6
/** Thickness along the corridor of a chicane's obstructions, metres. */
const obstruction = 0.3

/** A corner with the name of the wall that starts there. */
type Corner = [x: Metres, y: Metres, wall: string]

function ring(corners: Corner[]): { polygon: Point[]; walls: string[]; holes: Point[][] } {
  // An obstruction flush with its wall leaves a wall of no length behind: it is no wall.
  const kept = corners.filter(([x, y], i) => {
    const [nextX, nextY] = corners[(i + 1) % corners.length] as Corner
    return Math.hypot(nextX - x, nextY - y) > 1e-9
  })
  return { polygon: kept.map(([x, y]) => ({ x, y })), walls: kept.map(([, , wall]) => wall), holes: [] }
}

function box(x0: Metres, y0: Metres, x1: Metres, y1: Metres): { polygon: Point[] } {
  return {
    polygon: [
      { x: x0, y: y0 },
      { x: x1, y: y0 },
      { x: x1, y: y1 },
      { x: x0, y: y1 },
    ],
  }
}

/** Entry along +x below y = 0, sharp inner corner at the origin, exit to the left by `angle`. */
export function drawTurn({ w1, w2, angle }: Form<'turn'>, reach: Reach): Drawing {
  const c = Math.cos(angle)
  const s = Math.sin(angle)
  const outer = (w2 - w1 * c) / s
  // A wide entry into a narrow, gentle exit has its outer corner far behind the inner one.
  const entry = Math.max(reach.entry, 1 - outer)
  const exit = Math.max(reach.exit, 1 + outer * c - w1 * s)
  const at = (along: Metres, right: Metres): Point => ({ x: along * c + right * s, y: along * s - right * c })
  const endRight = at(exit, w2)
  const endLeft = at(exit, 0)
  const goal = [at(past, 0), at(past, w2), at(exit, w2), at(exit, 0)]
  return {
    ...ring([
      [-entry, -w1, 'entry outer wall'],
      [outer, -w1, 'exit outer wall'],
      [endRight.x, endRight.y, 'end of the exit'],
      [endLeft.x, endLeft.y, 'exit inner wall'],
      [0, 0, 'entry inner wall'],
      [-entry, 0, 'end of the entry'],
    ]),
    start: { x: -reach.before, y: -w1 / 2, heading: 0 },
    goal: { polygon: goal },
  }
}

/** Corridor along +x below y = 0, a doorway in its left wall between x = 0 and p, a room 3 m wide beyond. */
export function drawSidedoor({ w, p, t, reverse }: Form<'sidedoor'>, reach: Reach): Drawing {
  const end = p + 2
  const left = p / 2 - 1.5
  const right = p / 2 + 1.5
  const depth = t + Math.max(reach.exit, reach.entry)
  const corners: Corner[] = [
    [-reach.entry, -w, 'wall opposite the door'],
    [end, -w, 'end of the corridor'],
    [end, 0, 'wall past the far jamb'],
    [p, 0, 'far jamb'],
    [p, t, 'room wall past the far jamb'],
    [right, t, 'right wall of the room'],
    [right, depth, 'back of the room'],
    [left, depth, 'left wall of the room'],
    [left, t, 'room wall before the near jamb'],
    [0, t, 'near jamb'],
    [0, 0, 'wall before the near jamb'],
    [-reach.entry, 0, 'end of the entry'],
  ]
  return {
    ...ring(corners),
    start: reverse
      ? { x: p / 2, y: t + reach.before, heading: -Math.PI / 2 }
      : { x: -reach.before, y: -w / 2, heading: 0 },
    goal: reverse ? box(-reach.entry, -w, -past, 0) : box(left, t + past, right, depth),
  }
}

/** Straight corridor, a cross wall at x in [0, t] with an opening `p` whose centre lies `o` left of the centre line. */
export function drawIndoor({ w, p, t, o, reverse }: Form<'indoor'>, reach: Reach): Drawing {
  const low = Math.max(-w / 2, o - p / 2)
  const high = Math.min(w / 2, o + p / 2)
  const behind = reverse ? reach.exit : reach.entry
  const ahead = t + (reverse ? reach.entry : reach.exit)
  return {
    ...ring([
      [-behind, -w / 2, 'right wall'],
      [0, -w / 2, 'cross wall right of the opening'],
      [0, low, 'right jamb'],
      [t, low, 'cross wall right of the opening'],
      [t, -w / 2, 'right wall'],
      [ahead, -w / 2, 'end of the corridor'],
      [ahead, w / 2, 'left wall'],
      [t, w / 2, 'cross wall left of the opening'],
      [t, high, 'left jamb'],
      [0, high, 'cross wall left of the opening'],
      [0, w / 2, 'left wall'],
      [-behind, w / 2, 'end of the corridor'],
    ]),
    start: reverse ? { x: t + reach.before, y: 0, heading: Math.PI } : { x: -reach.before, y: 0, heading: 0 },
    goal: reverse ? box(-behind, -w / 2, -past, w / 2) : box(t + past, -w / 2, ahead, w / 2),
  }
}

/** Half a turn to the left round the end of a wall of thickness `k`, its tip at x = 0; end wall at x = e. */
export function drawUturn({ w1, k, w2, e }: Form<'uturn'>, reach: Reach): Drawing {
  return {
    ...ring([
      [-reach.entry, -w1, 'entry outer wall'],
      [e, -w1, 'end wall'],
      [e, k + w2, 'exit outer wall'],
      [-reach.exit, k + w2, 'end of the exit'],
      [-reach.exit, k, 'exit side of the dividing wall'],
      [0, k, 'tip of the dividing wall'],
      [0, 0, 'entry side of the dividing wall'],
      [-reach.entry, 0, 'end of the entry'],
    ]),
    start: { x: -reach.before, y: -w1 / 2, heading: 0 },
    goal: box(-reach.exit, k, -past, k + w2),
  }
}

/** Straight corridor with an obstruction from the left wall, then one from the right, `s` apart along it. */
export function drawChicane({ w, j, s, reverse }: Form<'chicane'>, reach: Reach): Drawing {
  const second = obstruction + s
  const end = second + obstruction
  const behind = reverse ? reach.exit : reach.entry
  const ahead = end + (reverse ? reach.entry : reach.exit)
  return {
    ...ring([
      [-behind, -w / 2, 'right wall'],
      [second, -w / 2, 'right obstruction'],
      [second, j - w / 2, 'right obstruction'],
      [end, j - w / 2, 'right obstruction'],
      [end, -w / 2, 'right wall'],
      [ahead, -w / 2, 'end of the corridor'],
      [ahead, w / 2, 'left wall'],
      [obstruction, w / 2, 'left obstruction'],
      [obstruction, w / 2 - j, 'left obstruction'],
      [0, w / 2 - j, 'left obstruction'],
      [0, w / 2, 'left wall'],
      [-behind, w / 2, 'end of the corridor'],
    ]),
    start: reverse ? { x: end + reach.before, y: 0, heading: Math.PI } : { x: -reach.before, y: 0, heading: 0 },
    goal: reverse ? box(-behind, -w / 2, -past, w / 2) : box(end + past, -w / 2, ahead, w / 2),
  }
}
