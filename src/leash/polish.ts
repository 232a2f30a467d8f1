import { signedArea } from '../geometry/boundary.ts'
import type { Scene } from '../geometry/scene.ts'
import { lengthOf } from '../geometry/segment.ts'
import type { Metres } from '../units/quantity.ts'
import { add, gather, type Margins, makeMargins, type PoseTerms } from './margins.ts'
import { type Node, sinc } from './nodes.ts'

/**
 * Polishing: a motion of the right kind is bent until its least margin is as great as it gets nearby. The soft minimum
 * of all margins along it is raised by Newton steps over the whole motion at once, solved backwards in time (the
 * motion's own dynamics keep it taut), each sharper than the one before.
 *
 * State: handler x, y, leash direction, heading. Controls of a step: logarithm of the pull, turn of the leash, turn of
 * the robot. A step without pull stays one; leash lengths of slack steps are kept as they are.
 */
export interface Stage {
  /** Sharpness of the soft minimum, 1/m. */
  sharp: number
  steps: number
}

export const usualStages: Stage[] = [
  { sharp: 60, steps: 6 },
  { sharp: 150, steps: 8 },
  { sharp: 400, steps: 10 },
  { sharp: 1000, steps: 10 },
  { sharp: 2500, steps: 8 },
]

interface Track {
  size: number
  /** Four numbers a node. */
  x: Float64Array
  /** Three numbers a step: logarithm of pull / nominal pull, turn, robot's turn. */
  u: Float64Array
  pull: Float64Array
  length: Float64Array
  slack: Uint8Array
  /** What is known of far nodes, shared by a track and its trials. */
  calm: Calm
}

/**
 * Most nodes are far from anything: the least margins a node once had, where it had them. Until it has moved so far
 * that they may have been used up, it need not be looked at again.
 */
interface Calm {
  x: Float64Array
  clearance: Float64Array
  constraint: Float64Array
}

/** Margins are asked for this much further than needed, so that a node stays calm for a while, metres. */
const lookahead = 0.06
/** A constraint met by more than this weighs nothing at any sharpness, metres. */
const wellMet = 0.06

export function polish(scene: Scene, terms: PoseTerms, nodes: readonly Node[], stages = usualStages): Node[] {
  const track = trackOf(nodes)
  const margins = makeMargins()
  const goal = goalEdges(scene)
  const work = makeWork(track.size)
  let best = Float64Array.from(track.x)
  let bestValue = hardest(terms, goal, margins, track)
  for (const { sharp, steps } of stages) {
    let damping = 1e-3
    for (let i = 0; i < steps; i++) {
      // Constraints are weighed against the clearance there is now: met ones then weigh next to nothing.
      const met = leastClearance(terms, goal, margins, track)
      const level = softest(terms, goal, margins, track, sharp, met)
      const before = level - effort(track, sharp) / sharp
      solve(terms, goal, margins, track, work, sharp, level, met, damping)
      let taken = 0
      for (const size of [1, 0.5, 0.25, 0.1]) {
        const tried = follow(track, work, size)
        const after = softest(terms, goal, margins, tried, sharp, met) - effort(tried, sharp) / sharp
        if (after > before) {
          track.x.set(tried.x)
          track.u.set(tried.u)
          taken = size
          if (after - before < 0.02 / sharp) i = steps
          break
        }
      }
      if (taken === 0) {
        damping *= 10
        if (damping > 10) break
      } else damping = Math.max(1e-4, damping * (taken === 1 ? 0.3 : 1))
      const value = hardest(terms, goal, margins, track)
      if (value > bestValue) {
        bestValue = value
        best = Float64Array.from(track.x)
      }
    }
  }
  return nodes.map((node, k) => {
    const psi = best[k * 4 + 2] as number
    const heading = best[k * 4 + 3] as number
    const off = heading - psi - 2 * Math.PI * Math.round((heading - psi) / (2 * Math.PI))
    const over = node.slack ? 0 : off - Math.max(-terms.phi, Math.min(terms.phi, off))
    return { ...node, x: best[k * 4] as number, y: best[k * 4 + 1] as number, psi, heading: heading - over }
  })
}

