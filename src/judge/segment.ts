import { pinchesOf } from '../plan/pinches.ts'
import type { Metres, MetresPerSecond } from '../units/quantity.ts'
import { answered, conflicts, missingAspects } from './answered.ts'
import { cautioned, cautionsOf } from './cautions.ts'
import { allowed } from './checks/allowed.ts'
import { crossFall } from './checks/cross-fall.ts'
import { crowd } from './checks/crowd.ts'
import { doorForce } from './checks/door-force.ts'
import { doorRoom } from './checks/door-room.ts'
import { doorTime } from './checks/door-time.ts'
import { edge } from './checks/edge.ts'
import { gap } from './checks/gap.ts'
import { level } from './checks/level.ts'
import { liftFit } from './checks/lift-fit.ts'
import { liftTime } from './checks/lift-time.ts'
import { noise } from './checks/noise.ts'
import { overhead } from './checks/overhead.ts'
import type { PairCheck } from './checks/pair-check.ts'
import { protrusion } from './checks/protrusion.ts'
import { sensing } from './checks/sensing.ts'
import { slip } from './checks/slip.ts'
import { slope } from './checks/slope.ts'
import { stop } from './checks/stop.ts'
import { stopAtEdge } from './checks/stop-at-edge.ts'
import { stopItem } from './checks/stop-item.ts'
import { straightWidth } from './checks/straight-width.ts'
import { traction } from './checks/traction.ts'
import { isPinch, pinchSite, turns } from './checks/turn.ts'
import { closedWindow } from './closed-window.ts'
import { type Finding, toCheck } from './finding.ts'
import type { Gap } from './gap.ts'
import { helpMissing, helpState } from './help.ts'
import type { SegmentResult, Verdict } from './result.ts'
import type { RoomSolver } from './rooms.ts'
import { score } from './score.ts'
import { nameOf, type Site } from './site.ts'
import { stale } from './staleness.ts'
import { creeping, pacesOf } from './team.ts'
import { type Decided, decide, governing as governingOf } from './verdict.ts'
import { whysOf } from './why.ts'
import { type Choice, choose, type Grid, gridOf, leastBad } from './window.ts'

/** Checks that depend on neither leash nor pace. Those that need the planner come last. */
export function plainFindings(site: Site): Finding[] {
  return [
    ...stopItem(site),
    ...straightWidth(site),
    ...overhead(site),
    ...protrusion(site),
    ...level(site),
    ...slope(site),
    ...crossFall(site),
    ...traction(site),
    ...slip(site),
    ...gap(site),
    ...edge(site),
    ...doorForce(site),
    ...doorRoom(site),
    ...sensing(site),
    ...crowd(site),
    ...noise(site),
    ...allowed(site),
  ]
}

/** A segment under one judgement: what it found, before a length and pace are fixed. */
export interface Judged {
  site: Site
  plain: Finding[]
  pairs: PairCheck[]
  gaps: Gap[]
  cautioned: Set<string>
  grid: Grid
  /** The best that the checks without leash and pace leave: 0 usable, 1 with cautions, 2 with help. */
  floor: number
  choice: Choice | null
  /** No length and pace holds and each has a failing check. */
  closed: boolean
}

export function judgeSite(site: Site, rooms: RoomSolver): Judged {
  const plain = [...plainFindings(site), ...(site.led ? liftFit(site, rooms) : [])]
  const pairs = site.led ? pairChecks(site, rooms) : []
  const gaps = [...answered(site), ...lacking(site), ...conflicts(site), ...stale(site), ...ledHelp(site)]
  const rows = cautioned(site)
  const { team } = site.setting
  const lengths = team.lengths.filter(
    (one) => (site.around.crowd ?? 3) < 2 || one <= team.card.leash.longestInCrowd + 1e-9,
  )
  const grid = site.led ? gridOf(pairs, lengths, pacesOf(team, site.outdoors)) : { pairs: [] }
  const floor = floorOf(plain, rows)
  const choice = choose(grid, floor)
  return {
    site,
    plain,
    pairs,
    gaps,
    cautioned: rows,
    grid,
    floor,
    choice,
    closed: site.led && choice === null && grid.pairs.every((one) => one.failing > 0),
  }
}

/** Checks that depend on leash or pace, of a venue as it is or with one pinch made wider. */
function pairChecks(site: Site, rooms: RoomSolver, wider?: { feature: string; by: Metres }): PairCheck[] {
  return [stop(site), ...stopAtEdge(site), ...turns(site, rooms, wider), ...doorTime(site), ...liftTime(site)]
}

