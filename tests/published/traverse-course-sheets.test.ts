import { describe, expect, it } from 'vitest'
import { adjustByCompassRule, misclosure } from '../../src/plan/traverse.ts'
import { agree, lay, point, steps } from './traverse-sheet.ts'

describe('textbook exercise on a homework site (justaaa.com/civil-engineering/19749), feet', () => {
  const start = [5000, 10_000] as const
  const traverse = lay(start, [
    ['N22-36-40W', 314.02],
    ['S60-39-24W', 264.49],
    ['S38-46-10E', 213.5],
    ['N88-22-58E', 217.69],
  ])

  it('latitudes and departures', () => {
    const [latitudes, departures] = steps(traverse.points)
    agree(latitudes, [289.883, -129.611, -166.46, 6.144], 0.0011)
    agree(departures, [-120.733, -230.556, 133.691, 217.603], 0.0011)
  })

  it('preliminary stations; the printed C and D differ from the sum of the printed steps by up to 0.013', () => {
    expect(10_000 - 120.733 - 230.556).toBeCloseTo(9648.711, 9)
    agree(
      traverse.points.slice(1, 4).map(({ x }) => x),
      [9879.266, 9648.699, 9782.39],
      0.014,
    )
    agree(
      traverse.points.slice(1, 4).map(({ y }) => y),
      [5289.883, 5160.278, 4993.825],
      0.014,
    )
  })

  it('misclosure 0.045, precision 1/22 500', () => {
    const closure = misclosure(traverse, point(start))
    expect(closure.linear).toBeCloseTo(0.045, 3)
    expect(Math.round((closure.precision ?? 0) / 100)).toBe(225)
  })
})

describe('four courses, a surveying sheet (scribd.com/document/493615208), metres', () => {
  const traverse = lay(
    [0, 0],
    [
      ['N76E', 80.4],
      ['S36E', 46.3],
      ['S61W', 72.8],
      ['N38W', 68.0],
    ],
  )
  const known = point([0, 0])

  it('misclosure: the sheet prints 0.285 in latitude from its rounded lines; unrounded it is 0.2836', () => {
    const closure = misclosure(traverse, known)
    expect(traverse.perimeter).toBeCloseTo(267.5, 9)
    agree([closure.y, closure.x], [0.285, -0.311], 0.0015)
  })

  it('corrections and adjusted steps', () => {
    const [rawLatitudes, rawDepartures] = steps(traverse.points)
    const [latitudes, departures] = steps(adjustByCompassRule(traverse, known).points)
    // The sheet prints the corrections' sizes; latitudes shrink, departures grow.
    agree(
      latitudes.map((value, i) => (rawLatitudes[i] ?? 0) - value),
      [0.0857, 0.0493, 0.0776, 0.0724],
      0.0006,
    )
    agree(
      departures.map((value, i) => value - (rawDepartures[i] ?? 0)),
      [0.0935, 0.0538, 0.0846, 0.0791],
      0.0006,
    )
    agree(latitudes, [19.3653, -37.5063, -35.3716, 53.5126], 0.0006)
    agree(departures, [78.1055, 27.2678, -63.5874, -41.786], 0.0006)
  })
})

describe('six courses that close coarsely, a surveying sheet (scribd.com/document/279716815), unit not stated', () => {
  const traverse = lay(
    [0, 0],
    [
      ['N05-30E', 495.85],
      ['N46-02E', 850.62],
      ['S67-38E', 855.45],
      ['S12-25E', 1020.87],
      ['S83-44W', 1117.26],
      ['N55-09W', 660.08],
    ],
  )
  const known = point([0, 0])

  it('misclosure 24.6876 in 5000.13: 1/200', () => {
    const closure = misclosure(traverse, known)
    expect(traverse.perimeter).toBeCloseTo(5000.13, 8)
    agree([closure.y, closure.x, closure.linear], [16.8171, 18.0737, 24.6876], 0.00006)
    expect(Math.round((closure.precision ?? 0) / 10)).toBe(20)
  })

  it('adjusted steps', () => {
    const [latitudes, departures] = steps(adjustByCompassRule(traverse, known).points)
    agree(latitudes, [491.8995, 587.6733, -328.4036, -1000.4252, -125.7134, 374.9694], 0.00006)
    agree(departures, [45.7328, 609.1538, 788.0003, 215.8168, -1114.6225, -544.0812], 0.00006)
  })
})
