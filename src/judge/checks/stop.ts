import { finding, ratioOf, stateOf } from '../finding.ts'
import type { Site } from '../site.ts'
import { creeping, leastSeparation } from '../team.ts'
import { metresNeeded, metresThere } from '../words.ts'
import type { PairCheck, Reckoned } from './pair-check.ts'

const gravity = 9.81

/** Stops reckoned in a run, by reaction and slope, then by length and pace. */
export type StopsReckoned = Map<string, Map<number, Reckoned>>

/** Distance a handler still walks after the robot stopped dead; infinite where a downward slope outruns the braking. */
export function stopDistance(pace: number, reaction: number, deceleration: number, down: number): number {
  const braking = deceleration - gravity * Math.sin(Math.atan(down))
  return braking <= 0 ? Number.POSITIVE_INFINITY : pace * reaction + (pace * pace) / (2 * braking)
}

/**
 * The robot stops dead; the handler reacts, brakes and must not walk into it: v t_r + v^2 / (2 (a_h - g sin down)) and
 * the planned slack, for the separation less half the robot before the attachment and the handler's front. A measured
 * braking adds the robot's own run-out, as far as the gap is never less on the way.
 * @param known figures of other segments of the run: they depend on reaction, slope, length and pace alone.
 */
export function stop(site: Site, known: StopsReckoned): PairCheck {
  const { setting, segment, slope } = site
  const { team } = setting
  const { robot, handler, leash: limits } = team.card
  const { a, d } = team.bodies
  const key = `${site.reaction} ${slope.down} ${slope.steepest}`
  const here = known.get(key) ?? new Map<number, Reckoned>()
  known.set(key, here)
  const reckon = (leash: number, pace: number): Reckoned => {
    // Leash in whole millimetres beside the pace: one number for both.
    const at = Math.round(leash * 1000) * 100 + pace
    const before = here.get(at)
    if (before) return before
    const made = reckoned(leash, pace)
    here.set(at, made)
    return made
  }
  const reckoned = (leash: number, pace: number): Reckoned => {
    const walked = stopDistance(pace, site.reaction, handler.deceleration, slope.down)
    const demand = walked + limits.plannedSlack
    const separation = leastSeparation(team, leash, slope.steepest) ?? 0
    const runOut = robot.hardestBraking
      ? credited(pace, robot.hardestBraking, site.reaction, handler.deceleration, slope.down)
      : 0
    const capacity = separation - (a / 2 - d) - team.front + runOut
    const ratio = ratioOf({ low: demand, high: demand }, { low: capacity, high: capacity })
    return { raw: stateOf(ratio), ratio, demand, capacity }
  }
  return {
    id: 'stop',
    feature: segment.id,
    timed: true,
    cell: (leash, pace) => {
      const { raw, ratio } = reckon(leash, pace)
      return { state: raw, ratio: () => ratio, told: false }
    },
    finding: (leash, pace) => {
      const { raw, ratio, demand, capacity } = reckon(leash, pace)
      return finding({
        id: 'stop',
        feature: segment.id,
        subject: `Stopping on ${segment.name}`,
        detail: () => `${metresNeeded(demand)} for ${metresThere(capacity)} behind a robot that stops dead`,
        harm: 'fall',
        source: 'common practice',
        raw,
        demand,
        capacity,
        ratio,
        caution: raw === 'tight' ? 'Slow. Be ready to stop.' : pace <= creeping + 1e-9 ? 'Very slow pace.' : null,
        at: { leash, pace },
        from: slope.from,
      })
    },
  }
}

/**
 * The robot's run-out that the gap really gains: the handler's way less the robot's, at its greatest over time.
 * Equals v^2 / (2 a_max) where the robot stands before the handler brakes.
 */
function credited(pace: number, robot: number, reaction: number, deceleration: number, down: number): number {
  const braking = deceleration - gravity * Math.sin(Math.atan(down))
  const walked = stopDistance(pace, reaction, deceleration, down)
  if (!Number.isFinite(walked) || robot <= 0) return 0
  const stands = pace / robot
  const handlerStands = reaction + pace / braking
  const way = (t: number, from: number, by: number) => {
    const brakes = Math.min(Math.max(0, t - from), pace / by)
    return pace * Math.min(t, from) + pace * brakes - (by * brakes * brakes) / 2
  }
  const closing = (t: number) => way(t, reaction, braking) - way(t, 0, robot)
  // The gap closes fastest where one of them stands or where their speeds are equal.
  const equal = robot < braking ? (braking * reaction) / (braking - robot) : handlerStands
  const worst = Math.max(
    ...[stands, handlerStands, equal].filter((t) => t >= 0).map((t) => closing(Math.min(t, handlerStands))),
  )
  return Math.max(0, walked - worst)
}
