import { holds } from '../geometry/polygon-check.ts'
import type { Scene } from '../geometry/scene.ts'
import type { Metres } from '../units/quantity.ts'
import { directionOf, directions, fillRays, fillWindow, handlerAt, type Tables, windowOf } from './tables.ts'

/**
 * The states of the taut team for one separation. A state: handler at a grid node, leash in one of `directions`,
 * robot's heading in one of at most two runs of headings; the attachment is derived from them, so there is no error to
 * integrate. States are numbered from 1, direction by direction and in each by node; state 0 stands for all that are
 * not worth a number.
 *
 * A robot at a door cannot turn as it likes: headings with clearance `tau` or more fall into runs with a wall between,
 * and only runs that overlap are linked. A value above `tau` may be too good by what a run's own dip costs.
 */
export interface Field {
  tables: Tables
  separation: Metres
  /** Where the handler may be: part of the scene's grid. */
  columns: number
  rows: number
  x0: Metres
  y0: Metres
  count: number
  /** 1 where the handler stands in the goal, by node. */
  goal: Uint8Array
  /** State by (direction * count + node) * 2 + run; 0: none. */
  slot: Int32Array
  /** First state of each direction, and the end. */
  begin: Int32Array
  /** Node of each state. */
  place: Int32Array
  /** Clearance of the pose itself at the best heading of its run; that of state 0 is below all others. */
  pose: Float32Array
  /** First and last heading of each run, in steps from the leash's direction. */
  first: Int8Array
  last: Int8Array
  /** Eight linked states a state, two each: swung left, swung right, pulled straight, pulled straight and one cell aside. */
  links: Int32Array
  /** Straight step of each direction: way, and weight of the cell aside. */
  way: Float64Array
  weight: Float64Array
  /** 1 where the far end of a pull has the greater node number: values then spread downwards. */
  downwards: Uint8Array
}

/** A leash may be seen to clip a wall by this much on the grid; the certificate does not forgive it. Metres. */
const clip = 0.02

/** Lays out the states with clearance `least` or more; headings fall into runs at `tau`. */
export function fieldOf(
  scene: Scene,
  tables: Tables,
  separation: Metres,
  window: number,
  tau: Metres,
  least: Metres,
): Field {
  const { grid } = tables
  const part = partOf(scene, tables)
  const columns = part.i1 - part.i0 + 1
  const rows = part.j1 - part.j0 + 1
  const count = columns * rows
  const bare = {
    tables,
    separation,
    columns,
    rows,
    x0: grid.x0 + part.i0 * grid.dx,
    y0: grid.y0 + part.j0 * grid.dy,
    count,
    goal: part.goal,
    slot: new Int32Array(count * directions * 2),
    begin: new Int32Array(directions + 1),
  }
  const found = gatherStates(bare, part, window, tau, least)
  const steps = layOutSteps(bare)
  const field: Field = { ...bare, ...found, ...steps, links: new Int32Array(found.place.length * 8) }
  for (let k = 0; k < directions; k++) linkDirection(field, k, steps.ahead[k] as number, steps.aside[k] as number)
  return field
}

interface Part {
  i0: number
  i1: number
  j0: number
  j1: number
  /** Nodes in use, as numbers of the part and of the grid. */
  nodes: Int32Array
  gridNodes: Int32Array
  goal: Uint8Array
}

/** Nodes where the handler may be on his way: not behind the start of a named form, and in the goal only its rim. */
function partOf(scene: Scene, tables: Tables): Part {
  const { grid } = tables
  const inGoal = new Uint8Array(grid.columns * grid.rows)
  for (let node = 0; node < inGoal.length; node++) {
    const x = grid.x0 + (node % grid.columns) * grid.dx
    const y = grid.y0 + Math.floor(node / grid.columns) * grid.dy
    if (holds(scene.goal.polygon, { x, y })) inGoal[node] = 1
  }
  const kept: number[] = []
  const part = { i0: grid.columns, i1: 0, j0: grid.rows, j1: 0 }
  const cos = Math.cos(scene.start.heading)
  const sin = Math.sin(scene.start.heading)
  const behind = -1.5 * Math.max(grid.dx, grid.dy)
  for (let j = 0; j < grid.rows; j++)
    for (let i = 0; i < grid.columns; i++) {
      const node = j * grid.columns + i
      const x = grid.x0 + i * grid.dx
      const y = grid.y0 + j * grid.dy
      if (scene.form && (x - scene.start.x) * cos + (y - scene.start.y) * sin < behind)
        if (scene.form.kind !== 'uturn' || y < 0) continue // behind the start lies only the exit lane of a U-turn
      if (inGoal[node] && !onRim(inGoal, grid.columns, grid.rows, i, j)) continue
      if (handlerAt(tables, node) <= -0.06) continue
      kept.push(node)
      part.i0 = Math.min(part.i0, i)
      part.i1 = Math.max(part.i1, i)
      part.j0 = Math.min(part.j0, j)
      part.j1 = Math.max(part.j1, j)
    }
  const columns = part.i1 - part.i0 + 1
  const gridNodes = Int32Array.from(kept)
  const nodes = gridNodes.map(
    (node) => (Math.floor(node / grid.columns) - part.j0) * columns + (node % grid.columns) - part.i0,
  )
  const goal = new Uint8Array(Math.max(0, columns * (part.j1 - part.j0 + 1)))
  for (let n = 0; n < nodes.length; n++) goal[nodes[n] as number] = inGoal[gridNodes[n] as number] as number
  return { ...part, nodes, gridNodes, goal }
}

