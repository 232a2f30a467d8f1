import { readFileSync } from 'node:fs'
import { describe, expect, test } from 'vitest'
import { featureWords, stripParts, turnWords, widthOf } from '../../src/app/components/strip/strip-words.ts'
import { unitsOffered } from '../../src/app/components/strip/units-offered.ts'
import { checkCopy } from '../../src/app/screens/leaving/copy-check.ts'
import { unfinished } from '../../src/app/screens/leaving/unfinished.ts'
import { askedFor } from '../../src/app/screens/strip/asked-for.ts'
import { placeOfDraft } from '../../src/app/screens/strip/draft-route.ts'
import { quantityEntry } from '../../src/app/screens/strip/quantity-entry.ts'
import { attributeOf } from '../../src/catalogue/attribute-of.ts'
import { kinds } from '../../src/catalogue/kinds.ts'
import { harms } from '../../src/judge/result.ts'
import { readSurveyFile, writeSurveyFile } from '../../src/record/file/index.ts'
import type { Segment, Walk } from '../../src/record/survey.ts'
import { parseQuantity } from '../../src/units/parse.ts'

function museum() {
  const text = readFileSync(new URL('../../demo-venues/museum.json', import.meta.url), 'utf8')
  const read = readSurveyFile(text, attributeOf)
  if (!read.ok) throw new Error(JSON.stringify(read.problems))
  return read
}

const reading = (id: string, value: number) => ({
  id,
  raw: `${value} m`,
  value,
  bound: 'exact' as const,
  instrument: 'tape' as const,
})

const walk: Walk = {
  id: 'w',
  name: 'walk',
  words: {},
  states: [],
  segments: [
    {
      id: 'p1',
      name: 'hall',
      ledBy: 'robot',
      readings: { length: [reading('l1', 9)], width: [reading('a', 1.5), reading('b', 1.24)] },
      words: {},
      features: [
        {
          id: 'door',
          kind: 'hinged-door',
          along: 3,
          side: 'across',
          readings: { clearWidth: [reading('c', 0.82)] },
          words: {},
        },
      ],
      turn: {
        id: 't',
        kind: 'turn',
        readings: { angle: [{ ...reading('g', -Math.PI / 2), raw: '-90 deg' }] },
        words: {},
      },
    },
    { id: 'p2', name: '', ledBy: 'robot', readings: {}, words: {}, features: [] },
  ],
}

describe('a record on the strip', () => {
  test('the least width rules, the turn says its side, the open part has no length', () => {
    const [one, two] = stripParts(walk, [], 'metric')
    expect(widthOf(walk.segments[0] as Segment)).toBe(1.24)
    expect(one).toMatchObject({ number: 1, length: 9, width: 1.24, turnText: 'right 90°', verdict: null })
    expect(two).toMatchObject({ number: 2, title: 'Part 2', length: null, width: null })
  })

  test('a reading that another settles no longer rules', () => {
    const settled = { ...reading('c', 1.4), settles: { readings: ['b'], by: 'N', reason: 'finer', on: '2026-11-30' } }
    const segment = { ...(walk.segments[0] as Segment), readings: { width: [reading('b', 1.24), settled] } }
    expect(widthOf(segment)).toBe(1.4)
  })

  test('a thing is said with its place', () => {
    const door = walk.segments[0]?.features[0] as Segment['features'][number]
    expect(featureWords(door, 'metric')).toBe('hinged door, 3.00 m along, right across')
    expect(featureWords(door, 'imperial')).toBe('hinged door, 9 ft 10 in along, right across')
    expect(turnWords(undefined)).toBeNull()
  })
})

describe('what a keypad sheet asks', () => {
  test('a width offers no reading by eye', () => {
    const entry = quantityEntry(walk, 'p1', 'width')
    expect(entry?.instruments).toContain('tape')
    expect(entry?.instruments).not.toContain('by-eye')
    expect(quantityEntry(walk, 'door', 'clearWidth')?.instruments).not.toContain('by-eye')
  })

  test('every quantity of the catalogue has a tool, and each unit offered is one the parser reads', () => {
    let asked = 0
    for (const row of kinds)
      for (const attribute of row.attributes) {
        if (attribute.type !== 'quantity') continue
        asked++
        const segment = {
          ...(walk.segments[1] as Segment),
          features: [{ id: 'f', kind: row.id, readings: {}, words: {} }],
        }
        const entry = quantityEntry({ ...walk, segments: [segment] }, 'f', attribute.id)
        expect([row.id, attribute.id, (entry?.instruments.length ?? 0) > 0]).toEqual([row.id, attribute.id, true])
        // A unit that the parser does not know is an Error.
        for (const units of ['metric', 'imperial'] as const)
          for (const unit of unitsOffered(attribute, units))
            expect(() => parseQuantity('1', { quantity: attribute.quantity, unit })).not.toThrow()
      }
    expect(asked).toBeGreaterThan(50)
  })
})

