import type { Recorder } from './recorder.ts'

/** Half-typed entries: one is kept, the newest, and found again at its field after a restart. */

export function draftOf(
  recorder: Recorder,
  holder: string,
  quantity: string,
): { text: string; instrument: string } | null {
  const draft = recorder.session.draft.value
  return draft?.walk === recorder.walk.id && draft.holder === holder && draft.quantity === quantity ? draft : null
}

export function keepDraft(recorder: Recorder, holder: string, quantity: string, text: string, instrument: string) {
  const at = new Date().toISOString()
  return recorder.session.keepDraft({ walk: recorder.walk.id, holder, quantity, text, instrument, at })
}

/** Free text is drafted as `text:<what>` of its holder. */
export const textDraft = (what: string) => `text:${what}`