function onRim(inGoal: Uint8Array, columns: number, rows: number, i: number, j: number): boolean {
  for (let dj = -3; dj <= 3; dj++)
    for (let di = -3; di <= 3; di++) {
      if (i + di < 0 || j + dj < 0 || i + di >= columns || j + dj >= rows) continue
      if (!inGoal[(j + dj) * columns + i + di]) return true
    }
  return false
}

function layOutSteps(field: { tables: Tables; columns: number }) {
  const { dx, dy } = field.tables.grid
  const steps = {
    way: new Float64Array(directions),
    weight: new Float64Array(directions),
    ahead: new Int32Array(directions),
    aside: new Int32Array(directions),
    downwards: new Uint8Array(directions),
  }
  for (let k = 0; k < directions; k++) {
    const c = Math.cos(directionOf(k))
    const s = Math.sin(directionOf(k))
    const sx = Math.abs(c) < 1e-9 ? 0 : Math.sign(c)
    const sy = Math.abs(s) < 1e-9 ? 0 : Math.sign(s)
    const tx = sx === 0 ? Number.POSITIVE_INFINITY : dx / Math.abs(c)
    const ty = sy === 0 ? Number.POSITIVE_INFINITY : dy / Math.abs(s)
    const alongX = tx <= ty
    steps.way[k] = alongX ? tx : ty
    steps.ahead[k] = alongX ? sx : sy * field.columns
    steps.aside[k] = sx + sy * field.columns
    steps.weight[k] = alongX ? (sy === 0 ? 0 : (tx * Math.abs(s)) / dy) : sx === 0 ? 0 : (ty * Math.abs(c)) / dx
    steps.downwards[k] = sy > 0 || (sy === 0 && sx > 0) ? 1 : 0
  }
  return steps
}

type Bare = Pick<Field, 'tables' | 'separation' | 'columns' | 'count' | 'slot' | 'begin'>

/** Numbers the states and fills their poses. */
function gatherStates(field: Bare, part: Part, window: number, tau: Metres, least: Metres) {
  const { tables, separation, count, slot, begin } = field
  const { grid, ray, robot } = tables
  const table = windowOf(tables, window)
  const { best } = table
  let size = 1 << 15
  let states = {
    place: new Int32Array(size),
    pose: new Float32Array(size),
    first: new Int8Array(size),
    last: new Int8Array(size),
  }
  states.pose[0] = least
  states.first[0] = 1
  let next = 1
  for (let n = 0; n < part.gridNodes.length; n++) fillRays(tables, part.gridNodes[n] as number)
  const stride = grid.columns * directions
  for (let k = 0; k < directions; k++) {
    begin[k] = next
    const aheadX = (separation * Math.cos(directionOf(k))) / grid.dx
    const aheadY = (separation * Math.sin(directionOf(k))) / grid.dy
    const shiftX = Math.floor(aheadX)
    const shiftY = Math.floor(aheadY)
    // The attachment lies between the same four neighbours of every node.
    const w00 = (1 - (aheadX - shiftX)) * (1 - (aheadY - shiftY))
    const w10 = (aheadX - shiftX) * (1 - (aheadY - shiftY))
    const w01 = (1 - (aheadX - shiftX)) * (aheadY - shiftY)
    const w11 = (aheadX - shiftX) * (aheadY - shiftY)
    for (let n = 0; n < part.gridNodes.length; n++) {
      const node = part.gridNodes[n] as number
      if ((ray[node * directions + k] as number) < separation - clip) continue
      const i = (node % grid.columns) + shiftX
      const j = Math.floor(node / grid.columns) + shiftY
      if (i < 0 || j < 0 || i + 1 >= grid.columns || j + 1 >= grid.rows) continue
      const n00 = j * grid.columns + i
      for (const corner of [n00, n00 + 1, n00 + grid.columns, n00 + grid.columns + 1])
        if (!table.known[corner]) fillWindow(tables, window, table, corner)
      const from = n00 * directions
      const handler = tables.handler[node] as number
      const top =
        w00 * (best[from + k] as number) +
        w10 * (best[from + directions + k] as number) +
        w01 * (best[from + stride + k] as number) +
        w11 * (best[from + stride + directions + k] as number)
      if (handler < least || top < least) continue
      for (let t = 0; t <= 2 * window; t++) {
        let heading = k + t - window
        heading += heading < 0 ? directions : heading >= directions ? -directions : 0
        const at = from + heading
        row[t] =
          w00 * (robot[at] as number) +
          w10 * (robot[at + directions] as number) +
          w01 * (robot[at + stride] as number) +
          w11 * (robot[at + stride + directions] as number)
      }
      const runs = cutRuns(window, tau, least)
      const at = part.nodes[n] as number
      for (let run = 0; run < runs; run++) {
        if (next === size) {
          size *= 2
          states = grown(states, size)
        }
        slot[(k * count + at) * 2 + run] = next
        states.place[next] = at
        states.pose[next] = Math.min(runBest[run] as number, handler)
        states.first[next] = (runFirst[run] as number) - window
        states.last[next] = (runLast[run] as number) - window
        next++
      }
    }
  }
  begin[directions] = next
  return {
    place: states.place.slice(0, next),
    pose: states.pose.slice(0, next),
    first: states.first.slice(0, next),
    last: states.last.slice(0, next),
  }
}

