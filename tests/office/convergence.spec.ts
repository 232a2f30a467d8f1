import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { logOf } from '../../src/office/repositories/facts.ts'
import type { FactDraft } from '../../src/record/facts.ts'
import { foldSurvey } from '../../src/record/fold.ts'
import { canonical } from '../../src/record/json.ts'
import { allFacts, emptyLog, type FactLog } from '../../src/record/log.ts'
import { addReading, addSegment, addWalk, nameVenue, remove, setWord } from '../../src/record/operations/index.ts'
import { exchangeSurvey } from '../../src/sync/exchange.ts'
import type { Line } from '../../src/sync/line.ts'
import { whereabouts } from '../../src/sync/whereabouts.ts'
import { act, type Phone, tape } from '../record/build.ts'
import { engines, type OfficeUnderTest, type Person, startOffice } from './office-under-test.ts'
import { pick, seeded } from './seeded.ts'
import { badLine, type Mishap, storeOf } from './simulated-phone.ts'

const seeds = process.env.TAUTLINE_LONG === '1' ? 1000 : 50

describe.each(engines)('three phones on a bad network converge on %s', (engine) => {
  let under: OfficeUnderTest
  let address: string
  const people: Person[] = []

  beforeAll(async () => {
    under = await startOffice(engine)
    for (const name of ['Ada', 'Ben', 'Cleo']) people.push(await under.person('surveyor', name))
    address = await under.app.listen({ port: 0, host: '127.0.0.1' })
  })
  afterAll(() => under.close())

  test(`${seeds} seeded schedules of edits, cuts, retries and reorderings lose nothing`, async () => {
    const mishaps = new Map<Mishap, number>()
    for (let seed = 1; seed <= seeds; seed++) await schedule(seed, mishaps)
    // The network was as bad as it claims to be.
    for (const kind of ['lost', 'answer-lost', 'answer-cut', 'twice', 'late'] as const)
      expect(mishaps.get(kind) ?? 0).toBeGreaterThan(seeds / 5)
  }, 3_000_000)

  async function schedule(seed: number, count: Map<Mishap, number>) {
    const random = seeded(seed)
    const survey = `converge-${engine}-${seed}`
    let isBad = true
    const mishap = (): Mishap => {
      if (!isBad) return 'none'
      const kind = pick<Mishap>(random, [
        'none',
        'none',
        'none',
        'none',
        'lost',
        'answer-lost',
        'answer-cut',
        'twice',
        'late',
      ])
      count.set(kind, (count.get(kind) ?? 0) + 1)
      return kind
    }
    const late: (() => Promise<void>)[] = []
    const phones = people.map((person, i) => {
      const log = emptyLog(survey, `phone-${i}`)
      const on: Phone = { log, person: person.name, tick: 0 }
      const line: Line = { address, token: person.token, fetch: badLine(mishap, late) }
      return { on, line, store: storeOf(log) }
    })
    const made: string[] = []
    const edit = (on: Phone) => made.push(...act(on, (log) => anEdit(random, log)).map((one) => canonical(one)))
    const sync = async ({ line, store }: (typeof phones)[number]) =>
      exchangeSurvey(line, store, survey, () => '2026-05-04T12:00:00.000Z')
    for (let step = 0; step < 30; step++) {
      const phone = pick(random, phones)
      const what = random()
      if (what < 0.6) edit(phone.on)
      else if (what < 0.95) await sync(phone)
      else await late.shift()?.()
    }
    // Everybody goes home; what was stuck on the way arrives last.
    isBad = false
    for (const arrive of late) await arrive()
    for (const phone of [...phones, ...phones]) expect(await sync(phone), `seed ${seed}`).toMatchObject({ ok: true })

    const atOffice = await logOf(under.office.db, survey)
    const held = allFacts(atOffice).map((one) => canonical(one))
    expect([...held].sort(), `seed ${seed}`).toEqual(made.sort())
    const view = canonical(foldSurvey(atOffice))
    for (const { on, store } of phones) {
      expect(
        allFacts(on.log).map((one) => canonical(one)),
        `seed ${seed}`,
      ).toEqual(held)
      expect(canonical(foldSurvey(on.log)), `seed ${seed}`).toBe(view)
      expect(await whereabouts(store, survey)).toMatchObject({ where: 'office' })
    }
  }

  test('two people who read one thing differently: both readings stay, as a dispute that the desk sees', async () => {
    const survey = `dispute-${engine}`
    const phones = people.slice(0, 2).map((person, i) => {
      const on: Phone = { log: emptyLog(survey, `d-${i}`), person: person.name, tick: 0 }
      return { on, store: storeOf(on.log), line: { address, token: person.token, fetch: badLine(() => 'none', []) } }
    })
    const [one, other] = phones as [(typeof phones)[number], (typeof phones)[number]]
    const now = () => '2026-05-04T12:00:00.000Z'
    act(one.on, (log) => addWalk(log, { id: 'w', name: 'Door to desk' }))
    act(one.on, (log) => addSegment(log, 'w', { id: 's', name: 'Foyer', ledBy: 'robot' }))
    await exchangeSurvey(one.line, one.store, survey, now)
    await exchangeSurvey(other.line, other.store, survey, now)
    act(one.on, (log) => setWord(log, 's', 'step', { says: 'none', how: 'swept', person: 'Ada' }))
    act(other.on, (log) => setWord(log, 's', 'step', { says: 'listed', how: 'swept', person: 'Ben' }))
    for (const phone of [one, other, one]) await exchangeSurvey(phone.line, phone.store, survey, now)
    for (const { on } of phones) {
      const conflict = foldSurvey(on.log).conflicts?.find((found) => found.field === 'word/step')
      expect(conflict?.versions.map((version) => version.person).sort()).toEqual(['Ada', 'Ben'])
    }
    const rita = await under.person('reviewer', 'Rita')
    const desk = await under.ask(rita, 'GET', `/api/surveys/${survey}/disputes`)
    const dispute = desk.body.disputes.find((found: { field: string }) => found.field === 'word/step')
    expect(dispute.versions).toHaveLength(2)
    const keep = dispute.versions[1].fact as string
    const settle = { entity: dispute.entity, field: dispute.field, keep, reason: 'Measured again at the door' }
    expect((await under.ask(rita, 'POST', `/api/surveys/${survey}/settle`, settle)).status).toBe(200)
    expect((await under.ask(rita, 'POST', `/api/surveys/${survey}/settle`, settle)).body.error).toBe('settled')
    for (const phone of [one, other]) {
      await exchangeSurvey(phone.line, phone.store, survey, now)
      const { conflicts = [], view } = foldSurvey(phone.on.log)
      expect(conflicts).toEqual([])
      expect(view.walks[0]?.segments[0]?.words.step).toMatchObject({
        says: dispute.versions[1].value.says,
        person: dispute.versions[1].person,
      })
    }
  })
})

let ids = 0

function anEdit(random: () => number, log: FactLog): FactDraft[] {
  const { walks } = foldSurvey(log).view
  const segments = walks.flatMap((walk) => walk.segments)
  const id = `${log.device}-${++ids}`
  const what = random()
  if (walks.length === 0 || what < 0.1) return addWalk(log, { id, name: `Walk ${id}` })
  if (segments.length === 0 || what < 0.3)
    return addSegment(log, pick(random, walks).id, { id, name: `Part ${id}`, ledBy: 'robot' })
  const segment = pick(random, segments)
  if (what < 0.6) return addReading(log, segment.id, 'width', tape(id, Math.round(80 + random() * 100) / 100))
  if (what < 0.8)
    return setWord(log, segment.id, 'step', {
      says: pick(random, ['none', 'listed']),
      how: 'swept',
      person: log.device,
    })
  if (what < 0.9) return nameVenue(log, { name: `Venue of ${id}` })
  return remove(log, segment.id)
}
