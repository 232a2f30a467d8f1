import { expect, it } from 'vitest'
import { cdp } from 'vitest/browser'
import { allFacts } from '../../src/record/log.ts'
import { addWalk } from '../../src/record/operations/index.ts'
import { freshName, openTab } from './fresh-store.ts'

interface Devtools {
  send(method: string, params: object): Promise<unknown>
}

it('a full phone says so, loses nothing, and saves again once there is room', async () => {
  const devtools = cdp() as unknown as Devtools
  const { usage = 0 } = await navigator.storage.estimate()
  // Before the first write: Chromium remembers for a while how much room it had found.
  await devtools.send('Storage.overrideQuotaForOrigin', { origin: location.origin, quotaSize: usage + 300_000 })
  const tab = await openTab(freshName())
  const log = await tab.openSurvey('v')
  expect((await tab.commit(log, addWalk(log, { id: 'w', name: 'before' }), 'Ada')).saved).toBe(true)
  const before = allFacts(log)
  const note = 'x'.repeat(10_000)
  const drafts = Array.from({ length: 200 }, (_, i) => addWalk(log, { id: `n${i}`, name: 'n', note: note + i })).flat()
  const saved = await tab.commit(log, drafts, 'Ada')
  expect(saved).toMatchObject({ saved: false, what: expect.stringContaining('no room') })
  expect(allFacts(log)).toEqual(before)
  expect(await tab.factsAfter('v', new Map())).toEqual(before)

  await devtools.send('Storage.overrideQuotaForOrigin', { origin: location.origin })
  const again = await tab.commit(log, drafts, 'Ada')
  expect(again.saved && again.facts[0]?.n).toBe(before.length + 1)
})
