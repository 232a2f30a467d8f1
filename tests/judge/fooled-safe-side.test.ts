import { expect, test } from 'vitest'
import { interval } from '../../src/record/interval.ts'
import { check, feature, judged, reading, stretch } from './build.ts'

/** "Take the safe side" of a measure whose unsafe end is the small one. */

test('a distance between two obstructions taken on the safe side counts at no more than it may be', () => {
  const apart = (safeSide: boolean) =>
    feature('chicane', { depth: reading(0.2), spacing: reading(1, 'paces', { safeSide }) })
  const room = (safeSide: boolean) =>
    check(judged(stretch({ features: [apart(safeSide)], readings: { width: [reading(1.15)] } })), 'turn').capacity
  expect(room(true)).toBe(room(false))
})

test('a gradient and an angle are settled at the greater', () => {
  const steep = interval([reading(0.05, 'level', { safeSide: true })], { unsafe: 'size' })
  expect(steep?.low).toBeGreaterThan(0.05)
  expect(steep?.low).toBe(steep?.high)
  const down = interval([reading(-0.05, 'level', { safeSide: true })], { unsafe: 'size' })
  expect(down?.high).toBeLessThan(-0.05)
})
