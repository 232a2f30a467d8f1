import type { Block, Line, Outline, Refusal, Section } from '../content/tree.ts'
import { asciiOf, centred, hasUnknown, type Indent, wrap } from './cells.ts'
import type { Translate } from './louis.ts'
import { type Passage, pages } from './pages.ts'

/** Cells in which things begin (common practice): paragraphs in 3 with runover in 1, items in 1 with runover in 3. */
const paragraphs: Indent = { first: 2, runover: 0 }
const items: Indent = { first: 0, runover: 2 }
const values: Indent = { first: 2, runover: 4 }
const headings: readonly Indent[] = [
  { first: 4, runover: 4 },
  { first: 6, runover: 6 },
]

/**
 * A sheet as a BRF file: ASCII braille, 40 cells by 25 lines, CRLF after each line, a form feed between pages, the page number
 * at the right of the last line and DRAFT at its left where the sheet is one. Tables become lists. A Refusal where the
 * braille code has no cells for a letter: a hole in a name would not be noticed under a finger.
 */
export function toBraille(outline: Outline, translate: Translate): string | Refusal {
  const unknown = new Map<string, string>()
  const braille = (line: Line): string => {
    const cells = translate(line.text)
    if (!hasUnknown(cells)) return asciiOf(cells)
    for (const letter of line.text) if (hasUnknown(translate(letter))) unknown.set(letter, line.from ?? line.text)
    return ''
  }
  const passages = [
    { heading: true, lines: centred(braille({ text: outline.heading })) },
    ...outline.blocks.flatMap((block) => blockPassages(block, braille)),
    ...outline.sections.flatMap((section) => sectionPassages(section, 0, braille)),
  ]
  if (unknown.size > 0) return refusal(unknown)
  return pages(passages, {
    number: (page) => braille({ text: String(page) }),
    mark: outline.draft ? braille({ text: 'DRAFT' }) : '',
  })
}

type Braille = (line: Line) => string

function sectionPassages(section: Section, depth: number, braille: Braille): Passage[] {
  const indent = headings[Math.min(depth, headings.length - 1)] ?? paragraphs
  return [
    { heading: true, lines: wrap(braille({ text: section.heading }), indent) },
    ...section.blocks.flatMap((block) => blockPassages(block, braille)),
    ...section.sections.flatMap((one) => sectionPassages(one, depth + 1, braille)),
  ]
}

function blockPassages(block: Block, braille: Braille): Passage[] {
  const passage = (line: Line, indent: Indent): Passage => ({ heading: false, lines: wrap(braille(line), indent) })
  switch (block.kind) {
    case 'paragraph':
      return [passage(block.line, paragraphs)]
    case 'verdict':
      return [passage({ text: `Verdict: ${block.text}` }, paragraphs)]
    case 'list':
      return block.items.map((item) => passage(item, items))
    case 'table':
      return [
        { heading: true, lines: wrap(braille({ text: block.caption }), headings[1] ?? paragraphs) },
        ...block.rows.flatMap((cells, i) => [
          passage({ text: `Row ${i + 1} of ${block.rows.length}` }, items),
          ...cells.map((cell, column) =>
            passage({ text: `${block.head[column] ?? ''}: ${cell === '' ? '(blank)' : cell}` }, values),
          ),
        ]),
      ]
  }
}

function refusal(unknown: ReadonlyMap<string, string>): Refusal {
  const letters = [...unknown.keys()].slice(0, 10)
  const places = [...new Set(unknown.values())].slice(0, 10)
  return {
    kind: 'refusal',
    why: `The English braille code has no cells for ${letters.map((letter) => `"${letter}"`).join(', ')}.`,
    missing: places,
    whatToDo: 'Write these words in plain Latin letters, or give the sheet as text or audio.',
  }
}
