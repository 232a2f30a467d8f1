import type PDFDocument from 'pdfkit'
import type { Outline } from '../content/tree.ts'

/** A4 in points: upright, or on its side for a table of many columns. */
export const upright: [number, number] = [595.28, 841.89]
export const onItsSide: [number, number] = [841.89, 595.28]
export const margins = { top: 72, bottom: 64, left: 56, right: 56 }

/** Width and height in which the words of a page stand. */
export function measure(doc: PDFDocument): number {
  return doc.page.width - margins.left - margins.right
}
export function bodyHeight(doc: PDFDocument): number {
  return doc.page.height - margins.top - margins.bottom
}

export const ink = '#1B1F3B'
const soft = '#565A78'
const tape = '#F2C230'

/** Faces by the names under which they are registered. */
export const face = { text: 'text', bold: 'bold' } as const

/** A new page where `height` more points would run into the foot of this one. True where there is one. */
export function makeRoom(doc: PDFDocument, height: number): boolean {
  if (doc.y + height <= doc.page.height - margins.bottom || doc.y <= margins.top) return false
  doc.continueOnNewPage()
  return true
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
    doc.text(number, doc.page.width - margins.right - room, doc.page.height - 44, { lineBreak: false })
    doc.fillColor(soft).fontSize(10)
    doc.text(outline.title, margins.left, doc.page.height - 43, {
      width: measure(doc) - room - 16,
      height: 11,
      ellipsis: true,
    })
    doc.endMarkedContent()
  }
}

/** The yellow tape with ink ticks: a tick each 5 mm, a longer one each 10 mm. It carries no meaning. */
function drawTape(doc: PDFDocument): void {
  const millimetre = 72 / 25.4
  doc.rect(margins.left, 26, measure(doc), 10).fill(tape)
  doc.strokeColor(ink).lineWidth(0.6)
  for (let at = 0; at * 5 * millimetre <= measure(doc); at++) {
    const x = margins.left + at * 5 * millimetre
    doc.moveTo(x, 36).lineTo(x, at % 2 === 0 ? 29 : 32)
  }
  doc.stroke()
}
