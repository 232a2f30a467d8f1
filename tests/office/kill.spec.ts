import { type ChildProcess, spawn } from 'node:child_process'
import { rmSync } from 'node:fs'
import { afterAll, describe, expect, inject, test } from 'vitest'
import type { Fact } from '../../src/record/facts.ts'
import { allFacts } from '../../src/record/log.ts'
import { addReading, markState } from '../../src/record/operations/index.ts'
import type { SyncReply } from '../../src/sync/messages.ts'
import { act, smallVenue, tape } from '../record/build.ts'
import { engines, fact, freshPlace, message } from './office-under-test.ts'
import { seeded } from './seeded.ts'

const kills = process.env.TAUTLINE_LONG === '1' ? 20 : 3
const running = new Set<ChildProcess>()

afterAll(() => {
  for (const child of running) child.kill('SIGKILL')
})

/** Starts the real program and waits until it says where it listens. */
async function start(place: { folder: string; url: string | undefined }): Promise<Started> {
  const env = {
    ...process.env,
    TAUTLINE_DATA: place.folder,
    DATABASE_URL: place.url ?? '',
    PORT: '0',
    TAUTLINE_LOG: 'warn',
    TAUTLINE_REQUESTS_A_MINUTE: '1000000',
  }
  const child = spawn(process.execPath, [inject('program'), 'serve'], { env, stdio: ['ignore', 'pipe', 'pipe'] })
  running.add(child)
  let said = ''
  child.stderr.on('data', (chunk) => {
    said += chunk
  })
  const address = await new Promise<string>((resolve, reject) => {
    child.stdout.on('data', (chunk) => {
      said += chunk
      const found = /office is at (http:\S+)/.exec(said)
      if (found?.[1]) resolve(found[1])
    })
    child.once('exit', (code) => reject(new Error(`the office ended with ${code}: ${said}`)))
  })
  const ended = new Promise<number | null>((resolve) =>
    child.once('exit', (code) => {
      running.delete(child)
      resolve(code)
    }),
  )
  return { address, child, ended, said: () => said }
}

interface Started {
  address: string
  child: ChildProcess
  ended: Promise<number | null>
  said(): string
}

async function post<T>(
  address: string,
  token: string | null,
  path: string,
  body: unknown,
): Promise<{ status: number; body: T }> {
  const reply = await fetch(`${address}${path}`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', ...(token ? { authorization: `Bearer ${token}` } : {}) },
    body: JSON.stringify(body),
  })
  return { status: reply.status, body: (await reply.json()) as T }
}

describe.each(engines)('the program on %s', (engine) => {
  test(`killed ${kills} times while it writes, it loses no entry that it acknowledged`, async () => {
    const place = await freshPlace(engine)
    const random = seeded(7)
    let office = await start(place)
    const code = /one use|code for Administrator: (\S+)/.exec(office.said())?.[1]
    expect(code).toBeDefined()
    const enrolled = await post<{ token: string }>(office.address, null, '/api/enrol', { code, label: 'x', record: '' })
    const { token } = enrolled.body
    const devices = ['k0', 'k1', 'k2', 'k3']
    const sent = new Map<string, Fact[]>(devices.map((device) => [device, []]))
    const acknowledged = new Map(devices.map((device) => [device, 0]))
    let inFlight = 0
    for (let kill = 0; kill < kills; kill++) {
      const before = total(acknowledged)
      const killAt = before + 20 + Math.floor(random() * 60)
      const { address, child, ended } = office
      const write = async (device: string) => {
        const own = sent.get(device) as Fact[]
        for (;;) {
          const from = acknowledged.get(device) ?? 0
          while (own.length < from + 3) own.push(fact(device, own.length + 1, { survey: 'killed' }))
          let reply: { status: number; body: SyncReply }
          try {
            inFlight++
            reply = await post<SyncReply>(address, token, '/api/surveys/killed/sync', message(own.slice(from), {}))
          } catch {
            return
          } finally {
            inFlight--
          }
          expect(reply.status).toBe(200)
          acknowledged.set(device, reply.body.ack[device] ?? 0)
          if (total(acknowledged) >= killAt && !child.killed) {
            expect(inFlight).toBeGreaterThan(0)
            child.kill('SIGKILL')
          }
        }
      }
      await Promise.all(devices.map(write))
      await ended
      expect(total(acknowledged)).toBeGreaterThan(before)
      office = await start(place)
      const { body } = await post<SyncReply>(office.address, token, '/api/surveys/killed/sync', message([]))
      for (const device of devices) expect(body.ack[device] ?? 0).toBeGreaterThanOrEqual(acknowledged.get(device) ?? 0)
      await expectAll(office.address, token, sent, acknowledged)
      // The office may hold what it had no time to acknowledge.
      for (const device of devices) acknowledged.set(device, body.ack[device] ?? 0)
    }
    office.child.kill('SIGTERM')
    expect(await office.ended).toBe(0)
    rmSync(place.folder, { recursive: true, force: true })
  }, 600_000)

  test('told to stop, it ends what is under way and lets go', async () => {
    const place = await freshPlace(engine)
    const office = await start(place)
    const code = /code for Administrator: (\S+)/.exec(office.said())?.[1]
    const { body } = await post<{ token: string }>(office.address, null, '/api/enrol', { code, label: 'x', record: '' })
    const sent = post<SyncReply>(
      office.address,
      body.token,
      '/api/surveys/s/sync',
      message([fact('s', 1, { survey: 's' })]),
    ).catch(() => null)
    office.child.kill('SIGTERM')
    expect(await office.ended).toBe(0)
    const reply = await sent
    const again = await start(place)
    // A code is printed at a start only while no administrator can sign in.
    expect(again.said()).not.toContain('code for')
    const { body: held } = await post<SyncReply>(again.address, body.token, '/api/surveys/s/sync', message([]))
    if (reply?.status === 200) expect(held.ack).toEqual({ s: 1 })
    else expect([{}, { s: 1 }]).toContainEqual(held.ack)
    again.child.kill('SIGTERM')
    expect(await again.ended).toBe(0)
    rmSync(place.folder, { recursive: true, force: true })
  })
})

