/** What this file needs of a liblouis built by Emscripten (16-bit characters): handed in, loaded only when asked for. */
export interface LouisModule {
  ccall(name: string, result: string, types: string[], values: unknown[]): unknown
  FS: { writeFile(path: string, text: string): void }
  _malloc(bytes: number): number
  _free(at: number): void
  setValue(at: number, value: number, type: string): void
  getValue(at: number, type: string): number
}

/** Text in, braille cells as U+2800 and up. A letter that the code does not know comes out as cells with a dot 7 or 8. */
export type Translate = (text: string) => string

/** Uncontracted (1) or contracted (2) Unified English Braille. */
export type Grade = 1 | 2

/** The files of the tables, by name, in the folder `tables` of liblouis. */
export const tableFiles = [
  'en-ueb-g1.ctb',
  'en-ueb-g2.ctb',
  'en-ueb-chardefs.uti',
  'en-ueb-math.ctb',
  'latinLetterDef8Dots.uti',
  'braille-patterns.cti',
  'unicode.dis',
] as const
export type TableFile = (typeof tableFiles)[number]

/** @param tables the text of each table file. @throws Error where the tables do not compile. */
export function louis(module: LouisModule, tables: Readonly<Record<TableFile, string>>): (grade: Grade) => Translate {
  for (const name of tableFiles) module.FS.writeFile(`/${name}`, tables[name])
  return (grade) => (text) => translateString(module, `unicode.dis,en-ueb-g${grade}.ctb`, straightened(text))
}

/** These tables take every ’ for a closing quotation mark; where none was opened it is an apostrophe. */
function straightened(text: string): string {
  return text.includes('\u2018') ? text : text.replaceAll('\u2019', "'")
}

function translateString(module: LouisModule, table: string, text: string): string {
  // Six cells and more for one letter are common ("\x5b57" of an unknown one takes eleven).
  const room = 16 * text.length + 64
  const at = module._malloc(8 + 2 * text.length + 2 * room)
  const input = at + 8
  const output = input + 2 * text.length
  for (let i = 0; i < text.length; i++) module.setValue(input + 2 * i, text.charCodeAt(i), 'i16')
  module.setValue(at, text.length, 'i32')
  module.setValue(at + 4, room, 'i32')
  const types = Array.from({ length: 8 }, (_, i) => (i === 0 ? 'string' : 'number'))
  const done = module.ccall('lou_translateString', 'number', types, [table, input, at, output, at + 4, 0, 0, 0])
  const read = module.getValue(at, 'i32')
  const cells = Array.from({ length: module.getValue(at + 4, 'i32') }, (_, i) => module.getValue(output + 2 * i, 'i16'))
  module._free(at)
  if (done !== 1 || read !== text.length)
    throw new Error(`liblouis did not translate with ${table}: ${read} of ${text.length} read`)
  return cells.map((cell) => (cell === 32 ? '\u2800' : String.fromCharCode(cell & 0xffff))).join('')
}
