import { type Boundary, boundaryOf, distanceToBoundary } from '../geometry/boundary.ts'
import { rectangleClearance } from '../geometry/rectangle.ts'
import type { Scene } from '../geometry/scene.ts'
import type { Metres, Radians } from '../units/quantity.ts'
import type { Bodies } from './answer.ts'
import { type Grid, gridOf } from './grid.ts'

/** Directions of leash and robot that the search tells apart. */
export const directions = 72
/** Robot clearances above this are not told apart, metres: no narrow place has more. */
const roomy = 0.4
/** Values below this are not told apart: a wall is a wall. Metres. */
export const floor = -0.15

/**
 * What the search looks up again and again, filled as it asks, node by node: the same for every separation.
 */
export interface Tables {
  walls: Boundary
  bodies: Bodies
  grid: Grid
  /** Handler's clearance at each node; NaN = not yet asked. */
  handler: Float32Array
  /** Robot's clearance with its attachment at a node, for each heading. */
  robot: Float32Array
  robotKnown: Uint8Array
  /** Free length of a ray from a node, for each direction. */
  ray: Float32Array
  rayKnown: Uint8Array
  /** Best robot clearance over the headings within a window of half-width `steps` about each direction. */
  windows: Map<number, { best: Float32Array; known: Uint8Array }>
}

export function tablesOf(scene: Scene, bodies: Bodies, spacing: Metres): Tables {
  const grid = gridOf(scene, spacing)
  const count = grid.columns * grid.rows
  return {
    walls: boundaryOf(scene),
    bodies,
    grid,
    handler: new Float32Array(count).fill(Number.NaN),
    robot: new Float32Array(count * directions),
    robotKnown: new Uint8Array(count),
    ray: new Float32Array(count * directions),
    rayKnown: new Uint8Array(count),
    windows: new Map(),
  }
}

export function directionOf(k: number): Radians {
  return (2 * Math.PI * k) / directions
}

export function handlerAt(tables: Tables, node: number): Metres {
  const known = tables.handler[node] as number
  if (!Number.isNaN(known)) return known
  const { grid, walls, bodies } = tables
  const x = grid.x0 + (node % grid.columns) * grid.dx
  const y = grid.y0 + Math.floor(node / grid.columns) * grid.dy
  const value = Math.max(floor, distanceToBoundary(walls, x, y) - bodies.r)
  tables.handler[node] = value
  return value
}

const cosines = Float64Array.from({ length: directions }, (_, k) => Math.cos(directionOf(k)))
const sines = Float64Array.from({ length: directions }, (_, k) => Math.sin(directionOf(k)))

/** Fills the robot's clearances at a node. */
export function fillRobot(tables: Tables, node: number): void {
  if (tables.robotKnown[node]) return
  tables.robotKnown[node] = 1
  const { grid, walls, bodies, robot } = tables
  const x = grid.x0 + (node % grid.columns) * grid.dx
  const y = grid.y0 + Math.floor(node / grid.columns) * grid.dy
  const inside = distanceToBoundary(walls, x, y)
  const from = node * directions
  // The attachment is a point of the robot: beyond a wall there is nothing to look for.
  if (inside < floor) {
    robot.fill(floor, from, from + directions)
    return
  }
  const half = bodies.a / 2
  const side = bodies.b / 2
  for (let k = 0; k < directions; k++) {
    const c = cosines[k] as number
    const s = sines[k] as number
    robot[from + k] = Math.max(
      floor,
      rectangleClearance(walls, x + bodies.d * c, y + bodies.d * s, c, s, half, side, roomy),
    )
  }
}

/** The window's table of best robot clearances; rows are filled by `fillWindow`. */
export function windowOf(tables: Tables, steps: number): { best: Float32Array; known: Uint8Array } {
  let window = tables.windows.get(steps)
  if (!window) {
    const count = tables.grid.columns * tables.grid.rows
    window = { best: new Float32Array(count * directions), known: new Uint8Array(count) }
    tables.windows.set(steps, window)
  }
  return window
}

export function fillWindow(
  tables: Tables,
  steps: number,
  window: { best: Float32Array; known: Uint8Array },
  node: number,
): void {
  if (window.known[node]) return
  window.known[node] = 1
  fillRobot(tables, node)
  const from = node * directions
  const { robot } = tables
  const { best } = window
  const reach = Math.min(steps, directions / 2)
  // A sliding maximum by monotone queue, twice round the circle.
  let head = 0
  let tail = 0
  for (let i = 0; i < directions + 2 * reach; i++) {
    const value = robot[from + ((i - reach + directions) % directions)] as number
    while (tail > head && (queueValue[tail - 1] as number) <= value) tail--
    queueValue[tail] = value
    queueAt[tail++] = i
    while ((queueAt[head] as number) < i - 2 * reach) head++
    if (i >= 2 * reach) best[from + i - 2 * reach] = queueValue[head] as number
  }
}

const queueValue = new Float64Array(directions * 2 + 2)
const queueAt = new Int32Array(directions * 2 + 2)

/** Fills the free ray lengths at a node: each wall only where it is seen. */
export function fillRays(tables: Tables, node: number): void {
  if (tables.rayKnown[node]) return
  tables.rayKnown[node] = 1
  const { grid, walls, ray } = tables
  const x = grid.x0 + (node % grid.columns) * grid.dx
  const y = grid.y0 + Math.floor(node / grid.columns) * grid.dy
  const from = node * directions
  ray.fill(100, from, from + directions)
  const slot = (2 * Math.PI) / directions
  for (let i = 0; i < walls.count; i++) {
    const nx = walls.nx[i] as number
    const ny = walls.ny[i] as number
    const off = (x - (walls.x0[i] as number)) * nx + (y - (walls.y0[i] as number)) * ny
    if (off <= 0) continue // seen from behind only
    const a0 = Math.atan2((walls.y0[i] as number) - y, (walls.x0[i] as number) - x)
    let a1 = Math.atan2((walls.y1[i] as number) - y, (walls.x1[i] as number) - x)
    if (a1 < a0) a1 += 2 * Math.PI
    for (let k = Math.ceil(a0 / slot - 1e-9); k <= Math.floor(a1 / slot + 1e-9); k++) {
      const at = ((k % directions) + directions) % directions
      const towards = -((cosines[at] as number) * nx + (sines[at] as number) * ny)
      if (towards <= 1e-9) continue
      const length = off / towards
      if (length < (ray[from + at] as number)) ray[from + at] = length
    }
  }
}
