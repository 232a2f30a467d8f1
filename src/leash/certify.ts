import { type Boundary, distanceToBoundary } from '../geometry/boundary.ts'
import { holds } from '../geometry/polygon-check.ts'
import { pointToRectangle, rectangleClearance } from '../geometry/rectangle.ts'
import type { Scene } from '../geometry/scene.ts'
import { lengthOf, pointToSegment, segmentToBoundary } from '../geometry/segment.ts'
import { discSweepClearance, rectangleSweepClearance } from '../geometry/sweep.ts'
import type { Metres, Radians } from '../units/quantity.ts'
import type { Bodies, Motion } from './answer.ts'
import { between, greatestMove, type Node, nodesOf, wrap } from './nodes.ts'
import { reachOf } from './team.ts'

/** What a motion is worth. `broken` names the first promise of the statement it breaks; then it is worth nothing. */
export interface Certificate {
  broken: string | null
  /** Never above the true clearance of the motion, metres. */
  clearance: Metres
  swing: Radians
  pauses: number
  /** Index of the sample, and whose clearance it is, where the motion is tightest. */
  at: number
  body: 'robot' | 'handler'
}

/** Samples obey the kinematics to this, metres: arcs are exact, the rest is rounding. */
const exact = 1e-6
/** Refinement stops at moves this small; the half of it is what a certificate may lose. */
const finest = 1e-3

/**
 * Recomputes a motion's clearance from its samples and checks it against every constraint of the statement: start and
 * goal, the taut kinematics, the standing handler, the leash inside the free region, the bodies apart, the leash's
 * angle, the centre of a wheeled robot, the pauses. Between samples the remainder is bounded, never ignored.
 *
 * @param drift a slack handler is taken everywhere from where he stands to `drift` metres towards the robot
 */
export function certify(
  scene: Scene,
  walls: Boundary,
  bodies: Bodies,
  separation: Metres,
  motion: Motion,
  drift: Metres = 0,
): Certificate {
  const nodes = nodesOf(motion)
  const broken = brokenEnds(scene, separation, nodes) ?? brokenStep(bodies, separation, nodes)
  const worth: Certificate = {
    broken,
    clearance: Number.NEGATIVE_INFINITY,
    swing: 0,
    pauses: 0,
    at: 0,
    body: 'robot',
  }
  if (broken) return worth
  const pauses = countPauses(nodes)
  worth.pauses = pauses.count
  worth.broken = pauses.broken
  measure(walls, bodies, nodes, drift, worth)
  for (let k = 1; k < nodes.length; k++) worth.swing += Math.abs((nodes[k] as Node).psi - (nodes[k - 1] as Node).psi)
  return worth
}

function brokenEnds(scene: Scene, separation: Metres, nodes: readonly Node[]): string | null {
  const first = nodes[0]
  const last = nodes.at(-1)
  if (!first || !last) return 'a motion without samples'
  for (const node of nodes)
    if (!Number.isFinite(node.x + node.y + node.psi + node.length + node.heading)) return 'a sample that is no number'
  const { x, y, heading } = scene.start
  if (lengthOf(first.x - x, first.y - y) > exact) return 'it does not start where it should'
  if (first.slack || Math.abs(first.length - separation) > exact || Math.abs(wrap(first.psi - heading)) > exact)
    return 'it does not start with a taut leash along the entry'
  if (Math.abs(wrap(first.heading - heading)) > exact) return 'the robot does not start heading along the entry'
  if (last.slack || !holds(scene.goal.polygon, last)) return 'it does not end in the goal'
  return null
}

function brokenStep(bodies: Bodies, separation: Metres, nodes: readonly Node[]): string | null {
  for (let k = 0; k < nodes.length; k++) {
    const to = nodes[k] as Node
    const from = nodes[k - 1] ?? to
    if (to.length > separation + exact) return 'the leash is stretched'
    if (!to.slack && Math.abs(to.length - separation) > exact) return 'a leash said to be taut hangs'
    if (!to.slack && Math.abs(wrap(to.heading - to.psi)) > bodies.phiMax + 1e-9) return 'the leash pulls from the side'
    const dx = to.x - from.x
    const dy = to.y - from.y
    const moved = lengthOf(dx, dy)
    if (from.slack || to.slack) {
      if (moved > exact * 1e-3) return 'the handler walks on a slack leash'
    } else {
      const mean = (from.psi + to.psi) / 2
      if (Math.abs(dy * Math.cos(mean) - dx * Math.sin(mean)) > exact) return 'the handler does not follow the pull'
      if (dx * Math.cos(mean) + dy * Math.sin(mean) < -exact) return 'the handler is pushed'
    }
    if (!bodies.sideways && slip(bodies, from, to) > 0.02 * Math.max(moved, 0.005)) return 'the wheels slip sideways'
  }
  return null
}

