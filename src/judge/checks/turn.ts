import { kind } from '../../catalogue/kinds.ts'
import type { Lacking, Pinch, PinchSite } from '../../plan/pinch.ts'
import type { Feature } from '../../record/survey.ts'
import { epsilon, type Finding, finding, ratioOf, roomState } from '../finding.ts'
import type { Room, RoomSolver, Rooms } from '../rooms.ts'
import { read } from '../setting.ts'
import { nameOf, type Site } from '../site.ts'
import { greatestSeparation, leastSeparation } from '../team.ts'
import { mmNeeded, mmThere } from '../words.ts'
import { isEdge } from './edge.ts'
import type { PairCheck } from './pair-check.ts'
import { pauseCounts, slackLeash } from './slack-leash.ts'

/** Above the clearance needed in a frame or turn a room check is a caution to this much more, metres a side. */
export const frameBand = 0.05
/** No pause so near a stair, an edge or a lift. */
const apartFromHarm = 2.0

export function pinchSite({ setting, segment, before, after }: Site): PinchSite {
  return {
    segment,
    before,
    after,
    read: (holder, quantity, unsafe) => read(setting, holder, quantity, unsafe),
    team: { a: setting.team.bodies.a, d: setting.team.bodies.d },
  }
}

export function isPinch(one: Pinch | Lacking): one is Pinch {
  return 'build' in one
}

/**
 * Turns, frames, pinches and obstructions: the room that the planner certifies, and the most there can be, at both ends
 * of every reading and over the separations of the length. The walk's own direction governs; the way back is shown
 * beside it. A slack pause counts only where
 * the handler is shown to stand, and never on a ramp, near a stair, edge or lift, or in a two-way crowd.
 */
export function turns(
  site: Site,
  pinches: readonly Pinch[],
  rooms: RoomSolver,
  { wider, nominal }: Variant = {},
): PairCheck[] {
  return pinches.map((pinch) =>
    pairOf(
      site,
      wider && pinch.feature.id === wider.feature ? widened(pinch, wider.by) : pinch,
      rooms,
      nominal?.find((one) => one.id === 'turn' && one.feature === pinch.feature.id),
    ),
  )
}

/** How the judgement of a pinch departs from the plain one. */
export interface Variant {
  /** One pinch made wider. */
  wider?: { feature: string; by: number }
  /**
   * The checks with every reading at its full uncertainty, where this one narrows one of them: what passed there passes
   * here, since its certified room can only grow.
   */
  nominal?: readonly PairCheck[]
}

/** The same pinch with every width that much wider. */
function widened(pinch: Pinch, by: number): Pinch {
  const widths = Object.entries(pinch.widths).map(([letter, { low, value, high }]) => [
    letter,
    { low: low + by, value: value + by, high: high + by },
  ])
  return { ...pinch, widths: Object.fromEntries(widths) }
}

