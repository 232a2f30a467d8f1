import type PDFDocument from 'pdfkit'
import type { Outline } from '../content/tree.ts'

/** A4 in points, and the measure in which the words stand. */
export const paper = { width: 595.28, height: 841.89 }
export const margins = { top: 72, bottom: 64, left: 56, right: 56 }
export const measure = paper.width - margins.left - margins.right
export const ink = '#1B1F3B'
const soft = '#565A78'
const tape = '#F2C230'

/** Faces by the names under which they are registered. */
export const face = { text: 'text', bold: 'bold' } as const

/** True where `height` more points would run into the foot of the page. */
export function pageIsFull(doc: PDFDocument, height: number): boolean {
  return doc.y + height > paper.height - margins.bottom
}

/**
 * What every page has besides the sheet's words, all of it marked as artifacts: the tape at its head, DRAFT, and at its foot
 * the sheet's title and "Page 2 of 5". Drawn last, when the pages are known.
 */
export function furnish(doc: PDFDocument, outline: Outline): void {
  const { start, count } = doc.bufferedPageRange()
  for (let i = 0; i < count; i++) {
    doc.switchToPage(start + i)
    // Words below the body would otherwise open a page of their own.
    doc.page.margins.bottom = 0
    doc.markContent('Artifact', { type: 'Layout' })
    drawTape(doc)
    doc.endMarkedContent()
    doc.markContent('Artifact', { type: 'Pagination' })
    doc.fillColor(ink)
    if (outline.draft) doc.font(face.bold).fontSize(14).text('DRAFT', margins.left, 46, { lineBreak: false })
    const number = `Page ${i + 1} of ${count}`
    doc.font(face.text).fontSize(12)
    const room = doc.widthOfString(number)
    doc.text(number, paper.width - margins.right - room, paper.height - 44, { lineBreak: false })
    doc.fillColor(soft).fontSize(10)
    doc.text(outline.title, margins.left, paper.height - 43, { width: measure - room - 16, height: 11, ellipsis: true })
    doc.endMarkedContent()
  }
}

/** The yellow tape with ink ticks: a tick each 5 mm, a longer one each 10 mm. It carries no meaning. */
function drawTape(doc: PDFDocument): void {
  const millimetre = 72 / 25.4
  doc.rect(margins.left, 26, measure, 10).fill(tape)
  doc.strokeColor(ink).lineWidth(0.6)
  for (let at = 0; at * 5 * millimetre <= measure; at++) {
    const x = margins.left + at * 5 * millimetre
    doc.moveTo(x, 36).lineTo(x, at % 2 === 0 ? 29 : 32)
  }
  doc.stroke()
}
