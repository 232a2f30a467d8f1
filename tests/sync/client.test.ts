import { describe, expect, test } from 'vitest'
import type { Fact } from '../../src/record/facts.ts'
import { allFacts, emptyLog, type FactLog, mergeFacts, seenBy } from '../../src/record/log.ts'
import {
  enrol,
  exchangeSurvey,
  type Line,
  type PhoneStore,
  saysWhere,
  syncAll,
  whereabouts,
} from '../../src/sync/client.ts'
import { startRetrying, waitBefore } from '../../src/sync/retry.ts'

const now = () => '2026-05-04T12:00:00.000Z'
const later = () => '2026-05-04T13:00:00.000Z'

function fact(device: string, n: number): Fact {
  return { survey: 's', device, n, clock: now(), entity: 'e', field: `f${n}`, value: n, replaces: [] }
}

function phone(facts: Fact[] = []): { log: FactLog; store: PhoneStore } {
  const log = emptyLog('s', 'a')
  mergeFacts(log, facts)
  const notes = new Map<string, unknown>()
  return {
    log,
    store: {
      seen: async () => seenBy(log),
      factsAfter: async (_survey, have) => allFacts(log).filter((one) => one.n > (have.get(one.device) ?? 0)),
      takeIn: async (given) => {
        const { refused } = mergeFacts(log, given)
        return refused[0] ? { saved: false, what: 'no', whatToDo: 'ask' } : { saved: true }
      },
      readPhoto: async () => null,
      recall: async (key) => notes.get(key) ?? null,
      remember: async (key, value) => void notes.set(key, structuredClone(value)),
    },
  }
}

/** A line whose office answers as the test says, one answer after the other; a string is thrown as a cut. */
function line(
  ...answers: ({ status: number; body: unknown } | string)[]
): Line & { asked: { path: string; body: unknown }[] } {
  const asked: { path: string; body: unknown }[] = []
  return {
    address: 'https://office.example',
    token: 't',
    asked,
    async fetch(address, init) {
      asked.push({
        path: address.slice('https://office.example'.length),
        body: JSON.parse(String(init.body ?? 'null')) as never,
      })
      const answer = answers.shift()
      if (answer === undefined) throw new Error('the test has no further answer')
      if (typeof answer === 'string') throw new Error(answer)
      return { status: answer.status, text: async () => JSON.stringify(answer.body) }
    },
  }
}

const ok = (ack: Record<string, number>, facts: Fact[] = [], more = false) => ({
  status: 200,
  body: { ack, facts, more, at: later() },
})
const no = (status: number, error: string, more: object = {}) => ({
  status,
  body: { error, what: `${error}.`, whatToDo: 'See to it.', ...more },
})

describe('where a survey is', () => {
  test('on this phone only, then sent, then at the office: never a step too early', async () => {
    const { store } = phone([fact('a', 1), fact('a', 2)])
    expect(await whereabouts(store, 's')).toEqual({ where: 'phone', waiting: 2, lastAtOffice: null })
    const cut = await exchangeSurvey(line('cut'), store, 's', now)
    expect(cut).toMatchObject({ ok: false, kind: 'later' })
    expect(await whereabouts(store, 's')).toEqual({ where: 'sent', waiting: 2, at: now() })
    expect(await exchangeSurvey(line(ok({ a: 2 })), store, 's', now)).toMatchObject({ ok: true, sent: 2, got: 0 })
    expect(await whereabouts(store, 's')).toEqual({ where: 'office', at: later() })
  })

  test('a new entry is on this phone only, the rest at the office', async () => {
    const { store, log } = phone([fact('a', 1)])
    await exchangeSurvey(line(ok({ a: 1 })), store, 's', now)
    mergeFacts(log, [fact('a', 2)])
    const where = await whereabouts(store, 's')
    expect(where).toEqual({ where: 'phone', waiting: 1, lastAtOffice: later() })
    expect(saysWhere(where, (iso) => iso.slice(11, 16))).toBe(
      'On this phone only: 1 entry; the rest at the office, 13:00.',
    )
  })
})

