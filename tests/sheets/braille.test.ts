import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { beforeAll, describe, expect, it } from 'vitest'
import { asciiOf } from '../../src/sheets/braille/cells.ts'
import {
  type Grade,
  type LouisModule,
  louis,
  type TableFile,
  type Translate,
  tableFiles,
} from '../../src/sheets/braille/louis.ts'
import { toBraille } from '../../src/sheets/braille/to-braille.ts'
import { own } from '../../src/sheets/content/own.ts'
import type { Outline } from '../../src/sheets/content/tree.ts'
import { hostile } from '../fixtures/sheets/hostile.ts'
import { clientSheet, sentencesOf, sheetOf, venueSheet } from '../fixtures/sheets/outlines.ts'
import { needTool, run, toInstall } from './system-tool.ts'

const require = createRequire(import.meta.url)
const folder = `${require.resolve('liblouis-build').replace(/[^/]+$/, '')}tables/`
const tables = Object.fromEntries(tableFiles.map((name) => [name, readFileSync(folder + name, 'utf8')]))
const at = louis(require('liblouis-build') as LouisModule, tables as Record<TableFile, string>)
const grades: Grade[] = [1, 2]

/** Greek and Cyrillic have no English braille: the venue's sheet without them. */
const venue = JSON.parse(JSON.stringify(venueSheet).replaceAll(' Ελλάδα and Привет', '')) as Outline

function brf(sheet: Outline, translate: Translate): string {
  const made = toBraille(sheet, translate)
  if (typeof made !== 'string') throw new Error(made.why)
  return made
}

/** All cells but the blanks and the pages' own last lines. */
function bodyOf(text: string): string {
  const lines = text.split('\f').flatMap((page) => page.split('\r\n').slice(0, 24))
  return lines.join('').replaceAll(' ', '')
}

describe('against the translator of the system', () => {
  beforeAll(() => needTool('lou_translate', 'liblouis-bin'), toInstall)

  /** The system's own liblouis and tables, one run for all texts. */
  function systemTranslate(texts: readonly string[], grade: Grade): Map<string, string> {
    const lines = run('lou_translate', [`unicode.dis,en-ueb-g${grade}.ctb`], `${texts.join('\n')}\n`).split('\n')
    return new Map(texts.map((text, i) => [text, lines[i] ?? '']))
  }

  const sheets = { client: clientSheet, venue }
  it.each(grades.flatMap((grade) => [{ reader: 'client', grade } as const, { reader: 'venue', grade } as const]))(
    'the sheet of the $reader is the same line by line, grade $grade',
    ({ reader, grade }) => {
      const sheet = sheets[reader]
      const asked: string[] = []
      const ours = brf(sheet, (text) => {
        asked.push(text)
        return at(grade)(text)
      })
      const theirs = systemTranslate([...new Set(asked)], grade)
      expect(ours.split('\r\n')).toEqual(brf(sheet, (text) => theirs.get(text) ?? '').split('\r\n'))
      expect(theirs.size).toBeGreaterThan(25)
    },
  )

  it('cells become the characters of the system’s own BRF', () => {
    const cells = Array.from({ length: 64 }, (_, dots) => String.fromCharCode(0x2800 + dots)).join('')
    const theirs = run('lou_translate', ['en-us-brf.dis,braille-patterns.cti'], `${cells}\n`)
    expect(asciiOf(cells).trimEnd().toLowerCase()).toBe(theirs.replace('\n', '').trimEnd().toLowerCase())
  })
})

