import { gzipSync } from 'node:zlib'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { canonical } from '../../src/record/json.ts'
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
import { pick, seeded } from './seeded.ts'

const requests = process.env.TAUTLINE_LONG === '1' ? 10_000 : 600

describe.each(engines)('hostile and broken requests on %s', (engine) => {
  let under: OfficeUnderTest
  let ada: Person
  let address: string

  beforeAll(async () => {
    under = await startOffice(engine)
    ada = await under.person('surveyor', 'Ada')
    await under.ask(ada, 'POST', syncPath, message(facts('a', 1, 3)))
    address = await under.app.listen({ port: 0, host: '127.0.0.1' })
  })
  afterAll(() => under.close())

  /** Sends bytes as they are, over a real socket. */
  const raw = async (body: string | Buffer, headers: Record<string, string> = {}) => {
    const reply = await fetch(`${address}${syncPath}`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', authorization: `Bearer ${ada.token}`, ...headers },
      body: new Uint8Array(Buffer.from(body)),
    })
    return { status: reply.status, body: JSON.parse(await reply.text()) as { error: string; what: string } }
  }

  const stillServes = async () => {
    const { status, body } = await under.ask(ada, 'POST', syncPath, message([]))
    expect(status).toBe(200)
    expect(body.ack).toEqual({ a: 3 })
  }

  test('a gzip bomb is refused by its unpacked size', async () => {
    const bomb = gzipSync(Buffer.alloc(200 * 1024 * 1024, 32))
    expect(bomb.length).toBeLessThan(300_000)
    const { status, body } = await raw(bomb, { 'content-encoding': 'gzip' })
    expect(status).toBe(413)
    expect(body.error).toBe('too-large')
    await stillServes()
  })

  test('a large body is refused by its size as sent', async () => {
    expect((await raw(' '.repeat(4 * 1024 * 1024 + 1))).status).toBe(413)
    await stillServes()
  })

  test('an honest gzip body is read', async () => {
    const packed = gzipSync(JSON.stringify(message(facts('a', 1, 3))))
    expect((await raw(packed, { 'content-encoding': 'gzip' })).status).toBe(200)
  })

  test('what says gzip and is none is refused', async () => {
    expect((await raw('{"a":1}', { 'content-encoding': 'gzip' })).status).toBe(400)
    expect((await raw('{"a":1}', { 'content-encoding': 'br' })).status).toBe(415)
    const cut = gzipSync(JSON.stringify(message(facts('a', 1, 3)))).subarray(0, 60)
    expect((await raw(cut, { 'content-encoding': 'gzip' })).status).toBe(400)
    await stillServes()
  })

  test('JSON 200,000 deep is refused before anything is built from it', async () => {
    const deep = `{"protocol":1,"have":{},"facts":[${'['.repeat(200_000)}${']'.repeat(200_000)}]}`
    const { status, body } = await raw(deep)
    expect(status).toBe(400)
    expect(body.error).toBe('json')
    await stillServes()
  })

  test.each(['__proto__', 'constructor', 'prototype'])('the key %s is refused wherever it stands', async (key) => {
    const inFact = JSON.stringify(message([fact('p', 1, { value: 'VALUE' })])).replace(
      '"VALUE"',
      `{"${key}":{"role":"x"}}`,
    )
    expect((await raw(inFact)).status).toBe(400)
    expect((await raw(`{"protocol":1,"have":{"${key}":1},"facts":[]}`)).status).toBe(400)
    expect((await raw(`{"protocol":1,"have":{},"facts":[],"${key}":{}}`)).status).toBe(400)
    await stillServes()
  })

  test('truncated JSON, other types and no body at all are refused', async () => {
    const whole = JSON.stringify(message([fact('t', 1)]))
    for (let length = 1; length < whole.length; length += 7)
      expect((await raw(whole.slice(0, length))).status).toBe(400)
    expect((await raw(whole, { 'content-type': 'text/plain' })).status).toBe(415)
    expect((await raw(whole, { 'content-type': 'application/x-www-form-urlencoded' })).status).toBe(415)
    expect((await under.ask(ada, 'POST', syncPath)).status).toBe(400)
    await stillServes()
  })

  test('a fact of another survey is refused', async () => {
    const { status, body } = await under.ask(ada, 'POST', syncPath, message([fact('o', 1, { survey: 'venue-2' })]))
    expect(status).toBe(409)
    expect(body.error).toBe('other-survey')
    await stillServes()
  })

  test('numbers that JSON cannot hold, control characters in ids, and far too long ids are refused', async () => {
    const wrong = [
      JSON.stringify(message([fact('x', 1, { value: 7 })])).replace('"value":7', '"value":1e999'),
      JSON.stringify(message([fact('x\u0000', 1)])),
      JSON.stringify(message([fact('x\ud800', 1)])),
      JSON.stringify(message([fact('x'.repeat(401), 1)])),
      JSON.stringify(message([fact('x', Number.MAX_SAFE_INTEGER + 1)])),
      JSON.stringify(message([fact('x', 1.5)])),
      JSON.stringify(message([fact('x', 0)])),
      JSON.stringify(message([], { x: -1 })),
      JSON.stringify(message([], { x: 1.5 })),
    ]
    for (const text of wrong) expect((await raw(text)).status, text.slice(0, 200)).toBe(400)
    await stillServes()
  })

  test('a text with a NUL is kept as it was typed', async () => {
    const survey = 'venue-nul'
    const sent = fact('nul', 1, { survey, field: 'name', value: 'a\u0000b' })
    const path = `/api/surveys/${survey}/sync`
    expect((await under.ask(ada, 'POST', path, message([sent]))).status).toBe(200)
    expect((await under.ask(ada, 'POST', path, message([]))).body.facts).toEqual([sent])
    expect((await under.ask(ada, 'GET', '/api/surveys')).body.surveys).toContainEqual(
      expect.objectContaining({ survey, name: 'ab' }),
    )
  })

  test('addresses that climb or break are refused', async () => {
    for (const path of [
      '/api/surveys/..%2F..%2Fetc/file',
      '/api/surveys/%00/file',
      '/api/surveys/%ff/file',
      '/../../etc/passwd',
    ])
      expect([400, 404], path).toContain((await under.ask(ada, 'GET', path)).status)
    await stillServes()
  })

  test('SQL in a filter is a text like any other', async () => {
    const { status, body } = await under.ask(
      ada,
      'GET',
      `/api/surveys?name=${encodeURIComponent("'; drop table facts; --")}`,
    )
    expect(status).toBe(200)
    expect(body.surveys).toEqual([])
    await stillServes()
  })

  test(`${requests} seeded mutations of a good message: each a clear refusal or a true acknowledgement`, async () => {
    const random = seeded(20)
    const survey = 'mutated'
    const path = `/api/surveys/${survey}/sync`
    const counts = new Map<number, number>()
    for (let i = 0; i < requests; i++) {
      const good = message(facts(`m${i % 5}`, 1, 1 + (i % 4), { survey, value: { nested: [1, 'two', null] } }))
      const sent = mutate(random, good)
      const { status, body } = await under.ask(ada, 'POST', path, sent)
      counts.set(status, (counts.get(status) ?? 0) + 1)
      if (status === 200) {
        for (const one of (sent as ReturnType<typeof message>).facts as { device: string; n: number }[])
          expect(body.ack[one.device]).toBeGreaterThanOrEqual(one.n)
        continue
      }
      expect([400, 403, 409, 426], canonical(sent).slice(0, 300)).toContain(status)
      for (const key of ['error', 'what', 'whatToDo']) expect(body[key]).toEqual(expect.any(String))
      expect(JSON.stringify(body)).not.toMatch(/node_modules|\bat \w+ \(|\.ts:\d/)
    }
    expect(counts.get(200) ?? 0).toBeGreaterThan(0)
    expect(counts.get(400) ?? 0).toBeGreaterThan(requests / 5)
    await stillServes()
  }, 600_000)
})

