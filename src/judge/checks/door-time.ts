import { finding, ratioOf, stateOf } from '../finding.ts'
import { read } from '../setting.ts'
import { helpAt, nameOf, type Site } from '../site.ts'
import { teamLength } from '../team.ts'
import { secondsNeeded, secondsThere } from '../words.ts'
import { doorWays, isTimed } from './doors.ts'
import type { PairCheck } from './pair-check.ts'

/** Walking speed through a door that a code allows for (ADA 407.3.4), metres a second. */
export const doorSpeed = 0.455
/** Added to the reaction before the team moves. */
export const setOff = 1.0

/**
 * Seconds the team needs to be through for the seconds during which the clear width stays. Held by a stop, by nothing
 * that closes, or shown three times to stay open: no limit. Held by a person, or a fire door found held open: help.
 */
export function doorTime(site: Site): PairCheck[] {
  const { setting, segment } = site
  return segment.features
    .filter((feature) => isTimed(feature))
    .flatMap((feature) => {
      const ways = doorWays(feature)
      if (ways.noLimit) return []
      const held = ways.person || ways.judgedShut
      const hold = held ? null : read(setting, feature, 'hold', 'low')
      if (!held && !hold) return []
      const help = helpAt(site, feature)
      const reckon = (leash: number, pace: number) => {
        const length = teamLength(setting.team, leash, site.slope.steepest) ?? Number.POSITIVE_INFINITY
        const demand = site.reaction + setOff + length / Math.min(pace, doorSpeed)
        if (!hold) return { raw: 'needs-help' as const, ratio: null, demand, capacity: null }
        const ratio = ratioOf({ low: demand, high: demand }, hold)
        return { raw: stateOf(ratio), ratio, demand, capacity: hold.low }
      }
      const whole = (leash: number, pace: number) => {
        const { raw, ratio, demand, capacity } = reckon(leash, pace)
        return finding({
          id: 'door-time',
          feature: feature.id,
          subject: `Time at ${nameOf(feature)}`,
          detail: () =>
            capacity === null
              ? 'somebody holds it until robot, leash and handler are through'
              : `${secondsNeeded(demand)} for ${secondsThere(capacity)} that it stays open`,
          harm: 'trap',
          source: 'ADA 407.3.4 walking speed; common practice',
          raw,
          demand,
          capacity,
          ratio,
          caution: raw === 'tight' ? 'The door closes soon. Go through without a pause.' : null,
          at: { leash, pace },
          from: [hold],
          strict: true,
          help,
        })
      }
      const check: PairCheck = {
        id: 'door-time',
        feature: feature.id,
        timed: true,
        cell: (leash, pace) => {
          const { state, ratio, told } = whole(leash, pace)
          return { state, ratio: () => ratio, told }
        },
        finding: whole,
      }
      return [check]
    })
}