/** Sideways way of the centre against the mean heading between two samples. */
function slip(bodies: Bodies, from: Node, to: Node): Metres {
  const dx = centreX(bodies, to) - centreX(bodies, from)
  const dy = centreY(bodies, to) - centreY(bodies, from)
  const mean = (from.heading + to.heading) / 2
  return Math.abs(dy * Math.cos(mean) - dx * Math.sin(mean))
}

function countPauses(nodes: readonly Node[]): { count: number; broken: string | null } {
  let count = 0
  let walked = Number.POSITIVE_INFINITY
  for (let k = 1; k < nodes.length; k++) {
    const from = nodes[k - 1] as Node
    const to = nodes[k] as Node
    if (to.slack && !from.slack) {
      count++
      if (walked < 0.2) return { count, broken: 'two pauses follow without walking between' }
      walked = 0
    }
    walked += lengthOf(to.x - from.x, to.y - from.y)
  }
  return { count, broken: count > 3 ? 'more than three pauses' : null }
}

export function centreX(bodies: Bodies, node: Node): Metres {
  return node.x + node.length * Math.cos(node.psi) + bodies.d * Math.cos(node.heading)
}

export function centreY(bodies: Bodies, node: Node): Metres {
  return node.y + node.length * Math.sin(node.psi) + bodies.d * Math.sin(node.heading)
}

/** Robot's clearance of a pose. */
export function robotClearance(
  walls: Boundary,
  bodies: Bodies,
  node: Node,
  enough: Metres = Number.POSITIVE_INFINITY,
): Metres {
  const cos = Math.cos(node.heading)
  const sin = Math.sin(node.heading)
  return rectangleClearance(
    walls,
    centreX(bodies, node),
    centreY(bodies, node),
    cos,
    sin,
    bodies.a / 2,
    bodies.b / 2,
    enough,
  )
}

/** Distance kept between the bodies, less the least they must keep; a slack handler drifts along the leash. */
export function apart(bodies: Bodies, node: Node, drift: Metres): Metres {
  const cx = centreX(bodies, node)
  const cy = centreY(bodies, node)
  const cos = Math.cos(node.heading)
  const sin = Math.sin(node.heading)
  let least = pointToRectangle(node.x, node.y, cx, cy, cos, sin, bodies.a / 2, bodies.b / 2)
  if (node.slack && drift > 0) {
    const x = node.x + drift * Math.cos(node.psi)
    const y = node.y + drift * Math.sin(node.psi)
    least = Math.min(least, pointToRectangle(x, y, cx, cy, cos, sin, bodies.a / 2, bodies.b / 2))
    for (let corner = 0; corner < 4; corner++) {
      const along = corner & 1 ? bodies.a / 2 : -bodies.a / 2
      const left = corner & 2 ? bodies.b / 2 : -bodies.b / 2
      const px = cx + along * cos - left * sin
      const py = cy + along * sin + left * cos
      least = Math.min(least, pointToSegment(px, py, node.x, node.y, x, y))
    }
  }
  return least - bodies.r - bodies.g
}

/** Leash clearances and clearances above the least by this need no exact value, metres: far above any remainder. */
const plenty = 0.05

function leashClearance(walls: Boundary, node: Node): Metres {
  const x = node.x + node.length * Math.cos(node.psi)
  const y = node.y + node.length * Math.sin(node.psi)
  return segmentToBoundary(walls, node.x, node.y, x, y, plenty)
}

function handlerClearance(walls: Boundary, bodies: Bodies, node: Node, drift: Metres): Metres {
  if (!node.slack || drift === 0) return distanceToBoundary(walls, node.x, node.y) - bodies.r
  const x = node.x + drift * Math.cos(node.psi)
  const y = node.y + drift * Math.sin(node.psi)
  const inside = distanceToBoundary(walls, node.x, node.y)
  return inside < 0 ? inside : segmentToBoundary(walls, node.x, node.y, x, y) - bodies.r
}

/** Everything of one pose that must not fall below a level. */
interface Margins {
  robot: Metres
  handler: Metres
  leash: Metres
  apart: Metres
}

