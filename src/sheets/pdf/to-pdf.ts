import PDFDocument, { type OutlineItem, type StructureElement } from 'pdfkit'
import { toBytes } from 'pdfkit/output'
import { held } from '../../units/held.ts'
import type { Block, Outline, Refusal, Section } from '../content/tree.ts'
import { refuseUnshown } from './glyphs.ts'
import { face, furnish, ink, makeRoom, margins, measure, onItsSide, upright } from './paper.ts'
import { drawTable, fits } from './table.ts'
import { drawShape, shapeWords } from './verdict-shape.ts'

export interface PdfMaterial {
  /** TrueType faces, embedded as far as they are used. */
  font: Uint8Array
  boldFont: Uint8Array
  /** When it is made: stands in the file's own data. */
  made: Date
}

/**
 * A sheet as a tagged PDF 1.7 (PDF/UA): title, language, headings, lists, tables with header cells, bookmarks, DRAFT on each
 * page of a draft. Large clear print for those who walk, 12 point for those who read at a desk. A Refusal where the faces have
 * no glyph for a letter.
 */
export async function toPdf(outline: Outline, { font, boldFont, made }: PdfMaterial): Promise<Uint8Array | Refusal> {
  const doc = new PDFDocument({
    pdfVersion: '1.7',
    subset: 'PDF/UA',
    tagged: true,
    lang: outline.lang,
    displayTitle: true,
    info: { Title: outline.title, Creator: 'Tautline', Producer: 'Tautline', CreationDate: made },
    // None to begin with: a face given here would be read anew at each change to it.
    font: null,
    autoFirstPage: false,
    bufferPages: true,
  })
  escapeTitle(doc, outline.title)
  doc.registerFont(face.text, font).registerFont(face.bold, boldFont)
  const faces = [face.text, face.bold].map((name) => doc.font(name)._font.font)
  const refusal = refuseUnshown(outline, (point) => faces.every((one) => one.hasGlyphForCodePoint(point)))
  if (refusal) return refusal
  const bytes = toBytes(doc)
  doc.addPage({
    size: tablesOf(outline).every((table) => fits(doc, table)) ? upright : onItsSide,
    margins: { ...margins },
  })
  const root = doc.struct('Document')
  doc.addStructure(root)
  const writer = { doc, root, size: outline.reader === 'client' || outline.reader === 'reception' ? 14 : 12 }
  doc.fillColor(ink)
  heading(writer, outline.heading, 1, doc.outline)
  for (const block of outline.blocks) writeBlock(writer, block)
  for (const section of outline.sections) writeSection(writer, section, 2, doc.outline)
  root.end()
  furnish(doc, outline)
  doc.end()
  return bytes
}

/** Every table of the sheet: the widest decides which way its pages lie. */
function tablesOf(outline: Outline): Extract<Block, { kind: 'table' }>[] {
  const blocksOf = (section: Section): Block[] => [...section.blocks, ...section.sections.flatMap(blocksOf)]
  return [...outline.blocks, ...outline.sections.flatMap(blocksOf)].filter((block) => block.kind === 'table')
}

interface Writer {
  doc: PDFDocument
  root: StructureElement
  /** Of the body, in points. */
  size: number
}

function writeSection(writer: Writer, section: Section, level: number, bookmarks: OutlineItem): void {
  const here = heading(writer, section.heading, level, bookmarks)
  for (const block of section.blocks) writeBlock(writer, block)
  for (const one of section.sections) writeSection(writer, one, level + 1, here)
}

/** Points that a heading of level 1, 2, 3 has over the body. */
const larger = [12, 6, 3]

function heading({ doc, root, size }: Writer, text: string, level: number, bookmarks: OutlineItem): OutlineItem {
  const points = size + (larger[level - 1] ?? 1)
  doc.font(face.bold).fontSize(points)
  if (level > 1) doc.y += size
  // Never the last thing on a page: three lines of what follows go with it.
  const width = measure(doc)
  makeRoom(doc, Math.min(doc.heightOfString(text, { width }), 8 * size) + 4 * size)
  root.add(doc.struct(`H${Math.min(level, 6)}`, () => doc.text(held(text), margins.left, doc.y, { width })))
  const bookmark = bookmarks.addItem(text)
  doc.y += size / 2
  return bookmark
}

function writeBlock({ doc, root, size }: Writer, block: Block): void {
  const words = { width: measure(doc), lineGap: size / 3 }
  doc.font(face.text).fontSize(size)
  switch (block.kind) {
    case 'paragraph':
      root.add(doc.struct('P', () => doc.text(held(block.line.text), margins.left, doc.y, words)))
      break
    case 'verdict': {
      const side = size + 4
      const left = margins.left + side + 10
      doc.font(face.bold).fontSize(size + 4)
      makeRoom(doc, 2 * side)
      const [x, y] = [margins.left, doc.y]
      const figure = { alt: shapeWords[block.verdict], bbox: [x, y, x + side, y + side] }
      root.add(doc.struct('Figure', figure).add(() => drawShape(doc, block.verdict, x, y + 2, side)))
      root.add(
        doc.struct('P', () =>
          doc.text(held(`Verdict: ${block.text}`), left, y, { ...words, width: words.width - side - 10 }),
        ),
      )
      break
    }
    case 'list': {
      const list = doc.struct('L')
      root.add(list)
      for (const { text } of block.items) writeItem(doc, list, text, size)
      break
    }
    case 'table':
      drawTable(doc, block, root)
      break
  }
  doc.x = margins.left
  doc.y += size / 3
}

function writeItem(doc: PDFDocument, list: StructureElement, text: string, size: number): void {
  // The dot and the first line of its words stay on one page.
  makeRoom(doc, size * 1.5)
  const top = doc.y
  const item = doc.struct('LI')
  list.add(item)
  item.add(doc.struct('Lbl', () => doc.text('•', margins.left + 4, top, { lineBreak: false })))
  item.add(
    doc.struct('LBody', () =>
      doc.text(held(text), margins.left + 22, top, { width: measure(doc) - 22, lineGap: size / 3 }),
    ),
  )
}

/** The library writes the title into XML as it stands: "O&M" would break the file's own data. */
function escapeTitle(doc: PDFDocument, title: string): void {
  const escaped = title.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;')
  const append = doc.appendXML.bind(doc)
  doc.appendXML = (xml, newline) =>
    append(title === '' ? xml : xml.replace(`>${title}<`, () => `>${escaped}<`), newline)
}