function trackOf(nodes: readonly Node[]): Track {
  const size = nodes.length
  const track: Track = {
    size,
    x: new Float64Array(size * 4),
    u: new Float64Array(size * 3),
    pull: new Float64Array(size),
    length: Float64Array.from(nodes, (node) => node.length),
    slack: Uint8Array.from(nodes, (node) => (node.slack ? 1 : 0)),
    calm: {
      x: new Float64Array(size * 4),
      clearance: new Float64Array(size).fill(Number.NEGATIVE_INFINITY),
      constraint: new Float64Array(size),
    },
  }
  for (let k = 0; k < size; k++) {
    const node = nodes[k] as Node
    track.x.set([node.x, node.y, node.psi, node.heading], k * 4)
    const next = nodes[k + 1]
    if (!next) break
    const turn = next.psi - node.psi
    track.u[k * 3 + 1] = turn
    track.u[k * 3 + 2] = next.heading - node.heading
    const chord = lengthOf(next.x - node.x, next.y - node.y)
    track.pull[k] = chord < 1e-9 ? 0 : chord / sinc(turn / 2)
  }
  return track
}

interface GoalEdge {
  x: number
  y: number
  nx: number
  ny: number
}

/** The goal's edges with normals into it; the handler's centre must be inside. */
function goalEdges(scene: Scene): GoalEdge[] {
  const ring = signedArea(scene.goal.polygon) > 0 ? scene.goal.polygon : [...scene.goal.polygon].reverse()
  return ring.map((from, i) => {
    const to = ring[(i + 1) % ring.length] as typeof from
    const length = lengthOf(to.x - from.x, to.y - from.y)
    return { x: from.x, y: from.y, nx: -(to.y - from.y) / length, ny: (to.x - from.x) / length }
  })
}

function gatherAt(terms: PoseTerms, goal: GoalEdge[], out: Margins, track: Track, k: number, above: Metres): void {
  const at = k * 4
  const hx = track.x[at] as number
  const hy = track.x[at + 1] as number
  const psi = track.x[at + 2] as number
  const theta = track.x[at + 3] as number
  const length = track.length[k] as number
  const { calm } = track
  const last = k === track.size - 1
  if ((calm.clearance[k] as number) > above && (calm.constraint[k] as number) > wellMet && !last) {
    const moved =
      Math.abs(hx - (calm.x[at] as number)) +
      Math.abs(hy - (calm.x[at + 1] as number)) +
      Math.abs(psi - (calm.x[at + 2] as number)) * Math.max(length, 0.3) +
      Math.abs(theta - (calm.x[at + 3] as number)) * (terms.bodies.a + terms.bodies.d)
    if ((calm.clearance[k] as number) - moved > above && (calm.constraint[k] as number) - moved > wellMet) {
      out.count = 0
      return
    }
  }
  const wide = above + lookahead
  gather(out, terms, hx, hy, psi, length, theta, track.slack[k] === 1, wide)
  let clearance = wide
  let constraint = 1
  for (let i = 0; i < out.count; i++) {
    const value = out.value[i] as number
    if (out.clears[i]) clearance = Math.min(clearance, value)
    else constraint = Math.min(constraint, value)
  }
  calm.clearance[k] = clearance
  calm.constraint[k] = constraint
  calm.x[at] = hx
  calm.x[at + 1] = hy
  calm.x[at + 2] = psi
  calm.x[at + 3] = theta
  if (last)
    for (const edge of goal) {
      const inside = (hx - edge.x) * edge.nx + (hy - edge.y) * edge.ny - 2e-3
      if (inside < 0.2) add(out, inside, edge.nx, edge.ny, 0, 0, 0)
    }
}

