import { describe, expect, it } from 'vitest'
import { adjustByCompassRule, misclosure } from '../../src/plan/traverse.ts'
import { agree, azimuth, lay, point, steps } from './traverse-sheet.ts'

// J. Mahun, open surveying text (jerrymahun.com), traverse computations, chapters F and I, and a problem's solution. Feet.
const second = Math.PI / 180 / 3600
// Printed to 0.001 ft.
const tolerance = 0.0011

describe('closed loop, chapters F and I', () => {
  const start = [500, 2000] as const
  const traverse = lay(start, [
    ['S68-05-35W', 472.68],
    ['N19-46-00W', 216.13],
    ['N45-55-20E', 276.52],
    ['S54-59-15E', 382.24],
  ])
  const adjusted = adjustByCompassRule(traverse, point(start))

  it('latitudes, departures, misclosure', () => {
    const [latitudes, departures] = steps(traverse.points)
    agree(latitudes, [-176.357, 203.395, 192.357, -219.312], tolerance)
    agree(departures, [-438.548, -73.093, 198.651, 313.065], tolerance)
    const closure = misclosure(traverse, point(start))
    agree([closure.y, closure.x, traverse.perimeter], [0.083, 0.075, 1347.57], tolerance)
  })

  it('adjusted latitudes and departures', () => {
    const [latitudes, departures] = steps(adjusted.points)
    agree(latitudes, [-176.386, 203.382, 192.34, -219.336], tolerance)
    agree(departures, [-438.574, -73.105, 198.635, 313.044], tolerance)
  })

  it('adjusted course AB: S68-05-27W, 472.72', () => {
    const [first] = adjusted.courses
    expect(Math.abs((first?.length ?? 0) - 472.72)).toBeLessThanOrEqual(0.006)
    const turned = Math.PI / 2 - (first?.heading ?? 0)
    expect(Math.abs(turned - azimuth('S68-05-27W'))).toBeLessThanOrEqual(second)
  })

  it('inverse AC: N86-58-48W, 512.39', () => {
    const [a, , c] = adjusted.points
    if (a === undefined || c === undefined) return expect.unreachable('three stations were due')
    expect(Math.hypot(c.x - a.x, c.y - a.y)).toBeCloseTo(512.39, 2)
    expect(Math.abs(Math.atan2(c.x - a.x, c.y - a.y) + 2 * Math.PI - azimuth('N86-58-48W'))).toBeLessThanOrEqual(second)
  })
})

describe('link between two known points', () => {
  const from = [2600.48, 1391.67] as const
  const to = [2713.78, 1727.81] as const
  const traverse = lay(from, [
    ['S56-23-38E', 398.75],
    ['S75-17-42W', 422.89],
    ['N43-05-47E', 604.49],
  ])

  it('latitudes, departures, preliminary stations', () => {
    const [latitudes, departures] = steps(traverse.points)
    agree(latitudes, [-220.7, -107.347, 441.402], tolerance)
    agree(departures, [332.104, -409.038, 413.004], tolerance)
    agree(
      traverse.points.slice(1).map(({ y }) => y),
      [2379.78, 2272.433, 2713.835],
      tolerance,
    )
    agree(
      traverse.points.slice(1).map(({ x }) => x),
      [1723.774, 1314.736, 1727.74],
      tolerance,
    )
    expect(traverse.perimeter).toBeCloseTo(1426.13, 8)
  })

  it('misclosure: the page prints a latitude error of 0.555; its own coordinates give 0.055', () => {
    expect(2713.835 - 2713.78).toBeCloseTo(0.055, 9)
    const closure = misclosure(traverse, point(to))
    agree([closure.y, closure.x], [0.055, -0.07], tolerance)
  })

  it('adjusted, it ends on the known point', () => {
    const end = adjustByCompassRule(traverse, point(to)).points.at(-1)
    expect(end?.x).toBeCloseTo(to[1], 9)
    expect(end?.y).toBeCloseTo(to[0], 9)
  })
})

describe('adjustment problem 2 (99-soln-ss-trav-adj-2)', () => {
  const start = [0, 0] as const
  const traverse = lay(start, [
    ['226-54-23', 639.15],
    ['0-00-00', 523.69],
    ['235-02-29', 409.54],
    ['79-35-02', 815.93],
  ])

  it('latitudes, departures, misclosure, precision 1/15 200', () => {
    const [latitudes, departures] = steps(traverse.points)
    agree(latitudes, [-436.662, 523.69, -234.66, 147.517], tolerance)
    agree(departures, [-466.732, 0, -335.645, 802.484], tolerance)
    const closure = misclosure(traverse, point(start))
    agree([closure.y, closure.x, closure.linear], [-0.115, 0.107, 0.157], tolerance)
    // Printed in hundreds, from the rounded 0.157: 2388.31 / 0.157 = 15 212; unrounded it is 15 146.
    expect(Math.abs((closure.precision ?? 0) - 15_200)).toBeLessThan(100)
  })

  it('adjusted latitudes, departures, lengths and azimuths', () => {
    const adjusted = adjustByCompassRule(traverse, point(start))
    const [latitudes, departures] = steps(adjusted.points)
    agree(latitudes, [-436.631, 523.715, -234.64, 147.556], tolerance)
    agree(departures, [-466.761, -0.023, -335.663, 802.447], tolerance)
    agree(
      adjusted.courses.map(({ length }) => length),
      [639.15, 523.715, 409.544, 815.901],
      tolerance,
    )
    const turn = 2 * Math.PI
    const azimuths = adjusted.courses.map(({ heading }) => (Math.PI / 2 - heading + turn) % turn)
    agree(azimuths, ['226-54-36.6', '359-59-50.8', '235-02-42.5', '79-34-50.5'].map(azimuth), second)
  })
})
