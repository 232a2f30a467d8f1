import type { Scene, SceneForm } from '../geometry/scene.ts'
import type { Interval, Unsafe } from '../record/interval.ts'
import type { Feature, Reading, Segment } from '../record/survey.ts'
import type { Metres } from '../units/quantity.ts'

/** How a quantity is read: pins and changed uncertainties are the reader's. */
export type Read = (
  holder: { readings: Readonly<Record<string, readonly Reading[]>> },
  quantity: string,
  unsafe: Unsafe,
) => Interval | null

/** A measure of a pinch with its ends. */
export interface Dimension {
  low: Metres
  value: Metres
  high: Metres
}

/**
 * A pinch as the planner is asked it: `widths` never do harm by growing, so the low end gives the certified room and
 * the high end the optimistic one; `free` measures have no one unsafe end and are tried at both ends and their value.
 */
export interface Pinch {
  feature: Feature
  widths: Readonly<Record<string, Dimension>>
  free: Readonly<Record<string, Dimension>>
  from: Interval[]
  /** Straight run-up of the way back. */
  leadBack: Metres
  /** Room taken off the certified end: an angle by 3-4-5 or plan is taken as square. */
  offLow: Metres
  /** The named form, or a scene of its own for a separation, both in metres and radians. */
  build: (dims: Readonly<Record<string, number>>) => SceneForm | OwnScene
}

/** A scene of no named form: `key` tells it from every other. */
export interface OwnScene {
  kind: 'own'
  key: string
  draw(separation: Metres): Scene
}

/** A pinch that cannot be judged yet, and what it lacks, in words. */
export interface Lacking {
  feature: Feature
  lacking: string
}

export interface PinchSite {
  segment: Segment
  before: Segment | null
  after: Segment | null
  read: Read
  team: { a: Metres; d: Metres }
}

/** Beyond this a width does not matter. */
export const wide: Metres = 10
export const thinnest: Metres = 0.01

/** A width within what matters. */
export function width({ low, value, high }: Dimension): Dimension {
  const within = (one: number) => Math.min(wide, Math.max(thinnest, one))
  return { low: within(low), value: within(value), high: within(high) }
}

/** A measure without an unsafe end, by its size, never nothing and never beyond what matters. */
export function free(one: Dimension): Dimension {
  const within = (end: number) => Math.min(wide, Math.max(thinnest, Math.abs(end)))
  return { low: within(one.low), value: within(one.value), high: within(one.high) }
}
