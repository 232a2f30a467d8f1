import type PDFDocument from 'pdfkit'
import type { Block } from '../content/tree.ts'
import { ink } from './paper.ts'

type Verdict = Extract<Block, { kind: 'verdict' }>['verdict']

/** What a shape is called where it cannot be seen. */
export const shapeWords: Readonly<Record<Verdict, string>> = {
  usable: 'Disc, the shape of usable.',
  'with-cautions': 'Triangle, the shape of with cautions.',
  'with-help': 'Diamond, the shape of with help.',
  'do-not-use': 'Cross, the shape of do not use.',
  'not-known': 'Dashed ring, the shape of not known.',
}

/** The shape of a verdict in ink, in a square of `size` points whose upper left corner is at x, y. */
export function drawShape(doc: PDFDocument, verdict: Verdict, x: number, y: number, size: number): void {
  const middle = size / 2
  doc.strokeColor(ink).lineWidth(2)
  switch (verdict) {
    case 'usable':
      doc.circle(x + middle, y + middle, middle - 1).fill(ink)
      break
    case 'with-cautions':
      doc.polygon([x + middle, y], [x + size, y + size], [x, y + size]).fill(ink)
      break
    case 'with-help':
      doc.polygon([x + middle, y], [x + size, y + middle], [x + middle, y + size], [x, y + middle]).fill(ink)
      break
    case 'do-not-use':
      doc
        .lineWidth(4)
        .moveTo(x + 2, y + 2)
        .lineTo(x + size - 2, y + size - 2)
      doc
        .moveTo(x + size - 2, y + 2)
        .lineTo(x + 2, y + size - 2)
        .stroke()
      break
    case 'not-known':
      doc
        .dash(3)
        .circle(x + middle, y + middle, middle - 1)
        .stroke()
      doc.undash()
      break
  }
  doc.fillColor(ink)
}
