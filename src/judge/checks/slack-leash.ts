import type { Metres } from '../../units/quantity.ts'
import { type Finding, finding } from '../finding.ts'
import type { Site } from '../site.ts'
import type { Team } from '../team.ts'
import { mmNeeded, mmThere } from '../words.ts'

/** The low point of a slack leash: under the first a caution, under the second the handler must gather it. */
const caution: Metres = 0.35
const floor: Metres = 0.1

/**
 * Height of the low point of a leash of length L hung between hand and attachment at level distance D:
 * (z_h + z_a - sqrt(L^2 - D^2)) / 2, metres; below nothing it lies on the floor. Common practice.
 */
export function lowPoint(length: Metres, distance: Metres, hand: Metres, attachment: Metres): Metres {
  return (hand + attachment - Math.sqrt(Math.max(0, length * length - distance * distance))) / 2
}

/**
 * A planned pause lets the leash hang. Under 0.10 m the pause counts only where the handler gathers the leash (see
 * `pauseCounts`). Never fails: without the pause the turn is judged taut.
 * @param nearest least distance from handler to attachment during the pause.
 */
export function slackLeash({ setting }: Site, feature: string, nearest: Metres, leash: Metres, pace: number): Finding {
  const low = slackLow(setting.team, leash, nearest)
  const { gathersLeash } = setting.team.card.handler
  return finding({
    id: 'slack-leash',
    feature,
    subject: 'The slack leash',
    detail: () =>
      `hangs to ${mmThere(low)} for ${mmNeeded(floor)}${low < floor && gathersLeash ? ', and you gather it' : ''}`,
    harm: 'fall',
    source: 'common practice',
    raw: low < caution ? 'tight' : 'passes',
    demand: floor,
    capacity: low,
    caution: low < caution ? 'The leash may be on the floor. Do not step forward.' : null,
    at: { leash, pace },
  })
}

/** Whether a pause counts: the leash stays off the floor, or the handler gathers it. */
export function pauseCounts(team: Team, leash: Metres, nearest: Metres): boolean {
  return slackLow(team, leash, nearest) >= floor - 1e-9 || team.card.handler.gathersLeash === true
}

function slackLow({ card: { handler, robot } }: Team, leash: Metres, nearest: Metres): Metres {
  return lowPoint(leash, Math.max(0, nearest - handler.handAhead), handler.handHeight, robot.attachHeight)
}
