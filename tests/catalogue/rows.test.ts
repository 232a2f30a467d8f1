import { describe, expect, test } from 'vitest'
import { kind, kinds } from '../../src/catalogue/kinds.ts'
import { aspects } from '../../src/record/answers.ts'
import { instrument } from '../../src/record/instruments.ts'

const units: Record<string, string[]> = {
  length: ['m', 'mm'],
  angle: ['deg'],
  gradient: ['1:n'],
  force: ['N'],
  time: ['s'],
  sound: ['dB(A)'],
  count: [''],
  number: [''],
}

describe('rows of the catalogue', () => {
  test('ids are the rows own, and an unknown kind has no row', () => {
    expect(new Set(kinds.map((row) => row.id)).size).toBe(kinds.length)
    expect(kinds.length).toBeGreaterThan(55)
    for (const row of kinds) expect(kind(row.id)).toBe(row)
    expect(kind('hover-field')).toBeUndefined()
  })

  test.each(kinds.map((row) => [row.id, row] as const))('%s is whole', (_, row) => {
    expect(row.id).toMatch(/^[a-z]+(-[a-z]+)*$/)
    expect(row.aspect === null || aspects.includes(row.aspect)).toBe(true)
    expect(row.fix).toMatch(/\.$/)
    expect([0, 60, 180, 365]).toContain(row.staleDays)
    const ids = row.attributes.map((one) => one.id)
    expect(new Set(ids).size).toBe(ids.length)
    for (const one of row.attributes) {
      expect(one.id).toMatch(/^[a-z]+([A-Z][a-z]+)*$/)
      if (one.type === 'quantity') {
        expect(units[one.quantity]).toContain(one.unit)
        for (const id of one.instruments) expect(instrument(id), id).toBeDefined()
      }
      const { required } = one
      if (typeof required === 'string') continue
      const asked = row.attributes.find((other) => other.id === required.item)
      expect(asked?.type).toBe('words')
      if (asked?.type === 'words') for (const word of required.says) expect(asked.says).toContain(word)
    }
  })

  test('every placeholder of a spoken text can be filled from the feature', () => {
    for (const row of kinds) {
      const known = new Set(['side', 'clock', 'name', 'role', ...row.attributes.map((one) => one.id)])
      for (const [, field] of row.spoken.matchAll(/\{(\w+)\}/g)) expect(known, `${row.id}: ${field}`).toContain(field)
    }
  })

  test.each(['step', 'edge', 'surface', 'door', 'sensing', 'overhead'] as const)(
    'aspect %s has kinds to list',
    (aspect) => {
      expect(kinds.filter((row) => row.aspect === aspect).length).toBeGreaterThanOrEqual(3)
    },
  )
})
