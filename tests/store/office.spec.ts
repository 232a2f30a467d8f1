import { openDB } from 'idb'
import { describe, expect, it } from 'vitest'
import { foldSurvey } from '../../src/record/fold.ts'
import { allFacts } from '../../src/record/log.ts'
import { addWalk, nameVenue, setWalkField } from '../../src/record/operations/index.ts'
import type { Store } from '../../src/store/open-store.ts'
import { freshName, openTab } from './fresh-store.ts'

const walk = (id: string) => ({ id, name: id })

describe('what the phone knows of its office', () => {
  it('survives closing, stands in no back-up, and is forgotten on its own', async () => {
    const name = freshName()
    const first = await openTab(name)
    await first.remember('enrolment', { token: 'a-secret-token' })
    await first.remember('sync/v', { ack: { a: 3 } })
    first.close()
    const again = await openTab(name)
    expect(await again.recall('enrolment')).toEqual({ token: 'a-secret-token' })
    expect(await again.backUp()).not.toMatch(/a-secret|"ack"/)
    await again.remember('sync/v', null)
    expect(await again.recall('sync/v')).toBeNull()
    await again.changeSettings({ person: 'Ada' })
    await again.forgetOffice()
    expect(await again.recall('enrolment')).toBeNull()
    expect((await again.settings()).person).toBe('Ada')
  })

  it('is added to a phone of the first version with nothing else touched', async () => {
    const name = freshName()
    const old = await openDB(name, 1, {
      upgrade(database) {
        database.createObjectStore('facts', { keyPath: ['survey', 'device', 'n'] })
        database.createObjectStore('marks', { keyPath: ['survey', 'device'] })
        database.createObjectStore('surveys', { keyPath: 'survey' })
        database.createObjectStore('snapshots', { keyPath: 'survey' })
        for (const plain of ['drafts', 'settings', 'memo']) database.createObjectStore(plain)
        database.createObjectStore('photos', { keyPath: 'id' })
      },
    })
    const held = { survey: 'v', device: 'd', n: 1, clock: '', entity: 'w', field: 'walk', value: 1, replaces: [] }
    await old.put('facts', held)
    await old.put('marks', { survey: 'v', device: 'd', n: 1 })
    await old.put('settings', 'd', 'device')
    old.close()
    const tab = await openTab(name)
    expect(tab.device()).toBe('d')
    expect(await tab.factsAfter('v', new Map())).toEqual([held])
    expect(await tab.remember('enrolment', 1)).toEqual({ saved: true })
  })
})

describe('wiping', () => {
  it('leaves nothing, and another tab can keep nothing more under the old id', async () => {
    const name = freshName()
    const [one, two] = [await openTab(name), await openTab(name)]
    const device = one.device()
    const log = await two.openSurvey('v')
    await two.commit(log, nameVenue(log, { name: 'Hall' }), 'Ada')
    await one.remember('enrolment', 1)
    await one.wipe()
    expect(await two.append('v', addWalk(log, walk('w')), 'Ada')).toMatchObject({ saved: false })
    const after = await openTab(name)
    expect(await after.surveys()).toEqual([])
    expect(await after.factsAfter('v', new Map())).toEqual([])
    expect(await after.recall('enrolment')).toBeNull()
    expect(after.device()).not.toBe(device)
  })
})

describe('removing one survey', () => {
  it('leaves nothing of it and everything of the others, also after loading again', async () => {
    const name = freshName()
    const tab = await openTab(name)
    for (const survey of ['v', 'v2']) {
      const log = await tab.openSurvey(survey)
      await tab.commit(log, nameVenue(log, { name: survey }), 'Ada')
      await tab.keepDraft(survey, 'half')
    }
    for (const id of ['p', 'p2']) await tab.keepPhoto({ id, type: 'image/jpeg', bytes: new ArrayBuffer(1) })
    expect(await tab.removeSurvey('v', ['p'])).toEqual({ saved: true })
    tab.close()
    const again = await openTab(name)
    expect((await again.surveys()).map(({ survey }) => survey)).toEqual(['v2'])
    expect([await again.factsAfter('v', new Map()), await again.seen('v'), await again.readDraft('v')]).toEqual([
      [],
      [],
      null,
    ])
    expect([await again.readPhoto('p'), (await again.readPhoto('p2'))?.id]).toEqual([null, 'p2'])
    expect(await again.factsAfter('v2', new Map())).toHaveLength(1)
    expect(await again.readDraft('v2')).toBe('half')
  })
})

describe('two phones under one id', () => {
  /** A phone, and its copy with the same id and the same first entries. */
  async function copied(): Promise<[Store, Store]> {
    const name = freshName()
    const [one, other] = [await openTab(name), freshName()]
    const log = await one.openSurvey('v')
    await one.commit(log, addWalk(log, walk('w')), 'Ada')
    const seed = await openTab(other)
    seed.close()
    const raw = await openDB(other)
    await raw.put('settings', one.device(), 'device')
    raw.close()
    const two = await openTab(other)
    await two.takeIn(allFacts(log))
    expect(two.device()).toBe(one.device())
    return [one, two]
  }

  it('part with everything both wrote: the copy goes on under an id of its own, and the other takes it in', async () => {
    const [one, two] = await copied()
    const [left, right] = [await one.openSurvey('v'), await two.openSurvey('v')]
    const shared = allFacts(left).length
    await one.commit(left, setWalkField(left, 'w', 'name', 'by one'), 'Ada')
    await two.commit(right, setWalkField(right, 'w', 'name', 'by two, first'), 'Ben')
    await two.commit(right, setWalkField(right, 'w', 'name', 'by two, again'), 'Ben')
    await two.commit(right, addWalk(right, walk('x')), 'Ben')
    const wrote = allFacts(right).slice(shared)
    expect(await one.takeIn(allFacts(right))).toMatchObject({ saved: false })

    const from = two.device()
    const parted = await two.partFromCopy('v', from, shared + 1)
    expect(parted).toEqual({ saved: true, facts: wrote.length })
    expect(two.device()).not.toBe(from)
    expect(new Map(await two.seen('v'))).toEqual(
      new Map([
        [from, shared],
        [two.device(), wrote.length],
      ]),
    )
    const now = await two.factsAfter('v', new Map([[from, shared]]))
    expect(now.map(({ person, clock, entity, field, value }) => [person, clock, entity, field, value])).toEqual(
      wrote.map(({ person, clock, entity, field, value }) => [person, clock, entity, field, value]),
    )

    expect(await one.takeIn(await two.factsAfter('v', new Map()))).toMatchObject({ saved: true })
    expect(await two.takeIn(await one.factsAfter('v', new Map()))).toMatchObject({ saved: true })
    const [a, b] = [foldSurvey(await one.openSurvey('v')), foldSurvey(await two.openSurvey('v'))]
    expect(a).toEqual(b)
    expect(a.view.walks.map(({ id }) => id)).toEqual(['w', 'x'])
    // What the copy wrote over its own earlier word stays written over; the two phones' words stand as rivals.
    const rivals = a.conflicts?.find(({ field }) => field === 'name')
    expect(rivals?.versions.map(({ value }) => value).sort()).toEqual(['by one', 'by two, again'])

    const log = await two.openSurvey('v')
    expect(await two.commit(log, addWalk(log, walk('y')), 'Ben')).toMatchObject({
      saved: true,
      facts: [{ device: two.device(), n: wrote.length + 1 }, { n: wrote.length + 2 }],
    })
  })
})
