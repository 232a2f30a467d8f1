import { expect, it } from 'vitest'
import { allFacts } from '../../src/record/log.ts'
import { addWalk, nameVenue } from '../../src/record/operations/index.ts'
import { freshName, openTab } from './fresh-store.ts'

async function filled() {
  const tab = await openTab(freshName())
  for (const survey of ['v', 'u']) {
    const log = await tab.openSurvey(survey)
    await tab.commit(log, nameVenue(log, { name: `Venue ${survey}` }), 'Ada')
    await tab.commit(log, addWalk(log, { id: 'w', name: 'Walk é' }), 'Ada')
  }
  await tab.keepDraft('v', { text: '1.2' })
  await tab.changeSettings({ person: 'Ada' })
  await tab.keepPhoto({ id: 'p', type: 'image/jpeg', bytes: new Uint8Array([0, 255, 7]).buffer })
  return tab
}

it('brings everything to another phone, which keeps its own id', async () => {
  const from = await filled()
  const text = await from.backUp()
  const to = await openTab(freshName())
  const own = to.device()
  expect(await to.restore(text)).toEqual({ saved: true, surveys: 2, facts: 6 })
  for (const survey of ['v', 'u'])
    expect(allFacts(await to.openSurvey(survey))).toEqual(allFacts(await from.openSurvey(survey)))
  expect(await to.readDraft('v')).toEqual({ text: '1.2' })
  expect(await to.settings()).toEqual({ person: 'Ada' })
  expect(new Uint8Array((await to.readPhoto('p'))?.bytes ?? new ArrayBuffer(0))).toEqual(new Uint8Array([0, 255, 7]))
  expect(to.device()).toBe(own)
  expect(own).not.toBe(from.device())
  const log = await to.openSurvey('v')
  const saved = await to.commit(log, addWalk(log, { id: 'x', name: 'x' }), 'Ben')
  expect(saved.saved && saved.facts[0]).toMatchObject({ device: own, n: 1 })
  expect(await to.restore(text)).toEqual({ saved: true, surveys: 2, facts: 0 })
})

it('leaves what is on the phone as it was: a setting, a half-typed entry, newer facts', async () => {
  const tab = await filled()
  const text = await tab.backUp()
  await tab.changeSettings({ person: 'Ben' })
  await tab.keepDraft('v', { text: '3.4' })
  const log = await tab.openSurvey('v')
  await tab.commit(log, addWalk(log, { id: 'later', name: 'later' }), 'Ben')
  expect(await tab.restore(text)).toEqual({ saved: true, surveys: 2, facts: 0 })
  expect(await tab.settings()).toEqual({ person: 'Ben' })
  expect(await tab.readDraft('v')).toEqual({ text: '3.4' })
  expect(allFacts(await tab.openSurvey('v'))).toEqual(allFacts(log))
})

it.each([
  ['one letter changed', (text: string) => text.replace('Walk é', 'Walk e'), 'checksum'],
  ['cut off', (text: string) => text.slice(0, -20), 'JSON'],
  ['a survey file', () => '{"kind":"tautline-survey","version":1,"survey":"v","facts":[]}', 'no back-up'],
  ['nested without end', () => '['.repeat(100_000), 'deeper nesting'],
  ['empty', () => '', 'JSON'],
])('refuses a back-up that is %s, and loads nothing of it', async (_, damage, why) => {
  const text = damage(await (await filled()).backUp())
  const to = await openTab(freshName())
  const restored = await to.restore(text)
  expect(restored).toMatchObject({ saved: false, what: expect.stringContaining(why) })
  expect(await to.surveys()).toEqual([])
  expect(await to.settings()).toEqual({})
})

it('refuses a back-up of a copied phone that went on elsewhere, and loads nothing of it', async () => {
  const from = await filled()
  const text = await from.backUp()
  const to = await openTab(freshName())
  const log = await from.openSurvey('v')
  const [first] = allFacts(log)
  if (!first) throw new Error('no fact')
  await to.takeIn([{ ...first, value: 'another name' }])
  expect(await to.restore(text)).toMatchObject({ saved: false, what: expect.stringContaining('does not follow on') })
  expect(await to.surveys()).toHaveLength(1)
  expect(await to.readDraft('v')).toBeNull()
})
