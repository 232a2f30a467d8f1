import { describe, expect, test } from 'vitest'
import { judgeSurvey, runToEnd } from '../../src/judge/judge.ts'
import type { SegmentResult } from '../../src/judge/result.ts'
import { clearance } from '../../src/leash/clearance.ts'
import { card, check, feature, on, reading, stretch, survey, walkOf } from './build.ts'

/** The judgement with the real planner, where it has a closed form: square corners measured by 3-4-5. */
function corner(w1: number, w2: number, lengths: number[], exact = false): SegmentResult {
  const segments = [
    stretch({ readings: { width: [reading(w1)] }, turn: feature('turn', { angle: reading(Math.PI / 2, 'square') }) }),
    stretch({ readings: { width: [reading(w2)] } }),
  ]
  const instruments = exact ? { tape: { absolute: 0, relative: 0 } } : {}
  const made = survey([walkOf(segments)], undefined, { instruments })
  const team = card({ leash: { lengths } })
  return runToEnd(judgeSurvey(made, { planner: clearance, on, team })).walks[0]?.segments[0] as SegmentResult
}

/** Room a side that a check's capacity stands for. */
const room = (one: SegmentResult) => ((check(one, 'turn').capacity as number) - 0.713) / 2

describe('a corner of 1.2 m by 1.2 m, worked by hand', () => {
  test.each([
    // Separation 1.091 and 1.350: 0.099 and 0.027 m, less 3 mm for the square.
    [0.8, 0.099],
    [1.0, 0.027],
  ])('at a leash of %d m it leaves %d m', (length, left) => {
    const found = room(corner(1.2, 1.2, [length], true))
    // The certificate may lie up to 1 cm under the truth and never above it.
    expect(found).toBeLessThanOrEqual(left - 0.003 + 0.0006)
    expect(found).toBeGreaterThanOrEqual(left - 0.003 - 0.01)
  })

  test('so the 0.8 m leash, at 0.40 to 0.45 m/s', () => {
    const found = corner(1.2, 1.2, [0.6, 0.8, 1.0])
    expect(found.leash?.recommended).toBe(0.8)
    expect(found.pace).toBe(0.4)
    expect(found.verdict).toBe('with-cautions')
    expect(found.governing).toBe('turn')
  })

  test('the interval goes through the planner: both ends of both widths', () => {
    const [low, high] = check(corner(1.2, 1.2, [0.8]), 'turn').ratio as [number, number]
    const narrow = check(corner(1.195, 1.195, [0.8], true), 'turn').ratio as [number, number]
    const wide = check(corner(1.205, 1.205, [0.8], true), 'turn').ratio as [number, number]
    expect(high).toBeCloseTo(narrow[1], 9)
    expect(low).toBeCloseTo(wide[0], 9)
    expect(low).toBeLessThan(high)
  })
})

test('the way back is shown beside, and is another figure where the corridors differ', () => {
  const there = check(corner(1.5, 1.1, [0.8], true), 'turn')
  const back = check(corner(1.1, 1.5, [0.8], true), 'turn')
  expect(there.back?.[1]).toBeCloseTo(back.ratio?.[1] as number, 9)
  expect(Math.abs((there.ratio?.[1] as number) - (back.ratio?.[1] as number))).toBeGreaterThan(0.005)
})
