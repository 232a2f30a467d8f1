import type { Metres } from '../units/quantity.ts'
import type { Boundary } from './boundary.ts'

/** Length of a vector; Math.hypot guards against overflow that no venue has, at ten times the cost. */
export function lengthOf(dx: number, dy: number): number {
  return Math.sqrt(dx * dx + dy * dy)
}

/** Distance from point (px, py) to the segment from (x0, y0) to (x1, y1); a segment without length is a point. */
export function pointToSegment(px: number, py: number, x0: number, y0: number, x1: number, y1: number): Metres {
  const dx = x1 - x0
  const dy = y1 - y0
  const square = dx * dx + dy * dy
  let t = square > 0 ? ((px - x0) * dx + (py - y0) * dy) / square : 0
  t = Math.max(0, Math.min(1, t))
  return lengthOf(px - x0 - t * dx, py - y0 - t * dy)
}

/**
 * Distance between a segment and the boundary; 0 where it touches or crosses a wall. With both ends in the free
 * region a positive value means that the whole segment lies in it.
 *
 * @param enough any value at or above this may stand for a greater distance (a cap that saves time)
 */
export function segmentToBoundary(
  walls: Boundary,
  x0: number,
  y0: number,
  x1: number,
  y1: number,
  enough: Metres = Number.POSITIVE_INFINITY,
): Metres {
  let best = enough
  const half = lengthOf(x1 - x0, y1 - y0) / 2
  const mx = (x0 + x1) / 2
  const my = (y0 + y1) / 2
  for (let i = 0; i < walls.count; i++) {
    const ex0 = walls.x0[i] as number
    const ey0 = walls.y0[i] as number
    const ex1 = walls.x1[i] as number
    const ey1 = walls.y1[i] as number
    // No point of the segment is nearer than its middle is, less half its length.
    if (pointToSegment(mx, my, ex0, ey0, ex1, ey1) - half >= best) continue
    const side0 = (x1 - x0) * (ey0 - y0) - (y1 - y0) * (ex0 - x0)
    const side1 = (x1 - x0) * (ey1 - y0) - (y1 - y0) * (ex1 - x0)
    const nx = walls.nx[i] as number
    const ny = walls.ny[i] as number
    const off0 = (x0 - ex0) * nx + (y0 - ey0) * ny
    const off1 = (x1 - ex0) * nx + (y1 - ey0) * ny
    if (side0 * side1 <= 0 && off0 * off1 <= 0 && (x0 !== x1 || y0 !== y1)) {
      // Both straddle: they cross, unless they lie in one line and apart.
      if (side0 !== 0 || side1 !== 0) return 0
    }
    // Two segments that do not cross are nearest at an end of one of them.
    best = Math.min(
      best,
      pointToSegment(x0, y0, ex0, ey0, ex1, ey1),
      pointToSegment(x1, y1, ex0, ey0, ex1, ey1),
      pointToSegment(ex0, ey0, x0, y0, x1, y1),
      pointToSegment(ex1, ey1, x0, y0, x1, y1),
    )
  }
  return best
}
