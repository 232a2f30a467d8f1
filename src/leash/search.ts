import type { Boundary } from '../geometry/boundary.ts'
import { holds } from '../geometry/polygon-check.ts'
import type { Scene } from '../geometry/scene.ts'
import type { Metres, Radians } from '../units/quantity.ts'
import type { Bodies, Motion } from './answer.ts'
import { type Certificate, certify } from './certify.ts'
import { costToGo } from './cost-to-go.ts'
import { type Field, fieldOf } from './field.ts'
import { assignHeadings } from './headings.ts'
import type { PoseTerms } from './margins.ts'
import { arcFrom, motionOf, type Node, refine, wrap } from './nodes.ts'
import { polish, usualStages } from './polish.ts'
import { rollOut } from './roll-out.ts'
import { directions, floor, type Tables } from './tables.ts'
import { reachOf } from './team.ts'
import { goalValues, raise, sample } from './value.ts'

/** A motion with its certificate. */
export interface Found {
  nodes: Node[]
  motion: Motion
  certificate: Certificate
}

/** What a search is about. */
export interface Quest {
  scene: Scene
  walls: Boundary
  tables: Tables
  bodies: Bodies
  separation: Metres
  /** Greatest angle of the taut leash to the robot's backward axis at which the bodies also keep apart. */
  phi: Radians
  drift: Metres
}

/** How far a value of this grid was seen to lie below the truth, at most, metres: it grows with the leash. */
export function shortfall(separation: Metres): Metres {
  return 0.025 + 0.032 * separation
}

/** Certifies nodes; null where the motion breaks a promise. */
export function prove(quest: Quest, nodes: Node[]): Found | null {
  const motion = motionOf(nodes, reachOf(quest.bodies))
  const certificate = certify(quest.scene, quest.walls, quest.bodies, quest.separation, motion, quest.drift)
  return certificate.broken === null ? { nodes, motion, certificate } : null
}

/** The better proved of two. */
export function better(one: Found | null, other: Found | null): Found | null {
  if (!one || !other) return one ?? other
  return other.certificate.clearance > one.certificate.clearance ? other : one
}

/** Polishes nodes in rounds, each with shorter steps, until a round gains nothing; the best proved of all rounds. */
export function polishAndProve(quest: Quest, rough: readonly Node[], rounds = 4): Found | null {
  const terms: PoseTerms = { walls: quest.walls, bodies: quest.bodies, phi: quest.phi, drift: quest.drift }
  const reach = reachOf(quest.bodies)
  let nodes = refine(rough, 0.07, reach)
  let best: Found | null = null
  for (let round = 0; round < rounds; round++) {
    nodes = polish(quest.scene, terms, nodes, round === 0 ? usualStages : usualStages.slice(2))
    const found = prove(quest, nodes)
    const gain = found && best ? found.certificate.clearance - best.certificate.clearance : 1
    best = better(best, found)
    if (gain < 5e-4) break
    nodes = refine(nodes, 0.06, reach)
  }
  return best
}

export interface TautResult {
  found: Found | null
  /** Value of the start on the grid, metres; the truth lies above it by the shortfall at most. */
  value: Metres
  /** False where the cap on passes was reached. */
  settled: boolean
  /** The field with headings cut at zero: a search with pauses begins with it as well. */
  base: Settled
}

/** A field with its taut values and the value of the start. */
export interface Settled {
  field: Field
  taut: Float32Array
  value: Metres
  settled: boolean
}

/** The taut search: value function, roll-out, polishing, proof. `passes` caps the work and is counted down. */
export function searchTaut(quest: Quest, passes: Passes): TautResult {
  const result = searchPlainly(quest, passes)
  const { found, value } = result
  // Polishing that did not even reach the grid's own value went astray: the robot's way on a shorter leash leads better.
  const astray = value + shortfall(quest.separation) >= 0 && (found?.certificate.clearance ?? -1) < value + 0.015
  if (!astray || quest.separation < 1 || passes.left <= 0) return result
  const shorter = shortened(quest, 0.2)
  const led = searchPlainly(shorter, passes).found
  if (!led || led.certificate.clearance < value) return result
  let best = found
  let way: Found | null = led
  for (const less of [0.1, 0]) {
    const next = shortened(quest, less)
    way = way && polishAndProve(next, followedAfresh(next, way.nodes))
    if (less === 0) best = better(best, way)
  }
  return { ...result, found: best }
}

