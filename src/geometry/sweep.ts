import type { Metres } from '../units/quantity.ts'
import type { Boundary } from './boundary.ts'
import { pointToSegment, segmentToBoundary } from './segment.ts'

/** Clearance of a disc that moves straight from one place to another, both inside; 0 less its radius where the way crosses a wall. */
export function discSweepClearance(
  walls: Boundary,
  x0: Metres,
  y0: Metres,
  x1: Metres,
  y1: Metres,
  r: Metres,
  enough: Metres = Number.POSITIVE_INFINITY,
): Metres {
  return segmentToBoundary(walls, x0, y0, x1, y1, enough + r) - r
}

/**
 * Clearance of a rectangle that shifts straight, without turning, from centre (x0, y0) to (x1, y1), clear of every
 * wall at both ends: the least distance of its corners' ways to the walls, and of the walls' corners, taken in the
 * rectangle's frame, to it. A way that crosses a wall gives 0.
 */
export function rectangleSweepClearance(
  walls: Boundary,
  x0: Metres,
  y0: Metres,
  x1: Metres,
  y1: Metres,
  cos: number,
  sin: number,
  half: Metres,
  side: Metres,
  enough: Metres = Number.POSITIVE_INFINITY,
): Metres {
  let best = enough
  for (let corner = 0; corner < 4; corner++) {
    const along = corner & 1 ? half : -half
    const left = corner & 2 ? side : -side
    const dx = along * cos - left * sin
    const dy = along * sin + left * cos
    best = Math.min(best, segmentToBoundary(walls, x0 + dx, y0 + dy, x1 + dx, y1 + dy, best))
  }
  for (let i = 0; i < walls.count; i++) {
    if (!walls.reflex[i]) continue
    const px = toX(walls, i, x0, y0, cos, sin)
    const py = toY(walls, i, x0, y0, cos, sin)
    const qx = toX(walls, i, x1, y1, cos, sin)
    const qy = toY(walls, i, x1, y1, cos, sin)
    best = Math.min(best, segmentToBox(px, py, qx, qy, half, side))
  }
  return best
}

function toX(walls: Boundary, i: number, x: number, y: number, cos: number, sin: number): number {
  return ((walls.x0[i] as number) - x) * cos + ((walls.y0[i] as number) - y) * sin
}

function toY(walls: Boundary, i: number, x: number, y: number, cos: number, sin: number): number {
  return ((walls.y0[i] as number) - y) * cos - ((walls.x0[i] as number) - x) * sin
}

/** Distance of a segment to the rectangle about the origin; both its ends are outside, and it is short. */
function segmentToBox(px: number, py: number, qx: number, qy: number, half: number, side: number): number {
  let best = Math.min(outside(px, py, half, side), outside(qx, qy, half, side))
  if (best === 0) return 0
  for (let corner = 0; corner < 4; corner++)
    best = Math.min(best, pointToSegment(corner & 1 ? half : -half, corner & 2 ? side : -side, px, py, qx, qy))
  return best
}

function outside(x: number, y: number, half: number, side: number): number {
  return Math.hypot(Math.max(0, Math.abs(x) - half), Math.max(0, Math.abs(y) - side))
}