describe.each(grades)('grade %d', (grade) => {
  const translate = at(grade)

  it('is 40 cells by 25 lines, form feeds between pages, page numbers in order', () => {
    for (const sheet of [clientSheet, venue]) {
      const pages = brf(sheet, translate).split('\f')
      expect(pages.length).toBeGreaterThan(2)
      for (const [i, page] of pages.entries()) {
        expect(page.endsWith('\r\n')).toBe(true)
        const lines = page.slice(0, -2).split('\r\n')
        expect(lines).toHaveLength(25)
        for (const line of lines) expect(line).toMatch(/^[ -_]{0,40}$/)
        expect(lines[24]).toHaveLength(40)
        const digits = String(i + 1).replace(/\d/g, (digit) => 'JABCDEFGHI'[Number(digit)] ?? '')
        expect(lines[24]?.endsWith(`#${digits}`)).toBe(true)
      }
    }
  })

  it('holds every sentence of the sheet, whatever the line ends', () => {
    for (const sheet of [clientSheet, venue]) {
      const text = bodyOf(brf(sheet, translate))
      for (const words of sentencesOf(sheet))
        expect(text, words).toContain(asciiOf(translate(words)).replaceAll(' ', ''))
    }
  })

  it('says DRAFT on every page of a draft and on none else', () => {
    const mark = asciiOf(translate('DRAFT'))
    expect(
      brf(venue, translate)
        .split('\f')
        .every((page) => page.trimEnd().split('\r\n').at(-1)?.startsWith(mark)),
    ).toBe(true)
    expect(brf(clientSheet, translate)).not.toContain(mark)
  })
})

describe('layout, uncontracted', () => {
  const pages = brf(clientSheet, at(1))
    .split('\f')
    .map((page) => page.split('\r\n'))

  it('begins with who must be with you, centred', () => {
    expect(pages[0]?.slice(0, 4)).toEqual([
      '      ,USE THIS WALK ONLY WITH THE',
      '          PORTER AT THE DESK4',
      '  ,YOU HAVE NOT YET WALKED IT WITH AN',
      'INSTRUCTOR4 ,GOOD UNTIL #CJ ,MAY #BJBG1',
    ])
  })

  it('sets headings in cell 5 after a blank line, items in cell 1 with runover in 3', () => {
    const lines = pages.flat()
    const always = lines.indexOf('    ,ALWAYS')
    expect(lines[always - 1]).toBe('')
    expect(lines[always + 1]).toBe(',CARRY YOUR CANE4')
    expect(lines.slice(always + 3, always + 6)).toEqual([
      ',WHEN THE LEASH GOES SLACK1 STAND STILL4',
      '  ,DO NOT STEP FORWARD3 THE LEASH MAY BE',
      '  ON THE FLOOR4',
    ])
  })

  it('never leaves a heading as the last thing on a page', () => {
    for (const grade of grades)
      for (const page of brf(venue, at(grade)).split('\f')) {
        const body = page.split('\r\n').slice(0, 24).filter(Boolean)
        expect(body.at(-1)).not.toMatch(/^ {4,}/)
      }
  })
})

it('writes tables as lists: each cell with its heading', () => {
  const text = brf(venue, at(1))
  expect(text).toContain('  ,CLAUSE3 "<BLANK">\r\n')
  expect(text).toContain(',ROW #A OF #DB\r\n  ,WHERE3 ,PAST THE LOCKERS\r\n  ,WHAT3 ,WIDTH #HBJ MM FOR #IAC MM\r\n')
})

describe('a letter without braille is refused in words', () => {
  it.each([
    ['Chinese', hostile.Chinese, '医'],
    ['Arabic', hostile.Arabic, 'م'],
    ['emoji', hostile.emoji, '👩'],
    ['Cyrillic', 'Привет', 'П'],
  ])('%s', (_what, typed, letter) => {
    const made = toBraille(sheetOf(own(typed)), at(2))
    if (typeof made === 'string') throw new Error('it was written')
    expect(made.kind).toBe('refusal')
    expect(made.why).toContain(`"${letter}"`)
    expect(made.missing.length).toBeGreaterThan(0)
    expect(made.whatToDo).toMatch(/Latin letters/)
  })
})

it.each([
  'script',
  'right-to-left override',
  'control characters',
  'a 10 kB name',
  'pdf strings',
  'xml and entities',
] as const)('%s becomes cells and no more', (what) => {
  const typed = own(hostile[what], what === 'a 10 kB name' ? Number.POSITIVE_INFINITY : 80).replaceAll('\ufffe', '')
  const text = brf(sheetOf(typed), at(1))
  expect(bodyOf(text)).toContain(asciiOf(at(1)(`Name: ${typed}`)).replaceAll(' ', ''))
  for (const line of text.replaceAll('\f', '').split('\r\n')) expect(line).toMatch(/^[ -_]{0,40}$/)
})