/** Least clearance at the nodes and half way between them; less by what a constraint is missed. */
function hardest(terms: PoseTerms, goal: GoalEdge[], margins: Margins, track: Track): Metres {
  let least = 1
  for (let k = 0; k < track.size; k++) {
    gatherAt(terms, goal, margins, track, k, least)
    least = lesser(margins, least)
    if (k === track.size - 1) break
    const from = k * 4
    const turn = (track.u[k * 3 + 1] as number) / 2
    const pull = ((track.pull[k] as number) * Math.exp(track.u[k * 3] as number)) / 2
    const psi = track.x[from + 2] as number
    gather(
      margins,
      terms,
      (track.x[from] as number) + pull * Math.cos(psi + turn / 2),
      (track.x[from + 1] as number) + pull * Math.sin(psi + turn / 2),
      psi + turn,
      ((track.length[k] as number) + (track.length[k + 1] as number)) / 2,
      (track.x[from + 3] as number) + (track.u[k * 3 + 2] as number) / 2,
      track.slack[k] === 1 || track.slack[k + 1] === 1,
      least,
    )
    least = lesser(margins, least)
  }
  return least
}

function lesser(margins: Margins, least: Metres): Metres {
  let now = least
  for (let i = 0; i < margins.count; i++) {
    const value = margins.value[i] as number
    if (margins.clears[i]) now = Math.min(now, value)
    else if (value < -1e-3) now = Math.min(now, value - 0.2)
  }
  return now
}

/**
 * Level t at which the sum of exp(-sharp (margin - t)) is one: a smooth stand-in for the least margin. Constraints
 * count as margins against zero, offset so that a met one weighs nothing.
 */
function softest(
  terms: PoseTerms,
  goal: GoalEdge[],
  margins: Margins,
  track: Track,
  sharp: number,
  met: Metres,
): number {
  let level = Number.POSITIVE_INFINITY
  const reach = 10 / sharp
  let sum = 0
  for (let k = 0; k < track.size; k++) {
    gatherAt(terms, goal, margins, track, k, Math.min(level + reach, 1))
    for (let i = 0; i < margins.count; i++) {
      const value = effective(margins, i, met)
      if (value < level) {
        sum = sum * Math.exp(-sharp * (level - value)) + 1
        if (level === Number.POSITIVE_INFINITY) sum = 1
        level = value
      } else if (value < level + reach) sum += Math.exp(-sharp * (value - level))
    }
  }
  return level - Math.log(sum) / sharp
}

/** A constraint is worth its margin over zero, steeply, above the clearance there is: so it gives way to none. */
function effective(margins: Margins, i: number, met: Metres): number {
  const value = margins.value[i] as number
  return margins.clears[i] ? value : met + 3 * value
}

function leastClearance(terms: PoseTerms, goal: GoalEdge[], margins: Margins, track: Track): Metres {
  let least = 1
  for (let k = 0; k < track.size; k++) {
    gatherAt(terms, goal, margins, track, k, least)
    for (let i = 0; i < margins.count; i++) if (margins.clears[i]) least = Math.min(least, margins.value[i] as number)
  }
  return least
}

/** Weights of the controls: they keep steps of like size and the leash from swinging without need. */
const controlWeight = [0.02, 0.05, 0.02]
/** A step beyond its size is pulled back hard: between far nodes a body could slip through a wall unseen. */
const beyond = 4

function stepLimit(track: Track, k: number, control: number): number {
  if (control === 0) return 0.6
  return control === 1 ? 0.09 / (track.length[k] as number) : 0.16
}

function excess(track: Track, k: number, control: number): number {
  const value = track.u[k * 3 + control] as number
  const limit = stepLimit(track, k, control)
  return value > limit ? value - limit : value < -limit && control > 0 ? value + limit : 0
}

function effort(track: Track, sharp: number): number {
  let sum = 0
  for (let k = 0; k < track.size - 1; k++)
    for (let i = 0; i < 3; i++) {
      const value = track.u[k * 3 + i] as number
      const over = excess(track, k, i)
      sum += ((controlWeight[i] as number) * value * value + (beyond * sharp + 100) * over * over) / 2
    }
  return sum
}

interface Work {
  gain: Float64Array
  shift: Float64Array
  tried: Track | null
}

function makeWork(size: number): Work {
  return { gain: new Float64Array(size * 12), shift: new Float64Array(size * 3), tried: null }
}

