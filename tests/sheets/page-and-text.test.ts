import { HtmlValidate } from 'html-validate/node'
import { describe, expect, it } from 'vitest'
import { verdicts } from '../../src/judge/result.ts'
import { outline } from '../../src/sheets/content/outline.ts'
import { isolate, isolateEnd, own, ownWhole } from '../../src/sheets/content/own.ts'
import type { Outline, Reader } from '../../src/sheets/content/tree.ts'
import { toHtml } from '../../src/sheets/html/to-html.ts'
import { toText } from '../../src/sheets/text/to-text.ts'
import { columns } from '../../src/sheets/text/width.ts'
import { hostile } from '../fixtures/sheets/hostile.ts'
import { library, libraryAssessment, libraryResult, libraryWalk } from '../fixtures/sheets/library.ts'
import { clientSheet, venueSheet } from '../fixtures/sheets/outlines.ts'
import { given, headingsOf, textsOf } from '../fixtures/sheets/words-of.ts'

const readers: Reader[] = ['client', 'venue', 'file', 'reception']
const on = '2026-11-01'

/** A sheet in which everything that people type is `typed`. */
function sheetWith(typed: string, reader: Reader): Outline {
  const walk = libraryWalk({ name: typed, startSign: typed, note: typed })
  for (const segment of walk.segments) {
    segment.name = typed
    segment.note = typed
    for (const answer of Object.values(segment.words)) answer.note = typed
    const sign = segment.words['end-sign']
    if (sign) sign.says = typed === '' ? 'x' : typed
    for (const reading of Object.values(segment.readings).flat())
      Object.assign(reading, { raw: typed, note: typed, person: typed })
    for (const feature of segment.features) feature.name = typed
    if (segment.help) segment.help = { ...segment.help, role: typed, act: typed, ifNobody: typed, call: typed }
  }
  walk.alarm = { ...walk.alarm, role: typed, act: typed }
  const survey = library(walk)
  survey.view.name = typed
  survey.view.contact = typed
  const result = libraryResult({ name: typed })
  for (const segment of result.segments) for (const check of segment.checks) check.sentence = typed
  const assessment = libraryAssessment(result, { venue: typed, team: { name: typed, version: '4' }, cautions: [typed] })
  return given(outline(survey, result, assessment, reader, { on, number: typed }))
}