describe('answers and limits', () => {
  test('what fails inside the office leaves no trace of its insides', async () => {
    const under = await startOffice('sqlite')
    const ada = await under.person('surveyor', 'Ada')
    await under.office.db.schema.dropTable('marks').execute()
    const { status, body, text } = await under.ask(ada, 'POST', syncPath, message([fact('a', 1)]))
    expect(status).toBe(500)
    expect(body.error).toBe('office')
    expect(text).not.toMatch(/marks|sqlite|node_modules/i)
    expect(under.log.join('')).toContain('no such table')
    await under.close()
  })

  test('too many requests from one address are held off, in words', async () => {
    const under = await startOffice('sqlite', { requestsAMinute: 20 })
    const answers = []
    for (let i = 0; i < 25; i++) answers.push(await under.ask(null, 'GET', '/api/hello', undefined, '192.0.2.1'))
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(20)
    expect(answers.at(-1)).toMatchObject({ status: 429, body: { error: 'too-many' } })
    await under.close()
  })

  test('guessing tokens is held off', async () => {
    const under = await startOffice('sqlite')
    const statuses = []
    for (let i = 0; i < 70; i++)
      statuses.push(
        (await under.ask({ token: `guess-${i}` } as Person, 'GET', '/api/me', undefined, '192.0.2.1')).status,
      )
    expect(statuses.filter((status) => status === 401)).toHaveLength(60)
    expect(statuses.at(-1)).toBe(429)
    await under.close()
  })

  test('guessing codes is held off', async () => {
    const under = await startOffice('sqlite')
    const guess = { code: 'ABCDEFGHJKMN', label: 'x', record: '' }
    const statuses = []
    for (let i = 0; i < 22; i++) statuses.push((await under.ask(null, 'POST', '/api/enrol', guess, '192.0.2.1')).status)
    expect(statuses.filter((status) => status === 410)).toHaveLength(20)
    expect(statuses.at(-1)).toBe(429)
    await under.close()
  })

  test('every answer carries the strict policy and may not be framed', async () => {
    const under = await startOffice('sqlite')
    for (const path of ['/api/hello', '/nowhere', '/sheet/none']) {
      const { headers } = await under.ask(null, 'GET', path)
      const policy = String(headers['content-security-policy'])
      expect(policy).toContain("default-src 'none'")
      expect(policy).toContain("frame-ancestors 'none'")
      expect(policy).not.toContain('unsafe-inline')
      expect(headers['x-content-type-options']).toBe('nosniff')
      expect(headers['referrer-policy']).toBe('no-referrer')
      expect(headers['access-control-allow-origin']).toBeUndefined()
    }
    await under.close()
  })
})

/** Puts a wrong value, a wrong key or nothing at a random place of a message; sometimes leaves it be. */
function mutate(random: () => number, good: unknown): unknown {
  const copy = structuredClone(good)
  if (random() < 0.1) return copy
  const places: [holder: Record<string, unknown>, key: string][] = []
  const walk = (node: unknown) => {
    if (typeof node !== 'object' || node === null) return
    for (const key of Object.keys(node)) {
      places.push([node as Record<string, unknown>, key])
      walk((node as Record<string, unknown>)[key])
    }
  }
  walk(copy)
  const [holder, key] = pick(random, places)
  const values = [null, true, -1, 1e300, 0.5, '', 'x'.repeat(1000), [], {}, [[[]]], { n: 1 }, '\u0000', 999]
  if (random() < 0.2) delete holder[key]
  else holder[key] = pick(random, values)
  return copy
}
