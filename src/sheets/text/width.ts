/** Columns that a text takes on a fixed-width screen: two for East Asian wide letters and emoji, none for marks. */
export function columns(text: string): number {
  if (/^[ -~]*$/.test(text)) return text.length
  let sum = 0
  for (const { segment } of letters.segment(text)) sum += letterColumns(segment)
  return sum
}

const letters = new Intl.Segmenter('en')

const none = /^[\p{M}\p{Cf}]+$/u
const wide =
  /[\p{Emoji_Presentation}\p{Regional_Indicator}\u1100-\u115f\u2e80-\u303e\u3041-\ua4cf\uac00-\ud7a3\uf900-\ufaff\ufe30-\ufe4f\uff00-\uff60\uffe0-\uffe6\u{20000}-\u{3fffd}]|\ufe0f/u

function letterColumns(letter: string): number {
  if (none.test(letter)) return 0
  return wide.test(letter) ? 2 : 1
}

/** Lines of at most `most` columns, broken at blanks; a word longer than a line is broken between letters. */
export function wrap(text: string, most: number): string[] {
  const lines: string[] = []
  let line = ''
  let width = 0
  const close = (): void => {
    if (line !== '') lines.push(line)
    line = ''
    width = 0
  }
  for (const word of text.split(' ').filter((one) => one !== '')) {
    const room = columns(word)
    if (width > 0 && width + 1 + room > most) close()
    if (room <= most) {
      line = width > 0 ? `${line} ${word}` : word
      width += room + (width > 0 ? 1 : 0)
      continue
    }
    for (const { segment } of letters.segment(word)) {
      const letter = letterColumns(segment)
      if (width + letter > most) close()
      line += segment
      width += letter
    }
  }
  close()
  return lines
}
