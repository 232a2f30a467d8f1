import type { Assessment, Check, SegmentResult, WalkResult, Why } from '../judge/result.ts'

/** An assessment as the terminal prints it: its fields are a promise to whoever reads them, so each is named here. */
export function assessmentShape({ venue, team, code, cautions, on, walks }: Assessment) {
  return { venue, team, code, on, cautions, walks: walks.map(walkShape) }
}

function walkShape(walk: WalkResult) {
  return {
    id: walk.id,
    name: walk.name,
    verdict: walk.verdict,
    score: walk.score,
    governing: walk.governing,
    leash: walk.leash,
    pace: walk.pace,
    pauses: walk.pauses,
    cautions: walk.cautions,
    changes: walk.changes,
    checks: walk.checks.map(checkShape),
    why: walk.why.map(whyShape),
    missing: walk.missing,
    conditions: walk.conditions,
    ladder: walk.ladder,
    segments: walk.segments.map(segmentShape),
  }
}

function segmentShape(segment: SegmentResult) {
  return {
    id: segment.id,
    name: segment.name,
    ledBy: segment.ledBy,
    verdict: segment.verdict,
    score: segment.score,
    governing: segment.governing,
    sentence: segment.sentence,
    checks: segment.checks.map(checkShape),
    why: segment.why.map(whyShape),
    window: segment.window,
    leash: segment.leash,
    pace: segment.pace,
    pauses: segment.pauses,
    cautions: segment.cautions,
    missing: segment.missing,
    conditions: segment.conditions,
    retakes: segment.retakes.map(({ reading, why, instrument }) => ({ reading, why, instrument })),
    ladder: segment.ladder,
    ...(segment.override ? { override: segment.override } : {}),
  }
}

function checkShape({ id, feature, state, caution, demand, capacity, ratio, at, source, readings }: Check) {
  return { id, feature, state, caution, demand, capacity, ratio, at, source, readings }
}

function whyShape({ kind, text, readings }: Why) {
  return { kind, text, readings }
}
