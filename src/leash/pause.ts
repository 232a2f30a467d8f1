import { distanceToBoundary } from '../geometry/boundary.ts'
import { rectangleClearance } from '../geometry/rectangle.ts'
import { segmentToBoundary } from '../geometry/segment.ts'
import type { Metres, Radians } from '../units/quantity.ts'
import { apart } from './certify.ts'
import { type Node, wrap } from './nodes.ts'
import type { Quest } from './search.ts'
import { directionOf, directions, fillRobot } from './tables.ts'

/** A robot's pose: attachment and heading. */
interface Pose {
  x: Metres
  y: Metres
  theta: Radians
}

/**
 * The way of a robot on a slack leash round a standing handler, from a taut pose to the first of `targets` (taut poses
 * at the same handler, the wanted one first) that can be reached: a flood of poses on the grid inside the leash's disc,
 * in sight of the handler, apart from him, at clearance `level` or better; then drawn straight. The nodes between, all
 * slack; null where no target is reached. `psi` is the target's direction, unwound along the way.
 */
export function pauseWay(
  quest: Quest,
  from: Node,
  targets: readonly Node[],
  level: Metres,
): { target: number; nodes: Node[]; psi: Radians } | null {
  const reached = flood(quest, from, targets, level)
  if (!reached) return null
  const { poses, target } = reached
  const to = targets[target] as Node
  const straight = drawStraight(quest, from, poses, level)
  const nodes: Node[] = []
  let psi = from.psi
  let heading = from.heading
  const separation = quest.separation
  for (let i = 1; i < straight.length; i++) {
    const one = straight[i - 1] as Pose
    const other = straight[i] as Pose
    const turn = wrap(other.theta - one.theta)
    const pieces = Math.max(1, Math.ceil((Math.hypot(other.x - one.x, other.y - one.y) + Math.abs(turn) * 0.5) / 0.06))
    for (let p = 1; p <= pieces; p++) {
      const t = p / pieces
      const x = one.x + (other.x - one.x) * t
      const y = one.y + (other.y - one.y) * t
      psi += wrap(Math.atan2(y - from.y, x - from.x) - psi)
      heading += wrap(one.theta + turn * t - heading)
      const length = Math.min(separation, Math.hypot(x - from.x, y - from.y))
      nodes.push({ x: from.x, y: from.y, psi, length, heading, slack: true })
    }
  }
  // The last of them is the taut pose itself, which the next stretch begins with.
  nodes.pop()
  return { target, nodes, psi: psi + wrap(to.psi - psi) }
}

/** Whether a slack pose keeps everything: clearances, the leash in sight, the bodies apart, the leash long enough. */
function keeps(quest: Quest, handler: Node, pose: Pose, level: Metres): boolean {
  const length = Math.hypot(pose.x - handler.x, pose.y - handler.y)
  if (length > quest.separation + 1e-9) return false
  const { bodies } = quest
  const c = Math.cos(pose.theta)
  const s = Math.sin(pose.theta)
  if (
    rectangleClearance(
      quest.walls,
      pose.x + bodies.d * c,
      pose.y + bodies.d * s,
      c,
      s,
      bodies.a / 2,
      bodies.b / 2,
      level + 0.05,
    ) < level
  )
    return false
  const psi = Math.atan2(pose.y - handler.y, pose.x - handler.x)
  if (apart(bodies, { ...handler, psi, length, heading: pose.theta, slack: true }, quest.drift) < 0.004) return false
  return seen(quest, handler, pose.x, pose.y, level)
}

function seen(quest: Quest, handler: Node, x: Metres, y: Metres, level: Metres): boolean {
  if (segmentToBoundary(quest.walls, handler.x, handler.y, x, y) < 0.004) return false
  if (quest.drift === 0) return true
  const length = Math.hypot(x - handler.x, y - handler.y)
  const hx = handler.x + (quest.drift * (x - handler.x)) / length
  const hy = handler.y + (quest.drift * (y - handler.y)) / length
  return (
    distanceToBoundary(quest.walls, hx, hy) - quest.bodies.r >= level &&
    segmentToBoundary(quest.walls, handler.x, handler.y, hx, hy) - quest.bodies.r >= level
  )
}

function attachmentOf(node: Node): Pose {
  return {
    x: node.x + node.length * Math.cos(node.psi),
    y: node.y + node.length * Math.sin(node.psi),
    theta: node.heading,
  }
}

const unseen = -2
const root = -1

