import { holds } from '../geometry/polygon-check.ts'
import type { Scene } from '../geometry/scene.ts'
import type { Metres, Radians } from '../units/quantity.ts'
import { arcFrom, type Node } from './nodes.ts'
import { directionOf, directions } from './tables.ts'
import { type Field, inside, linked, sample } from './value.ts'

/** A motion may dip this far under the level where the grid, not the place, makes it; each metre of dip is dear. */
const dip = 0.05
const dipCost = 20
/** What a metre walked costs beside a radian swung: of equal motions the one that saws the person least is wanted. */
const metre = 0.3
const unreachable = 1e6

/** Walking and swinging are preferred to a pause until they cost this much more. */
const pauseCost = 3

/** A layer of the search: values and costs with at most so many pauses to come. */
export interface Layer {
  value: Float32Array
  cost: Float32Array
}

/**
 * Cost to go at a level: swings, way and pauses, through states from which the goal is reached at `level` or better.
 * `below` is the layer with one pause less.
 */
export function costToGo(
  field: Field,
  value: Float32Array,
  level: Metres,
  most: number,
  below?: Layer,
  banned?: Uint8Array,
): Float32Array {
  const { count, goal, first, last } = field
  const cost = new Float32Array(count * directions * 2).fill(unreachable)
  for (let at = 0; at < count; at++) {
    const paused = below && !goal[at] && !banned?.[at] ? pauseFrom(field, below, at).cost : unreachable
    for (let k = 0; k < directions; k++)
      for (let state = (k * count + at) * 2, end = state + 2; state < end; state++)
        if ((first[state] as number) <= (last[state] as number) && (value[state] as number) >= level - dip)
          cost[state] = goal[at] ? 0 : paused
  }
  for (let pass = 0; pass < most; pass++) {
    let lowered = false
    for (let i = 0; i < 2 * directions; i++) {
      const k = i < directions ? directions - 1 - i : i - directions
      lowered = lowerDirection(field, value, cost, level, k) || lowered
    }
    if (!lowered) break
  }
  return cost
}

/** The cheapest state of the layer below at a node, and what it costs to pause there and go on from it. */
function pauseFrom(field: Field, below: Layer, at: number): { cost: number; state: number } {
  let cost = unreachable
  let state = -1
  for (let k = 0; k < directions; k++)
    for (let s = (k * field.count + at) * 2, end = s + 2; s < end; s++)
      if ((below.cost[s] as number) < cost) {
        cost = below.cost[s] as number
        state = s
      }
  return { cost: Math.min(unreachable, cost + pauseCost), state }
}

/** Least cost over the runs of a state that overlap [from, to]. */
function cheapest(field: Field, cost: Float32Array, state: number, from: number, to: number): number {
  let best = unreachable
  for (let s = state; s < state + 2; s++) {
    const start = field.first[s] as number
    const end = field.last[s] as number
    if (start > end || start > to || end < from) continue
    const value = cost[s] as number
    if (value < best) best = value
  }
  return best
}

function lowerDirection(field: Field, value: Float32Array, cost: Float32Array, level: Metres, k: number): boolean {
  const { count, columns, rows, first, last, goal } = field
  const left = ((k + 1) % directions) * count
  const right = ((k + directions - 1) % directions) * count
  const here = k * count
  const swing = directionOf(1)
  const ahead = field.ahead[k] as number
  const aside = field.aside[k] as number
  const weight = field.weight[k] as number
  const step = (field.way[k] as number) * metre
  const c = Math.cos(directionOf(k))
  const s = Math.sin(directionOf(k))
  let lowered = false
  for (let jj = 0; jj < rows; jj++) {
    const j = s > 0 ? rows - 1 - jj : jj
    for (let ii = 0; ii < columns; ii++) {
      const i = c > 0 ? columns - 1 - ii : ii
      const at = j * columns + i
      if (goal[at]) continue
      for (let run = 0; run < 2; run++) {
        const state = (here + at) * 2 + run
        const held = value[state] as number
        if (held < level - dip) continue
        const under = dipCost * Math.max(0, level - held)
        const from = first[state] as number
        const to = last[state] as number
        if (from > to) continue
        const old = cost[state] as number
        let best =
          Math.min(
            cheapest(field, cost, (left + at) * 2, from - 1, to - 1),
            cheapest(field, cost, (right + at) * 2, from + 1, to + 1),
          ) + swing
        if (inside(i, j, columns, rows, c, s)) {
          const one = (here + at + ahead) * 2
          const other = (here + at + aside) * 2
          const reached =
            linked(field, value, one, from, to) * (1 - weight) +
            (weight > 0 ? linked(field, value, other, from, to) * weight : 0)
          if (reached >= level - dip)
            best = Math.min(
              best,
              mix(cheapest(field, cost, one, from, to), cheapest(field, cost, other, from, to), weight) + step,
            )
        }
        best += under
        if (best < old - 1e-6) {
          cost[state] = best
          lowered = true
        }
      }
    }
  }
  return lowered
}

