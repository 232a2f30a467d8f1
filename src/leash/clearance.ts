import { type Boundary, boundaryOf } from '../geometry/boundary.ts'
import type { Scene } from '../geometry/scene.ts'
import { sayProblem } from '../geometry/scene-problem.ts'
import type { Metres } from '../units/quantity.ts'
import type { Bodies, ClearanceAnswer, ClearanceOptions, Motion, Planner } from './answer.ts'
import { type Certificate, certify } from './certify.ts'
import { freeBound } from './free-bound.ts'
import { motionOf, type Node } from './nodes.ts'
import { checkQuestion, reachOf } from './team.ts'
import { tightestOf } from './tightest.ts'
import { closedTurn, closedTurnNodes, hasClosedTurn } from './turn.ts'

/** What the closed form was seen to differ from an independent slow solver, at most, metres. */
const closedMargin = 0.003

/**
 * The clearance of one scene for one team at one separation. Ask `checkQuestion` first: a question it refuses is an
 * Error here.
 */
export const clearance: Planner = (scene, bodies, separation, options = {}) => {
  const wrong = checkQuestion(scene, bodies, separation, options)
  if (wrong) throw new Error(`bad-question: ${sayProblem(wrong)}`)
  const walls = boundaryOf(scene)
  const free = freeBound(scene, walls, bodies, separation)
  if (free < 0) return nothing(free, true)
  const form = scene.form
  if (form?.kind === 'turn' && hasClosedTurn(form, bodies)) {
    const high = Math.min(free, closedTurn(form, bodies, separation) + closedMargin)
    if (high < 0) return nothing(high, true)
    const nodes = closedTurnNodes(scene, walls, form, bodies, separation)
    const found = nodes && worth(scene, walls, bodies, separation, nodes)
    if (found && found.certificate.clearance >= 0) return answer(scene, walls, bodies, found, high, options)
  }
  return nothing(free, false)
}

interface Found {
  motion: Motion
  certificate: Certificate
}

function worth(
  scene: Scene,
  walls: Boundary,
  bodies: Bodies,
  separation: Metres,
  nodes: readonly Node[],
): Found | null {
  const motion = motionOf(nodes, reachOf(bodies))
  const certificate = certify(scene, walls, bodies, separation, motion)
  return certificate.broken === null ? { motion, certificate } : null
}

function answer(
  scene: Scene,
  walls: Boundary,
  bodies: Bodies,
  found: Found,
  high: Metres,
  options: ClearanceOptions,
): ClearanceAnswer {
  const { motion, certificate } = found
  const low = certificate.clearance
  return {
    mTaut: low,
    mTautHigh: Math.max(low, high),
    mSlack: low,
    mSlackHigh: Math.max(low, high),
    pauses: low >= (options.pausesAt ?? 0.05) ? 0 : null,
    tightest: tightestOf(scene, walls, bodies, motion, certificate),
    swing: certificate.swing,
    motion,
    tautMotion: motion,
    decided: true,
  }
}

/** No motion found; `high` is what none can exceed. */
function nothing(high: Metres, decided: boolean): ClearanceAnswer {
  const bound = high < 0 ? null : high
  return {
    mTaut: null,
    mTautHigh: bound,
    mSlack: null,
    mSlackHigh: bound,
    pauses: null,
    tightest: null,
    swing: 0,
    motion: null,
    tautMotion: null,
    decided,
  }
}
