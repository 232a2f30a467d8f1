import { describe, expect, it } from 'vitest'
import type { Check } from '../../src/judge/result.ts'
import { outline } from '../../src/sheets/content/outline.ts'
import type { Block, Outline, Reader, Section } from '../../src/sheets/content/tree.ts'
import {
  check,
  judgedPart,
  library,
  libraryAssessment,
  libraryResult,
  libraryWalk,
  porter,
  says,
} from '../fixtures/sheets/library.ts'
import { reading } from '../fixtures/sheets/survey.ts'
import { given, itemsOf, textsOf } from '../fixtures/sheets/words-of.ts'

const on = '2026-11-01'

function sheetFor(reader: Reader, checks: Check[] = [], walk = libraryWalk()): Outline {
  const base = libraryResult()
  const segments =
    checks.length === 0 ? base.segments : base.segments.map((one) => (one.id === 'hall' ? { ...one, checks } : one))
  const result = libraryResult({ segments })
  return given(outline(library(walk), result, libraryAssessment(result), reader, { on }))
}

function sectionOf(sheet: Outline, heading: string): Section {
  const found = sheet.sections.find((one) => one.heading === heading)
  if (!found) throw new Error(`no section ${heading}`)
  return found
}

function tables(section: Section): Extract<Block, { kind: 'table' }>[] {
  return [
    ...section.blocks.filter((block): block is Extract<Block, { kind: 'table' }> => block.kind === 'table'),
    ...section.sections.flatMap(tables),
  ]
}

describe("the venue manager's sheet", () => {
  const fails = check('straight-width', 'hall', {
    state: 'fails',
    demand: 0.913,
    capacity: 0.82,
    // 0.913 / 0.825 and 0.913 / 0.815: a tape's 5 mm either way.
    ratio: [0.913 / 0.825, 0.913 / 0.815],
    sentence: 'Width at the lockers: 815 mm for 913 mm with clearance.',
  })
  const heavy = check('door-force', 'hall', {
    state: 'unsure',
    demand: 31,
    capacity: 30,
    ratio: [28 / 30, 34 / 30],
    source: 'ADM 2.13',
  })
  const brief = check('door-time', 'hall', { state: 'tight', demand: 4.5, capacity: 5, ratio: [4.5 / 5.5, 4.5 / 4.5] })
  const own = check('stop', 'hall', { state: 'fails', demand: 1, capacity: 0.5, ratio: [2, 2] })

  const rows = tables(sectionOf(sheetFor('venue', [brief, own, heavy, fails]), 'Fixes, most pressing first'))[0]?.rows

  it('asks the most pressing first and the same thing once, says how much turns it, and leaves owner and date blank', () => {
    expect(rows).toEqual([
      // 913 mm asked, 815 mm at the unsafe end.
      [
        '1, now',
        'Along the hall',
        'Clear both sides to the agreed width.',
        '98 mm more clear width turns it',
        'common practice',
        '',
        '',
      ],
      ['2, soon', 'four steps', expect.any(String), 'no single figure', 'common practice', '', ''],
      // 34 N at the unsafe end for 30 N; 4.5 s / 0.85 is 5.294 s, 4.5 s at the unsafe end: 0.794 s, shown as 0.8 s.
      [
        '2, soon',
        'Along the hall',
        expect.any(String),
        '4 N less force turns it; 0.8 s more time the door stays open ends the caution',
        'ADM 2.13; common practice',
        '',
        '',
      ],
    ])
  })

  it('asks nothing of the venue that is the team’s', () => {
    expect(JSON.stringify(rows)).not.toContain('stop at')
    expect(rows).toHaveLength(3)
  })

  it('never props a fire door', () => {
    expect(textsOf(sheetFor('venue'))).toContain(
      'A fire door is never propped: a person holds it, or a hold-open device released by the alarm; ask your fire adviser.',
    )
  })

  it('has good points, hazards today and the day itself', () => {
    const sheet = sheetFor('venue', [check('straight-width', 'hall'), fails])
    expect(itemsOf(sectionOf(sheet, 'Good points'))).toContain('The clear width holds at 1 of 2 places.')
    expect(itemsOf(sectionOf(sheet, 'Hazards today'))).toContain(
      'Width at the lockers: 815 mm for 913 mm with clearance.',
    )
    expect(itemsOf(sectionOf(sheet, 'On the day'))).toContain(
      'Porter at the four steps: offers an arm up the steps; a second porter carries the robot up.',
    )
  })
})