function marginsOf(walls: Boundary, bodies: Bodies, node: Node, drift: Metres, enough: Metres): Margins {
  return {
    robot: robotClearance(walls, bodies, node, enough),
    handler: handlerClearance(walls, bodies, node, drift),
    leash: leashClearance(walls, node),
    apart: apart(bodies, node, drift),
  }
}

function measure(walls: Boundary, bodies: Bodies, nodes: Node[], drift: Metres, worth: Certificate): void {
  const reach = reachOf(bodies)
  let least = Number.POSITIVE_INFINITY
  const margins: Margins[] = []
  for (const [k, node] of nodes.entries()) {
    const margin = marginsOf(walls, bodies, node, drift, least + plenty)
    margins.push(margin)
    for (const body of ['robot', 'handler'] as const)
      if (margin[body] < least) {
        least = margin[body]
        worth.at = k
        worth.body = body
      }
  }
  // The samples alone say `least`; what lies between may be lower by the remainder, which refinement keeps small.
  let certified = least
  const visit = (from: Node, to: Node, a: Margins, b: Margins): void => {
    const move = greatestMove(from, to, reach)
    const target = least - finest / 2
    const robot = robotBetween(walls, bodies, from, to, a, b, move, target)
    const handler = handlerBetween(walls, bodies, from, to, a, b, drift, target)
    const leash = (a.leash + b.leash - move) / 2
    const gap = (a.apart + b.apart - move - (drift > 0 ? move : 0)) / 2
    const kept = Math.min(robot, handler)
    if (move <= finest || (kept >= target && leash > 0 && gap >= -1e-9)) {
      certified = Math.min(certified, kept)
      if (leash <= 0) worth.broken ??= 'the leash crosses a wall'
      if (Math.min(a.apart, b.apart) < -1e-9) worth.broken ??= 'the bodies are too close'
      return
    }
    if (a.leash <= 0 || b.leash <= 0) {
      worth.broken ??= 'the leash crosses a wall'
      return
    }
    const middle = between(from, to, 0.5)
    middle.slack = from.slack || to.slack
    const m = marginsOf(walls, bodies, middle, drift, least + plenty)
    visit(from, middle, a, m)
    visit(middle, to, m, b)
  }
  for (let k = 1; k < nodes.length && worth.broken === null; k++)
    visit(nodes[k - 1] as Node, nodes[k] as Node, margins[k - 1] as Margins, margins[k] as Margins)
  worth.clearance = certified
}

function robotBetween(
  walls: Boundary,
  bodies: Bodies,
  from: Node,
  to: Node,
  a: Margins,
  b: Margins,
  move: Metres,
  target: Metres,
): Metres {
  const bound = (a.robot + b.robot - move) / 2
  // The sweep does not see a wall's corner cut through the rectangle between two clear ends: far enough off it cannot.
  if (bound >= target || from.heading !== to.heading || bound <= 0) return bound
  // Without turning, the sweep of a straight shift is exact; the arc leaves its chord by the sagitta.
  const sagitta = (move * Math.abs(to.psi - from.psi)) / 8 + curl(from, to)
  const swept = rectangleSweepClearance(
    walls,
    centreX(bodies, from),
    centreY(bodies, from),
    centreX(bodies, to),
    centreY(bodies, to),
    Math.cos(from.heading),
    Math.sin(from.heading),
    bodies.a / 2,
    bodies.b / 2,
    target + plenty,
  )
  return Math.max(bound, swept - sagitta)
}

/** In a slack phase length and direction change together: the attachment's way bends by their product. */
function curl(from: Node, to: Node): Metres {
  return Math.abs(to.psi - from.psi) * Math.abs(to.length - from.length)
}

function handlerBetween(
  walls: Boundary,
  bodies: Bodies,
  from: Node,
  to: Node,
  a: Margins,
  b: Margins,
  drift: Metres,
  target: Metres,
): Metres {
  const turn = Math.abs(to.psi - from.psi)
  if (from.slack || to.slack) return (a.handler + b.handler - drift * turn) / 2
  const pull = lengthOf(to.x - from.x, to.y - from.y)
  const bound = (a.handler + b.handler - pull * (1 + turn * turn)) / 2
  if (pull === 0) return Math.min(a.handler, b.handler)
  if (bound >= target || Math.min(a.handler, b.handler) <= -bodies.r) return bound
  const sagitta = (pull * turn) / 4
  return Math.max(bound, discSweepClearance(walls, from.x, from.y, to.x, to.y, bodies.r, target + plenty) - sagitta)
}
