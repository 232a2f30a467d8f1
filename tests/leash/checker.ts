import Flatten from '@flatten-js/core'
import type { Scene } from '../../src/geometry/scene.ts'
import type { Bodies, Motion } from '../../src/leash/answer.ts'

/**
 * A second opinion on a motion, with its own geometry: it shares nothing with the planner but the shapes of the data.
 * Distances are those of another library, taken every 2 mm of the fastest body point.
 */
export interface Opinion {
  problems: string[]
  /** Least clearance seen; the true one is at most 1 mm (half a step) lower. */
  clearance: number
  pauses: number
  /** Total turn of the leash, radians. */
  swing: number
}

const step = 0.002

interface Pose {
  ax: number
  ay: number
  heading: number
  hx: number
  hy: number
  slack: boolean
}

export function giveOpinion(scene: Scene, bodies: Bodies, separation: number, motion: Motion, drift = 0): Opinion {
  const opinion: Opinion = { problems: [], clearance: Number.POSITIVE_INFINITY, pauses: 0, swing: 0 }
  const poses = posesOf(motion)
  const say = (text: string, i: number) => {
    if (opinion.problems.length < 5) opinion.problems.push(`${text} at sample ${i}`)
  }
  const first = poses[0]
  const last = poses.at(-1)
  if (!first || !last) return { ...opinion, problems: ['no samples'] }
  if (Math.hypot(first.hx - scene.start.x, first.hy - scene.start.y) > 1e-6) say('starts elsewhere', 0)
  if (Math.abs(turnBetween(directionOf(first), scene.start.heading)) > 1e-6) say('leash not along the entry', 0)
  if (Math.abs(turnBetween(first.heading, scene.start.heading)) > 1e-6) say('robot not along the entry', 0)
  if (!rayInside([scene.goal.polygon], last.hx, last.hy)) say('does not end in the goal', poses.length - 1)
  const reach = Math.hypot(bodies.a / 2 + bodies.d, bodies.b / 2)
  const rings = [scene.polygon, ...scene.holes]
  const walls = rings.flatMap((ring) =>
    ring.map((p, i) => {
      const q = ring[(i + 1) % ring.length] as typeof p
      return { segment: new Flatten.Segment(new Flatten.Point(p.x, p.y), new Flatten.Point(q.x, q.y)), p, q }
    }),
  )
  let walked = Number.POSITIVE_INFINITY
  for (let i = 0; i < poses.length; i++) {
    const to = poses[i] as Pose
    const from = poses[Math.max(0, i - 1)] as Pose
    const leash = Math.hypot(to.ax - to.hx, to.ay - to.hy)
    if (leash > separation + 1e-6) say('leash stretched', i)
    if (!to.slack && leash < separation - 1e-6) say('a taut leash hangs', i)
    if (!to.slack && Math.abs(turnBetween(directionOf(to), to.heading)) > bodies.phiMax + 1e-6)
      say('pulled from the side', i)
    if (i === 0) continue
    const swing = turnBetween(directionOf(from), directionOf(to))
    opinion.swing += Math.abs(swing)
    const dx = to.hx - from.hx
    const dy = to.hy - from.hy
    const moved = Math.hypot(dx, dy)
    walked += moved
    if (to.slack && !from.slack) {
      opinion.pauses++
      if (walked < 0.2) say('pauses too close', i)
      walked = 0
    }
    if (to.slack || from.slack) {
      if (moved > 1e-8) say('walks on a slack leash', i)
    } else {
      // The handler follows the leash: between two samples its direction lies between those of the leash.
      const mean = directionOf(from) + swing / 2
      if (Math.abs(dy * Math.cos(mean) - dx * Math.sin(mean)) > 1e-6) say('does not follow the leash', i)
      if (dx * Math.cos(mean) + dy * Math.sin(mean) < -1e-9) say('is pushed', i)
    }
    const turned = Math.abs(turnBetween(from.heading, to.heading))
    const shifted = Math.hypot(to.ax - from.ax, to.ay - from.ay)
    if (Math.max(moved, shifted + turned * reach) > 0.0101) say('steps too far', i)
    const pieces = Math.max(1, Math.ceil(Math.max(moved, shifted + turned * reach) / step))
    for (let piece = 1; piece <= pieces; piece++)
      look(walls, rings, bodies, mixed(from, to, piece / pieces), drift, opinion, (text) => say(text, i))
  }
  if (opinion.pauses > 3) say('too many pauses', 0)
  return opinion
}

type Wall = { segment: Flatten.Segment; p: { x: number; y: number }; q: { x: number; y: number } }

