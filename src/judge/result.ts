import type { Aspect } from '../record/answers.ts'
import type { LedBy } from '../record/survey.ts'

/** What an assessment is made of. SI units; `ratio` null where a check has none, an end null where there is no capacity. */

export const verdicts = ['usable', 'with-cautions', 'with-help', 'do-not-use', 'not-known'] as const
export type Verdict = (typeof verdicts)[number]

/** What harm a caution, a gap or a retake is about, worst first. */
export const harms = ['fall', 'head', 'trap', 'road', 'comfort'] as const
export type Harm = (typeof harms)[number]

export type CheckState = 'passes' | 'tight' | 'unsure' | 'fails' | 'helped' | 'needs-help' | 'stop-item'

export interface Check {
  /** A check id of the list, for example `straight-width`. */
  id: string
  /** The feature's id, or the segment's or walk's where it has none. */
  feature: string
  state: CheckState
  caution: string | null
  demand: number | null
  capacity: number | null
  ratio: [low: number | null, high: number | null] | null
  /** The ratio of the way back, where the check has a direction: shown, and judged only on a walk of its own. */
  back?: [low: number | null, high: number | null]
  /** Leash and pace it was judged at, where it depends on them. */
  at: { leash: number; pace: number } | null
  /** Clause, or "common practice". */
  source: string
  readings: string[]
  /** One plain sentence: "Width at the lockers governs: 820 mm for 913 mm with clearance." */
  sentence: string
  harm: Harm
}

export type WhyKind =
  | 'unanswered'
  | 'told'
  | 'differs'
  | 'too-close'
  | 'help'
  | 'hours'
  | 'stale'
  | 'not-asked'
  | 'card'

export interface Why {
  kind: WhyKind
  text: string
  readings: string[]
  harm?: Harm
  aspect?: Aspect
}

export interface Caution {
  feature: string
  harm: Harm
  text: string
}

export interface LeashWindow {
  least: number
  greatest: number
  recommended: number
}

export interface ClosedWindow {
  closedBy: [string, string]
  opens: { change: string; amount: number; unit: string } | null
}

export interface Retake {
  reading: string
  why: string
  instrument: string
  harm?: Harm
}

export interface SegmentResult {
  id: string
  name: string
  ledBy: LedBy
  verdict: Verdict
  score: number | null
  /** Id of the governing check, or null where there is none. */
  governing: string | null
  sentence: string
  checks: Check[]
  why: Why[]
  window: ClosedWindow | null
  leash: LeashWindow | null
  pace: number | null
  pauses: number
  cautions: Caution[]
  missing: Aspect[]
  conditions: string[]
  retakes: Retake[]
  /** Cells along `ladder.lengths` of the walk. */
  ladder: LadderCell[]
  /** Set where a named practitioner has spoken; `machine` is the verdict without it. */
  override?: { verdict: Verdict; machine: Verdict; reason: string; name: string; role: string; until: string }
}

/** One length on one segment: the best verdict it allows and the worst check at it. */
export interface LadderCell {
  leash: number
  verdict: Verdict
  /** Least room left, 1 - r_high of the worst check; null where it has no ratio. */
  room: number | null
  check: string | null
  pace: number | null
}

export interface WalkResult {
  id: string
  name: string
  verdict: Verdict
  score: number | null
  governing: string | null
  leash: number | null
  pace: number | null
  pauses: number
  cautions: Caution[]
  /** Places where the leash length is changed, when no one length serves the walk. */
  changes: { segment: string; leash: number }[]
  checks: Check[]
  missing: string[]
  why: Why[]
  conditions: string[]
  segments: SegmentResult[]
  ladder: { lengths: number[]; best: number | null }
}

export interface Assessment {
  venue: string
  team: { name: string; version: string }
  code: string
  /** Standing texts: what every result says. */
  cautions: string[]
  /** The day and hours judged for. */
  on: string
  walks: WalkResult[]
}

/** Progress of a long judgement. */
export interface JudgeProgress {
  done: number
  total: number
  doing: string
}
