import { describe, expect, it, vi } from 'vitest'
import { foldSurvey } from '../../src/record/fold.ts'
import { allFacts, emptyLog, mergeFacts } from '../../src/record/log.ts'
import { addWalk, nameVenue, setWalkField } from '../../src/record/operations/index.ts'
import { openStore } from '../../src/store/open-store.ts'
import { freshName, openTab } from './fresh-store.ts'

const walk = (id: string) => ({ id, name: id })

describe('what is kept', () => {
  it('survives closing: facts, their numbers, the phone id, a half-typed entry and the settings', async () => {
    const name = freshName()
    const first = await openTab(name)
    const log = await first.openSurvey('v')
    expect((await first.commit(log, nameVenue(log, { name: 'Harbour Hall' }), 'Ada')).saved).toBe(true)
    expect((await first.commit(log, addWalk(log, walk('w')), 'Ada')).saved).toBe(true)
    await first.keepDraft('v', { text: '1.2' })
    await first.changeSettings({ person: 'Ada', units: 'metric' })
    const device = first.device()
    first.close()

    const second = await openTab(name)
    expect(second.device()).toBe(device)
    const again = await second.openSurvey('v')
    expect(allFacts(again)).toEqual(allFacts(log))
    expect(allFacts(again).map((fact) => [fact.device, fact.n, fact.person])).toEqual([
      [device, 1, 'Ada'],
      [device, 2, 'Ada'],
      [device, 3, 'Ada'],
    ])
    expect(foldSurvey(again).view.walks.map((one) => one.id)).toEqual(['w'])
    expect(await second.readDraft('v')).toEqual({ text: '1.2' })
    expect(await second.settings()).toEqual({ person: 'Ada', units: 'metric' })
    expect((await second.surveys()).map((row) => [row.survey, row.name])).toEqual([['v', 'Harbour Hall']])
    await second.keepDraft('v', null)
    expect(await second.readDraft('v')).toBeNull()
    second.close()
  })

  it('is in the store before commit resolves, never only in memory', async () => {
    const name = freshName()
    const tab = await openTab(name)
    const other = await openTab(name)
    const log = await tab.openSurvey('v')
    const saved = await tab.commit(log, addWalk(log, walk('w')), 'Ada')
    expect(saved.saved && saved.facts).toEqual(await other.factsAfter('v', new Map()))
  })

  it('opens the same from a snapshot and newer facts as from facts alone', async () => {
    const name = freshName()
    const tab = await openTab(name)
    const log = await tab.openSurvey('v')
    for (let i = 0; i < 60; i++) {
      const drafts = Array.from({ length: 8 }, (_, k) => addWalk(log, walk(`w${i}-${k}`))).flat()
      await tab.commit(log, drafts, 'Ada')
    }
    // The first opening makes the snapshot, the next one reads it and what came after.
    await tab.openSurvey('v')
    await tab.commit(log, setWalkField(log, 'w0-0', 'name', 'renamed'), 'Ada')
    const again = await tab.openSurvey('v')
    expect(allFacts(again)).toEqual(allFacts(log))
    expect(foldSurvey(again).view).toEqual(foldSurvey(log).view)
    expect(foldSurvey(again).view.walks).toHaveLength(480)
  })

  it('keeps photos as bytes and the memo of the planner', async () => {
    const tab = await openTab(freshName())
    const bytes = new Uint8Array([1, 2, 250]).buffer
    expect(await tab.keepPhoto({ id: 'hash', type: 'image/jpeg', bytes })).toEqual({ saved: true })
    expect(new Uint8Array((await tab.readPhoto('hash'))?.bytes ?? new ArrayBuffer(0))).toEqual(
      new Uint8Array([1, 2, 250]),
    )
    expect(await tab.readPhoto('other')).toBeNull()
    await tab.keepMemo(new Map([['a', [1, 2]]]))
    expect(await tab.readMemo('a')).toEqual([1, 2])
    expect(await tab.readWholeMemo()).toEqual(new Map([['a', [1, 2]]]))
    await tab.clearMemo()
    expect(await tab.readMemo('a')).toBeUndefined()
  })
})

