import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { beforeAll, describe, expect, it } from 'vitest'
import { own, ownWhole } from '../../src/sheets/content/own.ts'
import type { Outline, Section } from '../../src/sheets/content/tree.ts'
import { toWord } from '../../src/sheets/word/to-word.ts'
import { hostile } from '../fixtures/sheets/hostile.ts'
import { clientSheet, sentencesOf, sheetOf, venueSheet } from '../fixtures/sheets/outlines.ts'
import { needTool, run, toInstall } from './system-tool.ts'
import { unzip } from './unzip.ts'

const parts = async (sheet: Outline) => unzip(await toWord(sheet))

/** Every element closed in its turn, every ampersand an entity, no character that XML forbids. */
function expectWellFormed(xml: string): void {
  const open: string[] = []
  for (const [, close, name = '', empty] of xml.matchAll(/<(\/?)([\w:.-]+)(?:\s+[\w:.-]+="[^"<]*")*\s*(\/?)>/g)) {
    if (close) expect(open.pop()).toBe(name)
    else if (!empty) open.push(name)
  }
  expect(open).toEqual([])
  const words = xml.replaceAll(/<\?xml[^>]*\?>|<\/?[\w:.-]+(?:\s+[\w:.-]+="[^"<]*")*\s*\/?>/g, '')
  expect(words).not.toMatch(/[<]|&(?!(amp|lt|gt|quot|apos|#\d+|#x[\da-f]+);)/i)
  // biome-ignore lint/suspicious/noControlCharactersInRegex: none may be left, that is what is asked
  expect(xml).not.toMatch(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff\ud800-\udfff]/u)
}

const entities: Record<string, string> = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'" }
const textOf = (xml: string) =>
  [...xml.matchAll(/<w:t(?: [^>]*)?>([^<]*)<\/w:t>/g)]
    .map(([, text = '']) => text.replaceAll(/&(\w+);/g, (whole, name: string) => entities[name] ?? whole))
    .join('')
    .replaceAll('\u00a0', ' ')

interface Para {
  style: string | null
  listed: boolean
  text: string
}
function paragraphsOf(xml: string): Para[] {
  return [...xml.matchAll(/<w:p>(.*?)<\/w:p>|<w:p\/>/gs)].map(([, inner = '']) => ({
    style: /<w:pStyle w:val="([^"]+)"/.exec(inner)?.[1] ?? null,
    listed: inner.includes('<w:numPr>'),
    text: textOf(inner),
  }))
}

function headingsOf(sheet: Outline): [string, string][] {
  const ofSection = (one: Section, level: number): [string, string][] => [
    [`Heading${level}`, one.heading],
    ...one.sections.flatMap((inner) => ofSection(inner, level + 1)),
  ]
  return [['Heading1', sheet.heading], ...sheet.sections.flatMap((one) => ofSection(one, 2))]
}

describe.each([
  ['client', clientSheet],
  ['venue, draft', venueSheet],
])('the sheet of the %s as a word file', (_name, sheet) => {
  let files = new Map<string, string>()
  let document = ''
  beforeAll(async () => {
    files = await parts(sheet)
    document = files.get('word/document.xml') ?? ''
  })

  it('is well formed in every part', () => {
    expect(files.size).toBeGreaterThan(8)
    for (const [name, xml] of files) if (/\.(xml|rels)$/.test(name)) expectWellFormed(xml)
  })

  it('has the headings of the outline in real heading styles, in order', () => {
    const headings = paragraphsOf(document).filter(({ style }) => style?.startsWith('Heading'))
    expect(headings.map(({ style, text }) => [style, text])).toEqual(headingsOf(sheet))
    for (const [style] of headingsOf(sheet)) expect(files.get('word/styles.xml')).toContain(`w:styleId="${style}"`)
    // Nothing in a paragraph may undo its style.
    expect(document).not.toMatch(/<w:b w:val="(false|0)"\/>/)
  })

  it('holds every sentence of the outline, in its order', () => {
    const all = paragraphsOf(document)
      .map(({ text }) => text)
      .join('\n')
    let from = 0
    for (const words of sentencesOf(sheet)) {
      const at = all.indexOf(words, from)
      expect(at, words).toBeGreaterThanOrEqual(from)
      from = at + words.length
    }
  })

  it('has true lists: the items of the outline and nothing else', () => {
    const items = (one: Outline | Section): string[] => [
      ...one.blocks.flatMap((block) => (block.kind === 'list' ? block.items.map(({ text }) => text) : [])),
      ...one.sections.flatMap(items),
    ]
    const listed = paragraphsOf(document).filter((one) => one.listed)
    expect(listed.map(({ text }) => text)).toEqual(items(sheet))
    expect(files.get('word/numbering.xml')).toContain('<w:numFmt w:val="bullet"/>')
  })

  it('has language and title', () => {
    expect(files.get('word/styles.xml')).toMatch(/<w:rPrDefault>.*<w:lang w:val="en"\/>.*<\/w:rPrDefault>/s)
    expect(files.get('docProps/core.xml')).toContain(`<dc:title>${sheet.title}</dc:title>`)
  })

  it('says DRAFT at the head of every page of a draft and of none else, and numbers pages', () => {
    const heads = [...files].filter(([name]) => /^word\/header\d*\.xml$/.test(name)).map(([, xml]) => textOf(xml))
    expect(heads).toEqual([sheet.draft ? 'DRAFT' : ''])
    const foots = [...files].filter(([name]) => /^word\/footer\d*\.xml$/.test(name)).map(([, xml]) => xml)
    expect(foots).toHaveLength(1)
    expect(foots[0]).toMatch(/>PAGE<.*>NUMPAGES</s)
    expect(document).toMatch(/<w:headerReference w:type="default"/)
  })
})

it('a table has one head row, marked so that it is repeated, and its first column as heads', async () => {
  const document = (await parts(venueSheet)).get('word/document.xml') ?? ''
  const rows = [...document.matchAll(/<w:tr>.*?<\/w:tr>/gs)].map(([row]) => row)
  expect(rows).toHaveLength(43)
  expect(rows.map((row) => row.includes('<w:tblHeader/>'))).toEqual([true, ...Array.from({ length: 42 }, () => false)])
  expect([...(rows[0] ?? '').matchAll(/<w:tc>.*?<\/w:tc>/gs)].map(([cell]) => textOf(cell))).toEqual([
    'Where',
    'What',
    'Would turn the verdict',
    'Clause',
    'Owner',
    'Date',
  ])
  expect(document).toMatch(/<w:tblLook [^>]*w:firstRow="(1|true)"/)
  expect(document).toMatch(/<w:tblLook [^>]*w:firstColumn="(1|true)"/)
})

it.each(Object.entries(hostile))('%s stays text in every part', async (_what, typed) => {
  for (const text of [typed, own(typed), ownWhole(typed)]) {
    const files = await parts(sheetOf(text))
    for (const [name, xml] of files) if (/\.(xml|rels)$/.test(name)) expectWellFormed(xml)
    const document = files.get('word/document.xml') ?? ''
    const shown = paragraphsOf(document).map((one) => one.text)
    expect(shown).toContain('The words after it stand.')
    expect(document).not.toContain('<script')
    if (text !== typed) expect(shown).toContain(`Name: ${text.replaceAll('\ufffe', '[U+FFFE]')}`)
  }
})

// LibreOffice takes minutes to install and seconds to start: in the long run alone.
if (process.env.TAUTLINE_LONG === '1')
  it(
    'opens in LibreOffice, and its headings survive',
    async () => {
      needTool('soffice', 'libreoffice-writer-nogui')
      const folder = mkdtempSync(join(tmpdir(), 'sheets-word-'))
      try {
        for (const sheet of [clientSheet, venueSheet]) {
          writeFileSync(join(folder, 'sheet.docx'), await toWord(sheet))
          const profile = `-env:UserInstallation=file://${folder}/profile`
          const args = [profile, '--headless', '--convert-to', 'html', '--outdir', folder, join(folder, 'sheet.docx')]
          run('soffice', args, '', /^Warning: failed to launch javaldx[^\n]*\n?$/)
          const html = readFileSync(join(folder, 'sheet.html'), 'utf8')
          const found = [...html.matchAll(/<h(\d)[^>]*>(.*?)<\/h\1>/gs)].map(([, level, inner = '']) => [
            `Heading${level}`,
            inner
              .replaceAll(/<[^>]*>/g, '')
              .replaceAll(/\s+/g, ' ')
              .trim(),
          ])
          expect(found).toEqual(headingsOf(sheet))
          const listed = paragraphsOf(unzip(await toWord(sheet)).get('word/document.xml') ?? '').filter(
            (one) => one.listed,
          )
          expect(html.match(/<li[ >]/g)).toHaveLength(listed.length)
          expect(html.match(/<thead>/g)?.length ?? 0).toBe(sheet === venueSheet ? 1 : 0)
        }
      } finally {
        rmSync(folder, { recursive: true, force: true })
      }
    },
    toInstall,
  )