/** Half of a way may end off the level: the mean of both is on it, as the value itself has it. */
function mix(one: number, other: number, weight: number): number {
  if (weight === 0) return one
  if (one >= unreachable) return other + 0.1 * (1 - weight)
  if (other >= unreachable) return one + 0.1 * weight
  return one * (1 - weight) + other * weight
}

/** Cost between the nodes; nodes off the level count as dear, not as infinite, while some are on it. */
function costAt(field: Field, cost: Float32Array, x: Metres, y: Metres, k: number, from: number, to: number): number {
  const { grid } = field.tables
  const fx = (x - field.x0) / grid.dx
  const fy = (y - field.y0) / grid.dy
  const i = Math.floor(fx + 1e-9)
  const j = Math.floor(fy + 1e-9)
  if (i < 0 || j < 0 || i + 1 >= field.columns || j + 1 >= field.rows) return unreachable
  const wx = Math.max(0, fx - i)
  const wy = Math.max(0, fy - j)
  const at = k * field.count + j * field.columns + i
  let sum = 0
  let weight = 0
  for (const [node, w] of [
    [at, (1 - wx) * (1 - wy)],
    [at + 1, wx * (1 - wy)],
    [at + field.columns, (1 - wx) * wy],
    [at + field.columns + 1, wx * wy],
  ] as const) {
    const value = cheapest(field, cost, node * 2, from, to)
    if (value >= unreachable) continue
    sum += value * w
    weight += w
  }
  return weight < 1e-6 ? unreachable : sum / weight + 0.3 * (1 - weight)
}

/**
 * The run of headings at a place that overlaps the one come from: the cheapest of the nearest node which has one on
 * the level.
 */
function runAt(
  field: Field,
  cost: Float32Array,
  x: Metres,
  y: Metres,
  k: number,
  from: number,
  to: number,
): [number, number] | null {
  const { grid } = field.tables
  const i = Math.round((x - field.x0) / grid.dx)
  const j = Math.round((y - field.y0) / grid.dy)
  let best: [number, number] | null = null
  let nearest = Number.POSITIVE_INFINITY
  for (let dj = -1; dj <= 1; dj++)
    for (let di = -1; di <= 1; di++) {
      if (i + di < 0 || j + dj < 0 || i + di >= field.columns || j + dj >= field.rows) continue
      const ex = field.x0 + (i + di) * grid.dx - x
      const ey = field.y0 + (j + dj) * grid.dy - y
      const far = ex * ex + ey * ey
      if (far >= nearest) continue
      const state = (k * field.count + (j + dj) * field.columns + i + di) * 2
      let least = unreachable
      for (let s = state; s < state + 2; s++) {
        const start = field.first[s] as number
        const end = field.last[s] as number
        if (start > end || start > to || end < from || (cost[s] as number) >= least) continue
        best = [start, end]
        least = cost[s] as number
        nearest = far
      }
    }
  return best
}

/** A rolled-out motion: taut stretches, between each two a pause at a standing handler. */
export interface Rolled {
  stretches: Node[][]
  /** Node of the field beside each pause, to ban where the robot turns out not to get through. */
  pausedAt: number[]
}

/**
 * Rolls a motion out of the field in continuous coordinates, always looking over all swings followed by a pull.
 * `layers[n]` has n pauses to come; the last is begun with. null where it loses its way. Headings are left at the
 * leash's direction.
 */
