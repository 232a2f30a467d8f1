/** Cells in a line and lines on a page of common braille paper; the last line is the page's own. */
export const cellsPerLine = 40
export const linesPerPage = 25

/** North American ASCII braille (common practice), by the value of dots 1 to 6. */
const ascii = ' A1B\'K2L@CIF/MSP"E3H9O6R^DJG>NTQ,*5<-U8V.%[$+X!&;:4\\0Z7(_?W]#Y)='
const blank = 0x2800

/** Braille cells as the characters of a BRF file. @throws RangeError on a cell of eight dots: those are refused before. */
export function asciiOf(cells: string): string {
  return Array.from(cells, (cell) => {
    const letter = ascii[cell.charCodeAt(0) - blank]
    if (letter === undefined) throw new RangeError(`no six-dot cell: ${cell}`)
    return letter
  }).join('')
}

/** True where the code had no cells of six dots for a letter. */
export function hasUnknown(cells: string): boolean {
  return /[^\u2800-\u283f]/.test(cells)
}

/** How far a first line and the lines after it stand in, in cells. */
export interface Indent {
  first: number
  runover: number
}

/** ASCII braille broken at blanks into lines of 40 cells; a word longer than a line is broken at its end. */
export function wrap(text: string, { first, runover }: Indent): string[] {
  const lines: string[] = []
  let line = ' '.repeat(first)
  let empty = true
  const open = () => {
    lines.push(line)
    line = ' '.repeat(runover)
    empty = true
  }
  for (const whole of text.split(' ').filter(Boolean)) {
    let word = whole
    if (!empty && line.length + 1 + word.length > cellsPerLine) open()
    while (word.length > cellsPerLine - line.length) {
      const room = cellsPerLine - line.length
      line += word.slice(0, room)
      word = word.slice(room)
      open()
    }
    line += empty ? word : ` ${word}`
    empty = false
  }
  return empty ? lines : [...lines, line]
}

/** A main heading: the same number of blanks on both sides, three at least. */
export function centred(text: string): string[] {
  return wrap(text, { first: 6, runover: 6 }).map((line) => {
    const words = line.trimStart()
    return ' '.repeat(Math.floor((cellsPerLine - words.length) / 2)) + words
  })
}
