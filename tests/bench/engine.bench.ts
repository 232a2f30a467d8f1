import { clearance } from '../../src/leash/clearance.ts'
import { referenceBodies } from '../../src/leash/team.ts'
import { sceneOf, turn } from '../leash/cases.ts'
import { doorRows, indoorRows, type ReferenceRow, searchedRows, turnRows } from '../published/leash-reference-rows.ts'
import { calibrate, median, time } from './calibrate.ts'

interface Row {
  what: string
  milliseconds?: number
  /** Calibration units. */
  units?: number
  [more: string]: unknown
}

/** The engine's figures: time an answer, time a searched pinch, and how far short of the reference rows it falls. */
export function* bench(): Generator<Row> {
  const unit = calibrate()
  yield { what: 'calibration unit', milliseconds: rounded(unit, 1) }
  const told = (what: string, milliseconds: number, more: Record<string, unknown> = {}): Row => ({
    what,
    milliseconds: rounded(milliseconds, 2),
    units: rounded(milliseconds / unit, 3),
    ...more,
  })
  const closed = turnRows.filter((row) => row.taut !== null && row.taut > 0.02)
  yield told('closed form: one answer with its certificate', median(closed.map((row) => time(() => solve(row)))))
  for (const [name, rows] of [
    ['openings in line', indoorRows],
    ['sharp turns and chicanes', searchedRows],
    ['side doors and U-turns', doorRows],
  ] as const) {
    const times = rows.map((row) => time(() => solve(row), 1))
    yield told(`searched: one answer, ${name}`, median(times), { most: rounded(Math.max(...times) / unit, 2) })
  }
  const lengths = [0.799, 1.091, 1.35, 1.592, 1.937, 2.269]
  const pinch = (degrees: number) => () => {
    for (const S of lengths)
      for (const width of [1.29, 1.3])
        for (const end of [S - 0.1, S]) {
          const scene = sceneOf(turn(width, width, degrees), referenceBodies, end)
          clearance(scene, referenceBodies, end, { drift: 0.1 })
        }
  }
  yield told('searched pinch: a turn of 120 degrees, six lengths, both ends', time(pinch(120), 1))
  yield told('closed pinch: a right angle, six lengths, both ends', time(pinch(90), 1))
  yield* shortfalls()
}

/** Millimetres by which an answer lies under the reference row; negative: above it. */
function* shortfalls(): Generator<Row> {
  for (const [name, rows] of [
    ['turns', turnRows],
    ['openings in line', indoorRows],
    ['sharp turns and chicanes', searchedRows],
    ['side doors and U-turns', doorRows],
  ] as const) {
    const taut: number[] = []
    const slack: number[] = []
    let wrongPauses = 0
    for (const row of rows) {
      const answer = solve(row)
      if (row.taut !== null && row.taut >= 0.02) taut.push(rounded((row.taut - (answer.mTaut ?? 0)) * 1000, 1))
      if (row.slack !== null && row.slack >= 0.02) slack.push(rounded((row.slack - (answer.mSlack ?? 0)) * 1000, 1))
      const near = [row.taut, row.slack].some((value) => value !== null && Math.abs(value - 0.05) <= 0.02)
      if (!near && answer.pauses !== row.pauses[1]) wrongPauses++
    }
    yield { what: `shortfall against reference rows, mm: ${name}`, taut, slack, wrongPauses }
  }
}

function solve(row: ReferenceRow) {
  return clearance(sceneOf(row.form, referenceBodies, row.S), referenceBodies, row.S)
}

function rounded(value: number, digits: number): number {
  return Number(value.toFixed(digits))
}
