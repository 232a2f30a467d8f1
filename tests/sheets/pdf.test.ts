import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { inflateSync } from 'node:zlib'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { own, ownWhole } from '../../src/sheets/content/own.ts'
import type { Block, Outline, Section } from '../../src/sheets/content/tree.ts'
import { toPdf } from '../../src/sheets/pdf/to-pdf.ts'
import { hostile } from '../fixtures/sheets/hostile.ts'
import { clientSheet, sentencesOf, sheetOf, venueSheet } from '../fixtures/sheets/outlines.ts'
import { needTool, run, toInstall } from './system-tool.ts'

const require = createRequire(import.meta.url)
const faces = require.resolve('dejavu-fonts-ttf/package.json').replace('package.json', 'ttf/')
const material = {
  font: new Uint8Array(readFileSync(`${faces}DejaVuSans.ttf`)),
  boldFont: new Uint8Array(readFileSync(`${faces}DejaVuSans-Bold.ttf`)),
  made: new Date('2026-11-30T12:00:00Z'),
}
const folder = mkdtempSync(join(tmpdir(), 'sheets-pdf-'))
afterAll(() => rmSync(folder, { recursive: true }))
beforeAll(() => needTool('pdfinfo', 'poppler-utils'), toInstall)

let files = 0
async function write(sheet: Outline): Promise<string> {
  const bytes = await toPdf(sheet, material)
  if (!(bytes instanceof Uint8Array)) throw new Error(bytes.why)
  const path = join(folder, `${++files}.pdf`)
  writeFileSync(path, bytes)
  return path
}

/** Poppler's view of the structure tree: what a screen reader is given, no artifacts. */
interface Element {
  depth: number
  type: string
  text: string
}
function structure(path: string): Element[] {
  const elements: Element[] = []
  for (const line of run('pdfinfo', ['-struct-text', path]).split('\n')) {
    const [, indent = '', rest = ''] = /^( *)(.*)$/.exec(line) ?? []
    if (rest.startsWith('"')) {
      const last = elements.at(-1)
      if (last) last.text += rest.slice(1, -1).replaceAll('\u00a0', ' ')
    } else if (/^[A-Z]\w*( \(|:|$)/.test(rest))
      elements.push({ depth: indent.length / 2, type: rest.replace(/[ :].*/, ''), text: '' })
  }
  return elements
}

function headingsOf(sheet: Outline): [string, string][] {
  const ofSection = (one: Section, level: number): [string, string][] => [
    [`H${level}`, one.heading],
    ...one.sections.flatMap((inner) => ofSection(inner, level + 1)),
  ]
  return [['H1', sheet.heading], ...sheet.sections.flatMap((one) => ofSection(one, 2))]
}

/** Words with every run of white space one blank: line ends fall where they fall. */
const squeezed = (text: string) => text.replaceAll(/[\s\u00a0]+/g, ' ').trim()

/** Inflated content streams of the pages: those that mark content. */
function contentStreams(file: Buffer): string[] {
  const streams: string[] = []
  for (let at = file.indexOf('stream\n'); at >= 0; at = file.indexOf('stream\n', at + 1)) {
    if (file.toString('latin1', at - 3, at) === 'end') continue
    try {
      const inflated = inflateSync(file.subarray(at + 7)).toString('latin1')
      if (/ BDC\n/.test(inflated)) streams.push(inflated)
    } catch {
      // Not every stream is deflated: the file's own data is not.
    }
  }
  return streams
}

/** Every mark is closed on its page, and nothing is drawn outside one. Returns how much is drawn. */
function expectMarked(stream: string): number {
  let painted = 0
  let depth = 0
  for (const line of stream.split('\n')) {
    if (/ B(DC|MC)$/.test(line)) depth++
    else if (/^EMC$/.test(line)) depth--
    else if (/(^|[\] ])(TJ|Tj|f|f\*|S|s|B)$/.test(line)) {
      painted++
      expect(depth, line).toBeGreaterThan(0)
    }
    expect(depth).toBeGreaterThanOrEqual(0)
  }
  expect(depth).toBe(0)
  return painted
}

