import { distanceToBoundary } from '../geometry/boundary.ts'
import { holds } from '../geometry/polygon-check.ts'
import type { Scene } from '../geometry/scene.ts'
import type { Metres } from '../units/quantity.ts'
import { directionOf, directions, fillRays, fillWindow, floor, handlerAt, type Tables, windowOf } from './tables.ts'

/**
 * The backward value function of the taut team. State: handler at a grid node, leash in one of `directions`, robot's
 * heading in one of at most two runs of headings; the attachment is derived from them, so there is no error to
 * integrate. `value` holds, state by state, the greatest clearance with which the goal can be reached, -0.1 and below
 * not told apart. Layout: (direction * count + node) * 2 + run.
 *
 * A robot at a door cannot turn as it likes: headings with clearance `tau` or more fall into runs with a wall between,
 * and only runs that overlap are linked. A value above `tau` may be too good by what a run's own dip costs.
 */
export interface Field {
  tables: Tables
  separation: Metres
  /** First column, first row and size of the part of the grid where the handler may be. */
  columns: number
  rows: number
  x0: Metres
  y0: Metres
  count: number
  /** Clearance of the pose itself at its best heading of the run. */
  pose: Float32Array
  value: Float32Array
  /** First and last heading of each run, in steps from the leash's direction; first > last: no run. */
  first: Int8Array
  last: Int8Array
  /** 1 where the handler stands in the goal. */
  goal: Uint8Array
  /** Straight step of each direction: way, node reached without and with the sideways cell, weight of the latter. */
  way: Float64Array
  ahead: Int32Array
  aside: Int32Array
  weight: Float64Array
}

/** A leash may be seen to clip a wall by this much on the grid; the certificate does not forgive it. Metres. */
const clip = 0.02

/** Lays out the field for one separation: poses, goal, steps; values at the goal only. */
export function fieldOf(scene: Scene, tables: Tables, separation: Metres, window: number, tau: Metres): Field {
  const { grid } = tables
  const part = partOf(scene, tables)
  const columns = part.i1 - part.i0 + 1
  const rows = part.j1 - part.j0 + 1
  const count = columns * rows
  const field: Field = {
    tables,
    separation,
    columns,
    rows,
    x0: grid.x0 + part.i0 * grid.dx,
    y0: grid.y0 + part.j0 * grid.dy,
    count,
    pose: new Float32Array(count * directions * 2).fill(floor),
    value: new Float32Array(count * directions * 2).fill(floor),
    first: new Int8Array(count * directions * 2).fill(1),
    last: new Int8Array(count * directions * 2),
    goal: new Uint8Array(count),
    way: new Float64Array(directions),
    ahead: new Int32Array(directions),
    aside: new Int32Array(directions),
    weight: new Float64Array(directions),
  }
  layOutSteps(field)
  fillPoses(scene, field, part, window, tau)
  return field
}

interface Part {
  i0: number
  i1: number
  j0: number
  j1: number
  use: Uint8Array
}

/** Nodes where the handler may be on his way: not behind the start of a named form, and in the goal only its rim. */
function partOf(scene: Scene, tables: Tables): Part {
  const { grid } = tables
  const use = new Uint8Array(grid.columns * grid.rows)
  const part: Part = { i0: grid.columns, i1: -1, j0: grid.rows, j1: -1, use }
  const cos = Math.cos(scene.start.heading)
  const sin = Math.sin(scene.start.heading)
  const behind = -1.5 * Math.max(grid.dx, grid.dy)
  for (let j = 0; j < grid.rows; j++)
    for (let i = 0; i < grid.columns; i++) {
      const node = j * grid.columns + i
      const x = grid.x0 + i * grid.dx
      const y = grid.y0 + j * grid.dy
      if (scene.form && (x - scene.start.x) * cos + (y - scene.start.y) * sin < behind) {
        // Behind the start line only what lies round a bend, as the exit lane of a U-turn does.
        if (scene.form.kind !== 'uturn' || y < 0) continue
      }
      if (handlerAt(tables, node) <= -0.06) continue
      if (holds(scene.goal.polygon, { x, y }) && !onRim(scene, grid.dx, grid.dy, x, y)) continue
      use[node] = 1
      part.i0 = Math.min(part.i0, i)
      part.i1 = Math.max(part.i1, i)
      part.j0 = Math.min(part.j0, j)
      part.j1 = Math.max(part.j1, j)
    }
  return part
}

