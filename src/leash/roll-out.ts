import { holds } from '../geometry/polygon-check.ts'
import type { Scene } from '../geometry/scene.ts'
import type { Metres, Radians } from '../units/quantity.ts'
import { cheapest, dip, dipCost, type Layer, metre, pauseCost, unreachable } from './cost-to-go.ts'
import type { Field } from './field.ts'
import { arcFrom, type Node } from './nodes.ts'
import { directionOf, directions } from './tables.ts'
import { sample } from './value.ts'

/** Where the leash may be taken up again at a node, the cheapest first; no more than can be looked at. */
function targetsOf(field: Field, below: Layer, at: number): Target[] {
  const targets: Target[] = []
  for (let k = 0; k < directions; k++)
    for (let run = 0; run < 2; run++) {
      const s = field.slot[(k * field.count + at) * 2 + run] as number
      if (s === 0 || (below.cost[s] as number) >= unreachable) continue
      targets.push({
        cost: below.cost[s] as number,
        k,
        run: [field.first[s] as number, field.last[s] as number],
      })
    }
  return targets.sort((one, other) => one.cost - other.cost).slice(0, 48)
}

/** A direction of the leash with a run of headings, in which the layer below can be gone on with. */
export interface Target {
  cost: number
  k: number
  run: [number, number]
}

/**
 * Asked at each pause: the stretch walked so far and where the leash may be taken up. Gives the target the robot can
 * reach, or null where it can reach none.
 */
export type Pauser = (stretch: Node[], targets: Target[]) => Target | null

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
    const value = cheapest(field, cost, node, from, to)
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
      const cell = k * field.count + (j + dj) * field.columns + i + di
      let least = unreachable
      for (let run = 0; run < 2; run++) {
        const s = field.slot[cell * 2 + run] as number
        const start = field.first[s] as number
        const end = field.last[s] as number
        if (s === 0 || start > to || end < from || (cost[s] as number) >= least) continue
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
  /** Node of the field beside each pause. */
  pausedAt: number[]
  /** False where the robot could not get through at the last of them. */
  through: boolean
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
  pauser?: Pauser,
): Rolled | null {
  const slot = directionOf(1)
  let nodes: Node[] = [
    { x: start.x, y: start.y, psi: start.psi, length: field.separation, heading: start.psi, slack: false },
  ]
  const rolled: Rolled = { stretches: [nodes], pausedAt: [], through: true }
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
        const targets = targetsOf(field, below, at)
        const cheapest = targets[0]
        if (cheapest && cheapest.cost + pauseCost <= move.total + 1e-3) {
          rolled.pausedAt.push(at)
          const target = pauser?.(nodes, targets)
          if (!target) return { ...rolled, through: false }
          n--
          k = target.k
          run = target.run
          nodes = [takenUp(here, target)]
          rolled.stretches.push(nodes)
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

/** The handler's pose with the leash taut again in the target's direction, the robot amid its headings. */
export function takenUp(here: Node, { k, run }: Target): Node {
  const slot = directionOf(1)
  return { ...here, psi: k * slot, heading: (k + (run[0] + run[1]) / 2) * slot }
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
