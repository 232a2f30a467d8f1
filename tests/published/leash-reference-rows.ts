import type { SceneForm } from '../../src/geometry/scene.ts'
import { chicane, indoor, sidedoor, turn, uturn } from '../leash/cases.ts'

/**
 * Rows of an independent slow solver for the reference team (a 0.65, b 0.35, d 0.15, r 0.27, g 0.10, 90 degrees,
 * sideways, lead 0.5, no drift, forward), copied by hand. `taut` is its best conservative value, `tautHigh` an
 * optimistic one (undefined = not computed), `err` the half-widths it allows for; null = none.
 */
export interface ReferenceRow {
  form: SceneForm
  S: number
  taut: number | null
  tautHigh: number | null | undefined
  slack: number | null
  /** Least pauses for a clearance of 0 and of 0.05. */
  pauses: [number | null, number | null]
  err: { taut: number; slack: number }
}

function row(
  form: SceneForm,
  S: number,
  taut: number | null,
  tautHigh: number | null | undefined,
  slack: number | null,
  pauses: [number | null, number | null],
  errTaut: number,
): ReferenceRow {
  return { form, S, taut, tautHigh, slack, pauses, err: { taut: errTaut, slack: 0.008 } }
}

const none: [null, null] = [null, null]

export const turnRows: ReferenceRow[] = [
  row(turn(1, 1, 90), 0.8, 0.1179, 0.1188, 0.1179, [0, 0], 0.003),
  row(turn(1, 1, 90), 1, 0.0632, 0.0632, 0.0632, [0, 0], 0.003),
  row(turn(1, 1, 90), 1.2, 0.0076, 0.0085, 0.0076, [0, null], 0.003),
  row(turn(1, 1, 90), 1.4, null, null, null, none, 0.003),
  row(turn(1, 1, 90), 1.6, null, null, null, none, 0.003),
  row(turn(1, 1, 90), 1.8, null, null, null, none, 0.003),
  row(turn(1.2, 1.2, 90), 0.8, 0.2326, 0.2326, 0.2326, [0, 0], 0.003),
  row(turn(1.2, 1.2, 90), 1.2, 0.1226, 0.1226, 0.1226, [0, 0], 0.003),
  row(turn(1.2, 1.2, 90), 1.6, 0.0032, 0.0113, 0.0105, [0, null], 0.0098),
  row(turn(1.2, 0.9, 90), 1, 0.0589, 0.0604, 0.0589, [0, 0], 0.003),
  row(turn(1.2, 0.9, 90), 1.2, 0.0049, 0.0065, 0.0049, [0, null], 0.003),
]

export const indoorRows: ReferenceRow[] = [
  row(indoor(1.5, 0.8, 0.15, 0.3), 0.8, 0.13, 0.13, 0.13, [0, 0], 0.003),
  row(indoor(1.5, 0.8, 0.15, 0.3), 1, 0.13, 0.13, 0.13, [0, 0], 0.003),
  row(indoor(1.5, 0.8, 0.15, 0.3), 1.2, 0.13, 0.13, 0.13, [0, 0], 0.003),
  row(indoor(1.5, 0.8, 0.15, 0.3), 1.4, 0.13, 0.13, 0.13, [0, 0], 0.003),
  row(indoor(1.5, 0.8, 0.15, 0.3), 1.6, 0.13, 0.13, 0.13, [0, 0], 0.003),
  row(indoor(1.5, 0.8, 0.15, 0.3), 1.8, 0.13, 0.13, 0.13, [0, 0], 0.003),
  row(indoor(1.8, 0.9, 0.15, 0.4), 1.2, 0.1797, 0.1797, 0.1797, [0, 0], 0.003),
  row(indoor(1.8, 0.9, 0.15, 0.4), 1.8, 0.1797, 0.1797, 0.1797, [0, 0], 0.003),
]