describe.each([
  ['client', clientSheet],
  ['venue, draft', venueSheet],
])('the sheet of the %s, read back by another’s reader', (_name, sheet) => {
  let path = ''
  let elements: Element[] = []
  beforeAll(async () => {
    path = await write(sheet)
    elements = structure(path)
  })

  it('is a tagged PDF 1.7 with its title, and the reader finds no fault', () => {
    const info = run('pdfinfo', [path])
    expect(info).toMatch(/^Tagged: +yes$/m)
    expect(info).toMatch(/^PDF version: +1\.7$/m)
    expect(info).toContain(`Title:           ${sheet.title}`)
    expect(info).toContain('CreationDate:    Mon Nov 30 12:00:00 2026')
    const raw = readFileSync(path, 'latin1')
    expect(raw).toContain('/Lang (en)')
    expect(raw).toContain('/DisplayDocTitle true')
    expect(run('pdfinfo', ['-meta', path])).toContain('<pdfuaid:part>1</pdfuaid:part>')
  })

  it('has the headings of the outline, in order and level, and the same bookmarks', () => {
    expect(elements.filter(({ type }) => /^H\d$/.test(type)).map(({ type, text }) => [type, text])).toEqual(
      headingsOf(sheet),
    )
    const bookmarks = [...run('pdftohtml', ['-xml', '-i', '-stdout', path]).matchAll(/<item page="\d+">(.*?)<\/item>/g)]
    expect(bookmarks.map(([, title]) => title)).toEqual(headingsOf(sheet).map(([, title]) => title))
  })

  it('holds every sentence of the outline, whole and in the outline’s order', () => {
    const all = squeezed(elements.map(({ text }) => text).join(' '))
    let from = 0
    for (const words of sentencesOf(sheet)) {
      const at = all.indexOf(squeezed(words), from)
      expect(at, words).toBeGreaterThanOrEqual(from)
      from = at + words.length
    }
  })

  it('shows to the eye what it says: the same words in the text on the pages', () => {
    // Running heads and feet stand between pages, so single words are compared.
    const shown = new Set(squeezed(run('pdftotext', ['-raw', path, '-'])).split(' '))
    for (const words of sentencesOf(sheet).flatMap((text) => text.split(' '))) expect(shown, words).toContain(words)
  })

  it('draws nothing that is neither tagged nor an artifact (ISO 14289-1, 7.1)', () => {
    const painted = contentStreams(readFileSync(path)).map(expectMarked)
    expect(painted.reduce((sum, one) => sum + one, 0)).toBeGreaterThan(50)
  })

  it('embeds its faces, as far as used', () => {
    const fonts = run('pdffonts', [path]).trim().split('\n').slice(2)
    expect(fonts).toHaveLength(2)
    for (const font of fonts) expect(font).toMatch(/^[A-Z]{6}\+DejaVuSans.* yes yes yes /)
  })

  it('numbers its pages', () => {
    const pages = run('pdftotext', ['-raw', path, '-']).split('\f').slice(0, -1)
    expect(pages.length).toBeGreaterThan(1)
    for (const [i, page] of pages.entries()) expect(page).toContain(`Page ${i + 1} of ${pages.length}`)
    expect(elements.some(({ text }) => /Page \d+ of/.test(text))).toBe(false)
  })

  it('says DRAFT on every page of a draft and on none else', () => {
    const pages = run('pdftotext', ['-raw', path, '-']).split('\f').slice(0, -1)
    for (const page of pages) expect(/^DRAFT$/m.test(page)).toBe(sheet.draft)
  })
})

