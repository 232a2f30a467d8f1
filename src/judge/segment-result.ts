import type { Pinch } from '../plan/pinch.ts'
import { pinchesOf } from '../plan/pinches.ts'
import { missingAspects } from './answered.ts'
import { cautionsOf } from './cautions.ts'
import { isPinch, pinchSite } from './checks/turn.ts'
import { closedWindow } from './closed-window.ts'
import { decideAt } from './decide-at.ts'
import { type Finding, toCheck } from './finding.ts'
import type { Gap } from './gap.ts'
import type { Check, SegmentResult, Verdict } from './result.ts'
import type { RoomSolver } from './rooms.ts'
import { score } from './score.ts'
import { type AtPair, type Judged, pairChecks } from './segment.ts'

/** Everything of a segment but what only the walk knows: retakes, ladder, overrides. */
export function segmentResult(
  judged: Judged,
  at: AtPair,
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
    checks: findings.map((one) => withBack(judged, one, at)),
    why: gaps.map(({ blocks, ...why }) => why),
    window:
      led && choice === null
        ? closedWindow(judged, (change) => pairChecks(site, pinchesHere(judged), rooms, { wider: change }))
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

/** A pinch also says what the way back would have at the length shown. */
function withBack({ pairs }: Judged, one: Finding, at: AtPair): Check {
  const check = toCheck(one)
  const back = at && pairs.find((pair) => pair.id === one.id && pair.feature === one.feature)?.back?.(at.leash)
  return back ? { ...check, back } : check
}

function pinchesHere({ site }: Judged): Pinch[] {
  return pinchesOf(pinchSite(site)).filter(isPinch)
}
