import { TextRun } from 'docx'
import { held } from '../../units/held.ts'

/** What XML 1.0 has no place for, not even escaped. */
const outside = /[^\t\n\r\u0020-\ud7ff\ue000-\ufffd\u{10000}-\u{10ffff}]/gu

/** Text for the file: what XML cannot hold is named, "[U+FFFE]". The library escapes the rest. */
export function xmlText(text: string): string {
  return text.replace(
    outside,
    (mark) => `[U+${(mark.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, '0')}]`,
  )
}

/** Words on the page, each figure held to its unit. */
export function words(text: string, bold = false): TextRun {
  // Said only where it is so: a plain "not bold" would undo a heading's style.
  return new TextRun({ text: xmlText(held(text)), ...(bold ? { bold } : {}) })
}
