/**
 * A row of RFC 4180 with its CRLF. Every cell is quoted that holds a comma, a quote or a line end, or that a reader with
 * another separator could split.
 */
export function rowOf(cells: readonly string[]): string {
  return `${cells.map((text) => quoted(disarmed(text))).join(',')}\r\n`
}

const plainNumber = /^[+-]?(\d+(\.\d*)?|\.\d+)(e[+-]?\d+)?$/i
/** What a spreadsheet takes for the beginning of a formula, full-width forms among them. */
const formula = /^[=+\-@\t\r\n\uff1d\uff0b\uff0d\uff20]/

/** An apostrophe before what a spreadsheet would calculate; a plain number stays a number. */
function disarmed(text: string): string {
  return formula.test(text) && !plainNumber.test(text) ? `'${text}` : text
}

function quoted(text: string): string {
  return /[",;\t\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text
}