describe("reception's day card", () => {
  it('says who is where, what they do and what they say', () => {
    const sheet = sheetFor('reception')
    expect(tables(sectionOf(sheet, 'Who is where'))[0]?.rows).toEqual([
      [
        'The four steps',
        'porter',
        'ring the bell at the counter',
        'Offers an arm up the steps. A second porter carries the robot up.',
        'Wait at the rail. After 3 minutes ring again.',
      ],
    ])
    expect(itemsOf(sectionOf(sheet, 'What they say'))[0]).toBe(
      'The porter at the four steps: "Hello, I am [name], porter. Would you like my arm?"',
    )
    expect(itemsOf(sectionOf(sheet, 'If the alarm sounds'))).toContain('The porter goes to the handler.')
  })

  it('says what is not named yet', () => {
    const walk = libraryWalk()
    const steps = walk.segments[2]
    if (steps) steps.help = { role: 'porter' }
    expect(tables(sectionOf(sheetFor('reception', [], walk), 'Who is where'))[0]?.rows[0]).toEqual([
      'The four steps',
      'porter',
      'not said yet',
      'not said yet',
      'not said yet',
    ])
  })
})

describe("the handler's file", () => {
  const walk = libraryWalk()
  const hall = walk.segments[0] as (typeof walk.segments)[number]
  hall.readings.width = [
    reading('w1', 1.0795, { raw: `3' 6 1/2"`, time: '2026-10-05T10:05:00Z', note: 'third locker' }),
    reading('w2', 1.02, { raw: '102 cm', person: 'Bea Roe', safeSide: true }),
    reading('w3', 2.1, { raw: '>2.1', bound: 'above', instrument: 'rod' }),
  ]
  hall.words.overhead = { ...says('none'), rivals: [{ says: 'listed', how: 'swept', person: 'Bea Roe' }] }
  walk.overrides = [
    {
      id: 'o',
      segment: 'hall',
      verdict: 'with-cautions',
      reason: 'walked twice',
      name: 'Ida Moss',
      role: 'O&M specialist',
      until: '2026-12-24',
    },
  ]
  const sheet = sheetFor('file', [], walk)
  const hallTables = tables(sectionOf(sheet, 'Segment: Along the hall'))

  it('has every reading: as written, SI, instrument, person, time', () => {
    const rows = hallTables.find(({ caption }) => caption === 'Readings')?.rows
    expect(rows).toContainEqual([
      'width',
      `3' 6 1/2"`,
      '1.0795 m',
      'tape on the floor',
      'Ada Lorn',
      '5 October 2026, 10:05',
      'third locker',
    ])
    expect(rows).toContainEqual([
      'width',
      '102 cm',
      '1.02 m',
      'tape on the floor',
      'Bea Roe',
      'not said',
      'counts at its unsafe end alone',
    ])
    expect(rows).toContainEqual(['width', '>2.1', '> 2.1 m', 'rod', 'Ada Lorn', 'not said', ''])
  })

  it('has both versions of a dispute', () => {
    const rows = hallTables.find(({ caption }) => caption === 'Answers of the segment')?.rows
    expect(rows).toContainEqual(['overhead', 'none', 'swept', 'Ada Lorn', '5 October 2026, 10:00', ''])
    expect(rows).toContainEqual(['overhead', 'listed', 'swept', 'Bea Roe', 'not said', 'says otherwise, not settled'])
  })

  it('has every check with demand, capacity, ratio and source', () => {
    expect(hallTables.find(({ caption }) => caption === 'Checks')?.rows).toEqual([
      [
        'straight-width',
        'hall',
        'tight',
        '0.913',
        '0.95',
        '0.956 to 0.966',
        'any',
        'common practice',
        'Width on the hall: 945 mm for 913 mm with clearance.',
      ],
    ])
  })

  it('has states, overrides, the help confirmed, the card and the pack', () => {
    expect(tables(sectionOf(sheet, 'States'))[0]?.rows).toContainEqual([
      'tried',
      'Cy Dale',
      'instructor',
      '20 October 2026',
      '4',
      '',
    ])
    expect(tables(sectionOf(sheet, 'Overrides'))[0]?.rows).toEqual([
      [
        'Along the hall',
        'With cautions',
        'walked twice',
        'Ida Moss',
        'O&M specialist',
        '24 December 2026',
        'not said',
        'not said',
      ],
    ])
    expect(tables(sectionOf(sheet, 'Help'))[0]?.rows[0]).toContain(porter.confirmedBy)
    expect(tables(sectionOf(sheet, 'Team card'))[0]?.rows).toEqual(
      expect.arrayContaining([
        ['robot, length', '0.65'],
        ['handler, opensDoors', 'not answered'],
        ['leash, lengths', '0.6, 0.8, 1, 1.2, 1.5, 1.8'],
      ]),
    )
    // ADA 2010, 307.4: 80 in.
    expect(tables(sectionOf(sheet, 'Code pack'))[0]?.rows.find(([limit]) => limit === 'headroom')?.[1]).toBe('2.03 m')
  })
})

it('says what is not known on the venue’s sheet', () => {
  const result = libraryResult({
    segments: [
      judgedPart('hall', {
        why: [{ kind: 'told', text: 'Width at the hall: told or by eye, nobody measured.', readings: [] }],
      }),
      ...libraryResult().segments.slice(1),
    ],
  })
  const sheet = given(outline(library(), result, libraryAssessment(result), 'venue', { on }))
  expect(itemsOf(sectionOf(sheet, 'Not known yet'))).toEqual(['Width at the hall: told or by eye, nobody measured.'])
})
