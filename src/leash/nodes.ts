import { lengthOf } from '../geometry/segment.ts'
import type { Metres, Radians } from '../units/quantity.ts'
import type { Motion } from './answer.ts'

/**
 * One pose of the team in the planner's own coordinates: handler (x, y), leash direction psi from handler to
 * attachment, its straight length, robot heading. Between two nodes the handler runs on a circular arc whose tangent
 * is psi (no arc at all where it stands), and psi, length and heading change evenly: a motion that obeys the taut
 * kinematics exactly, not to first order.
 */
export interface Node {
  x: Metres
  y: Metres
  psi: Radians
  length: Metres
  heading: Radians
  slack: boolean
}

/** Body points move at most this far between two samples; below the promised 0.01 so that rounding keeps it. */
const step = 0.0095

/** sin(x)/x. */
export function sinc(x: number): number {
  return Math.abs(x) < 1e-4 ? 1 - (x * x) / 6 : Math.sin(x) / x
}

/** The node reached by pulling the handler `pull` metres while the leash turns by `turn`. */
export function arcFrom(from: Node, pull: Metres, turn: Radians, heading: Radians): Node {
  const chord = pull * sinc(turn / 2)
  const direction = from.psi + turn / 2
  return {
    x: from.x + chord * Math.cos(direction),
    y: from.y + chord * Math.sin(direction),
    psi: from.psi + turn,
    length: from.length,
    heading,
    slack: from.slack,
  }
}

/** The pose at fraction `t` of the way between two nodes. */
export function between(from: Node, to: Node, t: number): Node {
  const turn = to.psi - from.psi
  const chord = lengthOf(to.x - from.x, to.y - from.y)
  const pull = chord > 0 ? chord / sinc(turn / 2) : 0
  const next = arcFrom(from, pull * t, turn * t, from.heading + (to.heading - from.heading) * t)
  next.length = from.length + (to.length - from.length) * t
  next.slack = from.slack && to.slack
  return next
}

/** Upper bound of how far any point of either body moves between two nodes; `reach` is the robot's farthest point from the attachment. */
export function greatestMove(from: Node, to: Node, reach: Metres): Metres {
  const turn = Math.abs(to.psi - from.psi)
  const pull = lengthOf(to.x - from.x, to.y - from.y) / Math.max(sinc(turn / 2), 1e-9)
  return (
    pull +
    turn * Math.max(from.length, to.length) +
    Math.abs(to.length - from.length) +
    Math.abs(to.heading - from.heading) * reach
  )
}

/** The same motion with more nodes, none of whose steps moves a body point more than `most`. */
export function refine(nodes: readonly Node[], most: Metres, reach: Metres): Node[] {
  const fine: Node[] = []
  for (const [k, to] of nodes.entries()) {
    const from = nodes[k - 1]
    const pieces = from ? Math.ceil(greatestMove(from, to, reach) / most - 1e-9) : 1
    for (let i = 1; from && i < pieces; i++) {
      const node = between(from, to, i / pieces)
      node.slack = from.slack || to.slack
      fine.push(node)
    }
    // A step without any move is none.
    if (!from || pieces > 0) fine.push(to)
  }
  return fine
}

/** Nodes as a dense motion. The first node is the start. */
export function motionOf(nodes: readonly Node[], reach: Metres): Motion {
  const flat: number[] = []
  for (let k = 0; k < nodes.length; k++) {
    const from = nodes[k] as Node
    push(flat, from)
    const to = nodes[k + 1]
    if (!to) break
    const pieces = Math.ceil(greatestMove(from, to, reach) / step)
    for (let i = 1; i < pieces; i++) {
      const node = between(from, to, i / pieces)
      // Between a taut and a slack node the leash already hangs.
      node.slack = from.slack || to.slack
      push(flat, node)
    }
  }
  return { samples: Float64Array.from(flat) }
}

function push(flat: number[], node: Node): void {
  flat.push(
    node.x + node.length * Math.cos(node.psi),
    node.y + node.length * Math.sin(node.psi),
    node.heading,
    node.x,
    node.y,
    node.slack ? 1 : 0,
  )
}

/** The nodes of a motion's samples, leash directions unwrapped. Inverse of `motionOf`. */
export function nodesOf(motion: Motion): Node[] {
  const s = motion.samples
  const nodes: Node[] = []
  let psi = 0
  for (let i = 0; i + 5 < s.length; i += 6) {
    const dx = (s[i] as number) - (s[i + 3] as number)
    const dy = (s[i + 1] as number) - (s[i + 4] as number)
    const raw = Math.atan2(dy, dx)
    psi = i === 0 ? raw : psi + wrap(raw - psi)
    nodes.push({
      x: s[i + 3] as number,
      y: s[i + 4] as number,
      psi,
      length: lengthOf(dx, dy),
      heading: s[i + 2] as number,
      slack: s[i + 5] === 1,
    })
  }
  return nodes
}

/** An angle brought into (-pi, pi]. */
export function wrap(angle: Radians): Radians {
  const turned = angle - 2 * Math.PI * Math.round(angle / (2 * Math.PI))
  return turned <= -Math.PI ? turned + 2 * Math.PI : turned
}