export const searchedRows: ReferenceRow[] = [
  row(turn(1, 1, 135), 0.8, 0.1224, 0.1224, 0.1544, [0, 0], 0.007),
  row(turn(1, 1, 135), 1, 0.048, 0.0507, 0.0992, [0, 1], 0.007),
  row(turn(1, 1, 135), 1.2, null, null, 0.0606, [1, 3], 0.007),
  row(turn(1, 1, 135), 1.4, null, null, 0.0126, [3, null], 0.007),
  row(turn(1, 1, 120), 1, 0.0399, 0.0399, 0.0521, [0, 1], 0.0082),
  row(turn(1, 1, 120), 1.2, null, null, null, none, 0.007),
  row(turn(1, 1, 120), 1.4, null, null, null, none, 0.007),
  row(chicane(1.5, 0.7, 0.8), 0.8, 0.0236, 0.0247, 0.0236, [0, null], 0.005),
  row(chicane(1.5, 0.7, 0.8), 1, null, null, null, none, 0.005),
  row(chicane(1.5, 0.7, 0.8), 1.2, null, null, null, none, 0.005),
  row(chicane(1.5, 0.7, 0.8), 1.4, null, null, null, none, 0.005),
  row(chicane(1.5, 0.7, 0.8), 1.6, null, null, null, none, 0.005),
  row(chicane(1.5, 0.7, 0.8), 1.8, null, null, null, none, 0.005),
  row(chicane(1.8, 0.7, 1.2), 0.8, 0.2228, 0.2242, 0.2228, [0, 0], 0.005),
  row(chicane(1.8, 0.7, 1.2), 1.2, 0.1692, 0.1703, 0.1692, [0, 0], 0.005),
]

export const doorRows: ReferenceRow[] = [
  row(uturn(1, 0.15, 1, 1.2), 0.8, 0.1125, 0.1125, 0.1125, [0, 0], 0.007),
  row(uturn(1, 0.15, 1, 1.2), 1, 0.0247, 0.0247, 0.032, [0, null], 0.007),
  row(uturn(1, 0.15, 1, 1.2), 1.2, null, null, null, none, 0.007),
  row(uturn(1, 0.15, 1, 1.2), 1.4, null, null, null, none, 0.007),
  row(uturn(1, 0.15, 1, 1.2), 1.6, null, null, null, none, 0.007),
  row(uturn(1, 0.15, 1, 1.2), 1.8, null, null, null, none, 0.007),
  row(uturn(1.2, 0.6, 1, 1), 0.8, 0.1085, 0.1085, 0.1085, [0, 0], 0.007),
  row(uturn(1.2, 0.6, 1, 1), 1.2, null, null, null, none, 0.007),
  row(sidedoor(1.2, 0.9, 0.15), 0.8, 0.1379, 0.1394, 0.1795, [0, 0], 0.008),
  row(sidedoor(1.2, 0.9, 0.15), 1, 0.1075, 0.1098, 0.1793, [0, 0], 0.0086),
  row(sidedoor(1.2, 0.9, 0.15), 1.2, 0.0832, undefined, 0.1805, [0, 0], 0.008),
  row(sidedoor(1.2, 0.9, 0.15), 1.4, 0.0642, undefined, 0.1799, [0, 0], 0.008),
  row(sidedoor(1.2, 0.9, 0.15), 1.6, 0.0368, undefined, 0.1791, [0, 1], 0.008),
  row(sidedoor(1.2, 0.9, 0.15), 1.8, 0.0118, undefined, 0.1793, [0, 1], 0.008),
  row(sidedoor(1, 0.9, 0.15), 1, 0.0619, undefined, 0.154, [0, 0], 0.008),
  row(sidedoor(1, 0.9, 0.15), 1.2, 0.0232, undefined, 0.1777, [0, 1], 0.008),
  row(sidedoor(1, 0.9, 0.15), 1.4, 0.011, undefined, 0.1792, [0, 1], 0.008),
  row(sidedoor(1, 0.9, 0.15), 1.6, null, null, 0.1786, [1, 1], 0.008),
]
