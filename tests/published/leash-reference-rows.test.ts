import { describe, expect, it } from 'vitest'
import { clearance } from '../../src/leash/clearance.ts'
import { referenceBodies } from '../../src/leash/team.ts'
import { sceneOf } from '../leash/cases.ts'
import { giveOpinion } from '../leash/checker.ts'
import { doorRows, indoorRows, type ReferenceRow, searchedRows, turnRows } from './leash-reference-rows.ts'

const long = process.env.TAUTLINE_LONG === '1'
/** Rows are rounded to 0.1 mm, their half-widths too. */
const rounding = 1e-4

function check(row: ReferenceRow, short: number): void {
  const scene = sceneOf(row.form, referenceBodies, row.S)
  const answer = clearance(scene, referenceBodies, row.S)
  expect(answer.decided).toBe(true)
  // Never above what the slow solver calls possible.
  const most = (row.tautHigh === undefined ? null : row.tautHigh) ?? (row.taut === null ? 0 : null)
  if (answer.mTaut !== null && most !== null) expect(answer.mTaut).toBeLessThanOrEqual(most + row.err.taut + rounding)
  // Close below it wherever it matters.
  if (row.taut !== null && row.taut >= 0.02) expect(answer.mTaut).toBeGreaterThanOrEqual(row.taut - short)
  // The optimistic end is not below a motion the slow solver has.
  if (row.taut !== null) expect(answer.mTautHigh).toBeGreaterThanOrEqual(row.taut)
  if (row.slack !== null && row.slack >= 0.02)
    expect(answer.mSlack).toBeGreaterThanOrEqual(row.slack - short - row.err.slack)
  // 0.1805 was written where no motion exceeds (0.9 - 0.54) / 2 = 0.18: half of the row's own width is granted.
  if (row.slack !== null) expect(answer.mSlackHigh).toBeGreaterThanOrEqual(row.slack - row.err.slack / 2)
  if (answer.mTaut !== null) expect(answer.mSlack).toBeGreaterThanOrEqual(answer.mTaut)
  // Both motions hold up before another geometry.
  for (const [motion, clear] of [
    [answer.tautMotion, answer.mTaut],
    [answer.motion, answer.mSlack],
  ] as const) {
    if (clear === null) continue
    expect(motion).not.toBeNull()
    if (!motion) continue
    const opinion = giveOpinion(scene, referenceBodies, row.S, motion)
    expect(opinion.problems).toEqual([])
    expect(clear).toBeLessThanOrEqual(opinion.clearance + 1e-9)
    expect(clear).toBeGreaterThanOrEqual(opinion.clearance - 0.0025)
  }
  // Pauses, wherever no value they hang on is within 2 cm of the clearance asked for.
  const sure = (value: number | null) => value === null || Math.abs(value - 0.05) > 0.02
  if (sure(row.taut) && sure(row.slack)) expect(answer.pauses).toBe(row.pauses[1])
}

function name(row: ReferenceRow): string {
  const sizes = Object.entries(row.form).filter(([key, value]) => typeof value === 'number' && key !== 'lead')
  return `${row.form.kind} ${sizes.map(([key, value]) => `${key} ${Math.round((value as number) * 1000) / 1000}`).join(', ')}, S ${row.S}`
}

describe('reference rows of an independent slow solver', () => {
  for (const row of [...turnRows, ...indoorRows]) it(name(row), () => check(row, 0.01))
  for (const row of searchedRows.filter((_, i) => long || i % 3 === 0)) it(name(row), () => check(row, 0.01))
  for (const row of doorRows.filter((_, i) => long || i % 4 === 0)) it(name(row), () => check(row, 0.02))
})
