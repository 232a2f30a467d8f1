import { cellsPerLine, linesPerPage } from './cells.ts'

/** Lines that belong together. A heading has a blank line before it and is never the last thing on a page. */
export interface Passage {
  heading: boolean
  lines: string[]
}

export interface PageMarks {
  /** The number of a page, in ASCII braille. */
  number: (page: number) => string
  /** Stands at the left of every page's last line; empty: nothing. */
  mark: string
}

const bodyLines = linesPerPage - 1

/** Passages set on pages of 25 lines, the last of which is the page's own. CRLF after each line, a form feed between pages. */
export function pages(passages: readonly Passage[], marks: PageMarks): string {
  const set: string[][] = [[]]
  const page = () => set.at(-1) ?? []
  passages.forEach(({ heading, lines }, i) => {
    const below = heading ? linesUnder(passages, i + 1) : 0
    const before = heading && page().length > 0 ? [''] : []
    // Kept together where a page can hold them; a longer passage runs over.
    const whole = before.length + lines.length + below
    if (heading && page().length > 0 && whole <= bodyLines && page().length + whole > bodyLines) set.push([])
    else page().push(...before)
    for (const line of lines) {
      if (page().length >= bodyLines) set.push([])
      page().push(line)
    }
  })
  return set.map((lines, i) => `${[...filled(lines), lastLine(marks, i + 1)].join('\r\n')}\r\n`).join('\f')
}

/** Lines that a heading takes along: further headings, then the first two lines under them. */
function linesUnder(passages: readonly Passage[], at: number): number {
  const next = passages[at]
  if (!next) return 0
  return next.heading ? 1 + next.lines.length + linesUnder(passages, at + 1) : Math.min(2, next.lines.length)
}

function filled(lines: readonly string[]): string[] {
  return [...lines, ...Array.from({ length: Math.max(0, bodyLines - lines.length) }, () => '')]
}

function lastLine({ number, mark }: PageMarks, page: number): string {
  return mark + number(page).padStart(cellsPerLine - mark.length)
}
