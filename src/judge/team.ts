import type { Bodies } from '../leash/answer.ts'
import type { TeamCard } from '../record/team-card.ts'
import type { Gradient, Metres, MetresPerSecond } from '../units/quantity.ts'

/** The figures that follow from a team card. Formulas and allowances: common practice, no source, unless a line says otherwise. */
export interface Team {
  card: TeamCard
  bodies: Bodies
  /** Width of the envelope: the wider of robot and handler. */
  envelope: Metres
  /** Handler's centre to what is furthest in front: half the body, and a bag carried there. */
  front: Metres
  /** What hangs lower than this strikes a head. */
  strike: Metres
  /** From the back of the handler to the robot's nose with the leash gathered in the hand. */
  gathered: Metres
  /** Separation of handler and attachment with the leash gathered. */
  gatheredSeparation: Metres
  /** Lengths on the card for which the bodies stay apart, shortest first. */
  lengths: Metres[]
}

/** Bounce of a walk, above stature, shoes and headgear. */
const bounce: Metres = 0.02
const bagBeside: Metres = 0.1
const bagInFront: Metres = 0.15

export function teamOf(given: TeamCard): Team {
  const card = { ...given, handler: { ...given.handler, ...shownOf(given.handler) } }
  const { robot, handler, leash } = card
  const breadth = handler.shoulders + handler.clothing + (handler.bag === 'beside' ? bagBeside : 0)
  const bag = handler.bag === 'in-front' ? bagInFront : 0
  const bodies: Bodies = {
    a: robot.length,
    b: robot.width,
    d: robot.attachBehind,
    r: breadth / 2,
    g: leash.apart,
    phiMax: (robot.phiMaxDegrees * Math.PI) / 180,
    sideways: robot.sideways,
  }
  // Any heading the robot may take: its nearest corner stays `apart` from the handler.
  const apart = bodies.r + bodies.g + Math.hypot(bodies.a / 2 - bodies.d, bodies.b / 2)
  const team = {
    card,
    bodies,
    envelope: Math.max(robot.width, breadth),
    front: handler.depth / 2 + bag,
    strike: handler.stature + handler.shoes + handler.headgear + bounce,
    gathered: handler.depth + bag + leash.apart + robot.length,
    gatheredSeparation: Math.max(handler.depth / 2 + bag + leash.apart + robot.length / 2 - robot.attachBehind, apart),
  }
  const lengths = [...new Set(leash.lengths)].sort((a, b) => a - b)
  return { ...team, lengths: lengths.filter((length) => (leastSeparation(team, length, 0) ?? 0) >= apart - 1e-9) }
}

/** What was shown to nobody by name was not shown. */
function shownOf({ standsWhenSlack: stands, ownWayThroughLifts: lifts }: TeamCard['handler']) {
  const named = (one: typeof stands) => (one?.name.trim() ? one : null)
  return { standsWhenSlack: named(stands), ownWayThroughLifts: named(lifts) }
}

/**
 * Level distance spanned by a straight leash whose far end lies `drop` lower on the level; on a slope the robot stands
 * higher (gradient up, positive) or lower by gradient x distance. Null where the leash does not reach.
 */
function levelSpan(length: Metres, drop: Metres, gradient: Gradient): Metres | null {
  const square = 1 + gradient * gradient
  const under = drop * drop * gradient * gradient + square * (length * length - drop * drop)
  return under < 0 ? null : (drop * gradient + Math.sqrt(under)) / square
}

type Carried = Pick<Team, 'card'>

/** S_min: hand hanging at the side, for stops. The lesser of up and down by `gradient`. Null: too short to reach. */
export function leastSeparation(
  { card: { robot, handler } }: Carried,
  length: Metres,
  gradient: Gradient,
): Metres | null {
  const drop = handler.handHeight - robot.attachHeight
  const spans = [levelSpan(length, drop, gradient), levelSpan(length, drop, -gradient)]
  return spans.some((one) => one === null) ? null : handler.handAhead + Math.min(...(spans as number[]))
}

/** S_max: the arm stretched by the pull, for turns, doors, lifts and the team's length. The greater of up and down. */
export function greatestSeparation(
  { card: { robot, handler } }: Carried,
  length: Metres,
  gradient: Gradient,
): Metres | null {
  const drop = handler.shoulderHeight - robot.attachHeight
  const spans = [levelSpan(length + handler.arm, drop, gradient), levelSpan(length + handler.arm, drop, -gradient)]
  return spans.some((one) => one === null) ? null : Math.max(...(spans as number[]))
}

/** From the handler's back to the robot's nose, leash taut and arm stretched. */
export function teamLength(team: Team, length: Metres, gradient: Gradient): Metres | null {
  const greatest = greatestSeparation(team, length, gradient)
  const { a, d } = team.bodies
  return greatest === null ? null : greatest + a / 2 + d + team.card.handler.depth / 2
}

/** Paces tried, fastest first: steps of 0.05 m/s from the handler's own or the robot's cruise, the lesser, to 0.25. */
export function pacesOf({ card }: Team, outdoors: boolean): MetresPerSecond[] {
  const top = Math.min(outdoors ? card.handler.paceOutdoors : card.handler.pace, card.robot.cruise)
  const paces: MetresPerSecond[] = []
  for (let i = 0; top - i * 0.05 > 0.25 - 1e-9; i++) paces.push(Number((top - i * 0.05).toFixed(4)))
  // A handler slower than 0.25 m/s is not hurried.
  return paces.length > 0 ? paces : [top]
}

/** At 0.30 m/s and under a team creeps. */
export const creeping: MetresPerSecond = 0.3