const A = new Float64Array(16)
const B = new Float64Array(12)

/** Slopes of a step: next state by state and by controls. */
function linearise(track: Track, k: number): void {
  const psi = track.x[k * 4 + 2] as number
  const pull = (track.pull[k] as number) * Math.exp(track.u[k * 3] as number)
  const turn = track.u[k * 3 + 1] as number
  const s = sinc(turn / 2)
  const c = Math.cos(psi + turn / 2)
  const n = Math.sin(psi + turn / 2)
  A.fill(0)
  A[0] = 1
  A[5] = 1
  A[10] = 1
  A[15] = 1
  A[2] = -pull * s * n
  A[6] = pull * s * c
  B.fill(0)
  B[0] = pull * s * c
  B[3] = pull * s * n
  const ds = -turn / 12
  B[1] = pull * (ds * c - (s / 2) * n)
  B[4] = pull * (ds * n + (s / 2) * c)
  B[7] = 1
  B[11] = 1
}

/** One Newton step over the whole motion, backwards in time: gains and shifts of the controls. */
function solve(
  terms: PoseTerms,
  goal: GoalEdge[],
  margins: Margins,
  track: Track,
  work: Work,
  sharp: number,
  level: number,
  met: Metres,
  damping: number,
): void {
  const V = new Float64Array(16)
  const v = new Float64Array(4)
  const VA = new Float64Array(16)
  const VB = new Float64Array(12)
  const Quu = new Float64Array(9)
  const Qux = new Float64Array(12)
  const qu = new Float64Array(3)
  const above = level + 10 / sharp
  for (let k = track.size - 1; k >= 0; k--) {
    if (k < track.size - 1) {
      linearise(track, k)
      // VA = V A, VB = V B
      for (let i = 0; i < 4; i++) {
        for (let j = 0; j < 4; j++) {
          let sum = 0
          for (let m = 0; m < 4; m++) sum += (V[i * 4 + m] as number) * (A[m * 4 + j] as number)
          VA[i * 4 + j] = sum
        }
        for (let j = 0; j < 3; j++) {
          let sum = 0
          for (let m = 0; m < 4; m++) sum += (V[i * 4 + m] as number) * (B[m * 3 + j] as number)
          VB[i * 3 + j] = sum
        }
      }
      for (let i = 0; i < 3; i++) {
        const over = excess(track, k, i)
        const weight = (controlWeight[i] as number) + (over === 0 ? 0 : beyond * sharp + 100)
        let g = (controlWeight[i] as number) * (track.u[k * 3 + i] as number) + (beyond * sharp + 100) * over
        for (let m = 0; m < 4; m++) g += (B[m * 3 + i] as number) * (v[m] as number)
        qu[i] = g
        for (let j = 0; j < 3; j++) {
          let sum = 0
          for (let m = 0; m < 4; m++) sum += (B[m * 3 + i] as number) * (VB[m * 3 + j] as number)
          Quu[i * 3 + j] = sum
        }
        Quu[i * 3 + i] = (Quu[i * 3 + i] as number) + weight + damping * sharp
        for (let j = 0; j < 4; j++) {
          let sum = 0
          for (let m = 0; m < 4; m++) sum += (B[m * 3 + i] as number) * (VA[m * 4 + j] as number)
          Qux[i * 4 + j] = sum
        }
      }
      invert3(Quu)
      const gainAt = k * 12
      const shiftAt = k * 3
      for (let i = 0; i < 3; i++) {
        let shift = 0
        for (let m = 0; m < 3; m++) shift -= (Quu[i * 3 + m] as number) * (qu[m] as number)
        work.shift[shiftAt + i] = shift
        for (let j = 0; j < 4; j++) {
          let gain = 0
          for (let m = 0; m < 3; m++) gain -= (Quu[i * 3 + m] as number) * (Qux[m * 4 + j] as number)
          work.gain[gainAt + i * 4 + j] = gain
        }
      }
      // V = A'VA + Qux'K, v = A'v + Qux'k
      const nextV = new Float64Array(16)
      const nextv = new Float64Array(4)
      for (let i = 0; i < 4; i++) {
        let g = 0
        for (let m = 0; m < 4; m++) g += (A[m * 4 + i] as number) * (v[m] as number)
        for (let m = 0; m < 3; m++) g += (Qux[m * 4 + i] as number) * (work.shift[shiftAt + m] as number)
        nextv[i] = g
        for (let j = 0; j < 4; j++) {
          let sum = 0
          for (let m = 0; m < 4; m++) sum += (A[m * 4 + i] as number) * (VA[m * 4 + j] as number)
          for (let m = 0; m < 3; m++) sum += (Qux[m * 4 + i] as number) * (work.gain[gainAt + m * 4 + j] as number)
          nextV[i * 4 + j] = sum
        }
      }
      V.set(nextV)
      v.set(nextv)
    }
    gatherAt(terms, goal, margins, track, k, above)
    for (let i = 0; i < margins.count; i++) {
      const weight = Math.exp(-sharp * (effective(margins, i, met) - level))
      if (weight < 1e-5) continue
      const scale = margins.clears[i] ? 1 : 3
      for (let p = 0; p < 4; p++) {
        const gp = scale * (margins.slope[i * 4 + p] as number)
        if (gp === 0) continue
        v[p] = (v[p] as number) - sharp * weight * gp
        for (let q = 0; q < 4; q++)
          V[p * 4 + q] =
            (V[p * 4 + q] as number) + sharp * sharp * weight * gp * scale * (margins.slope[i * 4 + q] as number)
      }
    }
  }
}