export function rollOut(
  scene: Scene,
  field: Field,
  layers: readonly Layer[],
  level: Metres,
  start: { x: Metres; y: Metres; psi: Radians },
  banned?: Uint8Array,
): Rolled | null {
  const slot = directionOf(1)
  let nodes: Node[] = [
    { x: start.x, y: start.y, psi: start.psi, length: field.separation, heading: start.psi, slack: false },
  ]
  const rolled: Rolled = { stretches: [nodes], pausedAt: [] }
  let n = layers.length - 1
  let k = Math.round(start.psi / slot)
  let run: [number, number] = [0, 0]
  let lastTurn = 0
  let walked = 1
  for (let step = 0; step < 500; step++) {
    const { value, cost } = layers[n] as Layer
    const here = nodes.at(-1) as Node
    if (holds(scene.goal.polygon, here)) {
      // A little further in, so that polishing has a goal to keep.
      nodes.push(arcFrom(here, 0.01, 0, here.heading))
      return rolled
    }
    const move = bestMove(scene, field, value, cost, level, here, k, run, lastTurn)
    const below = layers[n - 1]
    if (below && walked >= 0.2) {
      const at = nearestNode(field, here.x, here.y)
      if (at >= 0 && !banned?.[at] && !field.goal[at]) {
        const paused = pauseFrom(field, below, at)
        if (paused.cost < unreachable && paused.cost <= move.total + 1e-3) {
          n--
          k = Math.floor(paused.state / 2 / field.count)
          run = [field.first[paused.state] as number, field.last[paused.state] as number]
          nodes = [{ ...here, psi: k * slot, heading: (k + (run[0] + run[1]) / 2) * slot }]
          rolled.stretches.push(nodes)
          rolled.pausedAt.push(at)
          lastTurn = 0
          walked = 0
          continue
        }
      }
    }
    if (move.total >= unreachable) return null
    const wanted = (k + move.turn) * slot
    const parts = Math.ceil(Math.abs(wanted - here.psi) / (slot / 2) - 1e-9)
    for (let i = 0; i < parts; i++) {
      const from = nodes.at(-1) as Node
      nodes.push(arcFrom(from, 0, (wanted - here.psi) / parts, from.heading))
    }
    k += move.turn
    if (move.turn !== 0) lastTurn = Math.sign(move.turn)
    const at = ((k % directions) + directions) % directions
    const from = nodes.at(-1) as Node
    const to = arcFrom(from, field.way[at] as number, 0, from.heading)
    walked += field.way[at] as number
    nodes.push(to)
    run = runAt(field, cost, to.x, to.y, at, move.run[0], move.run[1]) ?? move.run
  }
  return null
}

interface Move {
  total: number
  turn: number
  run: [number, number]
}

/** The swing, followed by a pull, that leaves the least cost to go. */
function bestMove(
  scene: Scene,
  field: Field,
  value: Float32Array,
  cost: Float32Array,
  level: Metres,
  here: Node,
  k: number,
  run: [number, number],
  lastTurn: number,
): Move {
  const slot = directionOf(1)
  const best: Move = { total: unreachable, turn: 0, run }
  for (const sense of [1, -1]) {
    let reach = run
    for (let m = 0; m <= directions / 3; m++) {
      const to = k + sense * m
      const at = ((to % directions) + directions) % directions
      if (m > 0) {
        // A swing carries the heading along only through runs that overlap.
        const moved = runAt(field, cost, here.x, here.y, at, reach[0] - sense, reach[1] - sense)
        if (!moved) break
        reach = moved
        if (sample(field, value, here.x, here.y, at, reach[0], reach[1]) < level - dip) break
      }
      const way = field.way[at] as number
      const x = here.x + way * Math.cos(directionOf(to))
      const y = here.y + way * Math.sin(directionOf(to))
      const arrived = holds(scene.goal.polygon, { x, y })
      const ahead = arrived ? 0 : costAt(field, cost, x, y, at, reach[0], reach[1])
      if (ahead >= unreachable) continue
      const short = arrived ? 0 : Math.max(0, level - sample(field, value, x, y, at, reach[0], reach[1]))
      if (short > dip) continue
      // Swinging straight back is sawing: it must gain more than it costs.
      const back = sense * lastTurn < 0 && m > 0 ? 0.05 : 0
      const total = m * slot + back + way * metre + ahead + dipCost * short
      if (total < best.total - 1e-9) {
        best.total = total
        best.turn = sense * m
        best.run = reach
      }
    }
  }
  return best
}

function nearestNode(field: Field, x: Metres, y: Metres): number {
  const i = Math.round((x - field.x0) / field.tables.grid.dx)
  const j = Math.round((y - field.y0) / field.tables.grid.dy)
  return i < 0 || j < 0 || i >= field.columns || j >= field.rows ? -1 : j * field.columns + i
}
