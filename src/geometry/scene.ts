import type { Metres, Radians } from '../units/quantity.ts'

/** A point in the plane: x ahead or right, y up, metres. */
export interface Point {
  x: Metres
  y: Metres
}

/**
 * Where a motion begins: the handler's centre stands at (x, y), taut, with the robot ahead along `heading`.
 */
export interface SceneStart {
  x: Metres
  y: Metres
  heading: Radians
}

/**
 * Where a motion ends: the handler's centre is inside this closed polygon (vertices in order, at least three).
 */
export interface SceneGoal {
  polygon: Point[]
}

/**
 * A pinch as a free region for the planner. `polygon` is the outer wall as a closed ring without a repeated last
 * vertex, anticlockwise; `holes` are obstructions inside it, clockwise. `plan/` builds scenes, `leash/` solves them.
 */
export interface Scene {
  polygon: Point[]
  holes: Point[][]
  start: SceneStart
  goal: SceneGoal
  /** The names of the polygon's edges, edge i running from vertex i to i + 1: used to say which wall is tightest. */
  walls?: string[]
  /** The dimensions it was built from, where it is one of the named forms: closed forms need them. */
  form?: SceneForm
}

/** The named scenes; lengths in metres, `angle` in radians. See plan/scenes for the drawing of each. */
export type SceneForm =
  | { kind: 'turn'; w1: Metres; w2: Metres; angle: Radians; lead: Metres }
  | { kind: 'sidedoor'; w: Metres; p: Metres; t: Metres; lead: Metres; reverse: boolean }
  | { kind: 'indoor'; w: Metres; p: Metres; t: Metres; o: Metres; lead: Metres; reverse: boolean }
  | { kind: 'uturn'; w1: Metres; k: Metres; w2: Metres; e: Metres; lead: Metres }
  | { kind: 'chicane'; w: Metres; j: Metres; s: Metres; lead: Metres; reverse: boolean }
