import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { hashOf } from '../../src/office/secrets.ts'
import {
  engines,
  fact,
  message,
  type OfficeUnderTest,
  type Person,
  startOffice,
  syncPath,
} from './office-under-test.ts'

describe.each(engines)('people and devices on %s', (engine) => {
  let under: OfficeUnderTest
  let chief: Person
  const enrol = (code: string) => under.ask(null, 'POST', '/api/enrol', { code, label: 'a phone', record: 'r1' })
  const invite = async (name: string, role = 'surveyor') =>
    (await under.ask(chief, 'POST', '/api/people', { name, role })).body as { account: string; code: string }

  beforeAll(async () => {
    under = await startOffice(engine)
    chief = await under.person('administrator', 'Chief')
  })
  afterAll(() => under.close())

  test('a code gives one device a token, once', async () => {
    const { code } = await invite('Ada')
    const first = await enrol(code)
    expect(first.status).toBe(200)
    expect(Buffer.from(first.body.token, 'base64url')).toHaveLength(32)
    expect(first.body.account).toMatchObject({ name: 'Ada', role: 'surveyor' })
    const replay = await enrol(code)
    expect(replay.status).toBe(410)
    expect(replay.body.error).toBe('code')
  })

  test('of ten that redeem one code at the same moment one gets in', async () => {
    const { code } = await invite('Ben')
    const all = await Promise.all(Array.from({ length: 10 }, () => enrol(code)))
    expect(all.filter(({ status }) => status === 200)).toHaveLength(1)
    expect(all.filter(({ status }) => status === 410)).toHaveLength(9)
  })

  test('a code holds ten minutes and not a moment longer', async () => {
    const { code: inTime } = await invite('Cleo')
    const { code: late } = await invite('Dan')
    under.clock.now += 10 * 60_000 - 1
    expect((await enrol(inTime)).status).toBe(200)
    under.clock.now += 1
    expect((await enrol(late)).status).toBe(410)
  })

  test('used, old and mistyped codes get the same answer', async () => {
    const { code } = await invite('Eve')
    await enrol(code)
    const used = await enrol(code)
    const mistyped = await enrol('ABCDEFGHJKMN')
    expect(used.body).toEqual(mistyped.body)
  })

  test('a code may be typed in small letters and groups', async () => {
    const { code } = await invite('Fay')
    expect((await enrol(`${code.slice(0, 4)}-${code.slice(4, 8)} ${code.slice(8)}`.toLowerCase())).status).toBe(200)
  })

  test('neither codes nor tokens are kept, only their hashes', async () => {
    const { code } = await invite('Gus')
    const { body } = await enrol(code)
    const devices = await under.office.db.selectFrom('devices').selectAll().execute()
    const codes = await under.office.db.selectFrom('codes').selectAll().execute()
    const all = JSON.stringify([devices, codes])
    expect(all).not.toContain(code)
    expect(all).not.toContain(body.token)
    expect(devices.map((one) => one.token_hash)).toContain(hashOf(body.token))
    expect(under.log.join('')).not.toContain(body.token)
    expect(under.log.join('')).not.toContain(code)
  })

  test('a revoked phone can neither read nor write, and is told', async () => {
    const phone = await under.person('surveyor', 'Hal')
    expect((await under.ask(phone, 'POST', syncPath, message([fact('h', 1)]))).status).toBe(200)
    expect((await under.ask(chief, 'POST', `/api/devices/${phone.device}/revoke`)).status).toBe(200)
    for (const sent of [[], [fact('h', 2)]]) {
      const { status, body } = await under.ask(phone, 'POST', syncPath, message(sent))
      expect(status).toBe(401)
      expect(body).toMatchObject({ error: 'revoked', what: expect.stringContaining('2026-05-04') })
    }
    const held = await under.ask(chief, 'POST', syncPath, message([]))
    expect(held.body.ack).toMatchObject({ h: 1 })
  })

  test('one device revoked leaves the person’s other devices be; leaving ends them all', async () => {
    const first = await under.person('surveyor', 'Ida')
    const { body: code } = await under.ask(chief, 'POST', `/api/people/${first.account}/codes`)
    const second = { token: (await enrol(code.code)).body.token } as Person
    await under.ask(chief, 'POST', `/api/devices/${first.device}/revoke`)
    expect((await under.ask(first, 'GET', '/api/me')).status).toBe(401)
    expect((await under.ask(second, 'GET', '/api/me')).status).toBe(200)
    await under.ask(chief, 'POST', `/api/people/${first.account}/leave`)
    expect((await under.ask(second, 'GET', '/api/me')).body.error).toBe('revoked')
    expect((await under.ask(chief, 'POST', `/api/people/${first.account}/codes`)).status).toBe(409)
  })

  test('signing out ends the token that asked for it', async () => {
    const phone = await under.person('surveyor', 'Jon')
    expect((await under.ask(phone, 'POST', '/api/me/sign-out')).status).toBe(200)
    expect((await under.ask(phone, 'GET', '/api/me')).status).toBe(401)
  })

  test('a changed role holds from the next request on; nobody changes their own', async () => {
    const phone = await under.person('surveyor', 'Kim')
    expect((await under.ask(phone, 'GET', '/api/recalls')).status).toBe(403)
    await under.ask(chief, 'POST', `/api/people/${phone.account}/role`, { role: 'reviewer' })
    expect((await under.ask(phone, 'GET', '/api/recalls')).status).toBe(200)
    expect((await under.ask(chief, 'POST', `/api/people/${chief.account}/role`, { role: 'surveyor' })).status).toBe(409)
  })

  test('every deed is in the log with who did it, page by page', async () => {
    const seen: { act: string; account: string }[] = []
    let after = ''
    for (;;) {
      const { body } = await under.ask(chief, 'GET', `/api/audit?most=5&after=${after}`)
      seen.push(...body.entries)
      if (body.next === null) break
      after = body.next
    }
    const acts = seen.map(({ act }) => act)
    for (const act of [
      'person invited',
      'device enrolled',
      'device revoked',
      'person left',
      'role changed',
      'signed out',
    ])
      expect(acts).toContain(act)
    expect(seen.find(({ act }) => act === 'device revoked')?.account).toBe(chief.account)
    expect(seen).toHaveLength((await under.office.db.selectFrom('audit').select('entry').execute()).length)
  })
})