function flood(
  quest: Quest,
  from: Node,
  targets: readonly Node[],
  level: Metres,
): { target: number; poses: Pose[] } | null {
  const { tables, separation } = quest
  const { grid, robot } = tables
  const i0 = Math.max(0, Math.floor((from.x - separation - grid.x0) / grid.dx))
  const j0 = Math.max(0, Math.floor((from.y - separation - grid.y0) / grid.dy))
  const i1 = Math.min(grid.columns - 1, Math.ceil((from.x + separation - grid.x0) / grid.dx))
  const j1 = Math.min(grid.rows - 1, Math.ceil((from.y + separation - grid.y0) / grid.dy))
  const columns = i1 - i0 + 1
  const rows = j1 - j0 + 1
  if (columns <= 0 || rows <= 0) return null
  const parent = new Int32Array(columns * rows * directions).fill(unseen)
  // 0 not yet asked, 1 in reach and in sight, 2 not.
  const reach = new Uint8Array(columns * rows)
  const xOf = (place: number) => grid.x0 + ((place % columns) + i0) * grid.dx
  const yOf = (place: number) => grid.y0 + (Math.floor(place / columns) + j0) * grid.dy
  const usable = (place: number, t: number): boolean => {
    const x = xOf(place)
    const y = yOf(place)
    if (reach[place] === 0) {
      const near = Math.hypot(x - from.x, y - from.y)
      reach[place] = near <= separation - 1e-6 && near > 0.05 && seen(quest, from, x, y, level) ? 1 : 2
      if (reach[place] === 1) fillRobot(tables, gridNode(place))
    }
    if (reach[place] === 2) return false
    if ((robot[gridNode(place) * directions + t] as number) < level) return false
    const psi = Math.atan2(y - from.y, x - from.x)
    const length = Math.hypot(x - from.x, y - from.y)
    if (length - quest.drift > quest.bodies.r + quest.bodies.g + quest.bodies.a) return true
    return apart(quest.bodies, { ...from, psi, length, heading: directionOf(t), slack: true }, quest.drift) >= 0.004
  }
  const gridNode = (place: number) => (Math.floor(place / columns) + j0) * grid.columns + (place % columns) + i0
  const ends = (node: Node): number[] => {
    const pose = attachmentOf(node)
    const found: number[] = []
    const i = Math.round((pose.x - grid.x0) / grid.dx) - i0
    const j = Math.round((pose.y - grid.y0) / grid.dy) - j0
    const t = Math.round((wrap(pose.theta) / (2 * Math.PI)) * directions)
    for (let dj = -2; dj <= 2; dj++)
      for (let di = -2; di <= 2; di++) {
        if (i + di < 0 || j + dj < 0 || i + di >= columns || j + dj >= rows) continue
        const place = (j + dj) * columns + i + di
        const heading = (t + directions) % directions
        if (!usable(place, heading)) continue
        const between = { x: (pose.x + xOf(place)) / 2, y: (pose.y + yOf(place)) / 2, theta: pose.theta }
        if (keeps(quest, from, between, level - 0.004)) found.push(place * directions + heading)
      }
    return found
  }
  const queue = new Int32Array(columns * rows * directions)
  let tail = 0
  for (const state of ends(from)) {
    parent[state] = root
    queue[tail++] = state
  }
  for (let head = 0; head < tail; head++) {
    const state = queue[head] as number
    const place = Math.floor(state / directions)
    const t = state % directions
    const i = place % columns
    const j = Math.floor(place / columns)
    const visit = (next: number, heading: number) => {
      const to = next * directions + heading
      if (parent[to] !== unseen || !usable(next, heading)) return
      parent[to] = state
      queue[tail++] = to
    }
    if (i > 0) visit(place - 1, t)
    if (i < columns - 1) visit(place + 1, t)
    if (j > 0) visit(place - columns, t)
    if (j < rows - 1) visit(place + columns, t)
    visit(place, (t + 1) % directions)
    visit(place, (t + directions - 1) % directions)
  }
  for (const [target, to] of targets.entries()) {
    const last = ends(to).find((state) => parent[state] !== unseen)
    if (last !== undefined) return { target, poses: trace(last, to) }
  }
  return null

  function trace(last: number, to: Node): Pose[] {
    const poses: Pose[] = [attachmentOf(to)]
    for (let state = last; state !== root; state = parent[state] as number) {
      const place = Math.floor(state / directions)
      poses.push({ x: xOf(place), y: yOf(place), theta: directionOf(state % directions) })
    }
    poses.push(attachmentOf(from))
    return poses.reverse()
  }
}

/** Leaves out poses where the straight way between two others keeps everything. */
function drawStraight(quest: Quest, handler: Node, poses: Pose[], level: Metres): Pose[] {
  const straight = [poses[0] as Pose]
  let at = 0
  while (at < poses.length - 1) {
    let reach = at + 1
    for (let jump = 64; jump >= 2; jump = Math.floor(jump / 2))
      if (at + jump < poses.length && isStraight(quest, handler, poses[at] as Pose, poses[at + jump] as Pose, level)) {
        reach = at + jump
        break
      }
    straight.push(poses[reach] as Pose)
    at = reach
  }
  return straight
}

function isStraight(quest: Quest, handler: Node, one: Pose, other: Pose, level: Metres): boolean {
  const turn = wrap(other.theta - one.theta)
  const pieces = Math.ceil((Math.hypot(other.x - one.x, other.y - one.y) + Math.abs(turn) * 0.4) / 0.04)
  for (let p = 1; p < pieces; p++) {
    const t = p / pieces
    const pose = {
      x: one.x + (other.x - one.x) * t,
      y: one.y + (other.y - one.y) * t,
      theta: one.theta + turn * t,
    }
    if (!keeps(quest, handler, pose, level)) return false
  }
  return true
}