function floorOf(plain: readonly Finding[], rows: ReadonlySet<string>): number {
  if (plain.some((one) => one.state === 'helped')) return 2
  return rows.size > 0 || plain.some((one) => one.state === 'tight') ? 1 : 0
}

/** Pinches that lack a measure. What the catalogue already asks for is named there. */
function lacking(site: Site): Gap[] {
  if (!site.led) return []
  return pinchesOf(pinchSite(site)).flatMap((one) =>
    isPinch(one)
      ? []
      : [
          {
            kind: 'unanswered' as const,
            text: `${nameOf(one.feature)}: ${one.lacking} is not known.`,
            readings: [],
            harm: 'trap' as const,
            blocks: true,
          },
        ],
  )
}

/** A part that the robot does not lead needs whoever leads it, and how the robot gets across. */
function ledHelp({ led, segment }: Site): Gap[] {
  if (led || helpState(segment.help) === 'complete') return []
  const begun = helpState(segment.help) === 'begun'
  return [
    {
      kind: 'help',
      text: `${segment.name}: help ${begun ? `not complete: ${helpMissing(segment.help).join(', ')}` : 'not named'}.`,
      readings: [],
      harm: 'fall',
      blocks: true,
    },
  ]
}

/** A judged segment at one length and pace, decided. Null for both: as it stands without them. */
export interface At {
  findings: Finding[]
  gaps: Gap[]
  decided: Decided
  governing: Finding | null
}

export function decideAt(judged: Judged, at: { leash: Metres; pace: MetresPerSecond } | null): At {
  const { site, plain, pairs, cautioned: rows, closed } = judged
  const findings = [
    ...plain,
    ...(at ? pairs.flatMap((one) => [one.finding(at.leash, at.pace), ...(one.beside?.(at.leash, at.pace) ?? [])]) : []),
  ]
  const gaps = [...judged.gaps, ...whysOf(findings)]
  if (site.led && judged.choice === null && !closed && !gaps.some((one) => one.blocks)) gaps.push(noWindow(judged))
  const decided = decide({
    findings,
    gaps,
    ledOtherwise: !site.led,
    closed,
    cautioned: rows,
    creeping: at !== null && at.pace <= creeping + 1e-9,
  })
  return { findings, gaps, decided, governing: governingOf(decided) }
}

/** No length is on offer at all, or every pair leaves something not known. */
function noWindow({ site }: Judged): Gap {
  return {
    kind: 'too-close',
    text: `${site.segment.name}: no leash length and pace is known to hold.`,
    readings: [],
    harm: 'fall',
    blocks: true,
  }
}

/** The pair a segment is shown at by itself. */
export function ownPair({ choice, grid }: Judged): { leash: Metres; pace: MetresPerSecond } | null {
  if (choice) return { leash: choice.recommended, pace: choice.pace }
  const bad = leastBad(grid)
  return bad ? { leash: bad.leash, pace: bad.pace } : null
}

/** Everything of a segment but what only the walk knows: retakes, ladder, overrides. */
export function segmentResult(
  judged: Judged,
  at: { leash: Metres; pace: MetresPerSecond } | null,
  conditions: readonly string[],
  rooms: RoomSolver,
): SegmentResult {
  const { site, choice } = judged
  const { segment, led } = site
  const { findings, gaps, decided, governing } = decideAt(judged, at)
  const { verdict } = decided
  const missing = missingAspects(gaps)
  return {
    id: segment.id,
    name: segment.name,
    ledBy: segment.ledBy,
    verdict,
    score: score(verdict, findings, led),
    governing: governing?.id ?? null,
    sentence: sentenceOf(verdict, governing, gaps, segment.name),
    checks: findings.map(toCheck),
    why: gaps.map(({ blocks, ...why }) => why),
    window:
      led && choice === null && judged.grid.pairs.length > 0
        ? closedWindow(judged.grid, judged.pairs, (change) => pairChecks(site, rooms, change))
        : null,
    leash: choice ? { least: choice.least, greatest: choice.greatest, recommended: choice.recommended } : null,
    pace: choice ? (at?.pace ?? choice.pace) : null,
    pauses: findings.reduce((sum, one) => sum + one.pauses, 0),
    cautions: cautionsOf(site, findings),
    missing,
    conditions: [...conditions],
    retakes: [],
    ladder: [],
  }
}

function sentenceOf(verdict: Verdict, governing: Finding | null, gaps: readonly Gap[], name: string): string {
  if (governing) return `${governing.subject} governs: ${governing.detail()}.`
  const first = gaps.find((one) => one.blocks)
  if (verdict === 'not-known' && first) return first.text
  if (verdict === 'with-help') return `${name} is led by somebody else than the robot.`
  return `${name}: no check decides it.`
}
