import { type Have, missingFrom } from './messages.ts'
import type { PhoneStore } from './phone-store.ts'

/** What the phone knows of one survey's way to the office. */
export interface SyncNote {
  /** What the office said it holds, when last it spoke. */
  ack: Have
  ackAt: string | null
  /** When a message went out that no answer has come to. */
  sentAt: string | null
  /** Photos that the office has. */
  photos: string[]
}

/** Where a survey's entries are; `waiting`: those that the office has not acknowledged. */
export type Whereabouts =
  | { where: 'phone'; waiting: number; lastAtOffice: string | null }
  /** Went out, no acknowledgement yet: it counts as being on this phone only. */
  | { where: 'sent'; waiting: number; at: string }
  | { where: 'office'; at: string }

export const noNote: SyncNote = { ack: {}, ackAt: null, sentAt: null, photos: [] }

export async function readNote(store: PhoneStore, survey: string): Promise<SyncNote> {
  const kept = (await store.recall(keyOf(survey))) as Partial<SyncNote> | null
  return { ...noNote, ...(kept ?? {}) }
}

export async function keepNote(store: PhoneStore, survey: string, note: SyncNote): Promise<void> {
  await store.remember(keyOf(survey), note)
}

export async function whereabouts(store: PhoneStore, survey: string): Promise<Whereabouts> {
  const { ack, ackAt, sentAt } = await readNote(store, survey)
  const waiting = missingFrom(ack, await store.factsAfter(survey, new Map(Object.entries(ack)))).length
  if (waiting === 0 && ackAt !== null) return { where: 'office', at: ackAt }
  if (sentAt !== null) return { where: 'sent', waiting, at: sentAt }
  return { where: 'phone', waiting, lastAtOffice: ackAt }
}

/** One plain sentence. `time` words an ISO time for the reader. */
export function saysWhere(one: Whereabouts, time: (iso: string) => string): string {
  if (one.where === 'office') return `At the office, ${time(one.at)}.`
  const entries = `${one.waiting} ${one.waiting === 1 ? 'entry' : 'entries'}`
  if (one.where === 'sent')
    return `Sent ${time(one.at)}, not yet acknowledged: ${entries} still count as on this phone only.`
  return one.lastAtOffice === null
    ? `On this phone only: ${entries}.`
    : `On this phone only: ${entries}; the rest at the office, ${time(one.lastAtOffice)}.`
}

function keyOf(survey: string): string {
  return `sync/${survey}`
}
