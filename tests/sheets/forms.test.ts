import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { beforeAll, describe, expect, it } from 'vitest'
import { toAudio } from '../../src/sheets/audio/to-audio.ts'
import { asciiOf } from '../../src/sheets/braille/cells.ts'
import { type LouisModule, louis, type TableFile, tableFiles } from '../../src/sheets/braille/louis.ts'
import { toBraille } from '../../src/sheets/braille/to-braille.ts'
import { own } from '../../src/sheets/content/own.ts'
import type { Outline, Refusal } from '../../src/sheets/content/tree.ts'
import { toCsv } from '../../src/sheets/csv/to-csv.ts'
import { toGeoJson } from '../../src/sheets/geo/to-geojson.ts'
import { toHtml } from '../../src/sheets/html/to-html.ts'
import { toPdf } from '../../src/sheets/pdf/to-pdf.ts'
import { toText } from '../../src/sheets/text/to-text.ts'
import { toWord } from '../../src/sheets/word/to-word.ts'
import { hostile } from '../fixtures/sheets/hostile.ts'
import { clientFacts, clientSheet, sheetOf, venueSheet } from '../fixtures/sheets/outlines.ts'
import { assessment, survey } from '../fixtures/sheets/survey.ts'
import { needTool, run, toInstall } from './system-tool.ts'
import { unzip } from './unzip.ts'

const require = createRequire(import.meta.url)
const faces = require.resolve('dejavu-fonts-ttf/package.json').replace('package.json', 'ttf/')
const material = {
  font: new Uint8Array(readFileSync(`${faces}DejaVuSans.ttf`)),
  boldFont: new Uint8Array(readFileSync(`${faces}DejaVuSans-Bold.ttf`)),
  made: new Date('2026-11-30T12:00:00Z'),
}
const tablesIn = require.resolve('liblouis-build').replace(/[^/]+$/, 'tables/')
const tables = Object.fromEntries(tableFiles.map((name) => [name, readFileSync(tablesIn + name, 'utf8')]))
const braille = louis(require('liblouis-build') as LouisModule, tables as Record<TableFile, string>)

/** Words as one line, without the marks that only keep a right-to-left name in its place. */
const squeezed = (text: string) => text.replaceAll(/[\u2068\u2069]/g, '').replaceAll(/[\s\u00a0]+/g, ' ')

