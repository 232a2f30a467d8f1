import type { Walk } from '../record/survey.ts'
import { differs, unsettled } from './answered.ts'
import { battery } from './checks/battery.ts'
import { emergency } from './checks/emergency.ts'
import { decideAt } from './decide-at.ts'
import { dryFloorOnly, judgeSegment, type Standing } from './double.ts'
import { type Finding, finding, toCheck } from './finding.ts'
import type { Gap } from './gap.ts'
import { ladderCell } from './ladder.ts'
import { lengthsOf, type Stretch } from './one-length.ts'
import { overridden } from './overrides.ts'
import { harms, type JudgeProgress, type SegmentResult, type WalkResult } from './result.ts'
import { retakesOf } from './retakes.ts'
import type { RoomSolver } from './rooms.ts'
import { type AtPair, type Judged, ownPair, restrict } from './segment.ts'
import { segmentResult } from './segment-result.ts'
import type { Hours, Setting } from './setting.ts'
import { governing } from './verdict.ts'
import { whysOf } from './why.ts'
import { holds, pairOf } from './window.ts'
import { verdictRank, worstVerdict } from './worst.ts'

/** Judges one walk, segment by segment; the judging of each is announced before it is done. */
export function* judgeWalk(
  setting: Setting,
  walk: Walk,
  rooms: RoomSolver,
  progress: { done: number; total: number },
): Generator<JudgeProgress, WalkResult> {
  const standings: Standing[] = []
  for (const [index, segment] of walk.segments.entries()) {
    yield { ...progress, doing: `${walk.name}: ${segment.name}` }
    standings.push(judgeSegment(setting, walk, index, rooms))
    progress.done++
  }
  const { team } = setting
  const judged = standings.map((one) => one.judged)
  const stretches = lengthsOf(judged, team.lengths, team.card.leash.changeable)
  const paces = judged.flatMap((one, index) => {
    const leash = leashAt(stretches, index)
    const pace = leash === null ? null : (restrict(one, leash).choice?.pace ?? null)
    return pace === null ? [] : [pace]
  })
  const pace = paces.length > 0 ? Math.min(...paces) : null

  const segments: SegmentResult[] = []
  for (const [index, standing] of standings.entries()) {
    yield { ...progress, doing: `${walk.name}: readings of ${walk.segments[index]?.name}` }
    const leash = leashAt(stretches, index)
    const shown = shownAt(standing.judged, leash, pace, team.card.leash.changeable)
    const conditions = [...hoursOf(standing.judged), ...(standing.dryOnly ? [dryFloorOnly] : [])]
    const result = {
      ...segmentResult(shown.judged, shown.at, [...conditions, ...shown.says], rooms),
      ladder: team.lengths.map((one) => ladderCell(standing.judged, one)),
      retakes: retakesOf(setting, walk, index, standing, rooms),
    }
    segments.push(overridden(result, walk.overrides ?? [], setting, standing.judged.site.segment))
    progress.done++
  }
  return walkResult(setting, walk, segments, judged, stretches, pace)
}

function leashAt(stretches: readonly Stretch[] | null, index: number): number | null {
  return stretches?.findLast((one) => one.from <= index)?.leash ?? null
}

/** At the walk's length and pace where the segment holds there, else at its own, and it says so. */
function shownAt(
  judged: Judged,
  leash: number | null,
  pace: number | null,
  changeable: boolean,
): { judged: Judged; at: AtPair; says: string[] } {
  const own = ownPair(judged)
  if (!judged.site.led) return { judged, at: null, says: [] }
  if (leash === null || pace === null) return { judged, at: own, says: [] }
  const offered = judged.grid.pairs.some((one) => one.leash === leash)
  if (offered && holds(pairOf(judged.pairs, leash, pace))) return { judged, at: { leash, pace }, says: [] }
  // A leash that cannot be changed is the walk's on every part, also where it is not on offer.
  if (!changeable && judged.choice !== null) {
    const alone = restrict(judged, leash)
    return { judged: alone, at: ownPair(alone), says: [] }
  }
  if (!own) return { judged, at: null, says: [] }
  return { judged, at: own, says: [`shown at its own ${own.leash.toFixed(1)} m and ${own.pace.toFixed(2)} m/s`] }
}

function hoursOf({ site }: Judged): string[] {
  const words = ({ from, to }: Hours) => (from === to ? `at ${from}` : `${from} to ${to}`)
  return [...new Set(site.around.hours.map(words))]
}

