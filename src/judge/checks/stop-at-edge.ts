import { kind } from '../../catalogue/kinds.ts'
import { finding, ratioOf, stateOf } from '../finding.ts'
import type { Site } from '../site.ts'
import { nameOf } from '../site.ts'
import { leastSeparation } from '../team.ts'
import { metresNeeded, metresThere } from '../words.ts'
import type { PairCheck } from './pair-check.ts'
import { stopDistance } from './stop.ts'

/** A foot's length that the handler's front does not count. */
const toes = 0.15

/**
 * Only where the robot's braking is measured (else `stop` covers it): at edges, kerbs, stairs and lift sills the robot
 * stops its stand-off short of the edge, and the handler must stop before it. Common practice.
 */
export function stopAtEdge(site: Site): PairCheck[] {
  const { setting, segment, slope } = site
  const { team } = setting
  const { robot, handler, leash: limits } = team.card
  if (!robot.hardestBraking) return []
  const { a, d } = team.bodies
  return segment.features
    .filter((one) => kind(one.kind)?.feeds.includes('stop-at-edge') || one.kind === 'lift')
    .map((feature) => {
      const reckon = (leash: number, pace: number) => {
        const demand = stopDistance(pace, site.reaction, handler.deceleration, slope.down) + limits.plannedSlack
        const separation = leastSeparation(team, leash, slope.steepest) ?? 0
        const capacity = separation + (a / 2 + d) + robot.standOff - team.front - toes
        const ratio = ratioOf({ low: demand, high: demand }, { low: capacity, high: capacity })
        return { raw: stateOf(ratio), ratio, demand, capacity }
      }
      return {
        id: 'stop-at-edge',
        feature: feature.id,
        timed: false,
        cell: (leash: number, pace: number) => {
          const { raw, ratio } = reckon(leash, pace)
          return { state: raw, ratio: () => ratio, told: false }
        },
        finding: (leash: number, pace: number) => {
          const { raw, ratio, demand, capacity } = reckon(leash, pace)
          return finding({
            id: 'stop-at-edge',
            feature: feature.id,
            subject: `Stopping before ${nameOf(feature)}`,
            detail: () => `${metresNeeded(demand)} for ${metresThere(capacity)}`,
            harm: 'fall',
            source: 'common practice',
            raw,
            demand,
            capacity,
            ratio,
            caution: raw === 'tight' ? 'Slow. Be ready to stop.' : null,
            at: { leash, pace },
            from: slope.from,
          })
        },
      }
    })
}