/** The same quest on a leash shorter by `less`; the start comes nearer by as much. */
function shortened(quest: Quest, less: Metres): Quest {
  const { start } = quest.scene
  const scene = {
    ...quest.scene,
    start: {
      ...start,
      x: start.x + less * Math.cos(start.heading),
      y: start.y + less * Math.sin(start.heading),
    },
  }
  return { ...quest, scene, separation: quest.separation - less }
}

/** The robot's way of another motion walked on this quest's leash: the handler falls in behind it. */
function followedAfresh(quest: Quest, nodes: readonly Node[]): Node[] {
  const { start } = quest.scene
  const S = quest.separation
  let last: Node = { ...start, psi: start.heading, length: S, slack: false }
  const followed = [last]
  for (const node of nodes) {
    const ax = node.x + node.length * Math.cos(node.psi)
    const ay = node.y + node.length * Math.sin(node.psi)
    const far = Math.hypot(ax - last.x, ay - last.y)
    const direction = last.psi + wrap(Math.atan2(ay - last.y, ax - last.x) - last.psi)
    // A short step: the leash turns towards the attachment and the handler makes up what is too long.
    const swung: Node = { ...last, psi: direction, heading: node.heading }
    last = far > S ? { ...arcFrom(swung, far - S, 0, node.heading) } : swung
    followed.push(last)
  }
  // The goal lies where the handler must still come to.
  for (let i = 0; i < 60 && !holds(quest.scene.goal.polygon, last); i++) {
    last = arcFrom(last, 0.02, 0, last.heading)
    followed.push(last)
  }
  return followed
}

function searchPlainly(quest: Quest, passes: Passes): TautResult {
  const base = settledField(quest, 0, floor, passes)
  let { field, taut, value, settled } = base
  // The runs of headings are right at the level they were cut at: cut them again just under the value found.
  if (value > 0.02) {
    const again = settledField(quest, value - 0.006, value - depth, passes)
    field = again.field
    taut = again.taut
    settled = again.settled && settled
    value = Math.min(value, again.value)
  }
  let found: Found | null = null
  if (value + shortfall(quest.separation) >= 0)
    for (const below of [0.01, 0.03]) {
      if (found && found.certificate.clearance > value) break
      const level = value - below
      const cost = costToGo(field, taut, level, 60)
      const { x, y, heading } = quest.scene.start
      const rolled = rollOut(quest.scene, field, [{ value: taut, cost }], level, { x, y, psi: heading })
      const rough = rolled && headed(quest, rolled.stretches[0] as Node[], level)
      if (rough) found = better(found, polishAndProve(quest, rough))
    }
  return { found, value, settled, base }
}

/** How far below the value looked for a state is still told apart: a roll-out dips no deeper. Metres. */
export const depth = 0.1

/** Work still allowed, in passes over a field. */
export interface Passes {
  left: number
}

/** A field with its taut values, runs of headings cut at `tau`, states from `least` up, and the value of the start. */
export function settledField(quest: Quest, tau: Metres, least: Metres, passes: Passes): Settled {
  const window = Math.min(directions / 2, Math.floor((quest.phi / (2 * Math.PI)) * directions + 1e-9))
  const field = fieldOf(quest.scene, quest.tables, quest.separation, window, tau, least)
  const taut = goalValues(field)
  const settled = settle(field, taut, passes)
  return { field, taut, settled, value: startValue(quest, field, taut) }
}

export function startValue(quest: Quest, field: Field, value: Float32Array): Metres {
  const { x, y, heading } = quest.scene.start
  return sample(field, value, x, y, Math.round((heading / (2 * Math.PI)) * directions), 0, 0)
}

export function settle(field: Field, value: Float32Array, passes: Passes): boolean {
  const most = Math.max(0, Math.min(80, passes.left))
  const used = raise(field, value, most)
  passes.left -= Math.min(used, most)
  return used <= most
}

/** A stretch with headings that keep the robot as clear as they can. */
export function headed(quest: Quest, nodes: readonly Node[], level: Metres): Node[] | null {
  const enough = Math.max(0.02, level + 0.06)
  return assignHeadings(quest.walls, quest.bodies, nodes, directions, quest.phi, enough)?.nodes ?? null
}
