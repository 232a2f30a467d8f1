import type { Block, Outline, Section } from '../content/tree.ts'
import { wrap } from './width.ts'

const most = 80

/**
 * A sheet as plain text: UTF-8, LF, 80 columns at most, headings on their own line, a blank line between all parts, no
 * columns and no drawing. A table is read row by row, each cell with its heading.
 */
export function toText(outline: Outline): string {
  const passages = [
    wrap(outline.heading, most),
    ...outline.blocks.flatMap(blockLines),
    ...outline.sections.flatMap(sectionLines),
  ]
  return `${passages.map((lines) => lines.join('\n')).join('\n\n')}\n`
}

function sectionLines(section: Section): string[][] {
  return [wrap(section.heading, most), ...section.blocks.flatMap(blockLines), ...section.sections.flatMap(sectionLines)]
}

/** Passages of a block: each is set apart by a blank line. */
function blockLines(block: Block): string[][] {
  if (block.kind === 'paragraph') return [wrap(block.line.text, most)]
  if (block.kind === 'verdict') return [wrap(`Verdict: ${block.text}`, most)]
  if (block.kind === 'list') return block.items.length === 0 ? [] : [block.items.flatMap(({ text }) => item(text))]
  const rows = block.rows.map((cells, i) => [
    ...wrap(`Row ${i + 1} of ${block.rows.length}`, most),
    ...cells.flatMap((cell, column) => item(`${block.head[column] ?? ''}: ${cell === '' ? blank : cell}`)),
  ])
  return [wrap(`${block.caption}.`, most), ...rows]
}

/** To be filled in by hand. */
const blank = '(blank)'

/** "- " and the text, its further lines set in under it. */
function item(text: string): string[] {
  return wrap(text, most - 2).map((line, i) => (i === 0 ? `- ${line}` : `  ${line}`))
}