describe('coming back', () => {
  const draft = { walk: 'w', holder: 'door', quantity: 'clearWidth', text: '2', instrument: 'door-tape', at: '' }

  test('a half-typed reading names its part and its thing', () => {
    expect(placeOfDraft(walk, draft)).toEqual({
      index: 0,
      name: 'hinged door, clear width, door face to stop',
      route: { at: 'reading', holder: 'door', quantity: 'clearWidth' },
    })
  })

  test('a draft of another walk, or of a thing that is gone, leads nowhere', () => {
    expect(placeOfDraft(walk, { ...draft, walk: 'other' })).toBeNull()
    expect(placeOfDraft(walk, { ...draft, holder: 'gone' })).toBeNull()
    expect(placeOfDraft(walk, { ...draft, text: '' })).toBeNull()
  })

  test('an address opens the sheet of an aspect or of a reading', () => {
    expect(askedFor(walk, 'p2/p2/edge')).toEqual({ segment: 'p2', trail: [{ at: 'aspect', aspect: 'edge' }] })
    expect(askedFor(walk, 'p1/door/clearWidth').trail).toEqual([
      { at: 'reading', holder: 'door', quantity: 'clearWidth' },
    ])
    expect(askedFor(walk, 'p1/door/handle').trail).toEqual([{ at: 'feature', feature: 'door' }])
    expect(askedFor(walk, 'p1/p1/wetness').trail).toEqual([{ at: 'surface' }])
    expect(askedFor(walk, 'p1/p1/nonsense').trail).toEqual([])
    expect(askedFor(walk, 'p1/gone/clearWidth').trail).toEqual([])
  })

  test('without an address it starts at the part that is still open', () => {
    expect(askedFor(walk, undefined)).toEqual({ segment: 'p2', trail: [] })
  })
})

describe('before you leave', () => {
  const survey = (over: Walk) => ({
    survey: 's',
    view: { name: 'venue', floors: [], zones: [], places: [], walks: [over] },
  })

  test('before it is judged, what nobody answered comes worst harm first and each names its entry', () => {
    const list = unfinished(survey(walk), walk, null)
    const order = list.map((one) => harms.indexOf(one.harm))
    expect(order).toEqual(order.toSorted((a, b) => a - b))
    expect(list.find((one) => one.holder === 'p2' && one.quantity === 'edge')?.harm).toBe('fall')
    expect(list.some((one) => one.holder === 'p1' && one.quantity === 'width')).toBe(false)
    expect(list.some((one) => one.holder === 'door' && one.quantity === 'force')).toBe(true)
  })

  test('a walk without parts is not finished', () => {
    const empty = { ...walk, segments: [] }
    expect(unfinished(survey(empty), empty, null)).toHaveLength(1)
  })

  test('a copy that holds everything is checked', () => {
    const { log } = museum()
    const checked = checkCopy(writeSurveyFile(log), log)
    expect(checked.ok && checked.facts).toBeGreaterThan(100)
  })

  test('a copy with one entry less, one changed, or cut short is found out', () => {
    const { log } = museum()
    const text = writeSurveyFile(log)
    const lines = text.split('\n')
    const less = [...lines.slice(0, -3), (lines.at(-3) ?? '').replace(/,$/, ''), ...lines.slice(-2)]
    less.splice(-3, 1)
    less[less.length - 3] = (less.at(-3) ?? '').replace(/,$/, '')
    expect(checkCopy(less.join('\n'), log).ok).toBe(false)
    expect(checkCopy(text.replace('1.62 m', '1.63 m'), log).ok).toBe(false)
    expect(checkCopy(text.slice(0, text.length / 2), log).ok).toBe(false)
  })
})