function onRim(scene: Scene, dx: Metres, dy: Metres, x: Metres, y: Metres): boolean {
  const goal = scene.goal.polygon
  for (let i = -3; i <= 3; i++)
    for (let j = -3; j <= 3; j++) if (!holds(goal, { x: x + i * dx, y: y + j * dy })) return true
  return false
}

function layOutSteps(field: Field): void {
  const { dx, dy } = field.tables.grid
  for (let k = 0; k < directions; k++) {
    const c = Math.cos(directionOf(k))
    const s = Math.sin(directionOf(k))
    const sx = Math.abs(c) < 1e-9 ? 0 : Math.sign(c)
    const sy = Math.abs(s) < 1e-9 ? 0 : Math.sign(s)
    const tx = sx === 0 ? Number.POSITIVE_INFINITY : dx / Math.abs(c)
    const ty = sy === 0 ? Number.POSITIVE_INFINITY : dy / Math.abs(s)
    if (tx <= ty) {
      field.way[k] = tx
      field.ahead[k] = sx
      field.aside[k] = sx + sy * field.columns
      field.weight[k] = sy === 0 ? 0 : (tx * Math.abs(s)) / dy
    } else {
      field.way[k] = ty
      field.ahead[k] = sy * field.columns
      field.aside[k] = sx + sy * field.columns
      field.weight[k] = sx === 0 ? 0 : (ty * Math.abs(c)) / dx
    }
  }
}

function fillPoses(scene: Scene, field: Field, part: Part, window: number, tau: Metres): void {
  const { tables, separation, columns, rows, goal, count } = field
  const { grid, ray, robot } = tables
  const table = windowOf(tables, window)
  const { best } = table
  for (let j = 0; j < rows; j++)
    for (let i = 0; i < columns; i++) {
      const node = (j + part.j0) * grid.columns + i + part.i0
      if (!part.use[node]) continue
      const at = j * columns + i
      const handler = handlerAt(tables, node)
      fillRays(tables, node)
      if (holds(scene.goal.polygon, { x: field.x0 + i * grid.dx, y: field.y0 + j * grid.dy })) goal[at] = 1
      for (let k = 0; k < directions; k++) {
        if ((ray[node * directions + k] as number) < separation - clip) continue
        // The attachment lies between four nodes of the same grid.
        const fx = i + part.i0 + (separation * Math.cos(directionOf(k))) / grid.dx
        const fy = j + part.j0 + (separation * Math.sin(directionOf(k))) / grid.dy
        const ix = Math.floor(fx)
        const iy = Math.floor(fy)
        if (ix < 0 || iy < 0 || ix + 1 >= grid.columns || iy + 1 >= grid.rows) continue
        const n00 = iy * grid.columns + ix
        fillWindow(tables, window, table, n00)
        fillWindow(tables, window, table, n00 + 1)
        fillWindow(tables, window, table, n00 + grid.columns)
        fillWindow(tables, window, table, n00 + grid.columns + 1)
        const wx = fx - ix
        const wy = fy - iy
        const low =
          (best[n00 * directions + k] as number) * (1 - wx) + (best[(n00 + 1) * directions + k] as number) * wx
        const high =
          (best[(n00 + grid.columns) * directions + k] as number) * (1 - wx) +
          (best[(n00 + grid.columns + 1) * directions + k] as number) * wx
        if (low * (1 - wy) + high * wy <= floor + 1e-6) continue
        for (let t = 0; t <= 2 * window; t++) {
          const heading = (k + t - window + 2 * directions) % directions
          const base = n00 * directions + heading
          const above = base + grid.columns * directions
          row[t] =
            ((robot[base] as number) * (1 - wx) + (robot[base + directions] as number) * wx) * (1 - wy) +
            ((robot[above] as number) * (1 - wx) + (robot[above + directions] as number) * wx) * wy
        }
        setRuns(field, (k * count + at) * 2, window, tau, handler, goal[at] === 1)
      }
    }
}

