import { malformedFact } from '../record/log.ts'
import { ask, type Line } from './line.ts'
import { firstPage, type Have, missingFrom, numberIn, type SyncReply, type SyncRequest, spoken } from './messages.ts'
import type { PhoneStore } from './phone-store.ts'
import { keepNote, readNote } from './whereabouts.ts'

export interface ExchangeProgress {
  survey: string
  /** Entries the office has taken and this phone has got so far in this exchange. */
  sent: number
  got: number
  waiting: number
}

export type Exchanged =
  | { ok: true; sent: number; got: number; at: string }
  | {
      ok: false
      /**
       * `later`: no answer, try again by itself. `signed-out`: the office ended this phone's token. `erased`: the office
       * deleted it for good. `refused`: a person has to see to it.
       */
      kind: 'later' | 'signed-out' | 'erased' | 'refused'
      what: string
      whatToDo: string
    }
  /** Another phone wrote other entries under the same numbers: from `first` of `device` on, as far as the office saw. */
  | { ok: false; kind: 'copied'; what: string; whatToDo: string; device: string; first: number }

/**
 * Exchanges one survey with the office by difference, page by page, until neither lacks anything. Cut at any point, the next
 * exchange goes on from what both hold; nothing is noted as being at the office before the office has said so.
 */
export async function exchangeSurvey(
  line: Line,
  store: PhoneStore,
  survey: string,
  now: () => string,
  tell: (progress: ExchangeProgress) => void = () => undefined,
): Promise<Exchanged> {
  const note = await readNote(store, survey)
  let { ack } = note
  let sent = 0
  let got = 0
  let gaps = 0
  for (;;) {
    const waiting = missingFrom(ack, await store.factsAfter(survey, new Map(Object.entries(ack))))
    const facts = firstPage(waiting)
    const request: SyncRequest = {
      protocol: spoken.greatest,
      have: Object.fromEntries(await store.seen(survey)),
      facts,
    }
    if (facts.length > 0) await keepNote(store, survey, { ...note, ack, sentAt: now() })
    const reply = await ask<SyncReply>(line, 'POST', `/api/surveys/${encodeURIComponent(survey)}/sync`, request)
    if (!reply.ok) {
      if (reply.again) return { ok: false, kind: 'later', what: reply.what, whatToDo: 'It is tried again by itself.' }
      const { refusal } = reply
      await keepNote(store, survey, { ...note, ack, sentAt: null })
      // The office holds less than it once said (an older back-up was brought back): it says from where.
      if (refusal.error === 'gap' && refusal.device !== undefined && refusal.next !== undefined && gaps++ < 100) {
        ack = { ...ack, [refusal.device]: refusal.next - 1 }
        continue
      }
      const { error, what, whatToDo, device, next } = refusal
      if (error === 'fork' && device !== undefined && next !== undefined)
        return { ok: false, kind: 'copied', what, whatToDo, device, first: next }
      return { ok: false, kind: kindOf(error), what, whatToDo }
    }
    const { body } = reply
    const fault = faultOf(survey, body)
    if (fault)
      return {
        ok: false,
        kind: 'refused',
        what: `What the office sent cannot be read here (${fault}). Nothing of it was taken in; what is on this phone stays.`,
        whatToDo: 'Renew the app, or ask the administrator. Until then share the survey as a file.',
      }
    const taken = body.facts.length > 0 ? await store.takeIn(body.facts) : { saved: true as const }
    if (!taken.saved) return { ok: false, kind: 'refused', what: taken.what, whatToDo: taken.whatToDo }
    const grew = body.facts.length > 0 || isFurther(body.ack, ack)
    ack = body.ack
    sent += facts.filter((fact) => fact.n <= numberIn(ack, fact.device)).length
    got += body.facts.length
    const kept = await readNote(store, survey)
    await keepNote(store, survey, { ...kept, ack, ackAt: body.at, sentAt: null })
    const left = missingFrom(ack, await store.factsAfter(survey, new Map(Object.entries(ack)))).length
    tell({ survey, sent, got, waiting: left })
    if (!body.more && left === 0) return { ok: true, sent, got, at: body.at }
    if (!grew)
      return {
        ok: false,
        kind: 'later',
        what: 'The office took nothing more.',
        whatToDo: 'It is tried again by itself.',
      }
  }
}

/** What is wrong with an answer, for the record's own gate; null: nothing. */
function faultOf(survey: string, { ack, facts, at }: Partial<SyncReply>): string | null {
  const marks = typeof ack === 'object' && ack !== null ? Object.values(ack) : [Number.NaN]
  if (!marks.every(Number.isSafeInteger) || !Array.isArray(facts) || typeof at !== 'string') return 'another form'
  for (const fact of facts) {
    const refused = malformedFact(survey, fact)
    if (refused) return `${refused.path}: expected ${refused.expected}, found ${refused.found}`
  }
  return null
}

function isFurther(now: Have, before: Have): boolean {
  return Object.entries(now).some(([device, n]) => n > numberIn(before, device))
}

function kindOf(error: string): 'signed-out' | 'erased' | 'refused' {
  if (error === 'revoked' || error === 'token' || error === 'no-token') return 'signed-out'
  return error === 'erased' ? 'erased' : 'refused'
}
