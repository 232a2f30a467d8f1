import { finding, ratioOf, stateOf } from '../finding.ts'
import { read } from '../setting.ts'
import { helpAt, nameOf, type Site } from '../site.ts'
import { secondsNeeded, secondsThere } from '../words.ts'
import { doorSpeed, setOff } from './door-time.ts'
import type { PairCheck } from './pair-check.ts'

/**
 * A lift's door as a door, with the leash gathered. With help unless the handler's own way through lifts is shown: the
 * doors are held until robot, leash and handler are on one side.
 */
export function liftTime(site: Site): PairCheck[] {
  const { setting, segment } = site
  const { team } = setting
  const shown = team.card.handler.ownWayThroughLifts !== null
  return segment.features
    .filter((one) => one.kind === 'lift')
    .flatMap((feature) => {
      const hold = read(setting, feature, 'hold', 'low')
      if (shown && !hold) return []
      const help = helpAt(site, feature)
      const whole = (leash: number, pace: number) => {
        const demand = site.reaction + setOff + team.gathered / Math.min(pace, doorSpeed)
        const ratio = shown && hold ? ratioOf({ low: demand, high: demand }, hold) : null
        const raw = ratio ? stateOf(ratio) : 'needs-help'
        return finding({
          id: 'lift-time',
          feature: feature.id,
          subject: `Time at ${nameOf(feature)}`,
          detail: () =>
            ratio && hold
              ? `${secondsNeeded(demand)} for ${secondsThere(hold.low)} that its door stays open`
              : 'somebody holds the doors until robot, leash and handler are on one side',
          harm: 'trap',
          source: 'ADA 407.3.4 walking speed; common practice',
          raw,
          demand,
          capacity: hold?.low ?? null,
          ratio,
          caution: raw === 'tight' ? 'The lift door closes soon. Go in without a pause.' : null,
          at: { leash, pace },
          from: [hold],
          strict: true,
          help,
        })
      }
      const check: PairCheck = {
        id: 'lift-time',
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
