import { type ReadonlySignal, signal } from '@preact/signals'
import {
  enrol,
  type Line,
  type OfficeVenue,
  officeVenues,
  type PhoneStore,
  type Progress,
  type Role,
  signOut,
  startRetrying,
  syncAll,
  type Whereabouts,
  whereabouts,
} from '../../sync/client.ts'
import { notTold, outcome, type Stuck, stopped, stuckAfter, type Told } from './office-outcome.ts'

/** This phone at its office. */
export interface Enrolment {
  address: string
  token: string
  person: string
  role: Role
  branch: string
  /** What the office's list of devices calls this phone. */
  label: string
  since: string
  /** When everything on this phone was last exchanged. */
  lastDone: string | null
  /** Set once the office has signed this phone out. */
  ended: Told | null
}

export interface Under {
  progress: Progress | null
  survey: number
  surveys: number
}

/** What the exchange needs of this phone; a test hands over its own. */
export interface Phone {
  store: PhoneStore
  device(): string
  keep(enrolment: Enrolment): Promise<{ saved: true } | ({ saved: false } & Told)>
  recallEnrolment(): Promise<Enrolment | null>
  forgetOffice(): Promise<void>
  /** Surveys that belong at an office, invented ones left out. */
  surveys(): Promise<readonly string[]>
  fetch(
    address: string,
    init: Parameters<Line['fetch']>[1],
    stop: AbortSignal,
  ): Promise<{ status: number; text(): Promise<string> }>
  /** ISO. */
  now(): string
  after(milliseconds: number, call: () => void): () => void
}

export interface OfficeWork {
  /** Null: this phone is enrolled nowhere. */
  enrolment: ReadonlySignal<Enrolment | null>
  /** By survey. */
  where: ReadonlySignal<ReadonlyMap<string, Whereabouts>>
  stuck: ReadonlySignal<ReadonlyMap<string, Stuck>>
  /** What is under way; null: nothing. */
  under: ReadonlySignal<Under | null>
  /** How the last exchange ended. */
  said: ReadonlySignal<(Told & { failed: boolean }) | null>
  /** Reads what this phone knows; call once before anything else. */
  begin(): Promise<void>
  /** Looks again where each survey is. */
  look(): Promise<void>
  enrol(form: { address: string; code: string; label: string }): Promise<{ ok: true } | ({ ok: false } & Told)>
  /** Exchanges every survey, or those alone in which something waits; returns at once. */
  send(which: 'all' | 'waiting'): void
  /** Stops what is under way. What has arrived has arrived. */
  cancel(): void
  /** The office's venues that are not on this phone. */
  venues(name: string): Promise<{ ok: true; venues: OfficeVenue[] } | ({ ok: false } & Told)>
  bring(survey: string): Promise<{ ok: true } | ({ ok: false } & Told)>
  /** True: the office ended this phone's token too. False: only this phone knows of it. */
  signOut(): Promise<boolean>
}

