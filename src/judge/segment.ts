import type { Pinch } from '../plan/pinch.ts'
import { pinchesOf } from '../plan/pinches.ts'
import type { Metres, MetresPerSecond } from '../units/quantity.ts'
import { answered, conflicts } from './answered.ts'
import { cautioned } from './cautions.ts'
import { doorTime } from './checks/door-time.ts'
import { liftFit } from './checks/lift-fit.ts'
import { liftTime } from './checks/lift-time.ts'
import type { PairCheck } from './checks/pair-check.ts'
import { stop } from './checks/stop.ts'
import { stopAtEdge } from './checks/stop-at-edge.ts'
import { isPinch, pinchSite, turns, type Variant } from './checks/turn.ts'
import type { Finding } from './finding.ts'
import type { Gap } from './gap.ts'
import { helpMissing, helpState } from './help.ts'
import { plainFindings } from './plain-checks.ts'
import type { Verdict } from './result.ts'
import type { RoomSolver } from './rooms.ts'
import { nameOf, type Site } from './site.ts'
import { stale } from './staleness.ts'
import { pacesOf } from './team.ts'
import { whysOf } from './why.ts'
import { type Choice, choose, type Grid, gridOf, leastBad, noGrid, type Pair } from './window.ts'

/** A segment under one judgement: what it found, before a length and pace are fixed. */
export interface Judged {
  site: Site
  plain: Finding[]
  pairs: PairCheck[]
  /** Reasons that depend on no length and pace. */
  gaps: Gap[]
  cautioned: Set<string>
  grid: Grid
  /** The one length on offer, where only one is. */
  only?: Metres
  /** The best that the checks without leash and pace leave. */
  floor: Verdict
  choice: Choice | null
  /** The same with one length alone on offer, as asked for. */
  alone: Map<Metres, Judged>
}

/** @param nominal the same segment's checks before one of its readings was narrowed. */
export function judgeSite(site: Site, rooms: RoomSolver, nominal?: readonly PairCheck[]): Judged {
  const plain = [...plainFindings(site), ...(site.led ? liftFit(site, rooms) : [])]
  const pinches = site.led ? pinchesOf(pinchSite(site)) : []
  const gaps = [
    ...answered(site),
    ...pinches.flatMap((one) => (isPinch(one) ? [] : [lacks(nameOf(one.feature), one.lacking)])),
    ...conflicts(site),
    ...stale(site),
    ...ledHelp(site),
    ...whysOf(plain),
  ]
  const rows = cautioned(site)
  const pairs = site.led ? pairChecks(site, pinches.filter(isPinch), rooms, nominal ? { nominal } : {}) : []
  const grid = site.led ? gridFor(site, pairs, rooms) : noGrid
  const floor = floorOf(site, plain, gaps, rows)
  return {
    site,
    plain,
    pairs,
    gaps,
    cautioned: rows,
    grid,
    floor,
    choice: choose(grid, stepOf(floor)),
    alone: new Map(),
  }
}

/** Checks that depend on leash or pace, of a venue as it is or with one pinch made wider. */
export function pairChecks(
  site: Site,
  pinches: readonly Pinch[],
  rooms: RoomSolver,
  variant: Variant = {},
): PairCheck[] {
  return [
    stop(site, rooms.stops),
    ...stopAtEdge(site),
    ...turns(site, pinches, rooms, variant),
    ...doorTime(site),
    ...liftTime(site),
  ]
}

/** Lengths on offer here: in a crowd of band 2 or more none above the card's. */
export function lengthsHere({ setting, around }: Site): Metres[] {
  const { lengths, card } = setting.team
  return (around.crowd ?? 3) < 2 ? lengths : lengths.filter((one) => one <= card.leash.longestInCrowd + 1e-9)
}

function gridFor(site: Site, pairs: readonly PairCheck[], rooms: RoomSolver): Grid {
  const make = () => gridOf(pairs, lengthsHere(site), pacesOf(site.setting.team, site.outdoors))
  if (pairs.length > 1) return make()
  const { slope, reaction, outdoors, around } = site
  const key = `${reaction} ${slope.down} ${slope.steepest} ${outdoors} ${(around.crowd ?? 3) < 2}`
  const before = rooms.grids.get(key)
  if (before) return before
  const grid = make()
  rooms.grids.set(key, grid)
  return grid
}

/** The verdict of a segment by all that depends on neither length nor pace. */
function floorOf({ led }: Site, plain: readonly Finding[], gaps: readonly Gap[], rows: ReadonlySet<string>): Verdict {
  if (plain.some((one) => one.state === 'fails' || one.state === 'stop-item')) return 'do-not-use'
  if (gaps.some((one) => one.blocks)) return 'not-known'
  if (!led || plain.some((one) => one.state === 'helped')) return 'with-help'
  return rows.size > 0 || plain.some((one) => one.state === 'tight') ? 'with-cautions' : 'usable'
}

/** As a window counts: 0 usable, 1 with cautions, 2 with help. Where a part is not known or not used, its window is its pairs' own. */
export function stepOf(floor: Verdict): number {
  return floor === 'with-help' ? 2 : floor === 'with-cautions' ? 1 : 0
}

/** No length and pace holds, and each has a failing check. */
export function isClosed({ site, choice, grid, only }: Judged): boolean {
  if (!site.led || choice !== null) return false
  return grid.pairs.every((one) => one.failing > 0 || (only !== undefined && one.leash !== only))
}

/** The verdict at a pair, without its reasons: the same as of `decideAt`, at a glance. */
export function verdictAt(judged: Judged, pair: Pair | null): Verdict {
  const { site, floor } = judged
  if (floor === 'do-not-use' || isClosed(judged)) return 'do-not-use'
  if (floor === 'not-known') return pair?.rank === 4 ? 'do-not-use' : 'not-known'
  if (!site.led) return floor
  if (pair === null) return 'not-known'
  if (pair.rank >= 3) return pair.rank === 4 ? 'do-not-use' : 'not-known'
  const step = Math.max(stepOf(floor), pair.rank)
  return step === 2 ? 'with-help' : step === 1 ? 'with-cautions' : 'usable'
}

/** The pair a segment is shown at by itself. */
export function ownPair({ choice, grid, only }: Judged): Pair | null {
  const offered = only === undefined ? grid.pairs : grid.pairs.filter((one) => one.leash === only)
  if (!choice) return leastBad(offered)
  return offered.find((one) => one.leash === choice.recommended && one.pace === choice.pace) ?? null
}

/** A judged segment as if one length alone were on offer. */
export function restrict(judged: Judged, leash: Metres): Judged {
  const before = judged.alone.get(leash)
  if (before) return before
  const alone = { ...judged, only: leash, choice: choose(judged.grid, stepOf(judged.floor), leash) }
  judged.alone.set(leash, alone)
  return alone
}

/** Where a pair is asked for by its length and pace alone. */
export type AtPair = { leash: Metres; pace: MetresPerSecond } | null

function lacks(name: string, lacking: string): Gap {
  return { kind: 'unanswered', text: `${name}: ${lacking} is not known.`, readings: [], harm: 'trap', blocks: true }
}

/** A part that the robot does not lead needs whoever leads it, and how the robot gets across. */
function ledHelp({ led, segment }: Site): Gap[] {
  if (led || helpState(segment.help) === 'complete') return []
  const begun = helpState(segment.help) === 'begun'
  const what = begun ? `not complete: ${helpMissing(segment.help).join(', ')}` : 'not named'
  return [{ kind: 'help', text: `${segment.name}: help ${what}.`, readings: [], harm: 'fall', blocks: true }]
}
