import type { Boundary } from '../geometry/boundary.ts'
import { rectangleClearance } from '../geometry/rectangle.ts'
import type { Metres, Radians } from '../units/quantity.ts'
import type { Bodies } from './answer.ts'
import { type Node, wrap } from './nodes.ts'

/**
 * Gives the nodes of a motion the robot's headings: of all sequences that turn only through headings the leash allows,
 * one whose least clearance is greatest, and of those one that turns least. The first node keeps its heading; where the
 * robot turns on the spot a node is repeated. `level` is the least clearance at the nodes; null where no sequence
 * exists. Headings are tried in `count` equal steps.
 *
 * @param enough clearances above it are not told apart, metres
 */
export function assignHeadings(
  walls: Boundary,
  bodies: Bodies,
  nodes: readonly Node[],
  count: number,
  phi: Radians,
  enough: Metres,
): { nodes: Node[]; level: Metres } | null {
  const first = nodes[0] as Node
  const base = first.heading
  const slot = (2 * Math.PI) / count
  const size = nodes.length
  const room = new Float64Array(size * count)
  const best = new Float64Array(size * count).fill(-1)
  const cos = Float64Array.from({ length: count }, (_, t) => Math.cos(base + t * slot))
  const sin = Float64Array.from({ length: count }, (_, t) => Math.sin(base + t * slot))
  const half = bodies.a / 2
  const side = bodies.b / 2
  for (let k = 0; k < size; k++) {
    const node = nodes[k] as Node
    const ax = node.x + node.length * Math.cos(node.psi)
    const ay = node.y + node.length * Math.sin(node.psi)
    for (let t = 0; t < count; t++) {
      const free = node.slack || Math.abs(wrap(base + t * slot - node.psi)) <= phi + 1e-9
      const c = cos[t] as number
      const s = sin[t] as number
      room[k * count + t] = free
        ? rectangleClearance(walls, ax + bodies.d * c, ay + bodies.d * s, c, s, half, side, enough)
        : -1
    }
  }
  // Widest way through: turn on the spot at a node, or keep the heading to the next.
  best[0] = room[0] as number
  for (let k = 0; k < size; k++) {
    if (k > 0)
      for (let t = 0; t < count; t++)
        best[k * count + t] = Math.min(best[(k - 1) * count + t] as number, room[k * count + t] as number)
    turnWidest(best, room, k * count, count)
  }
  let level = -1
  for (let t = 0; t < count; t++) level = Math.max(level, best[(size - 1) * count + t] as number)
  return level <= -1 ? null : { nodes: leastTurning(nodes, room, count, level, base, slot), level }
}

function turnWidest(best: Float64Array, room: Float64Array, from: number, count: number): void {
  for (let i = 0; i < 2 * count; i++) {
    const t = from + (i % count)
    const next = from + ((i + 1) % count)
    const through = Math.min(best[t] as number, room[next] as number)
    if (through > (best[next] as number)) best[next] = through
  }
  for (let i = 2 * count; i > 0; i--) {
    const t = from + (i % count)
    const next = from + ((i - 1) % count)
    const through = Math.min(best[t] as number, room[next] as number)
    if (through > (best[next] as number)) best[next] = through
  }
}

/** Among the ways no narrower than `level`, the one that turns least, with unwrapped headings. */
function leastTurning(
  nodes: readonly Node[],
  room: Float64Array,
  count: number,
  level: Metres,
  base: Radians,
  slot: Radians,
): Node[] {
  const size = nodes.length
  const far = Number.POSITIVE_INFINITY
  const cost = new Float64Array(size * count).fill(far)
  const from = new Int32Array(size * count).fill(-1)
  cost[0] = 0
  for (let k = 0; k < size; k++) {
    const row = k * count
    if (k > 0)
      for (let t = 0; t < count; t++)
        if ((room[row + t] as number) >= level) {
          cost[row + t] = cost[row - count + t] as number
          from[row + t] = row - count + t
        }
    for (const way of [1, -1])
      for (let i = 0; i < 2 * count; i++) {
        const t = row + ((((way * i) % count) + count) % count)
        const next = row + ((((way * (i + 1)) % count) + count) % count)
        if ((room[next] as number) >= level && (cost[t] as number) + 1 < (cost[next] as number)) {
          cost[next] = (cost[t] as number) + 1
          from[next] = t
        }
      }
  }
  let at = (size - 1) * count
  for (let t = 0; t < count; t++)
    if ((cost[(size - 1) * count + t] as number) < (cost[at] as number)) at = (size - 1) * count + t
  const way: number[] = []
  for (; at >= 0; at = from[at] as number) way.push(at)
  way.reverse()
  const turned: Node[] = []
  let heading = base
  for (const [i, state] of way.entries()) {
    const k = Math.floor(state / count)
    heading += wrap(base + (state % count) * slot - heading)
    const before = way[i - 1]
    const next = way[i + 1]
    // Arrived at a node, or done turning at it.
    if (
      before === undefined ||
      Math.floor(before / count) !== k ||
      next === undefined ||
      Math.floor(next / count) !== k
    )
      turned.push({ ...(nodes[k] as Node), heading })
  }
  return turned
}
