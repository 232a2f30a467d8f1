import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { addBranch } from '../../src/office/repositories/people.ts'
import {
  engines,
  fact,
  message,
  type OfficeUnderTest,
  type Person,
  startOffice,
  syncPath,
} from './office-under-test.ts'

/** Who may use what, written down a second time: a route that is not listed here, or whose rule was loosened, fails. */
const expected: Record<string, string> = {
  'GET /health': 'anyone',
  'GET /ready': 'anyone',
  'GET /api/hello': 'anyone',
  'POST /api/enrol': 'anyone',
  'GET /sheet/:token': 'anyone',
  'GET /*': 'anyone',
  'GET /api/me': 'surveyor reviewer administrator',
  'POST /api/me/sign-out': 'surveyor reviewer administrator',
  'GET /api/people': 'administrator',
  'POST /api/people': 'administrator',
  'POST /api/people/:account/codes': 'administrator',
  'POST /api/people/:account/role': 'administrator',
  'POST /api/people/:account/leave': 'administrator',
  'POST /api/devices/:device/revoke': 'administrator',
  'GET /api/surveys': 'surveyor reviewer administrator',
  'GET /api/surveys/:survey/file': 'surveyor reviewer administrator',
  'GET /api/surveys/:survey/disputes': 'reviewer administrator',
  'POST /api/surveys/:survey/settle': 'reviewer',
  'POST /api/surveys/:survey/sync': 'surveyor reviewer administrator',
  'PUT /api/surveys/:survey/photos/:photo': 'surveyor reviewer administrator',
  'GET /api/surveys/:survey/photos/:photo': 'surveyor reviewer administrator',
  'GET /api/surveys/:survey/photos': 'surveyor reviewer administrator',
  'GET /api/surveys/:survey/review': 'reviewer administrator',
  'POST /api/surveys/:survey/walks/:walk/sign': 'reviewer',
  'POST /api/surveys/:survey/walks/:walk/issue': 'reviewer',
  'GET /api/surveys/:survey/sheets': 'surveyor reviewer administrator',
  'GET /api/surveys/:survey/sheets/:number': 'surveyor reviewer administrator',
  'POST /api/surveys/:survey/sheets/:number/withdraw': 'reviewer administrator',
  'POST /api/surveys/:survey/sheets/:number/shares': 'reviewer',
  'GET /api/surveys/:survey/sheets/:number/shares': 'reviewer administrator',
  'POST /api/surveys/:survey/shares/:share/revoke': 'reviewer administrator',
  'POST /api/surveys/:survey/sheets/:number/givings': 'reviewer administrator',
  'GET /api/recalls': 'reviewer administrator',
  'POST /api/surveys/:survey/givings/:giving/told': 'reviewer administrator',
  'POST /api/surveys/:survey/givings/:giving/reply': 'reviewer administrator',
  'GET /api/fixes': 'surveyor reviewer administrator',
  'PUT /api/surveys/:survey/fixes/:fix': 'reviewer administrator',
  'PUT /api/surveys/:survey/client': 'reviewer administrator',
  'GET /api/clients/:client': 'administrator',
  'DELETE /api/clients/:client': 'administrator',
  'GET /api/audit': 'administrator',
  'POST /api/jobs/team-trial': 'reviewer administrator',
  'GET /api/jobs/:job': 'reviewer administrator',
  'GET /api/jobs/:job/results': 'reviewer administrator',
}

const roles = ['surveyor', 'reviewer', 'administrator'] as const

describe.each(engines)('who may do what on %s', (engine) => {
  let under: OfficeUnderTest
  const own = new Map<string, Person>()
  const foreign = new Map<string, Person>()

  beforeAll(async () => {
    under = await startOffice(engine, { dist: '/nonexistent' })
    const south = await addBranch(under.office.db, 'South', under.clock.now)
    for (const role of roles) {
      own.set(role, await under.person(role, role))
      foreign.set(role, await under.person(role, `foreign ${role}`, south))
    }
    await under.ask(own.get('surveyor') as Person, 'POST', syncPath, message([fact('a', 1)]))
  })
  afterAll(() => under.close())

  const declared = () =>
    under.routes.filter(({ method }) => method !== 'HEAD').map(({ method, url }) => `${method} ${url}`)

  test('every route is in the table of this test, and the other way round', () => {
    expect(declared().sort()).toEqual(Object.keys(expected).sort())
  })

  test('nobody gets in without a token, or with one that was never given', async () => {
    const stranger = { token: 'A'.repeat(43) } as Person
    for (const [route, who] of Object.entries(expected)) {
      if (who === 'anyone') continue
      const [method, url] = concrete(route)
      expect((await under.ask(null, method, url)).body, route).toMatchObject({ error: 'no-token' })
      expect((await under.ask(stranger, method, url)).status, route).toBe(401)
    }
  })

  test.each(roles)('a %s gets exactly where the table says', async (role) => {
    for (const [route, who] of Object.entries(expected)) {
      // Signing out would end the token that the rest of this test needs.
      if (who === 'anyone' || route === 'POST /api/me/sign-out') continue
      const [method, url] = concrete(route)
      const { status } = await under.ask(own.get(role) as Person, method, url)
      if (who.split(' ').includes(role)) expect([401, 403], route).not.toContain(status)
      else expect(status, route).toBe(403)
    }
  })

  test.each(roles)('to a %s of another branch this branch’s survey is not there', async (role) => {
    for (const [route, who] of Object.entries(expected)) {
      if (!route.includes(':survey')) continue
      const [method, url] = concrete(route)
      const { status } = await under.ask(foreign.get(role) as Person, method, url)
      expect(status, route).toBe(who.split(' ').includes(role) ? 404 : 403)
    }
  })

  test('people, devices and jobs of another branch are not there either', async () => {
    const there = foreign.get('administrator') as Person
    const here = own.get('surveyor') as Person
    for (const [method, url, body] of [
      ['POST', `/api/people/${here.account}/codes`, undefined],
      ['POST', `/api/people/${here.account}/role`, { role: 'surveyor' }],
      ['POST', `/api/people/${here.account}/leave`, undefined],
      ['POST', `/api/devices/${here.device}/revoke`, undefined],
    ] as const)
      expect((await under.ask(there, method, url, body)).status, url).toBe(404)
    const { body } = await under.ask(there, 'GET', '/api/people')
    expect(body.people.map((one: { account: string }) => one.account)).not.toContain(here.account)
    expect((await under.ask(there, 'GET', '/api/surveys')).body.surveys).toEqual([])
    expect((await under.ask(here, 'GET', '/api/me')).status).toBe(200)
  })
})

test('a server with a route that declares no rule does not start', async () => {
  await expect(
    startOffice('sqlite', { more: (app) => void app.get('/api/forgotten', async () => ({ secret: true })) }),
  ).rejects.toThrow('/api/forgotten declares no rule')
})

/** The route with values in its address. */
function concrete(route: string): [method: string, url: string] {
  const [method = '', pattern = ''] = route.split(' ')
  const url = pattern
    .replace(':survey', 'venue-1')
    .replace(':photo', '0'.repeat(64))
    .replace(':number', '7')
    .replace(/:\w+/g, 'nothing-of-this-name')
  return [method, url]
}
