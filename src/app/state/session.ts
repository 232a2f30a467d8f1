import type { ReadonlySignal } from '@preact/signals'
import type { Assessment, WalkResult } from '../../judge/result.ts'
import type { FactDraft } from '../../record/facts.ts'
import type { FactLog } from '../../record/log.ts'
import type { Survey } from '../../record/survey.ts'

/**
 * One open survey on this phone, as the screens know it. A screen reads the signals and commits drafts that a named
 * operation of record/ made; it never touches the store or the worker itself.
 */
export interface Session {
  survey: ReadonlySignal<Survey>
  /** The log as it is now, for the named operations of record/operations that make the drafts of a commit. */
  log(): FactLog
  /** The surveyor using this phone. */
  person: ReadonlySignal<string>
  /** Resolves when the facts are durable, never before: only then may a screen say "saved". */
  commit(drafts: FactDraft[], label: string): Promise<Committed>
  undo(): Promise<Committed | null>
  redo(): Promise<Committed | null>
  /** What undo and redo would take back or bring again, in words; null: nothing. */
  undoLabel: ReadonlySignal<string | null>
  redoLabel: ReadonlySignal<string | null>
  judgement: ReadonlySignal<Judgement>
  /** A draft half typed, kept across a restart. */
  keepDraft(draft: EntryDraft | null): Promise<void>
  draft: ReadonlySignal<EntryDraft | null>
  /** A new id for an entity of this survey. */
  newId(kind: string): string
}

export type Committed = { saved: true; label: string; at: string } | { saved: false; what: string; whatToDo: string }

/** What the judge says now; `stale` while a newer judgement is being worked out: never shown as final then. */
export interface Judgement {
  walks: readonly WalkResult[]
  /** The whole of it, for sheets; null: none yet. */
  assessment: Assessment | null
  stale: boolean
  progress: { done: number; total: number; doing: string } | null
  problem: string | null
}

/** A keypad sheet left half typed: enough to come back to the same field. */
export interface EntryDraft {
  walk: string
  holder: string
  quantity: string
  text: string
  instrument: string
  at: string
}
