import { Paragraph, Table, TableCell, TableRow, WidthType } from 'docx'
import type { Block } from '../content/tree.ts'
import { words } from './xml-text.ts'

/** A table over the whole measure; its first row and first column are marked as heads. */
export function tableOf({ head, rows }: Extract<Block, { kind: 'table' }>): Table {
  return new Table({
    width: { size: 100, type: WidthType.PERCENTAGE },
    tableLook: { firstRow: true, firstColumn: true, noHBand: true, noVBand: true },
    rows: [
      new TableRow({ tableHeader: true, cantSplit: true, children: head.map((text) => cell(text, true)) }),
      ...rows.map(
        (cells) =>
          // A row stays on one page where a page can hold it.
          new TableRow({
            cantSplit: cells.join('').length < 1000,
            children: cells.map((text, i) => cell(text, i === 0)),
          }),
      ),
    ],
  })
}

function cell(text: string, isHead: boolean): TableCell {
  return new TableCell({
    margins: { left: 60, right: 60 },
    children: [new Paragraph({ children: [words(text, isHead)] })],
  })
}