const row = new Float64Array(directions + 1)

/** Splits the headings of `row` into its two best runs at or above tau, or just under the peak where that is lower. */
function setRuns(field: Field, at: number, window: number, tau: Metres, handler: Metres, isGoal: boolean): void {
  const { pose, value, first, last } = field
  let peak = floor
  for (let t = 0; t <= 2 * window; t++) if ((row[t] as number) > peak) peak = row[t] as number
  const level = Math.min(tau, peak - 0.005)
  let from = -1
  let best = floor
  for (let t = 0; t <= 2 * window + 1; t++) {
    const here = t <= 2 * window ? (row[t] as number) : Number.NEGATIVE_INFINITY
    if (here >= level) {
      if (from < 0) {
        from = t
        best = here
      } else if (here > best) best = here
    } else if (from >= 0) {
      keepRun(at, from - window, t - 1 - window, Math.min(best, handler))
      from = -1
    }
  }
  if (isGoal)
    for (let s = at; s < at + 2; s++) if ((first[s] as number) <= (last[s] as number)) value[s] = pose[s] as number

  function keepRun(state: number, start: number, end: number, clearance: number): void {
    const one = (first[state] as number) > (last[state] as number)
    const two = (first[state + 1] as number) > (last[state + 1] as number)
    const to = one ? state : two ? state + 1 : (pose[state] as number) < (pose[state + 1] as number) ? state : state + 1
    if (!one && !two && clearance <= (pose[to] as number)) return
    first[to] = start
    last[to] = end
    pose[to] = Math.max(floor, clearance)
  }
}

/** Best of `values` over the runs of a state that overlap the run [from, to], given in steps from that state's direction. */
export function linked(field: Field, values: Float32Array, state: number, from: number, to: number): number {
  const { first, last } = field
  let best = floor
  for (let s = state; s < state + 2; s++) {
    const start = first[s] as number
    const end = last[s] as number
    if (start > end || start > to || end < from) continue
    const value = values[s] as number
    if (value > best) best = value
  }
  return best
}

/**
 * Raises the values to the fixed point of: clearance of the pose, and the best of a straight pull, a swing to either
 * side. Returns the number of passes; `most` caps them (then the values are still low, never high).
 */
export function raise(field: Field, value: Float32Array, most: number): number {
  for (let pass = 1; pass <= most; pass++) {
    let raised = 0
    for (let i = 0; i < 2 * directions; i++) {
      const k = i < directions ? directions - 1 - i : i - directions
      raised = Math.max(raised, raiseDirection(field, value, k))
    }
    if (raised < 2e-4) return pass
  }
  return most + 1
}

function raiseDirection(field: Field, value: Float32Array, k: number): number {
  const { pose, count, columns, rows, goal, first, last } = field
  const left = ((k + 1) % directions) * count
  const right = ((k + directions - 1) % directions) * count
  const here = k * count
  const ahead = field.ahead[k] as number
  const aside = field.aside[k] as number
  const weight = field.weight[k] as number
  const keep = 1 - weight
  // Far end of the pull first: one pass then carries a value along the whole straight.
  const c = Math.cos(directionOf(k))
  const s = Math.sin(directionOf(k))
  let raised = 0
  for (let jj = 0; jj < rows; jj++) {
    const j = s > 0 ? rows - 1 - jj : jj
    for (let ii = 0; ii < columns; ii++) {
      const i = c > 0 ? columns - 1 - ii : ii
      const at = j * columns + i
      if (goal[at]) continue
      for (let run = 0; run < 2; run++) {
        const state = (here + at) * 2 + run
        const limit = pose[state] as number
        const old = value[state] as number
        if (limit <= old) continue
        const from = first[state] as number
        const to = last[state] as number
        let best = linked(field, value, (left + at) * 2, from - 1, to - 1)
        const other = linked(field, value, (right + at) * 2, from + 1, to + 1)
        if (other > best) best = other
        if (best < limit && inside(i, j, columns, rows, c, s)) {
          const straight =
            keep * linked(field, value, (here + at + ahead) * 2, from, to) +
            (weight > 0 ? weight * linked(field, value, (here + at + aside) * 2, from, to) : 0)
          if (straight > best) best = straight
        }
        const next = best < limit ? best : limit
        if (next > old) {
          value[state] = next
          if (next - old > raised) raised = next - old
        }
      }
    }
  }
  return raised
}