describe('lists, tables and pictures', () => {
  it('a list is L of LI, each a label and a body', async () => {
    const elements = structure(await write(clientSheet))
    const bodies = elements.filter(({ type }) => type === 'LBody').map(({ text }) => text)
    expect(bodies.slice(0, 2)).toEqual(['Carry your cane.', 'Leash at the 1.2 metre mark.'])
    for (const [i, { type }] of elements.entries())
      if (type === 'LI') expect(elements.slice(i + 1, i + 3).map((one) => one.type)).toEqual(['Lbl', 'LBody'])
  })

  it('a table has its caption, a header cell for each column and each row, once, though its head is drawn on every page', async () => {
    const path = await write(venueSheet)
    const elements = structure(path)
    const cells = elements.filter(({ type }) => type === 'TH').map(({ text }) => text)
    expect(cells.slice(0, 8)).toEqual([
      'Where',
      'What',
      'Would turn the verdict',
      'Clause',
      'Owner',
      'Date',
      'Past the lockers',
      'Fire door',
    ])
    expect(cells).toHaveLength(6 + 42)
    expect(elements.filter(({ type }) => type === 'TD')).toHaveLength(42 * 5)
    expect(elements.filter(({ type }) => type === 'TR')).toHaveLength(43)
    expect(elements.find(({ type }) => type === 'Caption')?.text).toBe('Fixes by priority')
    const scopes = run('pdfinfo', ['-struct', path]).match(/\/Scope \/(Row|Column)/g) ?? []
    expect(scopes.filter((scope) => scope.endsWith('Column'))).toHaveLength(6)
    expect(scopes.filter((scope) => scope.endsWith('Row'))).toHaveLength(42)
    const pages = run('pdftotext', ['-raw', path, '-']).split('\f')
    expect(pages.filter((page) => /^Row \d+/m.test(page)).every((page) => /^Where/m.test(page))).toBe(true)
  })

  it('the shape of a verdict has words', async () => {
    const raw = readFileSync(await write(clientSheet), 'latin1')
    expect(raw).toContain('/Alt (Diamond, the shape of with help.)')
    expect(structure(await write(clientSheet)).filter(({ type }) => type === 'Figure')).toHaveLength(1)
  })

  it('a table too wide for an upright page turns the pages on their side, and stays a table of columns', async () => {
    const head = ['What', 'As written', 'SI value', 'Instrument', 'Person', 'Time', 'Remarks']
    const row = [
      'overhead',
      '>2.20 metres',
      '2.2 metres',
      'rod-with-mark',
      'Annaliese Moorland',
      '2026-11-30T08:44:00Z',
      'Whole width',
    ]
    const sheet = structuredClone(clientSheet)
    sheet.sections = [
      { heading: 'Readings', blocks: [{ kind: 'table', caption: 'Readings', head, rows: [row] }], sections: [] },
    ]
    const path = await write(sheet)
    expect(run('pdfinfo', [path])).toMatch(/^Page size: +841\.89 x 595\.28 pts/m)
    expect(run('pdfinfo', [await write(venueSheet)])).toMatch(/^Page size: +595\.28 x 841\.89 pts/m)
    expect(run('pdftotext', ['-layout', path, '-'])).toMatch(/What +As written +SI value +Instrument/)
  })

  it('a row, a cell or a caption at the foot of a page keeps its marks in order', async () => {
    // Rows of every kind in turn, so that page ends fall within each of them.
    const long = `${'word '.repeat(700)}end`
    const rows = Array.from({ length: 30 }, (_, i) => [`Row ${i}`, i % 3 === 0 ? long : 'short'])
    for (const shift of [0, 3, 7, 11]) {
      const sheet = structuredClone(clientSheet)
      const lines = Array.from({ length: shift }, (_, i) => ({ text: `Line ${i}` }))
      const table: Block = { kind: 'table', caption: 'Long and short', head: ['Where', 'What'], rows }
      sheet.sections = [{ heading: 'Readings', blocks: [{ kind: 'list', items: lines }, table, table], sections: [] }]
      const path = await write(sheet)
      expect(structure(path).filter(({ type }) => type === 'TR')).toHaveLength(62)
      for (const stream of contentStreams(readFileSync(path))) expectMarked(stream)
      run('pdftotext', [path, '-'])
    }
  })

  it('a table whose words are wider than its columns is set cell under cell, and stays a table', async () => {
    const wide = sheetOf(`W${'o'.repeat(60)}rd`)
    const elements = structure(await write(wide))
    expect(elements.filter(({ type }) => type === 'TH')).toHaveLength(3)
    expect(elements.find(({ type }) => type === 'TD')?.text).toContain(`Cell W${'o'.repeat(60)}rd`)
  })
})

describe('a letter without a glyph is refused in words, never shown as a box', () => {
  it.each([
    ['Chinese', hostile.Chinese, 'Chinese'],
    ['Arabic', hostile.Arabic, 'Arabic'],
    ['emoji', hostile.emoji, 'emoji'],
    ['raw control characters', 'a\u0007b', 'U+0007'],
    ['a lone surrogate', hostile['lone surrogate'], 'U+D83D'],
  ])('%s', async (_what, typed, named) => {
    const refusal = await toPdf(sheetOf(typed), material)
    if (refusal instanceof Uint8Array) throw new Error('it was written')
    expect(refusal).toMatchObject({ kind: 'refusal' })
    expect(refusal.why).toContain(named)
    expect(refusal.missing.length).toBeGreaterThan(0)
    expect(refusal.whatToDo).toMatch(/HTML or text/)
  })

  it('Latin with its marks, Greek and Cyrillic are set', async () => {
    const typed = 'Łódź, Žižkov, Göteborg, İstanbul; Ελλάδα, ἀρχή; Привет, Київ'
    expect(squeezed(run('pdftotext', ['-raw', await write(sheetOf(typed)), '-']))).toContain(typed)
  })
})

it.each(['script', 'right-to-left override', 'a 10 kB name', 'pdf strings', 'xml and entities'] as const)(
  '%s stays text in words, title and bookmarks',
  async (what) => {
    for (const typed of [own(hostile[what]), ownWhole(hostile[what])]) {
      const path = await write(sheetOf(typed))
      const all = squeezed(
        structure(path)
          .map(({ text }) => text)
          .join(' '),
      )
      expect(all).toContain(squeezed(`Name: ${typed}`))
      expect(all).toContain('The words after it stand.')
      const meta = run('pdfinfo', ['-meta', path])
      expect(meta).toContain(
        `Sheet of ${typed}`.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;'),
      )
      expect(run('pdfinfo', [path])).toMatch(/^JavaScript: +no$/m)
    }
  },
)
