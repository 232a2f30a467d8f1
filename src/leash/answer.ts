import type { Metres, Radians } from '../units/quantity.ts'

/** The moving team as the planner needs it: a rectangle on a leash with a disc behind it. */
export interface Bodies {
  /** Robot length along its heading. */
  a: Metres
  /** Robot width. */
  b: Metres
  /** Leash attachment behind the body centre, d >= 0. */
  d: Metres
  /** Handler's radius. */
  r: Metres
  /** Least distance between the rectangle and the disc. */
  g: Metres
  /** Greatest angle between the taut leash and the robot's backward axis. */
  phiMax: Radians
  /** True: a robot that walks sideways and turns on the spot. False: its centre moves along its heading only. */
  sideways: boolean
}

/**
 * An explicit motion, the certificate of a clearance. `samples` is flat, six numbers a sample:
 * attachment x, attachment y, robot heading, handler x, handler y, slack (1 while the leash hangs slack, else 0).
 * Consecutive samples are at most 0.01 m of any body point apart.
 */
export interface Motion {
  samples: Float64Array
}

/** The tightest place of a motion, in numbers and in words. */
export interface Tightest {
  body: 'robot' | 'handler'
  /** Which part of the body: for the handler "left shoulder", "right shoulder", "front", "back"; for the robot a corner or side. */
  part: string
  /** The wall's name in the scene, for example "inner corner" or "far jamb". */
  wall: string
  x: Metres
  y: Metres
  /** "handler's left shoulder at the inner corner" */
  text: string
}

/** What the planner says of one scene, one team, one separation. */
export interface ClearanceAnswer {
  /** Certified clearance of a motion that stays taut: recomputed from the motion itself, never above the truth. null: none found. */
  mTaut: Metres | null
  /** Optimistic bound of the same: never below the truth. null: certainly none (below zero). */
  mTautHigh: Metres | null
  /** The same with at most three slack pauses. Never below mTaut. */
  mSlack: Metres | null
  mSlackHigh: Metres | null
  /** Least number of pauses found for a clearance of `pausesAt`; null: no motion with that clearance found. */
  pauses: number | null
  tightest: Tightest | null
  /** Total swing of the leash along the motion. */
  swing: Radians
  /** The motion of mSlack (the taut one where a pause gains nothing). */
  motion: Motion | null
  /** The certified taut motion, where there is one: for a handler who is not shown to stand. */
  tautMotion: Motion | null
  /** False: the cap on work was reached. Never to be read as passing: the high ends are then the free bounds. */
  decided: boolean
}

export interface ClearanceOptions {
  /** Clearance at which `pauses` is counted; 0.05 by default. */
  pausesAt?: Metres
  /** How far towards the robot a standing handler may be moved during a pause without making it invalid; 0 by default (the reference cases), 0.10 in judgement. */
  drift?: Metres
  /** False: only the taut answer is wanted; slack fields then repeat it. True by default. */
  slack?: boolean
  /** Cap on work, in sweeps of the value function or steps; the default is bounded too. */
  workCap?: number
}

/** A planner, so that judge/ can be given one with a memo. */
export type Planner = (
  scene: import('../geometry/scene.ts').Scene,
  bodies: Bodies,
  separation: Metres,
  options?: ClearanceOptions,
) => ClearanceAnswer
