import { describe, expect, test } from 'vitest'
import type { FactDraft } from '../../src/record/facts.ts'
import { allFacts, appendDrafts, emptyLog, type FactLog, seenBy } from '../../src/record/log.ts'
import { addReading, addSegment, addWalk, setWord } from '../../src/record/operations/index.ts'
import { exchangeSurvey } from '../../src/sync/exchange.ts'
import { tape } from '../record/build.ts'
import { engines, facts, message, type Person, startOffice } from './office-under-test.ts'
import { badLine, storeOf } from './simulated-phone.ts'

const items = ['overhead', 'step', 'edge', 'finish', 'wetness', 'slots', 'door', 'sensing', 'shoreline', 'end-sign']

/** A venue of 12 walks of 60 segments, each with readings and an answer to every item. */
function largeVenue(survey: string): FactLog {
  const log = emptyLog(survey, 'large')
  const add = (make: (log: FactLog) => FactDraft[]) =>
    appendDrafts(log, make(log), { device: 'large', clock: '2026-05-04T10:00:00.000Z', person: 'Ada' })
  for (let w = 0; w < 12; w++) {
    add((now) => addWalk(now, { id: `w${w}`, name: `Walk ${w}` }))
    for (let s = 0; s < 60; s++) {
      const id = `w${w}s${s}`
      add((now) => addSegment(now, `w${w}`, { id, name: `Part ${s}`, ledBy: 'robot' }))
      add((now) => addReading(now, id, 'length', tape(`${id}l`, 8)))
      add((now) => addReading(now, id, 'width', tape(`${id}b`, 1.4)))
      for (const item of items) add((now) => setWord(now, id, item, { says: 'none', how: 'swept', person: 'Ada' }))
    }
  }
  return log
}

describe.each(engines)('many on %s', (engine) => {
  test('a hundred phones at once: every acknowledged entry is there', async () => {
    const under = await startOffice(engine)
    const people: Person[] = []
    for (let i = 0; i < 100; i++) people.push(await under.person('surveyor', `Person ${i}`))
    const address = await under.app.listen({ port: 0, host: '127.0.0.1' })
    const times: number[] = []
    await Promise.all(
      people.map(async ({ token }, i) => {
        const survey = `venue-${i % 25}`
        for (let round = 0; round < 3; round++) {
          const from = round * 10
          const before = performance.now()
          const reply = await fetch(`${address}/api/surveys/${survey}/sync`, {
            method: 'POST',
            headers: { 'content-type': 'application/json', authorization: `Bearer ${token}` },
            body: JSON.stringify(message(facts(`phone-${i}`, from + 1, from + 10, { survey }))),
          })
          times.push(performance.now() - before)
          const body = (await reply.json()) as { ack: Record<string, number> }
          expect(body.ack[`phone-${i}`]).toBe(from + 10)
        }
      }),
    )
    times.sort((a, b) => a - b)
    const at = (part: number) => Math.round(times[Math.floor(times.length * part)] ?? 0)
    console.log(
      `100 phones at once on ${engine}: median ${at(0.5)} ms, p99 ${at(0.99)} ms of ${times.length} exchanges`,
    )
    const rows = await under.office.db.selectFrom('facts').select(['survey', 'device', 'n']).execute()
    expect(rows).toHaveLength(3000)
    await under.close()
  })

  test('a venue of 720 segments goes to the office and comes to another phone whole', async () => {
    const under = await startOffice(engine)
    const [ada, ben] = [await under.person('surveyor', 'Ada'), await under.person('surveyor', 'Ben')]
    const address = await under.app.listen({ port: 0, host: '127.0.0.1' })
    const log = largeVenue('venue-large')
    const other = emptyLog('venue-large', 'other')
    const fetch = badLine(() => 'none', [])
    const now = () => '2026-05-04T12:00:00.000Z'
    const begun = performance.now()
    const sent = await exchangeSurvey({ address, token: ada.token, fetch }, storeOf(log), 'venue-large', now)
    const there = performance.now()
    const got = await exchangeSurvey({ address, token: ben.token, fetch }, storeOf(other), 'venue-large', now)
    const back = performance.now()
    const many = allFacts(log).length
    const server = under.log
      .map((line) => JSON.parse(line) as { route?: string; ms?: number; account?: string })
      .filter(({ route, account }) => route?.endsWith('/sync') && account === ada.account)
      .reduce((sum, { ms = 0 }) => sum + ms, 0)
    console.log(
      `720 segments, ${many} entries on ${engine}: sent in ${Math.round(there - begun)} ms (the office's part ${server} ms), fetched in ${Math.round(back - there)} ms`,
    )
    expect(sent).toMatchObject({ ok: true, sent: many })
    expect(got).toMatchObject({ ok: true, got: many })
    expect(allFacts(other)).toEqual(allFacts(log))
    expect(seenBy(other)).toEqual(seenBy(log))
    await under.close()
  })
})

test('two office processes on one PostgreSQL: clones that race through both are told the truth', async () => {
  const first = await startOffice('postgres')
  const second = await startOffice('postgres', { beside: first })
  const ada = await first.person('surveyor', 'Ada')
  expect((await second.ask(ada, 'GET', '/api/me')).status).toBe(200)
  for (let round = 0; round < 20; round++) {
    const survey = `both-${round}`
    const path = `/api/surveys/${survey}/sync`
    const replies = await Promise.all(
      [first, second, first, second].map(async (office, i) => {
        const sent = facts('twin', 1, 3 + i, { survey, value: `clone ${i % 2}` })
        return { sent, reply: await office.ask(ada, 'POST', path, message(sent)) }
      }),
    )
    const stored = await first.office.db
      .selectFrom('facts')
      .select('body')
      .where('survey', '=', survey)
      .orderBy('n')
      .execute()
    const bodies = stored.map(({ body }) => JSON.parse(body))
    for (const { sent, reply } of replies)
      if (reply.status === 200) expect(bodies.slice(0, sent.length)).toEqual(sent)
      else expect(reply.body.error).toBe('fork')
    expect(replies.filter(({ reply }) => reply.status === 200)).toHaveLength(2)
  }
  await second.close()
  await first.close()
})