function pairOf(site: Site, pinch: Pinch, rooms: RoomSolver, nominal: PairCheck | undefined): PairCheck {
  const { setting } = site
  const { team } = setting
  const need = team.card.leash.clearancePinch
  const pausing = mayPause(site, pinch)
  const known = new Map<string, Solved>()
  const solve = (leash: number, back = false): Solved => {
    const key = `${leash} ${back}`
    const before = known.get(key)
    if (before) return before
    const separations = [
      leastSeparation(team, leash, site.slope.steepest),
      greatestSeparation(team, leash, site.slope.steepest),
    ]
    const within = separations.filter((one): one is number => one !== null)
    const solved = solvedOf(rooms.room(pinch, within, { slack: pausing, need, band: frameBand, back }), leash)
    known.set(key, solved)
    return solved
  }
  const solvedOf = ({ taut, slack }: Rooms, leash: number): Solved => {
    const state = roomState(taut, need, frameBand)
    const counts = pausing && (state === 'fails' || state === 'unsure')
    if (!counts || !pauseCounts(team, leash, slack.nearest ?? 0)) return { room: taut, state, pauses: 0 }
    const paused = roomState(slack, need, frameBand)
    // A pause is a caution however wide the room.
    if (paused === 'passes' || paused === 'tight')
      return { room: slack, state: 'tight', pauses: Math.max(1, slack.pauses) }
    return paused === 'unsure'
      ? { room: { ...taut, high: slack.high }, state: 'unsure', pauses: 0 }
      : { room: taut, state, pauses: 0 }
  }
  const demand = team.envelope + 2 * need
  const side = (end: number | null) => (end === null ? 0 : team.envelope + 2 * end)
  const ratio = ({ low, high }: Room) => ratioOf({ low: demand, high: demand }, { low: side(low), high: side(high) })
  const subject = subjectOf(site, pinch)
  const whole = (leash: number, pace: number): Finding => {
    const { room, state, pauses } = solve(leash)
    return finding({
      id: 'turn',
      feature: pinch.feature.id,
      subject,
      detail: () =>
        `${room.low === null ? 'no room certified' : `${mmThere(room.low)} a side`} for ${mmNeeded(need)}${pauses > 0 ? ' with a slack pause' : ''}`,
      harm: 'trap',
      source: 'common practice',
      raw: state,
      demand,
      capacity: room.low === null ? null : side(room.low),
      ratio: ratio(room),
      caution:
        pauses > 0
          ? 'The leash goes slack. Stand still until it pulls.'
          : state === 'passes'
            ? null
            : 'Tight place. Arms in.',
      at: { leash, pace },
      from: pinch.from,
      strict: true,
      pauses,
    })
  }
  const cells = new Map<number, ReturnType<PairCheck['cell']>>()
  return {
    id: 'turn',
    feature: pinch.feature.id,
    timed: false,
    cell: (leash) => {
      const before = cells.get(leash)
      if (before) return before
      const passed = nominal?.cell(leash, 0)
      if (passed?.state === 'passes') return { ...passed, ratio: () => whole(leash, 0).ratio }
      const { state, ratio: end, told } = whole(leash, 0)
      const cell = { state, ratio: () => end, told }
      cells.set(leash, cell)
      return cell
    },
    finding: whole,
    back: (leash) => ratio(solve(leash, true).room),
    beside: (leash, pace) => {
      const { pauses, room } = solve(leash)
      return pauses > 0 ? [slackLeash(site, pinch.feature.id, room.nearest ?? 0, leash, pace)] : []
    },
  }
}

interface Solved {
  room: Room
  state: ReturnType<typeof roomState>
  pauses: number
}

function subjectOf({ segment }: Site, { feature }: Pinch): string {
  return feature === segment.turn && !feature.name ? `Turn at the end of ${segment.name}` : `Room at ${nameOf(feature)}`
}

/** Whether a planned slack pause may be counted at this pinch; what stands on the parts before and after counts too. */
function mayPause({ setting, segment, before, after, around, length }: Site, { feature }: Pinch): boolean {
  if (setting.team.card.handler.standsWhenSlack === null) return false
  if ((around.crowd ?? 3) >= 2 && around.twoWay) return false
  if (feature.kind === 'lift' || segment.features.some((one) => one.kind === 'ramp')) return false
  const end = length?.low
  const at = feature === segment.turn ? end : feature.along
  const gone = before ? read(setting, before, 'length', 'low')?.high : 0
  const parts = [
    { features: segment.features, start: 0, apart: 0 },
    { features: before?.features ?? [], start: gone === undefined ? undefined : -gone, apart: at },
    {
      features: after?.features ?? [],
      start: end,
      apart: at === undefined || end === undefined ? undefined : end - at,
    },
  ]
  return !parts.some(({ features, start, apart }) =>
    features.some((one) => {
      if (one === feature || !isHarm(one)) return false
      // Where a thing stands is not known, it is near; an edge or a ramp runs beside its whole part.
      const along = isEdge(one) || one.kind === 'ramp' ? undefined : one.along
      const off =
        along === undefined || start === undefined || at === undefined ? (apart ?? 0) : Math.abs(start + along - at)
      return off < apartFromHarm - epsilon
    }),
  )
}

/** Stairs and whatever else one falls at, edges, lifts, stop items. */
function isHarm(one: Feature): boolean {
  return isEdge(one) || one.kind === 'lift' || kind(one.kind)?.harm === 'fall' || kind(one.kind)?.stopItem === true
}
