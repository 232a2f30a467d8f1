import type { Metres } from '../units/quantity.ts'
import type { Boundary } from './boundary.ts'

/** The edge that was nearest in the last call, for saying which wall is tightest. */
export const rectangleNearest = { edge: 0 }

/**
 * Signed clearance of a rectangle to the boundary. Inside the free region: the least distance between them, exactly.
 * Where a wall cuts the rectangle: minus the least shift that would free it of that wall. Wholly outside: negative.
 *
 * @param cx,cy centre; @param cos,sin of its heading; @param half half its length; @param side half its width
 * @param enough the answer may be any value at or above this once nothing nearer is possible (a cap that saves time)
 */
export function rectangleClearance(
  walls: Boundary,
  cx: Metres,
  cy: Metres,
  cos: number,
  sin: number,
  half: Metres,
  side: Metres,
  enough: Metres = Number.POSITIVE_INFINITY,
): Metres {
  const reach = Math.sqrt(half * half + side * side)
  let best = enough
  let nearestSquare = Number.POSITIVE_INFINITY
  let centreInside = false
  for (let i = 0; i < walls.count; i++) {
    const dx = cx - (walls.x0[i] as number)
    const dy = cy - (walls.y0[i] as number)
    const length = walls.length[i] as number
    const along = dx * (walls.tx[i] as number) + dy * (walls.ty[i] as number)
    const across = dx * (walls.nx[i] as number) + dy * (walls.ny[i] as number)
    const past = along < 0 ? along : along > length ? along - length : 0
    const square = across * across + past * past
    if (square < nearestSquare && along < length) {
      nearestSquare = square
      centreInside = past < 0 ? walls.reflex[i] === 1 || isStraight(walls, i, across) : across >= 0
    }
    const limit = best + reach
    if (limit <= 0 || square >= limit * limit) continue
    const clearance = edgeClearance(walls, i, cx, cy, cos, sin, half, side)
    if (clearance < best) {
      best = clearance
      rectangleNearest.edge = i
    }
  }
  if (centreInside || best < 0) return best
  return -Math.sqrt(nearestSquare) - side
}

function isStraight(walls: Boundary, i: number, across: number): boolean {
  const before = walls.before[i] as number
  const cross =
    (walls.tx[before] as number) * (walls.ty[i] as number) - (walls.ty[before] as number) * (walls.tx[i] as number)
  return Math.abs(cross) <= 1e-9 && across >= 0
}

function edgeClearance(
  walls: Boundary,
  i: number,
  cx: number,
  cy: number,
  cos: number,
  sin: number,
  half: number,
  side: number,
): number {
  // The edge in the rectangle's own axes.
  const wx0 = (walls.x0[i] as number) - cx
  const wy0 = (walls.y0[i] as number) - cy
  const wx1 = (walls.x1[i] as number) - cx
  const wy1 = (walls.y1[i] as number) - cy
  const px = wx0 * cos + wy0 * sin
  const py = wy0 * cos - wx0 * sin
  const qx = wx1 * cos + wy1 * sin
  const qy = wy1 * cos - wx1 * sin
  if (meets(px, py, qx, qy, half, side)) {
    const overX = Math.min(half - Math.min(px, qx), Math.max(px, qx) + half)
    const overY = Math.min(side - Math.min(py, qy), Math.max(py, qy) + side)
    const nx = walls.nx[i] as number
    const ny = walls.ny[i] as number
    const extent = Math.abs(nx * cos + ny * sin) * half + Math.abs(ny * cos - nx * sin) * side
    const overWall = extent + wx0 * nx + wy0 * ny
    return -Math.max(0, Math.min(overX, overY, overWall))
  }
  let best = Math.min(toBox(px, py, half, side), toBox(qx, qy, half, side))
  const dx = qx - px
  const dy = qy - py
  const square = dx * dx + dy * dy
  for (let corner = 0; corner < 4; corner++) {
    const kx = (corner & 1 ? half : -half) - px
    const ky = (corner & 2 ? side : -side) - py
    const t = (kx * dx + ky * dy) / square
    // Beyond the edge's ends an end is nearest, and was taken above.
    if (t <= 0 || t >= 1) continue
    const cross = kx * dy - ky * dx
    const distance = (cross * cross) / square
    if (distance < best) best = distance
  }
  return Math.sqrt(best)
}

/** Squared distance from a point to the rectangle about the origin. */
function toBox(x: number, y: number, half: number, side: number): number {
  const dx = Math.max(0, Math.abs(x) - half)
  const dy = Math.max(0, Math.abs(y) - side)
  return dx * dx + dy * dy
}

/** Whether a segment and the rectangle about the origin share a point (Liang and Barsky's clipping). */
function meets(px: number, py: number, qx: number, qy: number, half: number, side: number): boolean {
  let from = 0
  let to = 1
  const dx = qx - px
  if (dx === 0) {
    if (px < -half || px > half) return false
  } else {
    const one = (-half - px) / dx
    const other = (half - px) / dx
    from = Math.max(from, Math.min(one, other))
    to = Math.min(to, Math.max(one, other))
    if (from > to) return false
  }
  const dy = qy - py
  if (dy === 0) return py >= -side && py <= side
  const one = (-side - py) / dy
  const other = (side - py) / dy
  from = Math.max(from, Math.min(one, other))
  to = Math.min(to, Math.max(one, other))
  return from <= to
}

/** Distance from a point to a rectangle with centre (cx, cy), 0 inside. */
export function pointToRectangle(
  x: Metres,
  y: Metres,
  cx: Metres,
  cy: Metres,
  cos: number,
  sin: number,
  half: Metres,
  side: Metres,
): Metres {
  const dx = x - cx
  const dy = y - cy
  return Math.sqrt(toBox(dx * cos + dy * sin, dy * cos - dx * sin, half, side))
}
