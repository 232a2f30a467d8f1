import type { Assessment, JudgeProgress } from '../judge/result.ts'
import type { Survey } from '../record/survey.ts'

/** What crosses between a page and the judge's worker: plain data only. */
export type ToJudge =
  | { kind: 'judge'; question: number; survey: Survey; on: string }
  | { kind: 'cancel'; question: number }
  | { kind: 'remember'; memo: Memo }

export type FromJudge =
  | { kind: 'progress'; question: number; progress: JudgeProgress }
  | { kind: 'done'; question: number; assessment: Assessment }
  | { kind: 'cancelled'; question: number }
  | { kind: 'problem'; question: number; problem: string }
  /** What the planner worked out, to be kept. */
  | { kind: 'learned'; memo: Memo }
  /** What was kept is of another planner: forget it. */
  | { kind: 'outdated' }

/** The planner's answers by its questions. */
export type Memo = ReadonlyMap<string, unknown>
