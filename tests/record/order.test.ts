import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { compareOrder, type OrderKey, orderBetween, readOrderKey } from '../../src/record/order.ts'

const seed = 20_260_301
const devices = ['a', 'b', 'c']

/** Grows a list by inserting at arbitrary places by arbitrary devices. */
const insertions = fc.array(fc.record({ at: fc.nat(), device: fc.constantFrom(...devices) }), { maxLength: 80 })

describe('a key between two neighbours', () => {
  it('stands strictly between them, wherever and by whomever entries were inserted before', () => {
    fc.assert(
      fc.property(insertions, (steps) => {
        const keys: OrderKey[] = []
        for (const { at, device } of steps) {
          const index = at % (keys.length + 1)
          const [before, after] = [keys[index - 1] ?? null, keys[index] ?? null]
          const key = orderBetween(before, after, device)
          if (before) expect(compareOrder(before, key)).toBeLessThan(0)
          if (after) expect(compareOrder(key, after)).toBeLessThan(0)
          expect(readOrderKey(JSON.parse(JSON.stringify(key)))).toEqual(key)
          keys.splice(index, 0, key)
        }
      }),
      { seed, numRuns: 500 },
    )
  })

  it('stays short where entries only come at the end', () => {
    let key = orderBetween(null, null, 'a')
    for (let i = 0; i < 1000; i++) key = orderBetween(key, null, 'a')
    expect(JSON.stringify(key)).toBe('[["i","a",1000]]')
  })

  it('keeps runs of several devices, made at once behind any entry, together', () => {
    fc.assert(
      fc.property(insertions, fc.nat(), fc.integer({ min: 2, max: 6 }), (steps, place, length) => {
        const shared: OrderKey[] = []
        for (const { at, device } of steps) {
          const index = at % (shared.length + 1)
          shared.splice(index, 0, orderBetween(shared[index - 1] ?? null, shared[index] ?? null, device))
        }
        const start = place % (shared.length + 1)
        const added = devices.flatMap((device) => {
          let before = shared[start - 1] ?? null
          return Array.from({ length }, () => {
            before = orderBetween(before, shared[start] ?? null, device)
            return { device, key: before }
          })
        })
        const merged = added.sort((one, other) => compareOrder(one.key, other.key)).map((one) => one.device)
        const changes = merged.filter((device, i) => i > 0 && device !== merged[i - 1]).length
        expect(changes).toBe(devices.length - 1)
      }),
      { seed, numRuns: 500 },
    )
  })
})

it.each([
  [null],
  [[]],
  ['i'],
  [[['i', 'a']]],
  [[['i', 'a', 1.5]]],
  [[['', 'a', 0]]],
  [[['i0', 'a', 0]]],
  [[['I', 'a', 0]]],
])('reads no key out of %j', (value) => {
  expect(readOrderKey(value)).toBeNull()
})
