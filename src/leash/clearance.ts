import { boundaryOf } from '../geometry/boundary.ts'
import { holds } from '../geometry/polygon-check.ts'
import type { Scene } from '../geometry/scene.ts'
import { sayProblem } from '../geometry/scene-problem.ts'
import type { Metres } from '../units/quantity.ts'
import type { Bodies, ClearanceAnswer, ClearanceOptions, Planner } from './answer.ts'
import { apart } from './certify.ts'
import { freeBound } from './free-bound.ts'
import { arcFrom, type Node } from './nodes.ts'
import { isCentred, straightNodes } from './opening.ts'
import {
  better,
  type Found,
  polishAndProve,
  prove,
  type Quest,
  searchTaut,
  shortfall,
  type TautResult,
} from './search.ts'
import { mostPauses, type SlackResult, searchSlack } from './slack.ts'
import { type Tables, tablesOf } from './tables.ts'
import { checkQuestion } from './team.ts'
import { tightestOf } from './tightest.ts'
import { closedTurn, closedTurnNodes, hasClosedTurn, isBoundedTurn } from './turn.ts'

/** A motion this near to what the closed form allows is not searched for further, metres. */
const closeEnough = 0.02
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
  let high = free
  if (form?.kind === 'turn' && isBoundedTurn(form, bodies)) {
    high = Math.min(free, closedTurn(form, bodies, separation) + closedMargin)
    if (high < 0) return nothing(high, true)
  }
  const passes = { left: options.workCap ?? usualCap }
  const quest: Quest = {
    scene,
    walls,
    // Only a search asks for them, and pays for them.
    get tables() {
      return tablesFor(scene, bodies)
    },
    bodies,
    separation,
    phi: freeAngle(bodies, separation),
    drift: options.drift ?? 0,
  }
  if (form?.kind === 'turn' && hasClosedTurn(form, bodies)) {
    const nodes = closedTurnNodes(scene, walls, form, bodies, separation)
    const found = nodes && prove(quest, nodes)
    if (found && found.certificate.clearance >= high - 2 * closedMargin) return answer(quest, found, high, options)
    const polished = nodes && better(found, polishAndProve(quest, nodes))
    if (polished && polished.certificate.clearance >= high - closeEnough) return answer(quest, polished, high, options)
  }
  // Straight ahead: any robot can, and none can do better than the free bound.
  if (form?.kind === 'indoor' && isCentred(form)) {
    const found = prove(quest, straightNodes(scene, form, separation))
    if (found && found.certificate.clearance >= free - closedMargin) return answer(quest, found, free, options)
  }
  if (!bodies.sideways) return straightOn(quest, high, options)
  const taut = searchTaut(quest, passes)
  if (taut.settled) high = Math.min(high, highOf(quest, taut))
  if (options.slack === false) {
    if (high < 0) return nothing(high, taut.settled)
    const found = taut.found
    if (!found || found.certificate.clearance < 0) return nothing(high, taut.settled)
    return { ...answer(quest, found, high, options), decided: taut.settled }
  }
  // Up to a right angle a slack leash gains nothing: the handler only walks at full stretch.
  const closed = form?.kind === 'turn' && hasClosedTurn(form, bodies)
  if (closed && taut.found && taut.found.certificate.clearance >= 0)
    return { ...answer(quest, taut.found, high, options), decided: taut.settled }
  const slack = searchSlack(quest, taut, free, passes)
  return slackAnswer(quest, slack, high, free, taut.settled, options)
}

/**
 * A robot that cannot walk sideways: straight on is proved where that is the whole way. For any other way there is no
 * search yet, so the answer is undecided; what a robot that does walk sideways cannot exceed, it cannot either.
 */
function straightOn(quest: Quest, high: Metres, options: ClearanceOptions): ClearanceAnswer {
  const { start, goal } = quest.scene
  let node: Node = { ...start, psi: start.heading, length: quest.separation, slack: false }
  const nodes = [node]
  for (let i = 0; i < 400 && !holds(goal.polygon, node); i++) {
    node = arcFrom(node, 0.05, 0, start.heading)
    nodes.push(node)
  }
  const found = prove(quest, nodes)
  if (!found || found.certificate.clearance < 0) return nothing(high, false)
  const decided = found.certificate.clearance >= high - closedMargin
  return { ...answer(quest, found, high, options), decided }
}