describe('two tabs of one phone', () => {
  it('never share a number and never overwrite one another', async () => {
    const name = freshName()
    const [one, two] = [await openTab(name), await openTab(name)]
    expect(one.device()).toBe(two.device())
    const [left, right] = [await one.openSurvey('v'), await two.openSurvey('v')]
    const saves = []
    for (let i = 0; i < 25; i++) {
      saves.push(one.commit(left, addWalk(left, walk(`l${i}`)), 'Ada'))
      saves.push(two.commit(right, addWalk(right, walk(`r${i}`)), 'Ada'))
    }
    const results = await Promise.all(saves)
    const numbers = results.flatMap((saved) => (saved.saved ? saved.facts.map((fact) => fact.n) : []))
    expect(new Set(numbers).size).toBe(100)
    expect(Math.max(...numbers)).toBe(100)
    await Promise.all([one.catchUp(left), two.catchUp(right)])
    expect(foldSurvey(left).view).toEqual(foldSurvey(right).view)
    expect(foldSurvey(left).view.walks).toHaveLength(50)
  })

  it('agree on one phone id when both open a new phone at once', async () => {
    const name = freshName()
    const tabs = await Promise.all([openTab(name), openTab(name), openTab(name)])
    expect(new Set(tabs.map((tab) => tab.device())).size).toBe(1)
  })

  it('hear of one another', async () => {
    const name = freshName()
    const [one, two] = [await openTab(name), await openTab(name)]
    const heard: string[] = []
    const stop = two.listen((survey) => heard.push(survey))
    await one.append('v', addWalk(emptyLog('v'), walk('w')), 'Ada')
    await vi.waitFor(() => expect(heard).toEqual(['v']))
    stop()
    await one.append('v', addWalk(emptyLog('v'), walk('x')), 'Ada')
    const log = await two.openSurvey('v')
    expect(foldSurvey(log).view.walks.map((one) => one.id)).toEqual(['w', 'x'])
    expect(heard).toEqual(['v'])
  })
})

describe('facts from elsewhere', () => {
  it('are taken in once, and refused whole where a number is missing or says something else', async () => {
    const [phone, other] = [await openTab(freshName()), await openTab(freshName())]
    const log = await other.openSurvey('v')
    for (const id of ['a', 'b', 'c']) await other.commit(log, addWalk(log, walk(id)), 'Ben')
    const facts = allFacts(log)
    expect(await phone.takeIn(facts)).toMatchObject({ saved: true })
    const twice = await phone.takeIn(facts)
    expect(twice.saved && twice.added).toEqual([])

    const later = facts.map((fact) => ({ ...fact, device: 'elsewhere' }))
    const gap = await phone.takeIn([later[0], later[2]].filter((fact) => fact !== undefined))
    expect(gap).toMatchObject({ saved: false })
    const forked = await phone.takeIn([...later, ...facts.slice(0, 1).map((fact) => ({ ...fact, value: 'other' }))])
    expect(forked).toMatchObject({ saved: false })
    expect(await phone.factsAfter('v', new Map())).toEqual(facts)
  })

  it('lets a phone that opened earlier catch up', async () => {
    const phone = await openTab(freshName())
    const log = await phone.openSurvey('v')
    const away = emptyLog('v', 'b')
    const facts = addWalk(away, walk('w')).map((draft, i) => ({
      ...draft,
      survey: 'v',
      device: 'b',
      n: i + 1,
      clock: '2026-01-01T00:00:00Z',
    }))
    await phone.takeIn(facts)
    expect(await phone.catchUp(log)).toEqual(facts)
    expect(foldSurvey(log).view.walks.map((one) => one.id)).toEqual(['w'])
    expect(mergeFacts(log, facts).added).toEqual([])
  })
})

describe('a browser that keeps nothing', () => {
  it('is told in words: no IndexedDB, or one that refuses to open', async () => {
    const real = globalThis.indexedDB
    vi.stubGlobal('indexedDB', undefined)
    expect(await openStore(freshName())).toMatchObject({
      ok: false,
      whatToDo: expect.stringContaining('ordinary window'),
    })
    vi.stubGlobal('indexedDB', {
      open: () => {
        throw new DOMException('no', 'SecurityError')
      },
    })
    expect(await openStore(freshName())).toMatchObject({ ok: false, what: expect.stringContaining('SecurityError') })
    vi.unstubAllGlobals()
    expect(globalThis.indexedDB).toBe(real)
  })

  it('may lack the storage manager', async () => {
    const { storageState, askToPersist } = await import('../../src/store/storage-state.ts')
    expect(await storageState({})).toEqual({ persisted: null, usedBytes: null, roomBytes: null })
    expect(await askToPersist({})).toBeNull()
    const real = await storageState()
    expect(real.roomBytes).toBeGreaterThan(0)
  })
})

it('a draft that is no JSON is refused before anything is written', async () => {
  const tab = await openTab(freshName())
  const drafts = [
    { entity: 'w', field: 'name', value: 'kept?', replaces: [] },
    { entity: 'w', field: 'heading', value: Number.NaN, replaces: [] },
  ]
  await expect(tab.append('v', drafts, 'Ada')).rejects.toThrow('record/no-json')
  expect(await tab.factsAfter('v', new Map())).toEqual([])
})
