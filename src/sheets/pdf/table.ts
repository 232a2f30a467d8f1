import type PDFDocument from 'pdfkit'
import type { StructureElement } from 'pdfkit'
import { held } from '../../units/held.ts'
import type { Block } from '../content/tree.ts'
import { bodyHeight, face, ink, makeRoom, margins, measure, upright } from './paper.ts'

type Table = Extract<Block, { kind: 'table' }>

const size = 12
const gap = 8
const leading = { lineGap: 3 }

/**
 * A table with its caption, a header cell for each column and each row, in structure and in sight. The head is drawn again on
 * every page it runs over, as an artifact. A table too wide for its longest words, or a row too tall, is set cell under cell.
 */
export function drawTable(doc: PDFDocument, table: Table, parent: StructureElement): void {
  const root = doc.struct('Table')
  parent.add(root)
  makeRoom(doc, 6 * size)
  root.add(doc.struct('Caption', () => caption(doc, table.caption)))
  const widths = columnWidths(doc, table, measure(doc))
  const draw = (cells: readonly string[], scope: Scope) => {
    const row = doc.struct('TR')
    root.add(row)
    const add: AddCell = (i, words) => {
      const element = scope === 'Row' && i > 0 ? doc.struct('TD') : doc.struct('TH', { scope })
      row.add(element.add(words))
    }
    const height = widths ? rowHeight(doc, cells, widths, scope) : 0
    if (!widths || height > bodyHeight(doc) / 2) {
      stackCells(doc, cells, scope === 'Row' ? table.head : [], add)
      return
    }
    if (makeRoom(doc, height) && scope === 'Row') repeatHead(doc, table.head, widths)
    drawRow(doc, cells, widths, scope, height, add)
    doc.markContent('Artifact', { type: 'Layout' })
    drawRule(doc, scope === 'Column' ? 1 : 0.4)
    doc.endMarkedContent()
  }
  draw(table.head, 'Column')
  for (const cells of table.rows) draw(cells, 'Row')
  root.end()
  doc.x = margins.left
  doc.y += gap
}

/** The head again at the top of a page, for the eye alone. */
function repeatHead(doc: PDFDocument, head: readonly string[], widths: readonly number[]): void {
  doc.markContent('Artifact', { type: 'Layout' })
  drawRow(doc, head, widths, 'Column', rowHeight(doc, head, widths, 'Column'), (_, words) => words())
  drawRule(doc, 1)
  doc.endMarkedContent()
}

type Scope = 'Row' | 'Column'
type AddCell = (column: number, words: () => void) => void

function caption(doc: PDFDocument, text: string): void {
  doc.font(face.bold).fontSize(size)
  doc.text(held(text), margins.left, doc.y, { width: measure(doc), ...leading })
  doc.y += gap / 2
}

/** One row, its cells side by side from where the pen is; the pen is then under it. */
function drawRow(
  doc: PDFDocument,
  cells: readonly string[],
  widths: readonly number[],
  scope: Scope,
  height: number,
  add: AddCell,
): void {
  const top = doc.y
  let x = margins.left
  for (const [i, width] of widths.entries()) {
    const at = x
    add(i, () => {
      strength(doc, scope, i)
      doc.fillColor(ink).text(held(cells[i] ?? ''), at, top, { width: width - gap, ...leading })
    })
    x += width
  }
  doc.y = top + height
}

/** A line under a row. The caller marks it as an artifact. */
function drawRule(doc: PDFDocument, width: number): void {
  const y = doc.y - 2
  doc
    .strokeColor(ink)
    .lineWidth(width)
    .moveTo(margins.left, y)
    .lineTo(margins.left + measure(doc), y)
    .stroke()
}

/** Cell under cell over the whole measure; `head` stands before each but the first. */
function stackCells(doc: PDFDocument, cells: readonly string[], head: readonly string[], add: AddCell): void {
  for (const [i, text] of cells.entries()) {
    makeRoom(doc, 2 * size)
    add(i, () => {
      strength(doc, 'Row', i)
      const label = i > 0 && head[i] ? `${head[i]}: ` : ''
      doc.text(held(label + text), margins.left, doc.y, { width: measure(doc), ...leading })
    })
  }
}

function strength(doc: PDFDocument, scope: Scope, column: number): void {
  doc.font(scope === 'Column' || column === 0 ? face.bold : face.text).fontSize(size)
}

function rowHeight(doc: PDFDocument, cells: readonly string[], widths: readonly number[], scope: Scope): number {
  const heights = widths.map((width, i) => {
    strength(doc, scope, i)
    return doc.heightOfString(held(cells[i] || ' '), { width: width - gap, ...leading })
  })
  return Math.max(...heights) + 6
}

/** Whether a table's longest words stand side by side on an upright page. */
export function fits(doc: PDFDocument, table: Table): boolean {
  return columnWidths(doc, table, upright[0] - margins.left - margins.right) !== null
}

/** Room for the longest word of each column, and the rest by how much each has to say; null where the words do not fit. */
function columnWidths(doc: PDFDocument, { head, rows }: Table, room: number): number[] | null {
  doc.font(face.bold).fontSize(size)
  const columns = head.map((text, i) => [text, ...rows.map((cells) => cells[i] ?? '')])
  const least = columns.map((texts) =>
    Math.max(
      ...texts
        .flatMap((text) => held(text.slice(0, 400)).split(/[ -]/))
        .map((word) => doc.widthOfString(word) + gap + 2),
    ),
  )
  const spare = room - least.reduce((sum, width) => sum + width, 0)
  if (spare < 0) return null
  const weights = columns.map((texts) => Math.sqrt(Math.max(...texts.map((text) => text.length), 1)))
  const all = weights.reduce((sum, weight) => sum + weight, 0)
  return least.map((width, i) => width + (spare * (weights[i] ?? 0)) / all)
}
