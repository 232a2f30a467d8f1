import { describe, expect, test } from 'vitest'
import type { Fact } from '../../src/record/facts.ts'
import { agree, firstPage, isOfficeDevice, missingFrom, numberIn } from '../../src/sync/messages.ts'

const fact = (device: string, n: number, value: unknown = 'x'): Fact => ({
  survey: 's',
  device,
  n,
  clock: '2026-05-04T10:00:00Z',
  entity: 'e',
  field: 'f',
  value,
  replaces: [],
})

describe('what the office still needs', () => {
  test('is what lies beyond what it holds, by device and number', () => {
    const facts = [fact('b', 2), fact('a', 3), fact('b', 1), fact('a', 1), fact('a', 2)]
    expect(missingFrom({ a: 1, b: 2 }, facts)).toEqual([fact('a', 2), fact('a', 3)])
    expect(missingFrom({}, facts).map(({ device, n }) => `${device}${n}`)).toEqual(['a1', 'a2', 'a3', 'b1', 'b2'])
  })

  test('is never what the office itself wrote', () => {
    expect(isOfficeDevice('@office-1')).toBe(true)
    expect(isOfficeDevice('office-1')).toBe(false)
    expect(missingFrom({}, [fact('@office-1', 1), fact('a', 1)])).toEqual([fact('a', 1)])
  })

  test('takes a device called like a part of every object for what it is', () => {
    expect(numberIn({}, 'toString')).toBe(0)
    expect(missingFrom({}, [fact('toString', 1)])).toHaveLength(1)
  })
})

describe('a page', () => {
  test('ends at its number of facts', () => {
    const facts = [1, 2, 3, 4].map((n) => fact('a', n))
    expect(firstPage(facts, { facts: 3, characters: 1e6 })).toEqual(facts.slice(0, 3))
    expect(firstPage(facts, { facts: 4, characters: 1e6 })).toEqual(facts)
  })

  test('ends at its size, but holds one fact however large', () => {
    const large = fact('a', 1, 'x'.repeat(5000))
    const one = JSON.stringify(fact('a', 2)).length
    expect(firstPage([large, fact('a', 2)], { facts: 10, characters: 1000 })).toEqual([large])
    const two = [fact('a', 2), fact('a', 3)]
    expect(firstPage(two, { facts: 10, characters: 2 * one })).toHaveLength(2)
    expect(firstPage(two, { facts: 10, characters: 2 * one - 1 })).toHaveLength(1)
  })
})

describe('the version of the exchange', () => {
  test.each([
    ['the same', { least: 1, greatest: 1 }, { least: 1, greatest: 1 }, { protocol: 1 }],
    [
      'an older phone that the office still knows',
      { least: 1, greatest: 2 },
      { least: 1, greatest: 4 },
      { protocol: 2 },
    ],
    [
      'a newer phone that still knows the office',
      { least: 2, greatest: 5 },
      { least: 1, greatest: 2 },
      { protocol: 2 },
    ],
    ['a phone too old', { least: 1, greatest: 1 }, { least: 2, greatest: 3 }, { protocol: null, older: 'own' }],
    ['an office too old', { least: 3, greatest: 4 }, { least: 1, greatest: 2 }, { protocol: null, older: 'theirs' }],
  ] as const)('%s', (_what, own, theirs, agreed) => {
    expect(agree(own, theirs)).toEqual(agreed)
  })
})
