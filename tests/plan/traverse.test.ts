import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  adjustByCompassRule,
  angularMisclosure,
  type Course,
  layTraverse,
  misclosure,
  wrap,
} from '../../src/plan/traverse.ts'

const right = -Math.PI / 2
const left = Math.PI / 2
const origin = { x: 0, y: 0 }

/** A walk round a block of 30 by 20, anticlockwise. */
const block: Course[] = [
  { length: 30, turn: left },
  { length: 20, turn: left },
  { length: 30, turn: left },
  { length: 20, turn: left },
]

describe('dead reckoning', () => {
  it('turns left with a positive turn', () => {
    const { points, headings, perimeter } = layTraverse(block, origin, 0)
    const corners = [origin, { x: 30, y: 0 }, { x: 30, y: 20 }, { x: 0, y: 20 }, origin]
    for (const [i, corner] of corners.entries()) {
      expect(points[i]?.x).toBeCloseTo(corner.x, 12)
      expect(points[i]?.y).toBeCloseTo(corner.y, 12)
    }
    expect(headings).toEqual([0, left, 2 * left, 3 * left])
    expect(perimeter).toBe(100)
  })

  it('turns right with a negative one, from any start and heading', () => {
    const { points } = layTraverse(
      [
        { length: 5, turn: right },
        { length: 2, turn: 0 },
      ],
      { x: 1, y: 1 },
      left,
    )
    expect(points[2]?.x).toBeCloseTo(3, 12)
    expect(points[2]?.y).toBeCloseTo(6, 12)
  })

  it('refuses a length or turn that is no number, and a negative length', () => {
    for (const course of [
      { length: Number.NaN, turn: 0 },
      { length: 1, turn: Number.NaN },
      { length: -1, turn: 0 },
      { length: Number.POSITIVE_INFINITY, turn: 0 },
    ]) {
      expect(() => layTraverse([course], origin, 0)).toThrow(RangeError)
    }
    expect(() => layTraverse(block, origin, Number.NaN)).toThrow(RangeError)
  })
})

describe('misclosure', () => {
  it('is where the loop ends less where it began: 1 too far north in 101 is 1:101', () => {
    const long = block.map((course, i) => (i === 1 ? { ...course, length: 21 } : course))
    const closure = misclosure(layTraverse(long, origin, 0), origin)
    expect(closure.x).toBeCloseTo(0, 12)
    expect(closure.y).toBeCloseTo(1, 12)
    expect(closure.linear).toBeCloseTo(1, 12)
    expect(closure.direction).toBeCloseTo(left, 12)
    expect(closure.precision).toBeCloseTo(101, 9)
  })

  it('has no precision where it closes exactly', () => {
    const there = layTraverse([{ length: 3, turn: 0 }], origin, 0)
    expect(misclosure(there, { x: 3, y: 0 })).toEqual({ x: 0, y: 0, linear: 0, direction: 0, precision: null })
  })

  it('of the turns: what they miss whole circles by', () => {
    expect(angularMisclosure(block)).toBeCloseTo(0, 12)
    expect(angularMisclosure(block.map((course) => ({ ...course, turn: right })))).toBeCloseTo(0, 12)
    const off = [...block.slice(0, 3), { length: 20, turn: left - 0.1 }]
    expect(angularMisclosure(off)).toBeCloseTo(-0.1, 12)
  })

  it('angles are wrapped to half a turn, the half itself to the left', () => {
    expect(wrap(3 * Math.PI)).toBeCloseTo(Math.PI, 12)
    expect(wrap(-Math.PI)).toBe(Math.PI)
    expect(wrap(-0.5)).toBe(-0.5)
    expect(wrap(2 * Math.PI + 0.25)).toBeCloseTo(0.25, 12)
  })
})

describe('compass rule', () => {
  const course = fc.record({
    length: fc.double({ min: 0.1, max: 25, noNaN: true }),
    turn: fc.double({ min: -3, max: 3, noNaN: true }),
  })
  const walk = fc.array(course, { minLength: 1, maxLength: 20 })

  it('ends on the known point and moves each station by its share of the way walked', () => {
    fc.assert(
      fc.property(walk, (courses) => {
        const traverse = layTraverse(courses, { x: 4, y: -2 }, 1)
        const known = { x: 5, y: 5 }
        const closure = misclosure(traverse, known)
        const { points } = adjustByCompassRule(traverse, known)
        expect(points[0]).toEqual({ x: 4, y: -2 })
        expect(points.at(-1)?.x).toBeCloseTo(known.x, 9)
        expect(points.at(-1)?.y).toBeCloseTo(known.y, 9)
        let walked = 0
        for (const [i, { length }] of courses.entries()) {
          walked += length
          const moved = (traverse.points[i + 1]?.x ?? 0) - (points[i + 1]?.x ?? 0)
          expect(moved).toBeCloseTo((closure.x * walked) / traverse.perimeter, 9)
        }
      }),
      { seed: 20_260_303, numRuns: 300 },
    )
  })

  it('leaves a traverse without length as it is', () => {
    const still = layTraverse([{ length: 0, turn: 0 }], origin, 0)
    expect(adjustByCompassRule(still, { x: 1, y: 0 }).points).toEqual([origin, origin])
  })
})
