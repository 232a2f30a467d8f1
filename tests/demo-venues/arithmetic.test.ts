import { describe, expect, test } from 'vitest'
import { arithmetic, type Names } from '../fixtures/demo/arithmetic.ts'
import { siOf } from '../fixtures/demo/raw.ts'
import { demoVenues, expectedOf, namesOf, readingsOf, venueFile, type Worked } from '../fixtures/demo/venues.ts'

/** Agreement to three figures. */
function near(value: number, figure: number): boolean {
  return Math.abs(value - figure) <= 6e-4 * Math.abs(value)
}

interface ViewFile {
  view: { walks: { id: string; segments: { id: string }[] }[] }
}

describe.each(demoVenues)('the arithmetic record of %s', (venue) => {
  const file = venueFile(venue)
  const expected = expectedOf(venue)
  const names = namesOf(file, expected.figures)

  test.each(Object.entries(expected.figures))('figure %s comes to what it says', (_, worked) => {
    expect(arithmetic(worked.is, names)).toSatisfy((value: number) => near(value, worked.figure))
  })

  const lines = Object.entries(expected.segments).flatMap(([key, segment]) => {
    const of = (what: string, worked: Worked | undefined) => (worked ? [{ name: `${key} ${what}`, worked }] : [])
    const ends = (segment.ratio?.is ?? []).flatMap((is, end) => {
      const figure = segment.ratio?.figure[end] ?? null
      return is === null || figure === null ? [] : [{ name: `${key} ratio end ${end}`, worked: { is, figure } }]
    })
    return [...of('demand', segment.demand), ...of('capacity', segment.capacity), ...ends]
  })
  test.each(lines)('$name comes to what it says', ({ worked }) => {
    expect(arithmetic(worked.is, names)).toSatisfy((value: number) => near(value, worked.figure))
  })

  test('an end without a formula is an end without capacity, on both sides of the line', () => {
    for (const { ratio } of Object.values(expected.segments)) {
      if (!ratio) continue
      expect(ratio.is.map((is) => is === null)).toEqual(ratio.figure.map((figure) => figure === null))
    }
  })

  test('low ends are never above high ends', () => {
    for (const { ratio } of Object.values(expected.segments)) {
      const [low, high] = ratio?.figure ?? [null, null]
      if (low !== null && high !== null) expect(low).toBeLessThanOrEqual(high)
    }
  })

  test('a segment that may be used has no governing ratio above 1, one that may not and has a ratio is wholly above', () => {
    for (const [key, { verdict, ratio, window }] of Object.entries(expected.segments)) {
      const [low, high] = ratio?.figure ?? [null, null]
      if (verdict === 'usable' || verdict === 'with-cautions') {
        if (ratio) expect(high ?? Number.POSITIVE_INFINITY, key).toBeLessThanOrEqual(1)
      }
      if (verdict === 'do-not-use' && ratio && !window) expect(low ?? Number.POSITIVE_INFINITY, key).toBeGreaterThan(1)
    }
  })

  test('every segment and walk of the file has its expectation, and no other', () => {
    const { walks } = (file as ViewFile).view
    expect(Object.keys(expected.walks).sort()).toEqual(walks.map((walk) => walk.id).sort())
    const keys = walks.flatMap((walk) => walk.segments.map((segment) => `${walk.id}/${segment.id}`))
    expect(Object.keys(expected.segments).sort()).toEqual(keys.sort())
  })

  test('every reading is in a form that can be read', () => {
    const readings = [...readingsOf(file).values()]
    expect(readings.length).toBeGreaterThan(40)
    for (const { raw } of readings) expect(siOf(raw), raw).toSatisfy(Number.isFinite)
  })
})

test('the four venues show every verdict, on segments and on walks', () => {
  const all = ['do-not-use', 'not-known', 'usable', 'with-cautions', 'with-help']
  const records = demoVenues.map(expectedOf)
  const seen = (pick: (record: (typeof records)[number]) => object) =>
    [...new Set(records.flatMap((record) => Object.values(pick(record)).map(({ verdict }) => verdict)))].sort()
  expect(seen((record) => record.segments)).toEqual(all)
  expect(seen((record) => record.walks)).toEqual(all)
})

describe('the evaluator', () => {
  const names: Names = { r: () => 2, card: () => 0.5, figure: () => 3 }

  test.each([
    ['1 + 2 * 3', 7],
    ['(1 + 2) * 3', 9],
    ['8 / 4 / 2', 1],
    ['7 - 2 - 1', 4],
    ['-2 * -3', 6],
    ['sqrt(2 * 8) + tan(0)', 4],
    ["r('a.width-1') * card('robot.width') - figure('envelope')", -2],
  ])('%s is %d', (formula, value) => {
    expect(arithmetic(formula, names)).toBe(value)
  })

  test.each(['1 +', '2 3', 'log(2)', 'r(width)', '(1', 'sqrt(1, 2)', '1 $ 2', ''])('refuses "%s"', (formula) => {
    expect(() => arithmetic(formula, names)).toThrow()
  })
})

test.each([
  ['1.24 m', 1.24],
  ['124 cm', 1.24],
  ['4 ft 3/8 in', 1.228725],
  ['4\' 0 3/8"', 1.228725],
  ['51 1/2"', 1.3081],
  ['>2.1 m', 2.1],
  ['1:12', 1 / 12],
  ['4.8°', 0.083776],
  ['45 N', 45],
])('raw %s is %d', (raw, value) => {
  expect(siOf(raw)).toBeCloseTo(value, 6)
})