describe('an exchange', () => {
  test('sends from what the office last acknowledged, and says what it has', async () => {
    const { store, log } = phone([fact('a', 1), fact('b', 1)])
    await exchangeSurvey(line(ok({ a: 1, b: 1 })), store, 's', now)
    mergeFacts(log, [fact('a', 2)])
    const second = line(ok({ a: 2, b: 1 }))
    await exchangeSurvey(second, store, 's', now)
    expect(second.asked).toEqual([
      { path: '/api/surveys/s/sync', body: { protocol: 1, have: { a: 2, b: 1 }, facts: [fact('a', 2)] } },
    ])
  })

  test('fetches page after page', async () => {
    const { store, log } = phone()
    const office = line(
      ok({ b: 3 }, [fact('b', 1)], true),
      ok({ b: 3 }, [fact('b', 2)], true),
      ok({ b: 3 }, [fact('b', 3)]),
    )
    expect(await exchangeSurvey(office, store, 's', now)).toMatchObject({ ok: true, got: 3 })
    expect(seenBy(log)).toEqual([['b', 3]])
  })

  test('an office that holds less than it once said gets what it lacks', async () => {
    const { store } = phone([fact('a', 1), fact('a', 2), fact('a', 3)])
    await exchangeSurvey(line(ok({ a: 2 }), ok({ a: 3 })), store, 's', now)
    const { log } = phone([fact('a', 1), fact('a', 2), fact('a', 3)])
    mergeFacts(log, [fact('a', 4)])
    const grown = {
      ...store,
      factsAfter: async (_s: string, have: ReadonlyMap<string, number>) =>
        allFacts(log).filter((one) => one.n > (have.get(one.device) ?? 0)),
    }
    const office = line(no(409, 'gap', { device: 'a', next: 2 }), ok({ a: 4 }))
    expect(await exchangeSurvey(office, grown, 's', now)).toMatchObject({ ok: true })
    expect(office.asked[1]?.body).toMatchObject({ facts: [{ n: 2 }, { n: 3 }, { n: 4 }] })
  })

  test.each([
    ['revoked', 401, 'signed-out'],
    ['erased', 410, 'erased'],
    ['app-too-old', 426, 'refused'],
    ['office', 500, 'later'],
    ['too-many', 429, 'later'],
  ])('refused with %s it ends as %s says', async (error, status, kind) => {
    const { store } = phone([fact('a', 1)])
    expect(await exchangeSurvey(line(no(status, error)), store, 's', now)).toMatchObject({ ok: false, kind })
    expect((await whereabouts(store, 's')).where).not.toBe('office')
  })

  test('two phones under one id: told where they part', async () => {
    const { store } = phone([fact('a', 1), fact('a', 2)])
    const office = line(no(409, 'fork', { device: 'a', next: 2 }))
    expect(await exchangeSurvey(office, store, 's', now)).toMatchObject({ kind: 'copied', device: 'a', first: 2 })
  })

  test.each([
    ['no record', { ack: { a: 1 }, facts: [{ ...fact('b', 1), n: 'one' }], more: false, at: now() }],
    ['of another survey', { ack: { a: 1 }, facts: [{ ...fact('b', 1), survey: 'other' }], more: false, at: now() }],
    ['without facts', { ack: { a: 1 }, more: false, at: now() }],
    ['with a mark that is no number', { ack: { a: '9' }, facts: [], more: false, at: now() }],
  ])('an answer %s is refused whole and believed in nothing', async (_what, body) => {
    const { log, store } = phone([fact('a', 1)])
    const ended = await exchangeSurvey(line({ status: 200, body }), store, 's', now)
    expect(ended).toMatchObject({ ok: false, kind: 'refused' })
    expect(allFacts(log)).toHaveLength(1)
    expect((await whereabouts(store, 's')).where).toBe('sent')
  })

  test('an office that takes nothing and says nothing against it is tried later, not for ever', async () => {
    const { store } = phone([fact('a', 1)])
    expect(await exchangeSurvey(line(ok({})), store, 's', now)).toMatchObject({ ok: false, kind: 'later' })
  })

  test('the rest of the surveys waits where the office does not answer', async () => {
    const { store } = phone([fact('a', 1)])
    const results = await syncAll(line('cut'), store, ['s', 's2', 's3'], now)
    expect(results.map(({ survey }) => survey)).toEqual(['s'])
  })
})

describe('enrolling', () => {
  const request = { code: 'C', label: 'phone', record: 'a' }

  test('asks for the version first and sends no code to what is no office, or one it cannot talk to', async () => {
    for (const hello of [
      { something: 'else' },
      { office: 'tautline', version: '9', protocol: { least: 7, greatest: 9 } },
    ]) {
      const office = line({ status: 200, body: hello })
      expect(await enrol(office, request)).toMatchObject({ ok: false, again: false })
      expect(office.asked.map(({ path }) => path)).toEqual(['/api/hello'])
    }
  })
})

describe('trying again', () => {
  test('waits twice as long each time, five minutes at most, spread', () => {
    expect(waitBefore(1, 1)).toBe(2000)
    expect(waitBefore(1, 0)).toBe(1000)
    expect(waitBefore(4, 1)).toBe(16_000)
    expect(waitBefore(40, 1)).toBe(300_000)
  })

  test('one at a time; a nudge during a run is followed by another; failures are tried by themselves', async () => {
    const waits: number[] = []
    let due: () => void = () => undefined
    const outcomes: ('done' | 'later')[] = ['later', 'later', 'done', 'done']
    let runs = 0
    let active = 0
    const retrying = startRetrying(
      async () => {
        runs++
        expect(++active).toBe(1)
        if (runs === 3) retrying.nudge()
        await Promise.resolve()
        active--
        return outcomes.shift() ?? 'done'
      },
      (milliseconds, call) => {
        waits.push(milliseconds)
        due = call
        return () => undefined
      },
      () => 1,
    )
    const settled = () => new Promise((resolve) => setImmediate(resolve))
    retrying.nudge()
    await settled()
    due()
    await settled()
    due()
    await settled()
    expect(waits).toEqual([2000, 4000])
    expect(runs).toBe(4)
    retrying.stop()
    retrying.nudge()
    await settled()
    expect(runs).toBe(4)
  })
})
