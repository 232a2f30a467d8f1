/** Words beside the strip: wrapped by an estimate of the platform's sans serif, wide rather than narrow. */

/** Estimated width of one line, px, at a text size in px. */
export function lineWidth(line: string, size: number): number {
  let ems = 0
  for (const letter of line) ems += /[mwMW@%]/.test(letter) ? 0.92 : /[iljftr.,:;'|! ]/.test(letter) ? 0.38 : 0.6
  return ems * size
}

/** Breaks text into lines no wider than `width`; a word too long for a line is broken. At most `most` lines, then "…". */
export function wrap(text: string, width: number, size: number, most: number): string[] {
  const lines: string[] = []
  let line = ''
  for (const word of text.split(/\s+/).filter((one) => one !== '')) {
    for (const piece of pieces(word, width, size)) {
      const longer = line === '' ? piece : `${line} ${piece}`
      if (line !== '' && lineWidth(longer, size) > width) {
        lines.push(line)
        line = piece
      } else line = longer
    }
  }
  if (line !== '') lines.push(line)
  if (lines.length <= most) return lines
  const last = [...(lines[most - 1] ?? '')]
  while (last.length > 0 && lineWidth(`${last.join('')}…`, size) > width) last.pop()
  return [...lines.slice(0, most - 1), `${last.join('')}…`]
}

function pieces(word: string, width: number, size: number): string[] {
  const found: string[] = []
  let piece = ''
  for (const letter of word) {
    if (piece !== '' && lineWidth(piece + letter, size) > width) {
      found.push(piece)
      piece = ''
    }
    piece += letter
  }
  if (piece !== '') found.push(piece)
  return found
}