function look(
  walls: Wall[],
  rings: { x: number; y: number }[][],
  bodies: Bodies,
  pose: Pose,
  drift: number,
  opinion: Opinion,
  say: (text: string) => void,
): void {
  const c = Math.cos(pose.heading)
  const s = Math.sin(pose.heading)
  const cx = pose.ax + bodies.d * c
  const cy = pose.ay + bodies.d * s
  const corners = [
    [1, 1],
    [-1, 1],
    [-1, -1],
    [1, -1],
  ].map(([along, left]) => {
    const x = ((along as number) * bodies.a) / 2
    const y = ((left as number) * bodies.b) / 2
    return new Flatten.Point(cx + x * c - y * s, cy + x * s + y * c)
  })
  const sides = corners.map((corner, i) => new Flatten.Segment(corner, corners[(i + 1) % 4] as Flatten.Point))
  const leash = new Flatten.Segment(new Flatten.Point(pose.hx, pose.hy), new Flatten.Point(pose.ax, pose.ay))
  const towards = Math.atan2(pose.ay - pose.hy, pose.ax - pose.hx)
  const drawn = pose.slack ? drift : 0
  const person =
    drawn > 0
      ? new Flatten.Segment(
          leash.start,
          new Flatten.Point(pose.hx + drawn * Math.cos(towards), pose.hy + drawn * Math.sin(towards)),
        )
      : leash.start
  if (!rayInside(rings, cx, cy)) say('robot outside')
  if (!rayInside(rings, pose.hx, pose.hy)) say('handler outside')
  const half = Math.hypot(bodies.a, bodies.b) / 2
  const long = Math.hypot(pose.ax - pose.hx, pose.ay - pose.hy)
  for (const wall of walls) {
    // A wall farther off than the worst seen so far cannot be the nearest: it is not measured.
    if (plainDistance(wall, cx, cy) < half + opinion.clearance)
      for (const side of sides) opinion.clearance = Math.min(opinion.clearance, side.distanceTo(wall.segment)[0])
    const near = plainDistance(wall, pose.hx, pose.hy)
    if (near < bodies.r + drawn + opinion.clearance)
      opinion.clearance = Math.min(opinion.clearance, person.distanceTo(wall.segment)[0] - bodies.r)
    if (near < long && leash.intersect(wall.segment).length > 0) say('leash through a wall')
  }
  const far = Math.hypot(pose.hx - cx, pose.hy - cy)
  if (far < half + bodies.r + bodies.g + drawn) {
    const gap = Math.min(...sides.map((side) => side.distanceTo(person)[0])) - bodies.r
    if (gap < bodies.g - 1e-6) say('bodies too close')
  }
}

/** Distance of a point to a wall, by hand: for sorting out what is far. */
function plainDistance({ p, q }: Wall, x: number, y: number): number {
  const dx = q.x - p.x
  const dy = q.y - p.y
  const t = Math.max(0, Math.min(1, ((x - p.x) * dx + (y - p.y) * dy) / (dx * dx + dy * dy)))
  return Math.hypot(x - p.x - t * dx, y - p.y - t * dy)
}

function posesOf({ samples }: Motion): Pose[] {
  const poses: Pose[] = []
  for (let i = 0; i + 5 < samples.length; i += 6) {
    const [ax, ay, heading, hx, hy, slack] = samples.subarray(i, i + 6) as unknown as [
      number,
      number,
      number,
      number,
      number,
      number,
    ]
    poses.push({ ax, ay, heading, hx, hy, slack: slack === 1 })
  }
  return poses
}

function directionOf(pose: Pose): number {
  return Math.atan2(pose.ay - pose.hy, pose.ax - pose.hx)
}

function turnBetween(from: number, to: number): number {
  return Math.atan2(Math.sin(to - from), Math.cos(to - from))
}

function mixed(from: Pose, to: Pose, t: number): Pose {
  return {
    ax: from.ax + (to.ax - from.ax) * t,
    ay: from.ay + (to.ay - from.ay) * t,
    heading: from.heading + turnBetween(from.heading, to.heading) * t,
    hx: from.hx + (to.hx - from.hx) * t,
    hy: from.hy + (to.hy - from.hy) * t,
    slack: from.slack || to.slack,
  }
}

/** Odd number of crossings of a ray to the right: inside. */
function rayInside(rings: { x: number; y: number }[][], x: number, y: number): boolean {
  let inside = false
  for (const ring of rings)
    for (let i = 0; i < ring.length; i++) {
      const p = ring[i] as { x: number; y: number }
      const q = ring[(i + 1) % ring.length] as { x: number; y: number }
      if (p.y > y !== q.y > y && x < p.x + ((q.x - p.x) * (y - p.y)) / (q.y - p.y)) inside = !inside
    }
  return inside
}
