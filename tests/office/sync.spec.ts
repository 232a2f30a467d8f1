import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { addBranch } from '../../src/office/repositories/people.ts'
import type { Fact } from '../../src/record/facts.ts'
import {
  engines,
  fact,
  facts,
  message,
  type OfficeUnderTest,
  type Person,
  startOffice,
  syncPath,
} from './office-under-test.ts'

describe.each(engines)('sync by difference on %s', (engine) => {
  let under: OfficeUnderTest
  let ada: Person
  let ben: Person
  const sync = (who: Person, sent: readonly unknown[], have: Record<string, number> = {}, survey = 'venue-1') =>
    under.ask(who, 'POST', `/api/surveys/${encodeURIComponent(survey)}/sync`, message(sent, have))

  beforeAll(async () => {
    under = await startOffice(engine)
    ada = await under.person('surveyor', 'Ada')
    ben = await under.person('surveyor', 'Ben')
  })
  afterAll(() => under.close())

  test('what one phone sends the other gets, and only what it lacks', async () => {
    const first = await sync(ada, facts('a', 1, 3), { a: 3 })
    expect(first.status).toBe(200)
    expect(first.body.ack).toEqual({ a: 3 })
    expect(first.body.facts).toEqual([])
    const second = await sync(ben, facts('b', 1, 2), { b: 2, a: 1 })
    expect(second.body.ack).toEqual({ a: 3, b: 2 })
    expect(second.body.facts).toEqual(facts('a', 2, 3))
    expect(second.body.more).toBe(false)
  })

  test('the same message again changes nothing', async () => {
    const again = await sync(ada, facts('a', 1, 3), { a: 3, b: 2 })
    expect(again.status).toBe(200)
    expect(again.body.ack).toEqual({ a: 3, b: 2 })
    const rows = await under.office.db.selectFrom('facts').selectAll().where('survey', '=', 'venue-1').execute()
    expect(rows).toHaveLength(5)
    const line = await under.office.db.selectFrom('surveys').select('size').where('survey', '=', 'venue-1').execute()
    expect(line).toEqual([{ size: 5 }])
  })

  test('a gap is refused whole, with the number that is waited for', async () => {
    const gap = await sync(ada, [...facts('c', 1, 1), ...facts('a', 5, 6)])
    expect(gap.status).toBe(409)
    expect(gap.body).toMatchObject({ error: 'gap', device: 'a', next: 4 })
    const held = await sync(ada, [])
    expect(held.body.ack).toEqual({ a: 3, b: 2 })
  })

  test('other content under a number that is here is refused whole', async () => {
    const fork = await sync(ada, [fact('a', 3, { value: 'something else' }), fact('a', 4)])
    expect(fork.status).toBe(409)
    expect(fork.body).toMatchObject({ error: 'fork', device: 'a', next: 3 })
    expect((await sync(ada, [])).body.ack).toEqual({ a: 3, b: 2 })
  })

  test('one number with two contents in one message is a fork', async () => {
    const twice = await sync(ada, [fact('d', 1), fact('d', 1, { value: 'other' })])
    expect(twice.body.error).toBe('fork')
    expect((await sync(ada, [])).body.ack).toEqual({ a: 3, b: 2 })
  })

  test('facts may come in any order within a message', async () => {
    const mixed = facts('e', 1, 6).reverse()
    expect((await sync(ada, mixed)).body.ack).toMatchObject({ e: 6 })
  })

  test('the author is whose token it was, whatever the fact says', async () => {
    await sync(ben, [fact('b', 3, { person: 'Ada', author: ada.account, via: ada.device })])
    const row = await under.office.db
      .selectFrom('facts')
      .select(['author', 'via', 'body'])
      .where('device', '=', 'b')
      .where('n', '=', 3)
      .executeTakeFirstOrThrow()
    expect(row.author).toBe(ben.account)
    expect(row.via).toBe(ben.device)
    expect(JSON.parse(row.body)).toMatchObject({ person: 'Ada' })
  })

  test('fields that this version does not know come back as they went', async () => {
    const later = fact('f', 1, { value: { deep: [1, { more: null }] }, mood: { of: 'a later version' } })
    await sync(ada, [later], {}, 'venue-1')
    const back = (await sync(ben, [], { a: 99, b: 99, e: 99 })).body.facts as Fact[]
    expect(back).toContainEqual(later)
    const more = { ...message([], { a: 99, b: 99, e: 99, f: 1 }), later: true }
    expect((await under.ask(ada, 'POST', syncPath, more)).status).toBe(200)
  })

  test('a long survey comes in pages that never leave a gap', async () => {
    for (let from = 1; from <= 2501; from += 500)
      await sync(ada, facts('long', from, Math.min(2501, from + 499), { survey: 'venue-long' }), {}, 'venue-long')
    let have = 0
    let pages = 0
    for (let more = true; more; pages++) {
      const { body } = await sync(ben, [], { long: have }, 'venue-long')
      expect((body.facts as Fact[]).map((one) => one.n)).toEqual(body.facts.map((_: Fact, i: number) => have + 1 + i))
      have += body.facts.length
      more = body.more
    }
    expect(have).toBe(2501)
    expect(pages).toBe(3)
  })

  test('a version the office does not speak is told which side to renew', async () => {
    const old = await under.ask(ada, 'POST', syncPath, message([], {}, 0))
    expect(old.status).toBe(426)
    expect(old.body.error).toBe('app-too-old')
    const newer = await under.ask(ada, 'POST', syncPath, message([], {}, 2))
    expect(newer.body.error).toBe('app-too-new')
    expect((await under.ask(null, 'GET', '/api/hello')).body.protocol).toEqual({ least: 1, greatest: 1 })
  })

  test('a survey of another branch is not here, to read or to write', async () => {
    const south = await addBranch(under.office.db, 'South', under.clock.now)
    const cleo = await under.person('surveyor', 'Cleo', south)
    expect((await sync(cleo, [])).status).toBe(404)
    expect((await sync(cleo, facts('z', 1, 1))).status).toBe(404)
    expect((await sync(ada, [])).body.ack).not.toHaveProperty('z')
  })

  test('two phones that share an id and race: each acknowledgement stands for what is stored', async () => {
    const clones = [ada, ben].map((who, i) => ({ who, value: `clone ${i}` }))
    for (let round = 0; round < 25; round++) {
      const survey = `race-${round}`
      const replies = await Promise.all(
        clones.flatMap(({ who, value }) =>
          [2, 4, 3].map(async (upTo) => {
            const sent = facts('twin', 1, upTo, { survey, value })
            return { sent, reply: await sync(who, sent, {}, survey) }
          }),
        ),
      )
      const stored = await under.office.db
        .selectFrom('facts')
        .select(['n', 'body'])
        .where('survey', '=', survey)
        .orderBy('n')
        .execute()
      expect(stored.map(({ n }) => n)).toEqual(stored.map((_, i) => i + 1))
      let acknowledged = 0
      for (const { sent, reply } of replies) {
        if (reply.status !== 200) {
          expect(reply.body.error).toBe('fork')
          continue
        }
        acknowledged++
        expect(reply.body.ack.twin).toBeGreaterThanOrEqual(sent.length)
        for (const one of sent) expect(JSON.parse(stored[one.n - 1]?.body ?? '{}')).toEqual(one)
      }
      expect(acknowledged).toBe(3)
    }
  })

  test('the office’s own entries brought by a phone are passed over', async () => {
    const forged = fact('@office-forged', 1, { entity: 'w', field: 'state/reviewed/2026-05-04/Eve', survey: 'venue-1' })
    const reply = await sync(ada, [forged, fact('g', 1)])
    expect(reply.status).toBe(200)
    expect(reply.body.ack).not.toHaveProperty('@office-forged')
    expect(reply.body.ack).toMatchObject({ g: 1 })
  })

  test('an unchanged survey costs under two kilobytes', async () => {
    const { body } = await sync(ada, [])
    const bytes = JSON.stringify(message([], body.ack)).length
    const reply = await sync(ada, [], body.ack)
    console.log(`unchanged survey on ${engine}: ${bytes} bytes sent, ${reply.text.length} bytes back, headers aside`)
    expect(bytes + reply.text.length).toBeLessThan(2000)
  })
})
