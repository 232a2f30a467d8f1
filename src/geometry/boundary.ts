import type { Metres } from '../units/quantity.ts'
import type { Point, Scene } from './scene.ts'

/**
 * The walls of a scene as flat arrays, edge i from (x0, y0) to (x1, y1) with the free region on its left: outer ring
 * anticlockwise, holes clockwise. `nx, ny` is the unit normal into the free region.
 */
export interface Boundary {
  count: number
  x0: Float64Array
  y0: Float64Array
  x1: Float64Array
  y1: Float64Array
  /** Unit direction and length of each edge. */
  tx: Float64Array
  ty: Float64Array
  length: Float64Array
  nx: Float64Array
  ny: Float64Array
  /** 1 where the edge's first vertex is a corner that sticks into the free region. */
  reflex: Uint8Array
  /** The edge before this one on its ring. */
  before: Int32Array
}

/** Builds the walls of a scene; the rings' turning sense is set right here, whatever was given. */
export function boundaryOf(scene: Pick<Scene, 'polygon' | 'holes'>): Boundary {
  const rings = [turned(scene.polygon, 1), ...scene.holes.map((hole) => turned(hole, -1))]
  const count = rings.reduce((sum, ring) => sum + ring.length, 0)
  const array = () => new Float64Array(count)
  const boundary: Boundary = {
    count,
    x0: array(),
    y0: array(),
    x1: array(),
    y1: array(),
    tx: array(),
    ty: array(),
    length: array(),
    nx: array(),
    ny: array(),
    reflex: new Uint8Array(count),
    before: new Int32Array(count),
  }
  let first = 0
  for (const ring of rings) {
    for (let k = 0; k < ring.length; k++) setEdge(boundary, first, ring, k)
    for (let k = 0; k < ring.length; k++) setCorner(boundary, first + k, first + ((k + ring.length - 1) % ring.length))
    first += ring.length
  }
  return boundary
}

function setEdge(to: Boundary, first: number, ring: readonly Point[], k: number): void {
  const from = ring[k] as Point
  const next = ring[(k + 1) % ring.length] as Point
  const length = Math.hypot(next.x - from.x, next.y - from.y)
  const i = first + k
  to.x0[i] = from.x
  to.y0[i] = from.y
  to.x1[i] = next.x
  to.y1[i] = next.y
  to.length[i] = length
  to.tx[i] = (next.x - from.x) / length
  to.ty[i] = (next.y - from.y) / length
  to.nx[i] = -(next.y - from.y) / length
  to.ny[i] = (next.x - from.x) / length
}

function setCorner(to: Boundary, i: number, before: number): void {
  to.before[i] = before
  const cross = (to.tx[before] as number) * (to.ty[i] as number) - (to.ty[before] as number) * (to.tx[i] as number)
  to.reflex[i] = cross < 0 ? 1 : 0
}

/** Twice the enclosed area, positive for an anticlockwise ring; square metres. */
export function signedArea(ring: readonly Point[]): number {
  let sum = 0
  for (let i = 0; i < ring.length; i++) {
    const here = ring[i] as Point
    const next = ring[(i + 1) % ring.length] as Point
    sum += here.x * next.y - next.x * here.y
  }
  return sum
}

function turned(ring: readonly Point[], sense: 1 | -1): readonly Point[] {
  return Math.sign(signedArea(ring)) === sense ? ring : [...ring].reverse()
}

/** Edge and signed distance of the boundary point nearest to a place. */
export const nearest = { edge: 0, x: 0, y: 0 }

/**
 * Distance from (x, y) to the boundary, negative outside the free region; `nearest` is left at the point found.
 * The sign comes from the nearest feature, so that a thin wall does not lend its far side to a point beside it:
 * a corner that sticks into the region is nearest only from inside, any other corner only from outside.
 */
export function distanceToBoundary(walls: Boundary, x: Metres, y: Metres): Metres {
  let best = Number.POSITIVE_INFINITY
  let sign = -1
  for (let i = 0; i < walls.count; i++) {
    const dx = x - (walls.x0[i] as number)
    const dy = y - (walls.y0[i] as number)
    const along = dx * (walls.tx[i] as number) + dy * (walls.ty[i] as number)
    const length = walls.length[i] as number
    if (along >= length) continue // the next edge's first vertex is that end
    if (along <= 0) {
      const square = dx * dx + dy * dy
      if (square < best) {
        best = square
        sign = walls.reflex[i] ? 1 : cornerSign(walls, i, dx, dy)
        nearest.edge = i
        nearest.x = walls.x0[i] as number
        nearest.y = walls.y0[i] as number
      }
    } else {
      const across = dx * (walls.nx[i] as number) + dy * (walls.ny[i] as number)
      const square = across * across
      if (square < best) {
        best = square
        sign = across >= 0 ? 1 : -1
        nearest.edge = i
        nearest.x = (walls.x0[i] as number) + along * (walls.tx[i] as number)
        nearest.y = (walls.y0[i] as number) + along * (walls.ty[i] as number)
      }
    }
  }
  return sign * Math.sqrt(best)
}

/** A straight joint (two edges in line) is no corner: there the side of the edge tells. */
function cornerSign(walls: Boundary, i: number, dx: number, dy: number): number {
  const before = walls.before[i] as number
  const cross =
    (walls.tx[before] as number) * (walls.ty[i] as number) - (walls.ty[before] as number) * (walls.tx[i] as number)
  if (Math.abs(cross) > 1e-9) return -1
  return dx * (walls.nx[i] as number) + dy * (walls.ny[i] as number) >= 0 ? 1 : -1
}
