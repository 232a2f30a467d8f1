import { describe, expect, test } from 'vitest'
import { interval, uncertainty } from '../../src/record/interval.ts'
import type { Reading } from '../../src/record/survey.ts'

let count = 0
function read(value: number, more: Partial<Reading> = {}): Reading {
  count++
  return { id: `i${count}`, raw: `${value}`, value, bound: 'exact', instrument: 'tape', person: 'A', ...more }
}
const low = { unsafe: 'low' } as const
const highEnd = { unsafe: 'high' } as const

describe('one reading', () => {
  test('spreads by its instrument: absolute and relative parts', () => {
    expect(uncertainty(read(1, { instrument: 'tape' }))).toBe(0.005)
    expect(uncertainty(read(20, { instrument: 'paces' }))).toBeCloseTo(1.6, 9)
    expect(uncertainty(read(1), { tape: { absolute: 0.002, relative: 0.01 } })).toBeCloseTo(0.012, 9)
    // Nobody knows it: as if told.
    expect(uncertainty({ instrument: 'string' as 'tape', value: 2 })).toBe(1)
  })
  test('its unsafe end is the one asked for', () => {
    expect(interval([read(1)], low)).toMatchObject({ unsafe: 0.995, value: 1, safe: 1.005, low: 0.995, high: 1.005 })
    expect(interval([read(1)], highEnd)).toMatchObject({ unsafe: 1.005, safe: 0.995 })
  })
  test('a bound is open at its far end and spreads at its near one', () => {
    expect(interval([read(2.1, { bound: 'above' })], low)).toMatchObject({ low: 2.095, high: Number.POSITIVE_INFINITY })
    expect(interval([read(0.02, { bound: 'below' })], highEnd)).toMatchObject({
      low: Number.NEGATIVE_INFINITY,
      high: 0.025,
    })
  })
  test('the safe side is its unsafe end alone', () => {
    expect(interval([read(1, { safeSide: true })], low)).toMatchObject({ low: 0.995, value: 0.995, high: 0.995 })
    expect(interval([read(1, { safeSide: true })], highEnd)).toMatchObject({ low: 1.005, high: 1.005 })
  })
  test('nothing read is null, and a value that is no number is refused', () => {
    expect(interval([], low)).toBeNull()
    expect(interval(undefined, low)).toBeNull()
    expect(() => interval([read(Number.NaN)], low)).toThrow(/no-number/)
    expect(() => interval([read(1), read(Number.NaN)], low)).toThrow(/no-number/)
  })
})

describe('several readings', () => {
  test("one person's repeats: the least speaks, with its own uncertainty", () => {
    const found = interval([read(1.085), read(1.08), read(1.0827)], low)
    expect(found).toMatchObject({ value: 1.08, differs: false })
    expect(found?.low).toBeCloseTo(1.075, 9)
    expect(found?.high).toBeCloseTo(1.085, 9)
  })
  test('of several places along a stretch the least rules', () => {
    const found = interval([read(1.2), read(0.9, { place: 'another' }), read(1.1, { place: 'another' })], low)
    expect(found).toMatchObject({ low: 0.895, high: 0.905, differs: false })
    expect(found?.ids[0]).toBe(`i${count - 1}`)
  })
  test('two people join from the least unsafe end to the greatest safe end', () => {
    const found = interval([read(1), read(1.004, { person: 'B', instrument: 'laser' })], low)
    expect(found).toMatchObject({ low: 0.995, differs: false })
    expect(found?.high).toBeCloseTo(1.007, 9)
  })
  test('they agree within the root of the sum of squares, and differ beyond it', () => {
    const joint = Math.hypot(0.005, 0.003)
    expect(interval([read(1), read(1 + joint, { person: 'B', instrument: 'laser' })], low)?.differs).toBe(false)
    expect(interval([read(1), read(1 + joint + 1e-6, { person: 'B', instrument: 'laser' })], low)?.differs).toBe(true)
    expect(interval([read(0.8), read(0.72, { person: 'B' })], low)).toMatchObject({
      low: 0.715,
      high: 0.805,
      differs: true,
    })
  })
  test('a bound contradicted by a value differs', () => {
    expect(interval([read(2.1, { bound: 'above' }), read(2, { person: 'B' })], low)?.differs).toBe(true)
    expect(interval([read(2.1, { bound: 'above' }), read(2.3, { person: 'B' })], low)?.differs).toBe(false)
  })
  test('a named act with a reason replaces, a nameless one does not', () => {
    const first = read(0.8)
    const act = { readings: [first.id], by: 'R. Viewer', reason: 'frame taken off', on: '2026-11-30' }
    expect(interval([first, read(0.9, { person: 'B', settles: act })], low)).toMatchObject({
      low: 0.895,
      differs: false,
    })
    expect(interval([first, read(0.9, { person: 'B', settles: { ...act, reason: ' ' } })], low)?.differs).toBe(true)
  })
  test('the safe side of the worst settles a dispute there', () => {
    expect(interval([read(0.8), read(0.72, { person: 'B', safeSide: true })], low)).toMatchObject({
      low: 0.715,
      high: 0.715,
      differs: false,
    })
    expect(interval([read(0.8, { safeSide: true }), read(0.72, { person: 'B' })], low)?.differs).toBe(true)
  })
  test('told only where nobody measured', () => {
    expect(interval([read(1, { instrument: 'told' })], low)?.told).toBe(true)
    expect(interval([read(1, { instrument: 'told' }), read(1.2)], low)?.told).toBe(false)
  })
  test('where neither end is the unsafe one, all are spanned', () => {
    expect(interval([read(1.5, { instrument: 'steel-rule' }), read(1.6)], { unsafe: 'both' })).toMatchObject({
      low: 1.499,
      high: 1.605,
    })
  })
  test('a pinned reading is known at its pin; whether it differs is as it was taken', () => {
    const a = read(1)
    const b = read(1.005)
    const found = interval([a, b], { unsafe: 'low', pins: new Map([[b.id, 1.01]]) })
    expect(found).toMatchObject({ low: 0.995, differs: false })
    expect(interval([a], { unsafe: 'low', pins: new Map([[a.id, 0.995]]) })).toMatchObject({ low: 0.995, high: 0.995 })
  })
})
