import { describe, expect, test } from 'vitest'
import { cardOf, textsOf } from '../../src/app/screens/team/card-texts.ts'
import { fieldNames } from '../../src/app/screens/team/field-names.ts'
import { cardFields } from '../../src/app/screens/team/schema-fields.ts'
import { defaultTeamCard, type TeamCard } from '../../src/record/team-card.ts'

const answered: TeamCard = {
  ...defaultTeamCard,
  revision: '3',
  handler: { ...defaultTeamCard.handler, opensDoors: true },
}

/** Every leaf of a plain object, as "robot.friction.smooth.dry". */
function leaves(node: unknown, path = ''): string[] {
  if (typeof node !== 'object' || node === null || Array.isArray(node)) return [path]
  return Object.entries(node).flatMap(([key, inner]) => leaves(inner, path === '' ? key : `${path}.${key}`))
}

describe('the form of the team card', () => {
  test('has a field for everything the default card says, but for what is set on saving', () => {
    const paths = cardFields.map((field) => field.path)
    const said = leaves(defaultTeamCard).filter((path) => path !== 'revision' && path !== 'date')
    expect(said.filter((path) => !paths.includes(path))).toEqual([])
  })

  test('gives every field a name in words', () => {
    expect(cardFields.filter(({ path }) => !fieldNames[path]).map(({ path }) => path)).toEqual([])
  })

  test('asks whether the handler opens doors: without an answer nothing is saved', () => {
    const read = cardOf(textsOf(defaultTeamCard), defaultTeamCard, '2026-12-01')
    expect(read).toEqual({ ok: false, troubles: { 'handler.opensDoors': expect.stringContaining('Ask the handler') } })
  })

  test('saved untouched is the same card under the next revision and the day', () => {
    const read = cardOf(textsOf(answered), answered, '2026-12-01')
    expect(read).toEqual({ ok: true, card: { ...answered, revision: '4', date: '2026-12-01' } })
  })

  test('takes a figure in another unit, a gradient as 1:n, lengths one after the other', () => {
    const texts = {
      ...textsOf(answered),
      'robot.width': '38 cm',
      'robot.slope': '1:12',
      'leash.lengths': '0.7; 90 cm; 1.25',
    }
    const read = cardOf(texts, answered, '2026-12-01')
    if (!read.ok) throw new Error(JSON.stringify(read.troubles))
    expect(read.card.robot.width).toBeCloseTo(0.38, 12)
    expect(read.card.robot.slope).toBeCloseTo(1 / 12, 12)
    expect(read.card.leash.lengths).toEqual([0.7, 0.9, 1.25])
  })

  test('keeps who was shown to stand, and when; half an answer is refused', () => {
    const shown = { ...textsOf(answered), 'handler.standsWhenSlack': '2026-11-20 Ana Ruiz' }
    const read = cardOf(shown, answered, '2026-12-01')
    expect(read.ok && read.card.handler.standsWhenSlack).toEqual({ name: 'Ana Ruiz', date: '2026-11-20' })
    const half = cardOf({ ...shown, 'handler.standsWhenSlack': '2026-11-20 ' }, answered, '2026-12-01')
    expect(half.ok ? null : Object.keys(half.troubles)).toEqual(['handler.standsWhenSlack'])
  })

  test.each([
    ['robot.length', 'wide'],
    ['robot.length', ''],
    ['robot.length', '>0.5'],
    ['robot.length', '40'],
    ['handler.stature', '0.2'],
  ])('refuses %s = “%s” at its field', (path, text) => {
    const read = cardOf({ ...textsOf(answered), [path]: text }, answered, '2026-12-01')
    expect(read.ok ? null : Object.keys(read.troubles)).toEqual([path])
  })
})