const entities: Record<string, string> = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'", '#39': "'" }
/** What is read of a page of marks. */
function readable(marked: string): string {
  const text = marked.replaceAll(/<[^>]*>/g, '')
  return squeezed(text.replaceAll(/&([\w#]+);/g, (whole, name: string) => entities[name] ?? whole))
}

const noBlanks = (cells: string) => cells.replaceAll(' ', '')

/** Each form of an outline: the words that it holds as one line, and how a fact is written in it. A Refusal comes as it is. */
interface Form {
  words: (sheet: Outline) => Promise<string | Refusal>
  written: (fact: string) => string
}
const plain = squeezed
const inBraille = (grade: 1 | 2): Form => ({
  words: async (sheet) => {
    const made = toBraille(sheet, braille(grade))
    if (typeof made !== 'string') return made
    return noBlanks(
      made
        .split('\f')
        .flatMap((page) => page.split('\r\n').slice(0, 24))
        .join(''),
    )
  },
  written: (fact) => noBlanks(asciiOf(braille(grade)(fact))),
})
const forms: Record<string, Form> = {
  audio: { words: async (sheet) => squeezed(toAudio(sheet)), written: plain },
  text: { words: async (sheet) => squeezed(toText(sheet)), written: plain },
  html: {
    words: async (sheet) =>
      readable(
        toHtml(sheet)
          .replace(/<head>.*<\/head>/s, '')
          .replaceAll(/<\/(p|li|h\d|t[dh]|caption)>/g, ' '),
      ),
    written: plain,
  },
  'braille, uncontracted': inBraille(1),
  'braille, contracted': inBraille(2),
  pdf: {
    words: async (sheet) => {
      const made = await toPdf(sheet, material)
      if (!(made instanceof Uint8Array)) return made
      // Page by page the words run on; heads and feet stand between.
      return squeezed(run('pdftotext', ['-raw', '-', '-'], made))
    },
    written: plain,
  },
  word: {
    words: async (sheet) => {
      const document = unzip(await toWord(sheet)).get('word/document.xml') ?? ''
      return readable(document.replaceAll('</w:p>', ' '))
    },
    written: plain,
  },
}

beforeAll(() => needTool('pdftotext', 'poppler-utils'), toInstall)

describe.each(Object.entries(forms))('%s', (_name, { words, written }) => {
  it('states the same facts: verdict, leash, distances, cautions, end date', async () => {
    const made = await words(clientSheet)
    for (const fact of clientFacts) expect(made, fact).toContain(written(fact))
  })

  it('begins with the verdict: it is within the first words', async () => {
    const made = await words(clientSheet)
    if (typeof made !== 'string') throw new Error(made.why)
    expect(made.indexOf(written('Only with help: the porter.'))).toBeLessThan(320)
    expect(made.indexOf(written('Use this walk only with the porter'))).toBeLessThan(60)
  })

  it('a draft that is not known says both', async () => {
    const sheet = JSON.parse(JSON.stringify(venueSheet).replaceAll(' Ελλάδα and Привет', '')) as Outline
    const made = await words(sheet)
    for (const fact of ['DRAFT: Hazards today', 'Not known: nobody has looked', '93 mm more', 'certifies nothing'])
      expect(made).toContain(written(fact))
    for (const wrong of ['Usable', 'With cautions']) expect(made).not.toContain(written(wrong))
  })

  it.each(Object.entries(hostile))('%s is shown as text, or refused in words', async (_what, typed) => {
    const text = own(typed)
    const made = await words(sheetOf(text))
    if (typeof made === 'string') {
      expect(made).toContain(written('The words after it stand.'))
      // Cut before what a form writes in its own way.
      expect(made).toContain(written(`Name: ${text}`.replace(/\ufffe.*/, '')))
    } else {
      expect(made.kind).toBe('refusal')
      expect(made.why.length).toBeGreaterThan(20)
      expect(made.missing.length).toBeGreaterThan(0)
    }
  })
})

it('which forms refuse what is known: no letter is lost and none is a box', async () => {
  const refused: string[] = []
  for (const [name, { words }] of Object.entries(forms))
    for (const what of ['Arabic', 'Chinese', 'emoji', 'script', 'a 10 kB name'] as const)
      if (typeof (await words(sheetOf(own(hostile[what])))) !== 'string') refused.push(`${name}: ${what}`)
  expect(refused).toEqual([
    'braille, uncontracted: Arabic',
    'braille, uncontracted: Chinese',
    'braille, uncontracted: emoji',
    'braille, contracted: Arabic',
    'braille, contracted: Chinese',
    'braille, contracted: emoji',
    'pdf: Arabic',
    'pdf: Chinese',
    'pdf: emoji',
  ])
})

it('table and map of one survey agree on verdicts, lengths and who they hold for', () => {
  const map = JSON.parse(toGeoJson(survey(), assessment())) as {
    features: { id: string; properties: Record<string, unknown> }[]
    team: { name: string; version: string }
  }
  const rows = toCsv(survey(), assessment()).split('\r\n')
  for (const id of ['a', 'b', 'c']) {
    const found = map.features.find((one) => one.id === id)?.properties ?? {}
    const row = rows.find((one) => one.includes(`,${id}.length,`)) ?? ''
    expect(row).toContain(`,${String(found.lengthMetres)},m,exact,`)
    expect(row).toContain(`,${id}.length,${String(found.verdict)},`)
    expect(row).toContain(`${map.team.name} ${map.team.version}`)
  }
})
