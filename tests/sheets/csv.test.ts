import { readFileSync } from 'node:fs'
import { parse } from 'csv-parse/sync'
import { describe, expect, it } from 'vitest'
import { kind } from '../../src/catalogue/kinds.ts'
import { readSurveyFile } from '../../src/record/file/index.ts'
import { rowOf } from '../../src/sheets/csv/cell.ts'
import { toCsv } from '../../src/sheets/csv/to-csv.ts'
import { formulas, hostile } from '../fixtures/sheets/hostile.ts'
import { assessment, reading, smallView, stretch, survey } from '../fixtures/sheets/survey.ts'

type Row = Record<string, string>

/** csv-parse, as strict as it gets: another's parser. */
function read(csv: string): Row[] {
  return parse(csv, { columns: true, record_delimiter: '\r\n', relax_column_count: false, relax_quotes: false })
}

describe('one row per reading', () => {
  const rows = read(toCsv(survey(), assessment()))

  it('holds every reading once, with its holder', () => {
    expect(rows.map((row) => row.reading)).toEqual([
      'a.length',
      'a.width',
      'a.overhead',
      'bench.risers',
      'a.turn.angle',
      'b.length',
      'b.turn.angle',
      'c.length',
      'hall-am.noise',
    ])
    expect(rows.map((row) => row['feature kind'])).toEqual(['', '', '', 'stairs', 'turn', '', 'turn', '', ''])
  })

  it('gives value, unit, bound, instrument and uncertainty as recorded', () => {
    expect(rows[1]).toEqual({
      walk: 'Door to desk',
      segment: 'Stretch a',
      holder: 'segment',
      'feature kind': '',
      quantity: 'width',
      raw: '4 ft 7/8 in',
      'SI value': '1.24',
      unit: 'm',
      bound: 'exact',
      instrument: 'tape',
      U: '0.005',
      person: 'Ada Lorn',
      time: '',
      found: 'in-use',
      note: 'lockers, "red" both sides',
      reading: 'a.width',
      'segment verdict': 'with-cautions',
      'holds for': 'Lark team 3, 30 November 2026; local codes and licensed O&M practice take precedence',
    })
    // 1 % of 10 m in lays; 50 % of 3 by eye.
    expect(rows[0]?.U).toBe('0.1')
    expect(rows[3]).toMatchObject({ U: '1.5', unit: 'count', holder: 'Steps by the bench' })
    expect(rows[2]).toMatchObject({ bound: 'above', raw: '>2.1', 'SI value': '2.1', U: '0.01' })
    expect(rows[8]).toMatchObject({
      walk: '',
      segment: 'Hall',
      holder: 'surroundings 09:00 to 12:00',
      unit: 'dB(A)',
      U: '5',
    })
  })

  it('a segment nobody judged is not known', () => {
    expect(rows[7]).toMatchObject({ reading: 'c.length', 'segment verdict': 'not-known' })
  })

  it('takes the uncertainties that the survey changed', () => {
    const view = smallView({ instruments: { tape: { absolute: 0.002, relative: 0.001 } } })
    // 0.002 + 0.001 x 1.24 = 0.00324
    expect(read(toCsv(survey(view), assessment()))[1]?.U).toBe('0.00324')
  })

  it('says DRAFT in every row, and gives one walk alone', () => {
    const draft = read(toCsv(survey(), assessment(), { draft: true, walk: 'w' }))
    expect(draft.length).toBe(9)
    expect(draft.every((row) => row['holds for']?.startsWith('DRAFT; '))).toBe(true)
    expect(read(toCsv(survey(), assessment(), { walk: 'other' }))).toEqual([])
  })

  it('a quantity that the catalogue does not know has no unit made up for it', () => {
    const view = smallView()
    view.walks[0]?.segments[2]?.features.push({
      id: 'x',
      kind: 'hovering-gate',
      readings: { sway: [reading('x.sway', 1)] },
      words: {},
    })
    const row = read(toCsv(survey(view), assessment())).find(({ quantity }) => quantity === 'sway')
    expect(row).toMatchObject({ unit: 'not known', holder: 'hovering-gate', 'feature kind': 'hovering-gate' })
  })
})

describe('RFC 4180', () => {
  it('ends every row with CRLF and nothing else', () => {
    const csv = toCsv(survey(), assessment())
    expect(csv.endsWith('\r\n')).toBe(true)
    expect(csv.replaceAll('\r\n', '')).not.toMatch(/[\r\n]/)
    expect(csv.split('\r\n')).toHaveLength(1 + 9 + 1)
  })

  it.each([['a,b'], ['a"b'], ['"'], ['a\r\nb'], ['a\nb'], ['a;b'], [' a '], ['']])(
    'reads %j back as it was',
    (text) => {
      expect(parse(rowOf([text, 'end']), { record_delimiter: '\r\n' })).toEqual([[text, 'end']])
    },
  )
})

describe('safe in a spreadsheet', () => {
  it.each(formulas)('%j gets an apostrophe', (text) => {
    expect(parse(rowOf(['x', text]), { record_delimiter: '\r\n' })).toEqual([['x', `'${text}`]])
  })

  it.each(['-1.5', '+3', '0.25', '-1e-7', '12', '-.5'])('the plain number %s stays one', (text) => {
    expect(rowOf([text])).toBe(`${text}\r\n`)
  })

  it.each([...formulas, ...Object.values(hostile)])(
    'a name, raw text, note or person of %j stays one cell of text',
    (text) => {
      const view = smallView()
      view.walks[0]?.segments.push(
        stretch('h', null, {
          name: text,
          readings: { width: [reading('h.w', 1, { raw: text, note: text, person: text })] },
        }),
      )
      const row = read(toCsv(survey(view), assessment())).find((one) => one.reading === 'h.w')
      for (const column of ['segment', 'raw', 'note', 'person'] as const) {
        const cell = row?.[column] ?? ''
        expect(cell.length).toBeGreaterThan(0)
        expect(cell).not.toMatch(/^[=+\-@\t\r\uff1d]/)
        // biome-ignore lint/suspicious/noControlCharactersInRegex: none may be left, that is what is asked
        expect(cell).not.toMatch(/[\u0000-\u001f\u007f\u202a-\u202e\u2066\u2067\ud800-\udfff]/u)
      }
      expect(row?.['SI value']).toBe('1')
    },
  )
})

describe('the demo venues', () => {
  it.each(['clinic', 'interchange', 'museum', 'teaching'])(
    '%s: every reading of the file has a row with its raw text',
    (venue) => {
      const text = readFileSync(new URL(`../../demo-venues/${venue}.json`, import.meta.url), 'utf8')
      const file = readSurveyFile(text, (id, attribute) => {
        const found = kind(id)?.attributes.find((one) => one.id === attribute)
        return found?.type === 'quantity' ? { quantity: found.quantity, unit: found.unit } : undefined
      })
      if (!file.ok) throw new Error(JSON.stringify(file.problems))
      const raws = [...text.matchAll(/"raw": "((?:[^"\\]|\\.)*)"/g)].map(([, raw]) => JSON.parse(`"${raw}"`) as string)
      const rows = read(toCsv(file.survey, assessment()))
      expect(raws.length).toBeGreaterThan(30)
      expect(rows.map((row) => row.raw?.replace(/^'/, '')).sort()).toEqual(raws.sort())
      expect(rows.filter((row) => row.unit === 'not known')).toEqual([])
    },
  )
})