/** The exchange with the office as the app sees it. It never waits for a page, and no page waits for it. */
export function officeWork(phone: Phone): OfficeWork {
  const enrolment = signal<Enrolment | null>(null)
  const where = signal<ReadonlyMap<string, Whereabouts>>(new Map())
  const stuck = signal<ReadonlyMap<string, Stuck>>(new Map())
  const under = signal<Under | null>(null)
  const said = signal<(Told & { failed: boolean }) | null>(null)
  let wanted: 'all' | 'waiting' = 'waiting'
  let stop = new AbortController()

  const lineOf = (address: string, token: string | undefined, by: AbortSignal): Line => ({
    address,
    ...(token === undefined ? {} : { token }),
    fetch: (to, init) => phone.fetch(to, init, by),
  })
  const change = async (more: Partial<Enrolment>) => {
    if (!enrolment.value) return
    enrolment.value = { ...enrolment.value, ...more }
    await phone.keep(enrolment.value)
  }

  const look = async () => {
    const found = new Map<string, Whereabouts>()
    for (const survey of await phone.surveys()) found.set(survey, await whereabouts(phone.store, survey))
    where.value = found
  }

  const exchange = async (office: Enrolment, surveys: readonly string[]): Promise<'done' | 'later'> => {
    stop = new AbortController()
    const { signal: by } = stop
    const order = new Map(surveys.map((survey, i) => [survey, i + 1]))
    under.value = { progress: null, survey: 1, surveys: surveys.length }
    const results = await syncAll(
      lineOf(office.address, office.token, by),
      phone.store,
      surveys,
      phone.now,
      (progress) => {
        under.value = { progress, survey: order.get(progress.survey) ?? 1, surveys: surveys.length }
      },
    ).finally(() => {
      under.value = null
    })
    stuck.value = stuckAfter(stuck.value, results)
    const ended = results.find(({ entries }) => !entries.ok && entries.kind === 'signed-out')?.entries
    // Signed out here meanwhile: what the office says of it is no longer of interest.
    if (ended && !ended.ok && enrolment.value?.token === office.token)
      await change({ ended: { what: ended.what, whatToDo: ended.whatToDo } })
    const waits = results.some(({ entries, photos }) =>
      entries.ok ? (photos?.left ?? 0) > 0 : entries.kind === 'later',
    )
    if (!ended && !waits && results.length === surveys.length) await change({ lastDone: phone.now() })
    said.value = by.aborted ? stopped : outcome(results, stuck.value.size)
    await look()
    return waits && !by.aborted ? 'later' : 'done'
  }

  const retrying = startRetrying(async () => {
    const which = wanted
    wanted = 'waiting'
    const office = enrolment.value
    if (!office || office.ended) return 'done'
    await look()
    const waiting = [...where.value].filter(([, one]) => which === 'all' || one.where !== 'office')
    const surveys = waiting.map(([survey]) => survey)
    if (surveys.length === 0) {
      if (which === 'all')
        said.value = { what: 'There is no venue of yours on this phone yet.', whatToDo: '', failed: false }
      return 'done'
    }
    const ended = await exchange(office, surveys)
    if (ended === 'later' && which === 'all') wanted = 'all'
    return ended
  }, phone.after)

  return {
    enrolment,
    where,
    stuck,
    under,
    said,
    look,
    async begin() {
      enrolment.value = await phone.recallEnrolment()
      // Reading all that is on the phone is not worth it where nothing is ever sent.
      if (enrolment.value) await look()
    },
    async enrol({ address, code, label }) {
      const request = { code: code.trim(), label: label.trim(), record: phone.device() }
      const answer = await enrol(lineOf(address, undefined, new AbortController().signal), request)
      if (!answer.ok)
        return answer.again
          ? { ok: false, what: answer.what, whatToDo: 'Try again in a moment; the code may still hold.' }
          : { ok: false, what: answer.refusal.what, whatToDo: answer.refusal.whatToDo }
      const { token, account, branch } = answer.body
      // What another office holds says nothing of this one.
      await phone.forgetOffice()
      const fresh: Enrolment = {
        address,
        token,
        person: account.name,
        role: account.role,
        branch,
        label: request.label,
        since: phone.now(),
        lastDone: null,
        ended: null,
      }
      const kept = await phone.keep(fresh)
      if (!kept.saved) return { ok: false, what: kept.what, whatToDo: kept.whatToDo }
      enrolment.value = fresh
      stuck.value = new Map()
      said.value = null
      wanted = 'all'
      retrying.nudge()
      return { ok: true }
    },
    send(which) {
      if (which === 'all') wanted = 'all'
      retrying.nudge()
    },
    cancel: () => stop.abort(),
    async venues(name) {
      const office = enrolment.value
      if (!office) return { ok: false, what: 'This phone is not enrolled.', whatToDo: '' }
      const answer = await officeVenues(lineOf(office.address, office.token, new AbortController().signal), name)
      if (!answer.ok)
        return answer.again
          ? { ok: false, what: answer.what, whatToDo: 'Try again where there is a network.' }
          : { ok: false, what: answer.refusal.what, whatToDo: answer.refusal.whatToDo }
      const here = new Set(await phone.surveys())
      return { ok: true, venues: answer.body.filter(({ survey }) => !here.has(survey)) }
    },
    async bring(survey) {
      const office = enrolment.value
      if (!office) return { ok: false, what: 'This phone is not enrolled.', whatToDo: '' }
      const line = lineOf(office.address, office.token, new AbortController().signal)
      const [result] = await syncAll(line, phone.store, [survey], phone.now)
      await look()
      if (result && !result.entries.ok)
        return { ok: false, what: result.entries.what, whatToDo: result.entries.whatToDo }
      return { ok: true }
    },
    async signOut() {
      const office = enrolment.value
      stop.abort()
      // One that the office has signed out already need not be told of.
      const told =
        !office ||
        office.ended !== null ||
        (await signOut(lineOf(office.address, office.token, new AbortController().signal))).ok
      await phone.forgetOffice()
      enrolment.value = null
      stuck.value = new Map()
      said.value = told ? null : notTold
      await look()
      return told
    },
  }
}