export function inside(i: number, j: number, columns: number, rows: number, c: number, s: number): boolean {
  return !(
    (c > 1e-9 && i === columns - 1) ||
    (c < -1e-9 && i === 0) ||
    (s > 1e-9 && j === rows - 1) ||
    (s < -1e-9 && j === 0)
  )
}

/** Handler's clearance at a node when drawn `drift` along direction k, metres. */
function drawn(field: Field, i: number, j: number, k: number, drift: Metres): Metres {
  const { grid, walls, bodies } = field.tables
  const x = field.x0 + i * grid.dx + drift * Math.cos(directionOf(k))
  const y = field.y0 + j * grid.dy + drift * Math.sin(directionOf(k))
  return distanceToBoundary(walls, x, y) - bodies.r
}

/**
 * Values with one pause more than those given: where the handler stands the leash may go slack and be taken up again
 * in whatever direction is best, as if the robot could always walk there. Too good where it cannot: such places are
 * banned once they are found.
 */
export function withPause(field: Field, below: Float32Array, banned: Uint8Array, drift: Metres): Float32Array {
  const { pose, count, columns, goal } = field
  const value = Float32Array.from(below)
  for (let at = 0; at < count; at++) {
    if (goal[at] || banned[at]) continue
    const i = at % columns
    const j = Math.floor(at / columns)
    let best = floor
    for (let k = 0; k < directions; k++) {
      const state = (k * count + at) * 2
      const here = Math.max(below[state] as number, below[state + 1] as number)
      if (here > best && (drift === 0 || drawn(field, i, j, k, drift) > best))
        best = drift === 0 ? here : Math.min(here, drawn(field, i, j, k, drift))
    }
    if (best <= floor) continue
    for (let k = 0; k < directions; k++) {
      const state = (k * count + at) * 2
      let limit = best
      if (drift > 0 && (pose[state] as number) > floor) limit = Math.min(limit, drawn(field, i, j, k, drift))
      for (let s = state; s < state + 2; s++)
        if (Math.min(limit, pose[s] as number) > (value[s] as number)) value[s] = Math.min(limit, pose[s] as number)
    }
  }
  return value
}

/** Value between the nodes in place, over the runs that overlap [from, to]; `floor` off the field. */
export function sample(
  field: Field,
  value: Float32Array,
  x: Metres,
  y: Metres,
  k: number,
  from: number,
  to: number,
): number {
  const { grid } = field.tables
  const fx = (x - field.x0) / grid.dx
  const fy = (y - field.y0) / grid.dy
  const i = Math.floor(fx + 1e-9)
  const j = Math.floor(fy + 1e-9)
  if (i < 0 || j < 0 || i + 1 >= field.columns || j + 1 >= field.rows) return floor
  const wx = Math.max(0, fx - i)
  const wy = Math.max(0, fy - j)
  const at = (((k % directions) + directions) % directions) * field.count + j * field.columns + i
  return (
    (linked(field, value, at * 2, from, to) * (1 - wx) + linked(field, value, (at + 1) * 2, from, to) * wx) * (1 - wy) +
    (linked(field, value, (at + field.columns) * 2, from, to) * (1 - wx) +
      linked(field, value, (at + field.columns + 1) * 2, from, to) * wx) *
      wy
  )
}