/** What a browser without style or script shows, tag by tag. */
function shown(html: string): string {
  const body = html.slice(html.indexOf('<main>'))
  return body
    .replace(/<[^>]*>/g, ' ')
    .replace(
      /&(amp|lt|gt|quot|#39);/g,
      (_, name) => ({ amp: '&', lt: '<', gt: '>', quot: '"', '#39': "'" })[name as string] ?? '',
    )
    .replace(/\s+/g, ' ')
}
const plain = (text: string) => text.replace(/[\u2068\u2069\s-]+/g, '')

describe.each(readers)('the %s sheet', (reader) => {
  const sheet = given(outline(library(), libraryResult(), libraryAssessment(), reader, { on }))

  it('has the same words in the same order as page and as text', () => {
    const page = plain(shown(toHtml(sheet)))
    const text = plain(toText(sheet))
    let inPage = 0
    let inText = 0
    // A table has each column's heading once on the page and with each cell in the text.
    const heads = new Set(
      sheet.sections
        .flatMap((one) => [one, ...one.sections])
        .flatMap((one) => one.blocks.flatMap((block) => (block.kind === 'table' ? block.head : []))),
    )
    for (const words of textsOf(sheet).filter((one) => !heads.has(one))) {
      inPage = page.indexOf(plain(words), inPage)
      inText = text.indexOf(plain(words), inText)
      expect(inPage, `page: ${words}`).toBeGreaterThanOrEqual(0)
      expect(inText, `text: ${words}`).toBeGreaterThanOrEqual(0)
      inPage += plain(words).length
      inText += plain(words).length
    }
  })

  it('is valid, self-contained, in one language, with headings that skip no level', async () => {
    const html = toHtml(sheet)
    const report = await new HtmlValidate({
      extends: ['html-validate:recommended', 'html-validate:a11y'],
      rules: { 'long-title': 'off', 'no-trailing-whitespace': 'off', 'no-inline-style': 'off' },
    }).validateString(html)
    expect(
      report.results.flatMap(({ messages }) =>
        messages.map(({ ruleId, message, line }) => `${line}: ${ruleId}: ${message}`),
      ),
    ).toEqual([])
    expect(html).toMatch(/^<!DOCTYPE html>\n<html lang="en">/)
    expect(html).not.toMatch(/<script|<link|<img|<iframe|@import|url\((?!#)|\b(src|href)=|https?:/i)
    const levels = [...html.matchAll(/<h(\d)>/g)].map(([, level]) => Number(level))
    expect(levels).toEqual(headingsOf(sheet).map(([level]) => level))
    expect(levels[0]).toBe(1)
    for (const [i, level] of levels.entries()) expect(level - (levels[i - 1] ?? 0)).toBeLessThanOrEqual(1)
  })

  it('has header cells with a scope and a caption on every table', () => {
    const html = toHtml(sheet)
    const tables = [...html.matchAll(/<table>[\s\S]*?<\/table>/g)].map(([table]) => table)
    if (reader !== 'client') expect(tables.length).toBeGreaterThan(0)
    for (const table of tables) {
      expect(table).toMatch(/^<table>\s*<caption>[^<]+<\/caption>/)
      expect(table).not.toMatch(/<th>/)
      expect(table.match(/<th scope="col">/g)?.length).toBe(
        table.split('<tr>')[1]?.split('<th').length ? table.split('</thead>')[0]?.match(/<th /g)?.length : 0,
      )
      const rows = table.match(/<tr>/g)?.length ?? 0
      expect(table.match(/<th scope="row">/g)).toHaveLength(rows - 1)
    }
  })

  it('has text lines of 80 columns at most, headings alone between blank lines', () => {
    const text = toText(sheet)
    const lines = text.split('\n')
    for (const line of lines) expect(columns(line), line).toBeLessThanOrEqual(80)
    expect(text).not.toMatch(/[ \t]\n|\n\n\n|\r|\t/)
    expect(text.endsWith('\n')).toBe(true)
    for (const [, heading] of headingsOf(sheet).slice(1)) {
      const at = lines.indexOf(heading)
      expect(at, heading).toBeGreaterThan(0)
      expect([lines[at - 1], lines[at + 1]], heading).toEqual(['', ''])
    }
  })
})

describe.each(Object.entries(hostile))('hostile text: %s', (_, typed) => {
  it.each(readers)('is only text on the %s sheet', (reader) => {
    const sheet = sheetWith(typed, reader)
    const html = toHtml(sheet)
    expect(html.match(/<script|<img|<w:p/gi)).toBeNull()
    expect(html.match(/<[a-z][^>]*\son\w+=/gi)).toBeNull()
    for (const form of [html, toText(sheet)]) {
      expect(form).not.toMatch(/[\u202a-\u202e\u2066\u2067\u200e\u200f\ufeff]/u)
      expect(form.replaceAll('\n', '')).not.toMatch(/[\p{Cc}\p{Surrogate}\p{Noncharacter_Code_Point}]/u)
    }
    for (const line of toText(sheet).split('\n')) expect(columns(line)).toBeLessThanOrEqual(80)
    expect(html.match(/<bdi>/g)?.length ?? 0).toBe(html.match(/<\/bdi>/g)?.length ?? 0)
  })
})

it('shows what was typed, marks that cannot be seen as text', () => {
  expect(own('exit \u202egnp.exe\u202c end')).toBe('exit [U+202E]gnp.exe[U+202C] end')
  expect(own('a\u0000b\u0007c\u001bd')).toBe('a[U+0000]b[U+0007]c[U+001B]d')
  expect(own(' two\n\tlines ')).toBe('two lines')
  expect(own('half \ud83d of one')).toBe('half [U+D83D] of one')
  expect(own('👩‍🦯 cane')).toBe('👩‍🦯 cane')
  expect(own('مدخل المستشفى')).toBe(`${isolate}مدخل المستشفى${isolateEnd}`)
  // Joined letters are never cut in half.
  expect(own('👩‍🦯'.repeat(100), 5)).toBe(`${'👩‍🦯'.repeat(4)}…`)
  expect(own('x'.repeat(10_000))).toHaveLength(80)
  expect(ownWhole('x'.repeat(10_000))).toHaveLength(10_000)
})

it('keeps a reading whole in the file, however long', () => {
  const typed = 'long name '.repeat(1000).trim()
  expect(textsOf(sheetWith(typed, 'file'))).toContain(typed)
})

it('keeps right-to-left words apart from what stands beside them', () => {
  expect(toHtml(sheetWith('مدخل', 'client'))).toContain('Walk: <bdi>مدخل</bdi>.')
})

it('shows a verdict by word, shape and pattern, each different', () => {
  const marks = verdicts.map((verdict) => {
    const html = toHtml({ ...clientSheet, blocks: [{ kind: 'verdict', verdict, text: 'Word.' }] })
    expect(html).toContain('<span>Verdict: Word.</span>')
    const mark = /<svg class="mark"[\s\S]*?<\/svg>/.exec(html)?.[0] ?? ''
    expect(mark).toContain('aria-hidden="true"')
    return { shape: / d="([^"]+)"\/><\/svg>/.exec(mark)?.[1], pattern: /<defs>.*<rect[^>]*>/.exec(mark)?.[0] }
  })
  expect(new Set(marks.map(({ shape }) => shape)).size).toBe(5)
  expect(new Set(marks.map(({ pattern }) => pattern)).size).toBe(5)
})

it('has large print and more contrast without a script', () => {
  const html = toHtml(clientSheet)
  for (const id of ['large', 'contrast']) {
    expect(html).toContain(`<input type="checkbox" id="${id}">`)
    expect(html).toContain(`html:has(#${id}:checked)`)
  }
  expect(html).toContain('@media print')
})

it('reads a table row by row in the text, an empty cell as blank', () => {
  const text = toText({
    ...venueSheet,
    blocks: [{ kind: 'table', caption: 'Fixes', head: ['Place', 'Owner'], rows: [['Hall', '']] }],
    sections: [],
  })
  expect(text).toBe(`${venueSheet.heading}\n\nFixes.\n\nRow 1 of 1\n- Place: Hall\n- Owner: (blank)\n`)
})

it('counts columns as a screen does', () => {
  expect(columns('abc')).toBe(3)
  expect(columns('医院')).toBe(4)
  expect(columns('👩‍🦯')).toBe(2)
  expect(columns('e\u0301')).toBe(1)
})
