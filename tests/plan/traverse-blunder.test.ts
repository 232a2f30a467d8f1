import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { layTraverse } from '../../src/plan/traverse.ts'
import { expectedMisclosure, suspects } from '../../src/plan/traverse-blunder.ts'

const degree = Math.PI / 180
const origin = { x: 0, y: 0 }

/** Seven courses in seven directions, no two within 14 degrees of one line. */
const courses = [
  { length: 18, turn: 70 * degree },
  { length: 7.5, turn: -30 * degree },
  { length: 22, turn: 100 * degree },
  { length: 12.4, turn: 55 * degree },
  { length: 9, turn: -105 * degree },
  { length: 16, turn: 20 * degree },
  { length: 11, turn: 0 },
]
const end = layTraverse(courses, origin, 0).points.at(-1) ?? origin

describe('one blunder is found where it was made', () => {
  it.each(courses.map((_, i) => i))('a tape length lost or doubled in course %d', (wrong) => {
    for (const excess of [-5, 1, 5]) {
      const read = courses.map((course, i) => (i === wrong ? { ...course, length: course.length + excess } : course))
      const [first] = suspects(layTraverse(read, origin, 0), end)
      expect(first).toMatchObject({ reading: 'length', course: wrong })
      expect(first?.excess).toBeCloseTo(excess, 9)
      expect(first?.remains).toBeCloseTo(0, 9)
    }
  })

  it.each(courses.slice(0, -1).map((_, i) => i))('a turn misread at the end of course %d', (wrong) => {
    for (const excess of [-20 * degree, 10 * degree, 45 * degree]) {
      const read = courses.map((course, i) => (i === wrong ? { ...course, turn: course.turn + excess } : course))
      const [first] = suspects(layTraverse(read, origin, 0), end)
      expect(first).toMatchObject({ reading: 'turn', course: wrong })
      expect(first?.excess).toBeCloseTo(excess, 9)
      expect(first?.remains).toBeCloseTo(0, 9)
    }
  })

  it('under readings with small errors the blunder is still among the first three', () => {
    const small = fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 14, maxLength: 14 })
    fc.assert(
      fc.property(small, fc.integer({ min: 0, max: 6 }), (noise, wrong) => {
        const read = courses.map(({ length, turn }, i) => ({
          length: length + 0.01 * (noise[i] ?? 0) + (i === wrong ? 5 : 0),
          turn: turn + 0.2 * degree * (noise[7 + i] ?? 0),
        }))
        const first = suspects(layTraverse(read, origin, 0), end).slice(0, 3)
        expect(first).toContainEqual(expect.objectContaining({ reading: 'length', course: wrong }))
      }),
      { seed: 20_260_304, numRuns: 500 },
    )
  })

  it('two parallel courses cannot be told apart: both are named before all others', () => {
    const read = layTraverse(
      [30, 20, 35, 20].map((length) => ({ length, turn: 90 * degree })),
      origin,
      0,
    )
    const [first, second, third] = suspects(read, origin)
    expect([first, second].map((one) => [one?.reading, one?.course])).toEqual([
      ['length', 0],
      ['length', 2],
    ])
    expect([first?.excess, second?.excess].map((excess) => Math.round(excess ?? 0))).toEqual([-5, 5])
    expect(third?.remains).toBeGreaterThan(0.1)
  })

  it('names nothing where the traverse closes, and nothing in an empty one', () => {
    expect(suspects(layTraverse(courses, origin, 0), end)).toEqual([])
    expect(suspects(layTraverse([], origin, 0), origin)).toEqual([])
  })
})

describe('what the instruments allow', () => {
  it('lengths alone join as the root of the sum of squares', () => {
    const straight = layTraverse(
      [
        { length: 3, turn: 0 },
        { length: 4, turn: 0 },
      ],
      origin,
      0,
    )
    expect(
      expectedMisclosure(straight, [
        { length: 0.03, turn: 0 },
        { length: 0.04, turn: 0 },
      ]),
    ).toBeCloseTo(0.05, 12)
  })

  it('a turn counts by its distance to the end: a phone compass over 20 m swamps the tape', () => {
    const bent = layTraverse(
      [
        { length: 10, turn: 1 },
        { length: 20, turn: 0 },
      ],
      origin,
      0,
    )
    const allowed = expectedMisclosure(bent, [
      { length: 0.1, turn: 20 * degree },
      { length: 0.2, turn: 20 * degree },
    ])
    // 20 m x 20 degrees = 6.98 m; 0.22 m of tape does not show beside it.
    expect(allowed).toBeCloseTo(6.985, 3)
  })

  it('wants one uncertainty for each course', () => {
    expect(() => expectedMisclosure(layTraverse(courses, origin, 0), [])).toThrow(RangeError)
  })
})