function walkResult(
  setting: Setting,
  walk: Walk,
  segments: SegmentResult[],
  judged: readonly Judged[],
  stretches: Stretch[] | null,
  pace: number | null,
): WalkResult {
  const pauses = segments.reduce((sum, one) => sum + one.pauses, 0)
  const out = emergency(walk)
  const own: Finding[] = [battery(setting, walk, pace, pauses), ...(out ? [out] : [])]
  const gaps: Gap[] = [
    ...(out ? [] : [unanswered(walk, 'a way out that needs neither robot nor lift')]),
    ...whysOf(own),
    ...open(setting, walk),
  ]
  if (segments.length === 0) gaps.push(unanswered(walk, 'its parts'))
  const ownVerdict = own.some((one) => one.state === 'fails')
    ? 'do-not-use'
    : gaps.some((one) => one.blocks)
      ? 'not-known'
      : own.some((one) => one.state === 'helped')
        ? 'with-help'
        : own.some((one) => one.state === 'tight')
          ? 'with-cautions'
          : 'usable'
  const verdict = worstVerdict([ownVerdict, ...segments.map((one) => one.verdict)])
  const { governs, score } = worstOf(verdict, ownVerdict, own, segments, judged)
  return {
    id: walk.id,
    name: walk.name,
    verdict,
    score,
    governing: governs,
    leash: verdictRank(verdict) >= verdictRank('not-known') ? null : (stretches?.[0]?.leash ?? null),
    pace: verdictRank(verdict) >= verdictRank('not-known') ? null : pace,
    pauses,
    cautions: segments.flatMap((one) => one.cautions).sort((a, b) => harms.indexOf(a.harm) - harms.indexOf(b.harm)),
    changes: (stretches ?? []).slice(1).map(({ from, leash }) => ({ segment: segments[from]?.id ?? '', leash })),
    checks: [...own.map(toCheck), ...allowedOn(walk, judged).map(toCheck)],
    missing: [...segments.flatMap((one) => one.missing.map((aspect) => `${one.name}: ${aspect}`)), ...unsaid(walk)],
    why: [...gaps.map(({ blocks, ...why }) => why), ...segments.flatMap((one) => one.why)],
    conditions: [...new Set(segments.flatMap((one) => one.conditions))],
    segments,
    ladder: {
      lengths: [...setting.team.lengths],
      best: stretches?.length === 1 ? (stretches[0]?.leash ?? null) : null,
    },
  }
}

/** The finding that governs the walk, of its worst segments and its own checks, and the score of that segment. */
function worstOf(
  verdict: WalkResult['verdict'],
  ownVerdict: WalkResult['verdict'],
  own: readonly Finding[],
  segments: readonly SegmentResult[],
  judged: readonly Judged[],
): { governs: string | null; score: number | null } {
  const pool: Finding[] = []
  const holder = new Map<Finding, SegmentResult>()
  for (const [index, segment] of segments.entries()) {
    const one = judged[index]
    if (segment.verdict !== verdict || !one) continue
    const { deciding } = decideAt(one, pairShown(segment, one)).decided
    for (const found of deciding) {
      pool.push(found)
      holder.set(found, segment)
    }
  }
  if (ownVerdict === verdict) pool.push(...own.filter((one) => decidesOwn(one, verdict)))
  const governs = governing({ verdict, deciding: pool })
  const worst = segments.filter((one) => one.verdict === verdict)
  const at = (governs && holder.get(governs)) ?? worst[0]
  return { governs: governs?.id ?? null, score: scoreOf(verdict, at, segments) }
}

/** The pair a result was made at, read from its checks. */
function pairShown(segment: SegmentResult, judged: Judged): AtPair {
  return segment.checks.find((one) => one.at !== null)?.at ?? ownPair(judged)
}

function decidesOwn(one: Finding, verdict: WalkResult['verdict']): boolean {
  const states = {
    'do-not-use': ['fails'],
    'not-known': ['unsure', 'needs-help'],
    'with-help': ['helped'],
    'with-cautions': ['tight'],
  }
  return verdict === 'usable' || states[verdict].includes(one.state)
}

function scoreOf(
  verdict: WalkResult['verdict'],
  at: SegmentResult | undefined,
  segments: readonly SegmentResult[],
): number | null {
  if (verdict === 'do-not-use') return 0
  if (verdict === 'not-known') return null
  if (at) return at.score
  // Only the walk's own check decides: room is left at the worst of its segments.
  const scores = segments.flatMap((one) => (one.score === null ? [] : [one.score]))
  return scores.length > 0 ? Math.min(...scores) : null
}

/** Robot allowed, over the zones of the walk. Its segments carry it in their verdicts. */
function allowedOn(walk: Walk, judged: readonly Judged[]): Finding[] {
  const all = judged.flatMap((one) => one.plain.filter((found) => found.id === 'allowed'))
  if (all.length === 0) return []
  const worst = all.find((one) => one.state === 'fails') ?? all.find((one) => one.state === 'unsure') ?? all[0]
  return worst
    ? [
        finding({
          id: 'allowed',
          feature: walk.id,
          subject: worst.subject,
          detail: worst.detail,
          harm: 'comfort',
          source: worst.source,
          raw: worst.state as 'passes',
        }),
      ]
    : []
}

/** Versions of the walk's own answers that nobody has settled. Where it starts and heads moves nothing. */
function open(setting: Setting, walk: Walk): Gap[] {
  const versions = unsettled(setting, (one) => one.entity === walk.id && ['alarm', 'in', 'gone'].includes(one.field))
  const rivals = walk.words.wayOut && differs(walk.words.wayOut) ? ['the way out'] : []
  return [...versions.map((one) => one.field), ...rivals].map((what) => ({
    kind: 'differs',
    text: `${walk.name}: two versions of ${what}.`,
    readings: [],
    harm: 'trap',
    blocks: true,
  }))
}

function unanswered(walk: Walk, what: string): Gap {
  return {
    kind: 'unanswered',
    text: `${walk.name}: nobody answered ${what}.`,
    readings: [],
    harm: 'trap',
    blocks: true,
  }
}

/** What a walk should say and does not. It blocks nothing but the sheet. */
function unsaid(walk: Walk): string[] {
  const items: [string, string][] = [
    ['wayOut', 'way out'],
    ['helpCall', 'help call'],
    ['rest', 'rest places'],
  ]
  return [
    ...items.filter(([item]) => !walk.words[item]).map(([, name]) => `${walk.name}: ${name}`),
    ...(walk.alarm?.role ? [] : [`${walk.name}: alarm role`]),
  ]
}