/** Passes over the field, each a look at every state twice. */
const usualCap = 4000

/** Optimistic end: the value on the grid with its shortfall, or what was proved with a margin where polishing took hold. */
function highOf(quest: Quest, taut: TautResult): Metres {
  const far = shortfall(quest.separation)
  const proved = taut.found?.certificate.clearance ?? Number.NEGATIVE_INFINITY
  const kind = quest.scene.form?.kind
  const margin = kind === 'turn' || kind === 'chicane' || kind === 'indoor' ? 0.012 : 0.025
  return proved >= taut.value + far / 3 ? Math.min(proved + margin, taut.value + far) : taut.value + far
}

/** Greatest leash angle at which a taut team keeps its bodies apart: less than phi_max only on a short leash. */
function freeAngle(bodies: Bodies, separation: Metres): number {
  const kept = (angle: number) =>
    apart(bodies, { x: 0, y: 0, psi: 0, length: separation, heading: angle, slack: false }, 0) >= 0
  for (let i = 1; i <= 180; i++) {
    const angle = (bodies.phiMax * i) / 180
    if (!kept(angle)) return (bodies.phiMax * (i - 1)) / 180
  }
  return bodies.phiMax
}

const spacing = 0.05
let lastKey = ''
let lastTables: Tables | null = null

/** Tables of the last scene are kept: the separations on offer and both directions share them. */
function tablesFor(scene: Scene, bodies: Bodies): Tables {
  const key = JSON.stringify([scene.polygon, scene.holes, scene.form ? 0 : scene.start, bodies])
  if (lastTables === null || key !== lastKey) {
    lastTables = tablesOf(scene, bodies, spacing)
    lastKey = key
  }
  return lastTables
}

function answer(quest: Quest, found: Found, high: Metres, options: ClearanceOptions): ClearanceAnswer {
  const { motion, certificate } = found
  const low = certificate.clearance
  return {
    mTaut: low,
    mTautHigh: Math.max(low, high),
    mSlack: low,
    mSlackHigh: Math.max(low, high),
    pauses: low >= (options.pausesAt ?? 0.05) ? 0 : null,
    tightest: tightestOf(quest.scene, quest.walls, quest.bodies, motion, certificate),
    swing: certificate.swing,
    motion,
    tautMotion: motion,
    decided: true,
  }
}

function slackAnswer(
  quest: Quest,
  slack: SlackResult,
  tautHigh: Metres,
  free: Metres,
  tautSettled: boolean,
  options: ClearanceOptions,
): ClearanceAnswer {
  const worth = (found: Found | null | undefined) => found?.certificate.clearance ?? Number.NEGATIVE_INFINITY
  const taut = slack.found[0] && worth(slack.found[0]) >= 0 ? slack.found[0] : null
  const best = slack.found[mostPauses] ?? null
  const settled = tautSettled && slack.settled
  const low = worth(best)
  let high = settled ? Math.min(free, Math.max(tautHigh, low, slack.value + shortfall(quest.separation))) : free
  if (low >= free - 0.003) high = free
  if (!best || low < 0) return { ...nothing(high, settled), mTautHigh: tautHigh < 0 ? null : tautHigh }
  const wanted = options.pausesAt ?? 0.05
  const pauses = slack.found.findIndex((found) => worth(found) >= wanted)
  return {
    mTaut: taut ? worth(taut) : null,
    mTautHigh: tautHigh < 0 ? null : Math.max(tautHigh, taut ? worth(taut) : 0),
    mSlack: low,
    mSlackHigh: high,
    pauses: pauses < 0 ? null : pauses,
    tightest: tightestOf(quest.scene, quest.walls, quest.bodies, best.motion, best.certificate),
    swing: best.certificate.swing,
    motion: best.motion,
    tautMotion: taut?.motion ?? null,
    decided: settled,
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
