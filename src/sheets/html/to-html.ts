import type { Block, Outline, Section } from '../content/tree.ts'
import { escapeIsolated, escapePlain } from './escape.ts'
import { tapeRule, verdictMark } from './marks.ts'
import { style } from './style.ts'

/**
 * A sheet as one page that asks for nothing else: real headings in order, lists, tables with header cells, no script.
 * Its words come in the same order as in the text form, the verdict's first.
 */
export function toHtml(outline: Outline): string {
  const wide = outline.sections.some(hasTable) ? ' class="wide"' : ''
  return `<!DOCTYPE html>
<html lang="${outline.lang}">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta http-equiv="Content-Security-Policy" content="default-src 'none'; style-src 'unsafe-inline'">
<title>${escapePlain(outline.title)}</title>
<style>${style}</style>
</head>
<body${wide}>
${tapeRule}
<main>
<h1>${escapeIsolated(outline.heading)}</h1>
${outline.blocks.map(blockHtml).join('\n')}
${look}
${outline.sections.map((section) => sectionHtml(section, 2)).join('\n')}
</main>
</body>
</html>
`
}

const look =
  '<fieldset class="look"><legend>Reading</legend><label><input type="checkbox" id="large"> Large print</label>' +
  '<label><input type="checkbox" id="contrast"> White on black</label></fieldset>'

function sectionHtml(section: Section, level: number): string {
  const open = section.part ? '<section class="part">' : '<section>'
  const tag = `h${Math.min(level, 6)}`
  return [
    open,
    `<${tag}>${escapeIsolated(section.heading)}</${tag}>`,
    ...section.blocks.map(blockHtml),
    ...section.sections.map((inner) => sectionHtml(inner, level + 1)),
    '</section>',
  ].join('\n')
}

function blockHtml(block: Block): string {
  if (block.kind === 'paragraph') return `<p>${escapeIsolated(block.line.text)}</p>`
  if (block.kind === 'verdict')
    return `<p class="verdict verdict-${block.verdict}">${verdictMark(block.verdict)}<span>Verdict: ${escapeIsolated(block.text)}</span></p>`
  if (block.kind === 'list')
    return block.items.length === 0
      ? ''
      : `<ul>\n${block.items.map(({ text }) => `<li>${escapeIsolated(text)}</li>`).join('\n')}\n</ul>`
  const head = block.head.map((cell) => `<th scope="col">${escapeIsolated(cell)}</th>`).join('')
  const rows = block.rows.map((cells) => `<tr>${cells.map(cellHtml).join('')}</tr>`)
  // A wide table scrolls on its own: the group can be reached by keyboard.
  return [
    `<div class="table" role="group" tabindex="0" aria-label="${escapePlain(block.caption)}"><table>`,
    `<caption>${escapeIsolated(block.caption)}</caption>`,
    `<thead><tr>${head}</tr></thead>`,
    `<tbody>\n${rows.join('\n')}\n</tbody></table></div>`,
  ].join('\n')
}

function cellHtml(cell: string, column: number): string {
  return column === 0 ? `<th scope="row">${escapeIsolated(cell)}</th>` : `<td>${escapeIsolated(cell)}</td>`
}

function hasTable(section: Section): boolean {
  return section.blocks.some((block) => block.kind === 'table') || section.sections.some(hasTable)
}
