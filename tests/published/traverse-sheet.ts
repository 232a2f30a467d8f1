import { expect } from 'vitest'
import type { Point } from '../../src/geometry/scene.ts'
import { type Course, layTraverse, type Traverse } from '../../src/plan/traverse.ts'

/** A course as a surveying text prints it: quadrant bearing or azimuth, and length in the text's own unit. */
export type PrintedCourse = readonly [direction: string, length: number]

/** Northing, then easting, as the texts print pairs. */
export type NorthEast = readonly [north: number, east: number]

const degree = Math.PI / 180

/** "S68-05-35W" or "226-54-23" -> azimuth in radians, clockwise from north. */
export function azimuth(printed: string): number {
  const quadrant = /^([NS])([\d-]+)([EW])$/.exec(printed)
  if (!quadrant) return sexagesimal(printed)
  const angle = sexagesimal(quadrant[2] ?? '')
  const fromNorth = quadrant[1] === 'N' ? angle : Math.PI - angle
  return quadrant[3] === 'E' ? fromNorth : 2 * Math.PI - fromNorth
}

function sexagesimal(printed: string): number {
  const [degrees = 0, minutes = 0, seconds = 0] = printed.split('-').map(Number)
  return (degrees + minutes / 60 + seconds / 3600) * degree
}

/** x is east and y is north, so that a heading is 90 degrees less the azimuth. */
export function point([north, east]: NorthEast): Point {
  return { x: east, y: north }
}

/** The printed courses as a surveyor of this project would record them: lengths and turns from a first heading. */
export function lay(start: NorthEast, printed: readonly PrintedCourse[]): Traverse {
  const headings = printed.map(([direction]) => Math.PI / 2 - azimuth(direction))
  const courses: Course[] = printed.map(([, length], i) => ({
    length,
    turn: (headings[i + 1] ?? headings[i] ?? 0) - (headings[i] ?? 0),
  }))
  return layTraverse(courses, point(start), headings[0] ?? 0)
}

/** Steps between stations, as [latitudes, departures]. */
export function steps(points: readonly Point[]): [latitudes: number[], departures: number[]] {
  const pairs = points.slice(1).map((to, i) => ({ to, from: points[i] ?? to }))
  return [pairs.map(({ to, from }) => to.y - from.y), pairs.map(({ to, from }) => to.x - from.x)]
}

/** Each value within `tolerance` of the printed one, and as many of them. */
export function agree(computed: readonly number[], printed: readonly number[], tolerance: number): void {
  expect(computed).toHaveLength(printed.length)
  for (const [i, value] of printed.entries()) {
    expect(Math.abs((computed[i] ?? Number.NaN) - value), `${i}: ${computed[i]} for ${value}`).toBeLessThanOrEqual(
      tolerance,
    )
  }
}
