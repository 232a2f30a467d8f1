import { describe, expect, test } from 'vitest'
import { corner } from '../fixtures/demo/corner.ts'

/**
 * Rows of a slow solver that shares nothing with this statement: w1, w2, S, its best conservative value and the half
 * width it allows. Robot 0.65 by 0.35, attachment 0.15 behind its centre, radius 0.27.
 */
const slowSolver = [
  [1, 1, 0.8, 0.1179, 0.003],
  [1, 1, 1, 0.0632, 0.003],
  [1, 1, 1.2, 0.0076, 0.003],
  [1.2, 1.2, 0.8, 0.2326, 0.003],
  [1.2, 1.2, 1.2, 0.1226, 0.003],
  [1.2, 1.2, 1.6, 0.0032, 0.0098],
  [1.2, 0.9, 1, 0.0589, 0.003],
  [1.2, 0.9, 1.2, 0.0049, 0.003],
] as const

/** The default team, radius 0.3565, at a corner of 1.2 by 1.2 m: separation, room. Worked by hand. */
const byHand = [
  [0.8, 0.18],
  [1.09, 0.099],
  [1.35, 0.027],
] as const

describe('the closed statement of a square corner', () => {
  test.each(slowSolver)('%d by %d at %d leaves %d within %d', (w1, w2, separation, room, within) => {
    expect(Math.abs(corner(w1, w2, separation, 0.35, 0.27) - room)).toBeLessThanOrEqual(within)
  })

  test.each(byHand)('1.2 by 1.2 at %d leaves %d', (separation, room) => {
    expect(corner(1.2, 1.2, separation, 0.35, 0.3565)).toBeCloseTo(room, 3)
  })

  test('a wider corner never leaves less, a longer leash never more', () => {
    expect(corner(1.3, 1.2, 1, 0.35, 0.3)).toBeGreaterThanOrEqual(corner(1.2, 1.2, 1, 0.35, 0.3))
    expect(corner(1.2, 1.3, 1, 0.35, 0.3)).toBeGreaterThanOrEqual(corner(1.2, 1.2, 1, 0.35, 0.3))
    expect(corner(1.2, 1.2, 1.2, 0.35, 0.3)).toBeLessThanOrEqual(corner(1.2, 1.2, 1, 0.35, 0.3))
  })
})