/** Inverse of a symmetric positive matrix, in place. */
function invert3(m: Float64Array): void {
  const [a, b, c, , d, e, , , f] = m as unknown as [
    number,
    number,
    number,
    number,
    number,
    number,
    number,
    number,
    number,
  ]
  const A0 = d * f - e * e
  const B0 = c * e - b * f
  const C0 = b * e - c * d
  const det = a * A0 + b * B0 + c * C0
  m[0] = A0 / det
  m[1] = B0 / det
  m[2] = C0 / det
  m[3] = B0 / det
  m[4] = (a * f - c * c) / det
  m[5] = (b * c - a * e) / det
  m[6] = C0 / det
  m[7] = (b * c - a * e) / det
  m[8] = (a * d - b * b) / det
}

/** Follows the controls corrected by `size` of the step; pulls stay pulls, and no step grows out of hand. */
function follow(track: Track, work: Work, size: number): Track {
  const tried = work.tried ?? { ...track, x: new Float64Array(track.size * 4), u: new Float64Array(track.size * 3) }
  work.tried = tried
  tried.x.set(track.x.subarray(0, 4), 0)
  for (let k = 0; k < track.size - 1; k++) {
    for (let i = 0; i < 3; i++) {
      let change = size * (work.shift[k * 3 + i] as number)
      for (let j = 0; j < 4; j++)
        change +=
          (work.gain[k * 12 + i * 4 + j] as number) * ((tried.x[k * 4 + j] as number) - (track.x[k * 4 + j] as number))
      const limit = i === 0 ? 0.5 : 0.2
      change = Math.max(-limit, Math.min(limit, change))
      tried.u[k * 3 + i] = (track.u[k * 3 + i] as number) + change
    }
    tried.u[k * 3] = Math.max(-6, Math.min(1.2, tried.u[k * 3] as number))
    const pull = (track.pull[k] as number) * Math.exp(tried.u[k * 3] as number)
    const psi = tried.x[k * 4 + 2] as number
    const turn = tried.u[k * 3 + 1] as number
    const chord = pull * sinc(turn / 2)
    tried.x[k * 4 + 4] = (tried.x[k * 4] as number) + chord * Math.cos(psi + turn / 2)
    tried.x[k * 4 + 5] = (tried.x[k * 4 + 1] as number) + chord * Math.sin(psi + turn / 2)
    tried.x[k * 4 + 6] = psi + turn
    tried.x[k * 4 + 7] = (tried.x[k * 4 + 3] as number) + (tried.u[k * 3 + 2] as number)
  }
  return tried
}