function grown<T extends { place: Int32Array; pose: Float32Array; first: Int8Array; last: Int8Array }>(
  states: T,
  size: number,
) {
  const place = new Int32Array(size)
  const pose = new Float32Array(size)
  const first = new Int8Array(size)
  const last = new Int8Array(size)
  place.set(states.place)
  pose.set(states.pose)
  first.set(states.first)
  last.set(states.last)
  return { place, pose, first, last }
}

const row = new Float64Array(directions + 1)
const runFirst = new Int32Array(2)
const runLast = new Int32Array(2)
const runBest = new Float64Array(2)

/** Splits the headings of `row` into its two best runs at or above tau, or just under the peak where that is lower. */
function cutRuns(window: number, tau: Metres, least: Metres): number {
  let peak = Number.NEGATIVE_INFINITY
  for (let t = 0; t <= 2 * window; t++) if ((row[t] as number) > peak) peak = row[t] as number
  if (peak < least) return 0
  const level = Math.min(tau, peak - 0.005)
  let runs = 0
  let from = -1
  let best = 0
  for (let t = 0; t <= 2 * window + 1; t++) {
    const here = t <= 2 * window ? (row[t] as number) : Number.NEGATIVE_INFINITY
    if (here >= level) {
      if (from < 0) {
        from = t
        best = here
      } else if (here > best) best = here
    } else if (from >= 0) {
      if (best >= least) {
        const to = runs < 2 ? runs++ : (runBest[0] as number) < (runBest[1] as number) ? 0 : 1
        if (runs < 2 || to < 2) keepRun(to, from, t - 1, best)
      }
      from = -1
    }
  }
  return runs
}

/** A third run takes the place of a worse one. */
function keepRun(to: number, first: number, last: number, best: number): void {
  runFirst[to] = first
  runLast[to] = last
  runBest[to] = best
}

function linkDirection(field: Field, k: number, ahead: number, aside: number): void {
  const { begin, place, first, last, count, columns, rows, links, weight } = field
  const left = ((k + 1) % directions) * count
  const right = ((k + directions - 1) % directions) * count
  const here = k * count
  const stepX = (aside - Math.round(aside / columns) * columns) | 0
  const stepY = Math.round(aside / columns)
  for (let s = begin[k] as number, end = begin[k + 1] as number; s < end; s++) {
    const at = place[s] as number
    const from = first[s] as number
    const to = last[s] as number
    link(field, links, s * 8, left + at, from - 1, to - 1)
    link(field, links, s * 8 + 2, right + at, from + 1, to + 1)
    const i = at % columns
    const j = (at - i) / columns
    if (i + stepX < 0 || i + stepX >= columns || j + stepY < 0 || j + stepY >= rows) continue
    link(field, links, s * 8 + 4, here + at + ahead, from, to)
    if ((weight[k] as number) > 0) link(field, links, s * 8 + 6, here + at + aside, from, to)
  }
}

function link(field: Field, links: Int32Array, to: number, cell: number, from: number, until: number): void {
  const { slot, first, last } = field
  const one = slot[cell * 2] as number
  if (one !== 0 && (first[one] as number) <= until && (last[one] as number) >= from) links[to] = one
  const other = slot[cell * 2 + 1] as number
  if (other !== 0 && (first[other] as number) <= until && (last[other] as number) >= from) links[to + 1] = other
}
