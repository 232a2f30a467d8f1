import { beforeEach, describe, expect, test } from 'vitest'
import { type Enrolment, officeWork, type Phone } from '../../src/app/state/office-work.ts'
import type { Fact } from '../../src/record/facts.ts'
import type { PhoneStore } from '../../src/sync/client.ts'

/** A whole small office: what it holds, and what it says to each path. */
class FakeOffice {
  readonly held: Fact[] = []
  refusal: { status: number; error: string; what: string; whatToDo: string; device?: string; next?: number } | null =
    null
  silent = false
  /** Called on each exchange before it is answered. */
  onAsk: () => void = () => undefined
  readonly asked: { path: string; token: string | undefined }[] = []

  readonly fetch: Phone['fetch'] = async (address, init, stop) => {
    const path = address.replace('https://office.example', '')
    this.asked.push({ path, token: init.headers.authorization })
    if (path.endsWith('/sync')) this.onAsk()
    if (this.silent || stop.aborted) throw new Error('no answer')
    const answer = (status: number, body: object) => ({ status, text: async () => JSON.stringify(body) })
    if (path === '/api/hello')
      return answer(200, { office: 'tautline', version: '1', protocol: { least: 1, greatest: 1 } })
    if (path === '/api/enrol')
      return answer(200, { token: 'T', account: { id: 'p', name: 'Ana Pell', role: 'surveyor' }, branch: 'North' })
    if (this.refusal) return answer(this.refusal.status, this.refusal)
    if (path === '/api/me/sign-out') return answer(200, { signedOut: true })
    if (path.startsWith('/api/surveys?') || path === '/api/surveys')
      return answer(200, {
        surveys: [...new Set(this.held.map(({ survey }) => survey))].map((survey) => ({
          survey,
          name: survey,
          changed_at: '',
        })),
      })
    const survey = path.split('/')[3] ?? ''
    const { have, facts } = JSON.parse(String(init.body)) as { have: Record<string, number>; facts: Fact[] }
    for (const one of facts) if (!this.held.some((other) => sameNumber(other, one))) this.held.push(one)
    const ack: Record<string, number> = {}
    const own = this.held.filter((one) => one.survey === survey)
    for (const { device, n } of own) ack[device] = Math.max(ack[device] ?? 0, n)
    return answer(200, { ack, more: false, facts: own.filter(({ device, n }) => n > (have[device] ?? 0)), at: now })
  }
}

const now = '2026-05-04T12:00:00.000Z'
const sameNumber = (a: Fact, b: Fact) => a.survey === b.survey && a.device === b.device && a.n === b.n
const fact = (survey: string, device: string, n: number): Fact => ({
  survey,
  device,
  n,
  clock: now,
  entity: '@venue',
  field: `f${n}`,
  value: n,
  replaces: [],
})

function phoneWith(facts: Fact[], office: FakeOffice) {
  const notes = new Map<string, unknown>()
  const waits: (() => void)[] = []
  const seen = (survey: string) => {
    const marks = new Map<string, number>()
    for (const one of facts)
      if (one.survey === survey) marks.set(one.device, Math.max(marks.get(one.device) ?? 0, one.n))
    return [...marks]
  }
  const store: PhoneStore = {
    seen: async (survey) => seen(survey),
    factsAfter: async (survey, have) =>
      facts.filter((one) => one.survey === survey && one.n > (have.get(one.device) ?? 0)),
    takeIn: async (given) => {
      facts.push(...given)
      return { saved: true }
    },
    readPhoto: async () => null,
    recall: async (key) => notes.get(key) ?? null,
    remember: async (key, value) => void notes.set(key, value),
  }
  const phone: Phone = {
    store,
    device: () => 'a',
    keep: async (enrolment) => {
      notes.set('enrolment', enrolment)
      return { saved: true }
    },
    recallEnrolment: async () => (notes.get('enrolment') as Enrolment | undefined) ?? null,
    forgetOffice: async () => notes.clear(),
    surveys: async () => [...new Set(facts.map(({ survey }) => survey))],
    fetch: office.fetch,
    now: () => now,
    after: (_milliseconds, call) => {
      waits.push(call)
      return () => void waits.splice(waits.indexOf(call), 1)
    },
  }
  return { phone, notes, waits, facts }
}

