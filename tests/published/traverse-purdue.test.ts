import { expect, it } from 'vitest'
import { adjustByCompassRule, misclosure } from '../../src/plan/traverse.ts'
import { agree, lay, point, steps } from './traverse-sheet.ts'

// Purdue University, ASM 215, "Traverse computations": engineering.purdue.edu/~asm215/topics/travcalc.html. Feet.
const start = [10_000, 10_000] as const
const traverse = lay(start, [
  ['N26-10E', 285.1],
  ['S75-25E', 610.45],
  ['S15-30W', 720.48],
  ['N01-42W', 203.0],
  ['N53-06W', 647.02],
])
const known = point(start)
// Printed to 0.01 ft, and each line reckoned on from rounded lines: one unit more than half.
const tolerance = 0.011

it('latitudes and departures', () => {
  const [latitudes, departures] = steps(traverse.points)
  agree(latitudes, [255.88, -153.7, -694.28, 202.91, 388.48], tolerance)
  agree(departures, [125.72, 590.78, -192.54, -6.02, -517.41], tolerance)
})

it('misclosure', () => {
  const closure = misclosure(traverse, known)
  expect(traverse.perimeter).toBeCloseTo(2466.05, 8)
  agree([closure.y, closure.x, closure.linear], [-0.71, 0.53, 0.89], tolerance)
})

it('precision: the page prints 1/2771 from the rounded 0.89 ft; unrounded it is 1/2792', () => {
  expect(Math.round(traverse.perimeter / 0.89)).toBe(2771)
  expect(Math.round(misclosure(traverse, known).precision ?? 0)).toBe(2792)
})

it('compass rule: corrections, adjusted steps, stations', () => {
  const adjusted = adjustByCompassRule(traverse, known)
  const [latitudes, departures] = steps(adjusted.points)
  const [rawLatitudes, rawDepartures] = steps(traverse.points)
  agree(
    latitudes.map((value, i) => value - (rawLatitudes[i] ?? 0)),
    [0.08, 0.18, 0.21, 0.06, 0.18],
    tolerance,
  )
  agree(
    departures.map((value, i) => value - (rawDepartures[i] ?? 0)),
    [-0.06, -0.13, -0.15, -0.05, -0.14],
    tolerance,
  )
  agree(latitudes, [255.96, -153.52, -694.07, 202.97, 388.66], tolerance)
  agree(departures, [125.66, 590.65, -192.69, -6.07, -517.55], tolerance)
  agree(
    adjusted.points.map(({ y }) => y),
    [10_000, 10_255.96, 10_102.44, 9408.37, 9611.34, 10_000],
    tolerance,
  )
  agree(
    adjusted.points.map(({ x }) => x),
    [10_000, 10_125.66, 10_716.31, 10_523.62, 10_517.55, 10_000],
    tolerance,
  )
})
