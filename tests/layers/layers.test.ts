import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { inspect, rooms } from '../../scripts/layers.mjs'

const here = import.meta.dirname

describe('the house', () => {
  it('has no breach, and every file was read', () => {
    const { files, breaches } = inspect(join(here, '../../src'))
    expect(breaches).toEqual([])
    expect(files).toBeGreaterThan(60)
  })

  it('says with each wall what to do instead', () => {
    for (const [room, rule] of Object.entries(rooms as Record<string, { instead: string }>))
      expect(rule.instead.length, room).toBeGreaterThan(20)
  })
})

describe('a planted breach is found', () => {
  const { breaches } = inspect(join(here, 'breaches')) as { breaches: string[] }
  const planted: [string, RegExp][] = [
    ['a type imported upwards', /^units\/looks-up\.ts -> judge\/ok\.ts: units\/ stands on nothing/],
    ['an import() type upwards', /^record\/sneaks-type\.ts -> judge\/ok\.ts/],
    ['a page that calls the planner by a dynamic import', /^app\/screens\/solves\.ts -> leash\/clearance\.ts/],
    ['a page that starts a worker past the bridge', /^app\/screens\/starts-worker\.ts -> workers\/judge\.worker\.ts/],
    ['a package used outside its owner', /^judge\/owns-idb\.ts -> idb: only store\//],
    ['a package of one sheet form in another', /^sheets\/text\/takes-pdfkit\.ts -> pdfkit: only sheets\/pdf\//],
    ['a package without an owner', /^store\/unowned\.ts -> left-pad/],
    ['one sheet form that borrows from another', /^sheets\/text\/borrows\.ts -> sheets\/html\/form\.ts/],
    ['a cycle', /^cycle: geometry\/circle\.ts -> geometry\/turn\.ts -> geometry\/circle\.ts/],
    ['a folder named utils', /^units\/utils\/pad\.ts: name it for its idea/],
    [
      'a file that no entry reaches',
      /^leash\/clearance\.ts: no entry reaches it|^units\/utils\/pad\.ts: no entry reaches it/,
    ],
  ]
  it.each(planted)('%s', (_what, sentence) => {
    expect(breaches.filter((breach) => sentence.test(breach)).length).toBeGreaterThan(0)
  })
})