const form = { address: 'https://office.example', code: 'ABCDEFGHJKMN', label: 'Ana’s phone' }

/** Until nothing is under way any more. */
async function settled(work: ReturnType<typeof officeWork>): Promise<void> {
  for (let i = 0; i < 200 && (i < 20 || work.under.value); i++) await new Promise((done) => setImmediate(done))
}

let office: FakeOffice
beforeEach(() => {
  office = new FakeOffice()
})

async function enrolled(facts: Fact[]) {
  const made = phoneWith(facts, office)
  const work = officeWork(made.phone)
  await work.begin()
  expect(await work.enrol(form)).toEqual({ ok: true })
  await settled(work)
  return { ...made, work }
}

describe('a phone at its office', () => {
  test('says where each survey is before it is enrolled, and asks nobody', async () => {
    const { phone } = phoneWith([fact('s', 'a', 1)], office)
    const work = officeWork(phone)
    await work.begin()
    work.send('all')
    await settled(work)
    await work.look()
    expect(work.where.value.get('s')).toEqual({ where: 'phone', waiting: 1, lastAtOffice: null })
    expect(office.asked).toEqual([])
  })

  test('enrols, sends by itself, and keeps its token for the next opening', async () => {
    const { phone, work } = await enrolled([fact('s', 'a', 1), fact('s2', 'a', 1)])
    expect(office.held).toHaveLength(2)
    expect(work.where.value.get('s')).toEqual({ where: 'office', at: now })
    expect(work.enrolment.value).toMatchObject({ person: 'Ana Pell', branch: 'North', lastDone: now, ended: null })
    const again = officeWork(phone)
    await again.begin()
    expect(again.enrolment.value).toEqual(work.enrolment.value)
  })

  test('without an office it says so, and nothing is kept', async () => {
    office.silent = true
    const { phone, notes } = phoneWith([], office)
    const work = officeWork(phone)
    expect(await work.enrol(form)).toMatchObject({ ok: false, what: 'No office answers at this address.' })
    expect(notes.size).toBe(0)
  })

  test('an office that does not answer is tried again by itself, with what came from elsewhere still asked for', async () => {
    const { work, waits, facts } = await enrolled([fact('s', 'a', 1)])
    office.held.push(fact('s', 'b', 1))
    office.silent = true
    work.send('all')
    await settled(work)
    expect(work.said.value).toMatchObject({ what: 'The office does not answer.', failed: false })
    expect(waits).toHaveLength(1)
    office.silent = false
    waits[0]?.()
    await settled(work)
    expect(facts.map(({ device, n }) => `${device}${n}`)).toEqual(['a1', 'b1'])
  })

  test('looks at the waiting ones alone when asked so', async () => {
    const { work, facts } = await enrolled([fact('s', 'a', 1), fact('s2', 'a', 1)])
    office.asked.length = 0
    work.send('waiting')
    await settled(work)
    expect(office.asked).toEqual([])
    facts.push(fact('s2', 'a', 2))
    work.send('waiting')
    await settled(work)
    expect(office.asked.map(({ path }) => path)).toEqual(['/api/surveys/s2/sync'])
  })

  test('stopped in the middle: what arrived is at the office, the rest waits, nothing is tried by itself', async () => {
    const { work, facts, waits } = await enrolled([fact('s', 'a', 1), fact('s2', 'a', 1)])
    facts.push(fact('s', 'a', 2), fact('s2', 'a', 2))
    let asked = 0
    office.onAsk = () => {
      if (++asked === 2) work.cancel()
    }
    work.send('all')
    await settled(work)
    expect(work.said.value?.what).toBe('Stopped.')
    expect(work.where.value.get('s')?.where).toBe('office')
    expect(work.where.value.get('s2')).toMatchObject({ where: 'sent', waiting: 1 })
    expect(waits).toEqual([])
  })

  test('signed out by the office: told, kept over a restart, and no longer asked', async () => {
    const { work, phone } = await enrolled([fact('s', 'a', 1)])
    office.refusal = { status: 401, error: 'revoked', what: 'Signed out on 4 May.', whatToDo: 'Ask.' }
    work.send('all')
    await settled(work)
    expect(work.enrolment.value?.ended).toEqual({ what: 'Signed out on 4 May.', whatToDo: 'Ask.' })
    const again = officeWork(phone)
    await again.begin()
    expect(again.enrolment.value?.ended).not.toBeNull()
    office.asked.length = 0
    again.send('all')
    await settled(again)
    expect(office.asked).toEqual([])
  })

  test.each([
    ['not-found', 404],
    ['app-too-old', 426],
    ['gap', 409],
    ['erased', 410],
  ])(
    'a survey refused by "%s" says what and what to do, and is free again once it got through',
    async (error, status) => {
      const { work, facts } = await enrolled([fact('s', 'a', 1)])
      facts.push(fact('s', 'a', 2))
      office.refusal = { status, error, what: 'It will not do.', whatToDo: 'Do this.' }
      work.send('all')
      await settled(work)
      expect(work.stuck.value.get('s')).toEqual({
        what: 'It will not do.',
        whatToDo: 'Do this.',
        copied: null,
        erased: error === 'erased',
      })
      expect(work.said.value?.failed).toBe(true)
      office.refusal = null
      work.send('all')
      await settled(work)
      expect(work.stuck.value.size).toBe(0)
      expect(work.where.value.get('s')?.where).toBe('office')
    },
  )

  test('a copied phone is told, with where the two part, and that nothing is lost', async () => {
    const { work, facts } = await enrolled([fact('s', 'a', 1)])
    facts.push(fact('s', 'a', 2))
    office.refusal = { status: 409, error: 'fork', what: '-', whatToDo: '-', device: 'a', next: 2 }
    work.send('all')
    await settled(work)
    expect(work.stuck.value.get('s')).toMatchObject({
      what: expect.stringContaining('Nothing is lost'),
      copied: { device: 'a', first: 2 },
    })
  })

  test('an answer that is no record is not taken in', async () => {
    const { work, facts } = await enrolled([fact('s', 'a', 1)])
    office.held.push({ ...fact('s', 'b', 1), field: 7 as unknown as string })
    work.send('all')
    await settled(work)
    expect(work.stuck.value.get('s')?.what).toMatch(/cannot be read here/)
    expect(facts).toHaveLength(1)
  })

  test('brings a venue that only the office has', async () => {
    const { work, facts } = await enrolled([fact('s', 'a', 1)])
    office.held.push(fact('far', 'b', 1))
    expect(await work.venues('')).toMatchObject({ ok: true, venues: [{ survey: 'far' }] })
    expect(await work.bring('far')).toEqual({ ok: true })
    expect(facts.filter(({ survey }) => survey === 'far')).toHaveLength(1)
    expect(await work.venues('')).toEqual({ ok: true, venues: [] })
  })

  test('signing out ends the token there, or says that it could not; another office is told everything anew', async () => {
    const { work, notes } = await enrolled([fact('s', 'a', 1)])
    expect(await work.signOut()).toBe(true)
    expect(office.asked.at(-1)).toEqual({ path: '/api/me/sign-out', token: 'Bearer T' })
    expect(notes.size).toBe(0)
    expect(work.where.value.get('s')).toEqual({ where: 'phone', waiting: 1, lastAtOffice: null })
    await work.enrol(form)
    await settled(work)
    office.silent = true
    expect(await work.signOut()).toBe(false)
    expect(work.enrolment.value).toBeNull()
  })
})
