import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { makeSheetNow } from '../../src/office/core.ts'
import type { SheetOrder } from '../../src/office/office.ts'
import { readSurveyFile } from '../../src/record/file/read-survey-file.ts'
import { allFacts } from '../../src/record/log.ts'
import { markState } from '../../src/record/operations/index.ts'
import { act, smallVenue } from '../record/build.ts'
import { demoLog } from './demo-log.ts'
import {
  engines,
  fact,
  message,
  type OfficeUnderTest,
  type Person,
  startOffice,
  syncPath,
} from './office-under-test.ts'

const day = 24 * 60 * 60 * 1000

describe.each(engines)('review, signature, sheets and links on %s', (engine) => {
  let under: OfficeUnderTest
  let ada: Person
  let rita: Person
  let chief: Person
  let orders: SheetOrder[] = []
  let refusing = false

  beforeAll(async () => {
    under = await startOffice(engine, {
      // What stands here for the sheets of the core: the gates, numbers and links are what is tried.
      makeSheet: async (order) => {
        orders.push(order)
        return refusing
          ? { ok: false, why: 'Nobody helps at the door.', whatToDo: 'Name who helps.' }
          : {
              ok: true,
              title: 'Door to desk',
              verdict: 'usable',
              html: `<!doctype html><title>Sheet ${order.number}</title><style>p{margin:0}</style><p>Sheet ${order.number}</p>`,
              goodUntil: '2026-06-03',
            }
      },
    })
    ada = await under.person('surveyor', 'Ada')
    rita = await under.person('reviewer', 'Rita')
    chief = await under.person('administrator', 'Chief')
  })
  afterAll(() => under.close())

  const phone = smallVenue('a', 'Ada')
  const send = async (who: Person = ada) => {
    const { status, body } = await under.ask(who, 'POST', syncPath, message(allFacts(phone.log)))
    expect(status, JSON.stringify(body)).toBe(200)
  }
  const mark = (state: 'surveyed' | 'tried' | 'reviewed', note = '') =>
    act(phone, (log) => markState(log, 'w', { state, name: `Ada${note}`, date: '2026-05-04', team: '1' }))
  const review = async () => (await under.ask(rita, 'GET', '/api/surveys/venue-1/review')).body
  const sign = async (who = rita, have?: object) =>
    under.ask(who, 'POST', '/api/surveys/venue-1/walks/w/sign', {
      statement: 'Looked through, every part',
      have: have ?? (await review()).have,
    })
  const issue = (form = 'client', changes = '') =>
    under.ask(rita, 'POST', '/api/surveys/venue-1/walks/w/issue', { form, changes })
  const linkTo = async (number: number, days = 10) =>
    (await under.ask(rita, 'POST', `/api/surveys/venue-1/sheets/${number}/shares`, { days })).body
  const open = (path: string) => under.ask(null, 'GET', path)

  test('a sheet waits for every state in turn', async () => {
    await send()
    expect((await issue()).body.what).toContain('surveyed')
    mark('surveyed')
    await send()
    expect((await issue()).body.what).toContain('tried')
    expect((await issue('venue')).body.what).not.toContain('tried')
    mark('tried')
    await send()
    const { status, body } = await issue()
    expect(status).toBe(409)
    expect(body.what).toBe('No sheet yet: no reviewer has signed it.')
    expect(orders).toEqual([])
  })

  test('a phone that claims "reviewed" has reviewed nothing, and its claim is on no sheet', async () => {
    mark('reviewed', ' as a reviewer')
    await send()
    expect((await issue()).body.what).toContain('no reviewer has signed')
    const [walk] = (await review()).walks
    expect(walk.states.map(({ state }: { state: string }) => state)).toEqual(['surveyed', 'tried'])
  })

  test('who looked at less than is there does not sign', async () => {
    const { have } = await review()
    const { status, body } = await sign(rita, { ...have, a: have.a - 1 })
    expect(status).toBe(409)
    expect(body.error).toBe('changed')
  })

  test('nobody signs a survey that they brought alone', async () => {
    const survey = 'venue-own'
    await under.ask(
      rita,
      'POST',
      `/api/surveys/${survey}/sync`,
      message([
        fact('r', 1, {
          survey,
          entity: 'w',
          field: 'in',
          value: { parent: '@venue', list: 'walks', order: ['a', 'r', 1] },
        }),
      ]),
    )
    const reply = await under.ask(rita, 'POST', `/api/surveys/${survey}/walks/w/sign`, {
      statement: 'fine by me',
      have: { r: 1 },
    })
    expect([404, 409]).toContain(reply.status)
    const own = smallVenue('s', 'Rita')
    const facts = allFacts(own.log).map((one) => ({ ...one, survey: 'venue-mine' }))
    expect((await under.ask(rita, 'POST', '/api/surveys/venue-mine/sync', message(facts))).status).toBe(200)
    const { have } = (await under.ask(rita, 'GET', '/api/surveys/venue-mine/review')).body
    const mine = await under.ask(rita, 'POST', '/api/surveys/venue-mine/walks/w/sign', {
      statement: 'fine by me',
      have,
    })
    expect(mine.body.error).toBe('own-work')
  })

  test('signed, it is issued under a number, with the exact entries and the team card', async () => {
    expect((await sign()).status).toBe(200)
    const { status, body } = await issue()
    expect(status, JSON.stringify(body)).toBe(201)
    expect(body).toEqual({ number: 1, goodUntil: '2026-06-03', replaces: null })
    const sheet = (await under.ask(ada, 'GET', '/api/surveys/venue-1/sheets/1')).body
    const frozen = readSurveyFile(sheet.facts)
    if (!frozen.ok) throw new Error('the frozen entries cannot be read')
    const words = allFacts(frozen.log).filter(({ device }) => device === 'a')
    expect(words).toEqual(allFacts(phone.log))
    expect(sheet.team).toMatchObject({ revision: '1', robot: { width: 0.35 } })
    const [order] = orders
    expect(order?.survey.view.walks[0]?.states.map(({ state }) => state)).toEqual(['surveyed', 'tried', 'reviewed'])
  })

  test('the phones hear of signature and issue, as the office’s own entries', async () => {
    const { facts } = (await under.ask(ada, 'POST', syncPath, message([], { a: 999 }))).body
    const fields = facts.map(({ field }: { field: string }) => field)
    expect(fields).toEqual(['state/reviewed/2026-05-04/Rita', 'state/issued/2026-05-04/Rita'])
  })

  test('an entry after the signature: it must be reviewed again', async () => {
    act(phone, () => [{ entity: 's1', field: 'note', value: 'lockers moved', replaces: [] }])
    await send()
    expect((await issue('client', 'x')).body.what).toContain('reviewed again')
    expect((await sign()).status).toBe(200)
  })

  test('a new sheet says what changed, replaces the old one, and its link says so', async () => {
    const { path } = await linkTo(1)
    const shown = await open(path)
    expect(shown.status).toBe(200)
    expect(shown.text).toContain('Sheet 1')
    expect((await issue()).body.error).toBe('say-what-changed')
    expect((await issue('client', 'The lockers moved')).body).toMatchObject({ number: 2, replaces: 1 })
    const { sheets } = (await under.ask(ada, 'GET', '/api/surveys/venue-1/sheets')).body
    expect(sheets[1].changes).toMatch(/^The lockers moved \(\d+ entr(y|ies) since: .*Foyer/)
    expect(sheets[0].replaced_by).toBe(2)
    const old = await open(path)
    expect(old.status).toBe(410)
    expect(old.text).toContain('Sheet 1 was replaced by sheet 2. Do not use your saved, printed or audio copy.')
  })

  test('a link is unguessable, hashed, counted, kept by nobody and indexed by nobody', async () => {
    const { path, share } = await linkTo(2)
    const token = path.split('/').at(-1) as string
    expect(Buffer.from(token, 'base64url')).toHaveLength(32)
    for (let i = 0; i < 3; i++) expect((await open(path)).status).toBe(200)
    const { headers } = await open(path)
    expect(headers['cache-control']).toBe('no-store')
    expect(headers['x-robots-tag']).toContain('noindex')
    expect(headers['content-security-policy']).toMatch(/default-src 'none'; style-src 'sha256-[^']+'; .*sandbox/)
    const { shares } = (await under.ask(chief, 'GET', '/api/surveys/venue-1/sheets/2/shares')).body
    expect(shares.find((one: { share: string }) => one.share === share).opened).toBe(4)
    expect(JSON.stringify(shares)).not.toContain(token)
    expect(JSON.stringify(await under.office.db.selectFrom('shares').selectAll().execute())).not.toContain(token)
    expect(under.log.join('')).not.toContain(token)
    expect((await open(`/sheet/${token.slice(0, -2)}AA`)).status).toBe(404)
  })

  test('a withdrawn link says since when, and not to use what was saved', async () => {
    const { path, share } = await linkTo(2)
    await under.ask(chief, 'POST', `/api/surveys/venue-1/shares/${share}/revoke`)
    const { status, text } = await open(path)
    expect(status).toBe(410)
    expect(text).toContain('Withdrawn on 4 May 2026. Do not use your saved, printed or audio copy.')
    expect(text).not.toContain('Sheet 2</p>')
  })

  test('a link ends with its days, and with its sheet at the latest', async () => {
    const { path, expires } = await linkTo(2, 2)
    expect(expires).toBe('2026-05-06T12:00:00.000Z')
    expect((await linkTo(2, 366)).expires).toBe('2026-06-04T00:00:00.000Z')
    const before = under.clock.now
    under.clock.now = Date.parse(expires) - 1
    expect((await open(path)).status).toBe(200)
    under.clock.now += 1
    const ended = await open(path)
    expect(ended.status).toBe(410)
    expect(ended.text).toContain('This link ended on 6 May 2026. Do not use your saved, printed or audio copy.')
    const { path: long } = await linkTo(2, 366)
    under.clock.now = Date.parse('2026-06-04T00:00:00Z')
    expect((await open(long)).text).toContain('good until 3 June 2026. Do not use your saved')
    under.clock.now = before
  })

  test('the recall list names each form given, and closes on the reply alone', async () => {
    const give = async (number: number, form: string, to: string) =>
      (await under.ask(rita, 'POST', `/api/surveys/venue-1/sheets/${number}/givings`, { form, to })).body
        .giving as string
    const braille = await give(2, 'braille, on paper', 'R. Penn')
    const audio = await give(2, 'audio', 'R. Penn')
    const recalls = async () =>
      (await under.ask(rita, 'GET', '/api/recalls')).body.recalls.map(({ giving }: { giving: string }) => giving)
    expect(await recalls()).toEqual([])
    await under.ask(chief, 'POST', '/api/surveys/venue-1/sheets/2/withdraw', { reason: 'Works in the foyer' })
    expect((await recalls()).sort()).toEqual([braille, audio].sort())
    await under.ask(rita, 'POST', `/api/surveys/venue-1/givings/${audio}/told`)
    expect(await recalls()).toContain(audio)
    const reply = (text: string) =>
      under.ask(rita, 'POST', `/api/surveys/venue-1/givings/${audio}/reply`, { reply: text })
    expect((await reply('')).status).toBe(400)
    expect((await reply('Deleted it from the player')).status).toBe(200)
    expect(await recalls()).toEqual([braille])
    expect((await reply('again')).status).toBe(409)
  })

  test('a sheet refused after its number was taken uses the number up, and the log says so', async () => {
    refusing = true
    expect((await issue('client')).body).toMatchObject({ error: 'no-sheet', what: 'Nobody helps at the door.' })
    refusing = false
    expect((await issue('client')).body).toMatchObject({ number: 4 })
    const { entries } = (await under.ask(chief, 'GET', '/api/audit?most=5000')).body
    const refused = entries.find(({ act }: { act: string }) => act === 'sheet refused, number not used')
    expect(refused.detail.number).toBe(3)
  })

  test('of two who issue at once one sheet stands', async () => {
    await sign()
    const both = await Promise.all([issue('venue', 'x'), issue('venue', 'x')])
    const issued = both.filter(({ status }) => status === 201).map(({ body }) => body.number as number)
    expect(issued.length).toBeGreaterThan(0)
    for (const { status, body } of both) if (status !== 201) expect(body.error).toBe('changed')
    const { sheets } = (await under.ask(ada, 'GET', '/api/surveys/venue-1/sheets')).body
    const ours = sheets.filter(({ form }: { form: string }) => form === 'venue')
    expect(ours).toHaveLength(issued.length)
    const standing = ours.filter((one: { replaced_by: number | null }) => one.replaced_by === null)
    expect(standing.map(({ number }: { number: number }) => number)).toEqual([Math.max(...issued)])
  })

  test('what no longer holds is not issued', async () => {
    const before = under.clock.now
    under.clock.now += 40 * day
    expect((await issue('file', 'x')).body.error).toBe('stale')
    under.clock.now = before
  })

  test('fixes are kept with owner, day and status', async () => {
    const fix = { text: 'Move the lockers', owner: 'Facilities', due: '2026-06-01', status: 'asked', note: '' }
    const path = '/api/surveys/venue-1/fixes/s1%2Flockers'
    expect((await under.ask(rita, 'PUT', path, fix)).status).toBe(200)
    expect((await under.ask(rita, 'PUT', path, { ...fix, status: 'done' })).status).toBe(200)
    expect((await under.ask(rita, 'PUT', path, { ...fix, status: 'forgotten' })).status).toBe(400)
    expect((await under.ask(ada, 'GET', '/api/fixes')).body.fixes).toMatchObject([
      { fix: 's1/lockers', status: 'done', owner: 'Facilities' },
    ])
    orders = []
  })
})

describe('with the core’s own sheets', () => {
  test('a demo venue is sent, signed, issued and read by link on another device', async () => {
    const under = await startOffice('sqlite', { makeSheet: async (order) => makeSheetNow(order) })
    under.clock.now = Date.parse('2026-11-30T12:00:00Z')
    const ada = await under.person('surveyor', 'Ada')
    const rita = await under.person('reviewer', 'Rita')
    const facts = allFacts(demoLog('clinic'))
    const base = '/api/surveys/demo-clinic'
    expect((await under.ask(ada, 'POST', `${base}/sync`, message(facts.slice(0, 1000)))).status).toBe(200)
    expect((await under.ask(ada, 'POST', `${base}/sync`, message(facts.slice(1000)))).status).toBe(200)
    const { have } = (await under.ask(rita, 'GET', `${base}/review`)).body
    const walk = 'street-to-reception'
    const signed = await under.ask(rita, 'POST', `${base}/walks/${walk}/sign`, {
      statement: 'Every part looked at',
      have,
    })
    expect(signed.status, signed.text).toBe(200)
    const issued = await under.ask(rita, 'POST', `${base}/walks/${walk}/issue`, { form: 'client', changes: '' })
    expect(issued.status, issued.text).toBe(201)
    const { body: link } = await under.ask(rita, 'POST', `${base}/sheets/${issued.body.number}/shares`, { days: 7 })
    const page = await under.ask(null, 'GET', link.path)
    expect(page.status).toBe(200)
    expect(page.text).toContain('<html lang="en">')
    expect(page.text).toContain('Sheet number: 1.')
    expect(page.text).toContain('Reviewed: Rita, 30 November 2026.')
    expect(page.text).not.toMatch(/<script|\bscore\b/i)
    await under.close()
  })
})
