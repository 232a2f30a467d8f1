import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import pg from 'pg'
import { inject } from 'vitest'
import type { FastifyInstance } from '../../src/office/fastify.ts'
import type { DeclaredRoute } from '../../src/office/guard.ts'
import type { Office } from '../../src/office/office.ts'
import { folderOfPhotos } from '../../src/office/photo-store.ts'
import { addAccount, addBranch, addCode } from '../../src/office/repositories/people.ts'
import { buildServer } from '../../src/office/server.ts'
import { openDatabase } from '../../src/office/sql/open.ts'
import type { Fact } from '../../src/record/facts.ts'
import type { Role } from '../../src/sync/messages.ts'

export const engines = ['sqlite', 'postgres'] as const
export type Engine = (typeof engines)[number]

export interface Answer {
  status: number
  // What comes back is looked at, not typed.
  // biome-ignore lint/suspicious/noExplicitAny: answers of every route
  body: any
  text: string
  headers: Record<string, string | string[] | number | undefined>
}

export interface OfficeUnderTest {
  office: Office
  app: FastifyInstance
  routes: readonly DeclaredRoute[]
  folder: string
  url: string | undefined
  /** The office's clock: a test moves it. */
  clock: { now: number }
  branch: string
  log: string[]
  /** `from`: the address it comes from; a new one each time unless given, so that no limit by address is met by chance. */
  ask(who: Person | null, method: string, url: string, body?: unknown, from?: string): Promise<Answer>
  person(role: Role, name?: string, branch?: string): Promise<Person>
  close(): Promise<void>
}

export interface Person {
  account: string
  device: string
  token: string
  name: string
}

/** A folder, and an empty database in the engine, for one office. */
export async function freshPlace(engine: Engine): Promise<{ folder: string; url: string | undefined }> {
  const folder = mkdtempSync(join(tmpdir(), 'tautline-office-'))
  if (engine === 'sqlite') return { folder, url: undefined }
  const name = `office_${Math.random().toString(36).slice(2)}${process.pid}`
  const client = new pg.Client({ connectionString: `${inject('postgres')}/postgres` })
  await client.connect()
  await client.query(`create database ${name}`)
  await client.end()
  return { folder, url: `${inject('postgres')}/${name}` }
}

export interface Wishes {
  judge?: Office['judge']
  makeSheet?: Office['makeSheet']
  requestsAMinute?: number
  dist?: string
  /** An office that is there already: a second process on its database. */
  beside?: OfficeUnderTest
  more?: (app: FastifyInstance) => void
}

/** A whole office in this process, on the engine, its clock at noon of a fixed day. */
export async function startOffice(engine: Engine, wishes: Wishes = {}): Promise<OfficeUnderTest> {
  const { folder, url } = wishes.beside ?? (await freshPlace(engine))
  const opened = await openDatabase({ folder, url })
  const clock = { now: Date.parse('2026-05-04T12:00:00Z') }
  const office: Office = {
    db: opened.db,
    photos: folderOfPhotos(join(folder, 'photos')),
    now: () => clock.now,
    judge: wishes.judge ?? null,
    makeSheet: wishes.makeSheet ?? null,
    version: 'test',
    process: 'process-test',
  }
  const log: string[] = []
  const { app, routes } = await buildServer(
    office,
    {
      requestsAMinute: wishes.requestsAMinute ?? 1_000_000,
      trustProxy: [],
      dist: wishes.dist ?? null,
      logLevel: 'info',
      logTo: { write: (line) => void log.push(line) },
    },
    wishes.more,
  )
  const branch = wishes.beside?.branch ?? (await addBranch(office.db, 'North', clock.now))
  let asked = 0
  const ask: OfficeUnderTest['ask'] = async (who, method, path, body, from) => {
    asked++
    const reply = await app.inject({
      method: method as 'GET',
      url: path,
      remoteAddress: from ?? `10.${(asked >> 16) & 255}.${(asked >> 8) & 255}.${asked & 255}`,
      headers: {
        ...(who ? { authorization: `Bearer ${who.token}` } : {}),
        ...(body === undefined
          ? {}
          : { 'content-type': Buffer.isBuffer(body) ? 'application/octet-stream' : 'application/json' }),
      },
      ...(body === undefined ? {} : { payload: Buffer.isBuffer(body) ? body : JSON.stringify(body) }),
    })
    const isJson = String(reply.headers['content-type']).startsWith('application/json')
    return { status: reply.statusCode, body: isJson ? reply.json() : null, text: reply.body, headers: reply.headers }
  }
  return {
    office,
    app,
    routes,
    folder,
    url,
    clock,
    branch,
    log,
    ask,
    async person(role, name = `a ${role}`, of = branch) {
      const account = await addAccount(office.db, of, name, role, clock.now)
      const { code } = await addCode(office.db, account, 'test', clock.now)
      const { status, body } = await ask(null, 'POST', '/api/enrol', { code, label: `${name}'s phone`, record: 'r' })
      if (status !== 200) throw new Error(JSON.stringify(body))
      const me = await ask({ token: body.token } as Person, 'GET', '/api/me')
      return { account, device: me.body.device, token: body.token, name }
    },
    async close() {
      await app.close()
      await opened.close()
      if (!wishes.beside) rmSync(folder, { recursive: true, force: true })
    },
  }
}

/** A fact as a phone would send it. */
export function fact(device: string, n: number, more: Partial<Fact> & Record<string, unknown> = {}): Fact {
  return {
    survey: 'venue-1',
    device,
    n,
    clock: '2026-05-04T10:00:00.000Z',
    person: 'Ada',
    entity: '@venue',
    field: 'note',
    value: `note ${n} of ${device}`,
    replaces: [],
    ...more,
  }
}

export function facts(device: string, from: number, to: number, more: Partial<Fact> = {}): Fact[] {
  return Array.from({ length: to - from + 1 }, (_, i) => fact(device, from + i, more))
}

export const syncPath = '/api/surveys/venue-1/sync'

export function message(sent: readonly unknown[], have: Record<string, number> = {}, protocol = 1) {
  return { protocol, have, facts: sent }
}
