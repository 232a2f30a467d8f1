import { Paragraph, Table, TableCell, TableRow, TextRun, WidthType } from 'docx'
import type { Block } from '../content/tree.ts'
import { bold, xmlText } from './xml-text.ts'

/** A table over the whole measure; its first row and first column are marked as heads. */
export function tableOf({ head, rows }: Extract<Block, { kind: 'table' }>): Table {
  return new Table({
    width: { size: 100, type: WidthType.PERCENTAGE },
    tableLook: { firstRow: true, firstColumn: true, noHBand: true, noVBand: true },
    rows: [
      new TableRow({ tableHeader: true, cantSplit: true, children: head.map((text) => cell(text, true)) }),
      ...rows.map((cells) => new TableRow({ children: cells.map((text, i) => cell(text, i === 0)) })),
    ],
  })
}

function cell(text: string, isHead: boolean): TableCell {
  const run = isHead ? bold(text) : new TextRun(xmlText(text))
  return new TableCell({ margins: { left: 60, right: 60 }, children: [new Paragraph({ children: [run] })] })
}
