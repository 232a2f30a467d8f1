import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { judgeNow } from '../../src/office/core.ts'
import type { Judge, Judged } from '../../src/office/office.ts'
import { finish, lease, leaseHolds } from '../../src/office/repositories/jobs.ts'
import { workOnce } from '../../src/office/worker.ts'
import { foldSurvey } from '../../src/record/fold.ts'
import { defaultTeamCard } from '../../src/record/team-card.ts'
import { demoLog } from './demo-log.ts'
import { engines, fact, message, type OfficeUnderTest, type Person, startOffice } from './office-under-test.ts'

const card = { kind: 'tautline-team', version: 1, ...defaultTeamCard, name: 'wide team', revision: '9' }

describe.each(engines)('a new team card tried on every venue on %s', (engine) => {
  let under: OfficeUnderTest
  let rita: Person
  const judged: string[] = []
  let failing = ''

  /** What stands here for the judge: a venue called "narrow" fits no team but the one of its own card. */
  const judge: Judge = async (survey, team): Promise<Judged> => {
    if (survey.view.name === failing) throw new Error('no floor under it')
    judged.push(`${survey.view.name}/${team.revision}`)
    const fits = survey.view.name !== 'narrow' || team.revision !== '9'
    const verdict = fits ? 'usable' : 'do-not-use'
    return { walks: [{ id: 'w', name: 'Walk', verdict, sentence: `for ${team.name}` }], goodUntil: '2026-08-01' }
  }

  beforeAll(async () => {
    under = await startOffice(engine, { judge })
    rita = await under.person('reviewer', 'Rita')
    for (const name of ['broad', 'narrow', 'third', 'fourth']) {
      const sent = [fact('a', 1, { survey: name, field: 'name', value: name })]
      await under.ask(rita, 'POST', `/api/surveys/${name}/sync`, message(sent))
    }
  })
  afterAll(() => under.close())

  const begin = async () =>
    (await under.ask(rita, 'POST', '/api/jobs/team-trial', { team: card })).body as { job: string }
  const progress = async (job: string) => (await under.ask(rita, 'GET', `/api/jobs/${job}`)).body

  test('the list of venues gets verdict and end day in the background', async () => {
    while (await workOnce(under.office));
    const { surveys } = (await under.ask(rita, 'GET', '/api/surveys')).body
    expect(surveys).toHaveLength(4)
    for (const one of surveys) expect(one).toMatchObject({ verdict: 'usable', good_until: '2026-08-01' })
    const expired = (day: string) => under.ask(rita, 'GET', `/api/surveys?expiredBy=${day}`)
    expect((await expired('2026-07-31')).body.surveys).toHaveLength(0)
    expect((await expired('2026-08-01')).body.surveys).toHaveLength(4)
    await under.ask(rita, 'POST', '/api/surveys/broad/sync', message([fact('a', 2, { survey: 'broad' })]))
    judged.length = 0
    while (await workOnce(under.office));
    expect(judged).toEqual(['broad/1'])
  })

  test('it is worked through venue by venue, and lists what changes', async () => {
    const { job } = await begin()
    expect(await progress(job)).toMatchObject({ total: 4, done: 0, waiting: 4 })
    await workOnce(under.office)
    expect(await progress(job)).toMatchObject({ done: 1, waiting: 3 })
    while (await workOnce(under.office));
    expect(await progress(job)).toMatchObject({ done: 4, failed: 0, waiting: 0 })
    const { results } = (await under.ask(rita, 'GET', `/api/jobs/${job}/results`)).body
    const changing = results.filter(
      (one: { result: { walks: { changes: boolean }[] } }) => one.result.walks[0]?.changes,
    )
    expect(changing).toMatchObject([
      { survey: 'narrow', result: { walks: [{ before: 'usable', after: 'do-not-use', sentence: 'for wide team' }] } },
    ])
  })

  test('several workers share it: every venue once', async () => {
    const { job } = await begin()
    judged.length = 0
    const workers = ['one', 'two', 'three'].map((process) => ({ ...under.office, process }))
    await Promise.all(
      workers.map(async (office) => {
        while (await workOnce(office));
      }),
    )
    expect(await progress(job)).toMatchObject({ done: 4, waiting: 0 })
    expect(judged.filter((one) => one.endsWith('/9')).sort()).toEqual(['broad/9', 'fourth/9', 'narrow/9', 'third/9'])
  })

  test('what a worker that died had taken is taken over when its lease runs out, and its late answer does not count', async () => {
    const { job } = await begin()
    const { db } = under.office
    const dead = await lease(db, 'dead', under.clock.now)
    expect(dead?.job).toBe(job)
    while (await workOnce(under.office));
    expect(await progress(job)).toMatchObject({ done: 3, waiting: 1 })
    under.clock.now += leaseHolds
    while (await workOnce(under.office));
    expect(await progress(job)).toMatchObject({ done: 4, waiting: 0 })
    if (!dead) throw new Error('nothing was leased')
    expect(await finish(db, dead, 'dead', 'done', { walks: [] })).toBe(false)
    const { results } = (await under.ask(rita, 'GET', `/api/jobs/${job}/results`)).body
    for (const one of results) expect(one.result.walks).toHaveLength(1)
  })

  test('a venue that cannot be judged is listed with why; the others go on', async () => {
    failing = 'third'
    const { job } = await begin()
    while (await workOnce(under.office));
    failing = ''
    expect(await progress(job)).toMatchObject({ done: 3, failed: 1, waiting: 0 })
    const { results } = (await under.ask(rita, 'GET', `/api/jobs/${job}/results`)).body
    expect(results).toContainEqual({
      survey: 'third',
      name: 'third',
      state: 'failed',
      result: { why: 'no floor under it' },
    })
  })

  test('a judge stopped with the office says nothing of the venue: it stays to be done', async () => {
    const { job } = await begin()
    const ending: Judge = async () => {
      throw new Error('office/core-ended: the office is stopping')
    }
    await workOnce({ ...under.office, judge: ending })
    expect(await progress(job)).toMatchObject({ done: 0, failed: 0, waiting: 4 })
    under.clock.now += leaseHolds
    while (await workOnce(under.office));
    expect(await progress(job)).toMatchObject({ done: 4, failed: 0 })
  })

  test('a card that cannot be read begins nothing', async () => {
    const { status, body } = await under.ask(rita, 'POST', '/api/jobs/team-trial', { team: { kind: 'other' } })
    expect(status).toBe(422)
    expect(body.what).toContain('team card cannot be read')
  })
})

test('the core’s own judge answers as the office asks it', () => {
  const { view, ...survey } = foldSurvey(demoLog('clinic'))
  const walk = view.walks.find(({ id }) => id === 'street-to-reception')
  if (!walk || !view.team) throw new Error('the demo venue has changed')
  const judged = judgeNow({ ...survey, view: { ...view, walks: [walk] } }, view.team, '2026-11-30')
  // Worked by hand in demo-venues/expected/clinic.json.
  expect(judged.walks).toMatchObject([{ id: 'street-to-reception', verdict: 'with-cautions' }])
  // What was heard there on 30 November holds sixty days.
  expect(judged.goodUntil).toBe('2027-01-29')
})