test('the program judges and makes sheets in threads of its own', async () => {
  const place = await freshPlace('sqlite')
  const office = await start(place)
  const code = /code for Administrator: (\S+)/.exec(office.said())?.[1]
  const enrolled = await post<{ token: string }>(office.address, null, '/api/enrol', { code, label: 'x', record: '' })
  const enter = async (role: string) => {
    const invited = await post<{ code: string }>(office.address, enrolled.body.token, '/api/people', {
      name: role,
      role,
    })
    const { body } = await post<{ token: string }>(office.address, null, '/api/enrol', {
      code: invited.body.code,
      label: role,
      record: '',
    })
    return body.token
  }
  const [surveyor, reviewer] = [await enter('surveyor'), await enter('reviewer')]
  const today = new Date().toISOString()
  const phone = smallVenue('a', 'Ada')
  act(phone, (log) => addReading(log, 's1', 'width', tape('s1-width', 1.6, { time: today })))
  act(phone, (log) => markState(log, 'w', { state: 'surveyed', name: 'Ada', date: today.slice(0, 10) }))
  const base = '/api/surveys/venue-1'
  const sent = await post<SyncReply>(office.address, surveyor, `${base}/sync`, message(allFacts(phone.log)))
  const signature = { statement: 'Looked through', have: sent.body.ack }
  expect((await post(office.address, reviewer, `${base}/walks/w/sign`, signature)).status).toBe(200)
  const issued = await post(office.address, reviewer, `${base}/walks/w/issue`, { form: 'venue', changes: '' })
  expect(issued).toMatchObject({ status: 201, body: { number: 1 } })
  const headers = { authorization: `Bearer ${reviewer}` }
  const get = async (path: string) => (await fetch(`${office.address}${path}`, { headers })).json()
  expect(await get(`${base}/sheets/1`)).toMatchObject({ verdict: 'not-known', form: 'venue' })
  // In the background the list gets its verdict: half the answers are missing, so nobody knows.
  await expect
    .poll(async () => ((await get('/api/surveys')) as { surveys: { verdict: string }[] }).surveys[0]?.verdict, {
      timeout: 60_000,
    })
    .toBe('not-known')
  office.child.kill('SIGTERM')
  expect(await office.ended).toBe(0)
  rmSync(place.folder, { recursive: true, force: true })
})

test('a second office on the same data folder does not start', async () => {
  const place = await freshPlace('sqlite')
  const first = await start(place)
  await expect(start(place)).rejects.toThrow(/in use by process/)
  const health = await fetch(`${first.address}/health`)
  expect(health.status).toBe(200)
  first.child.kill('SIGTERM')
  expect(await first.ended).toBe(0)
  const next = await start(place)
  next.child.kill('SIGTERM')
  expect(await next.ended).toBe(0)
  rmSync(place.folder, { recursive: true, force: true })
})

async function expectAll(
  address: string,
  token: string,
  sent: ReadonlyMap<string, Fact[]>,
  acknowledged: ReadonlyMap<string, number>,
): Promise<void> {
  const held = new Map<string, Fact[]>()
  const have: Record<string, number> = {}
  for (let more = true; more; ) {
    const { body } = await post<SyncReply>(address, token, '/api/surveys/killed/sync', message([], have))
    for (const one of body.facts) {
      held.set(one.device, [...(held.get(one.device) ?? []), one])
      have[one.device] = one.n
    }
    more = body.more
  }
  for (const [device, n] of acknowledged)
    expect(held.get(device)?.slice(0, n) ?? []).toEqual(sent.get(device)?.slice(0, n))
}

function total(counts: ReadonlyMap<string, number>): number {
  return [...counts.values()].reduce((sum, one) => sum + one, 0)
}
