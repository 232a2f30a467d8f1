import type { Verdict } from '../../judge/result.ts'

/**
 * The one outline that every form of a sheet is written from: headings, paragraphs, lists and tables as plain data.
 * All text has been through `own`, so that a form needs only its own escapes.
 */
export type Reader = 'client' | 'venue' | 'file' | 'reception'

export interface Line {
  text: string
  /** Where a surveyor corrects these words: "end sign of Past the lockers". */
  from?: string
  /** Nobody has given it: the sheet is not finished. */
  missing?: true
}

export type Block =
  | { kind: 'paragraph'; line: Line }
  | { kind: 'list'; items: Line[] }
  /** The first cell of a row is the row's heading. */
  | { kind: 'table'; caption: string; head: string[]; rows: string[][] }
  | { kind: 'verdict'; verdict: Verdict; text: string }

export interface Section {
  heading: string
  /** A part of the walk: its paragraphs are the start, the items of its list are the facts. */
  part?: true
  blocks: Block[]
  sections: Section[]
}

export interface Outline {
  kind: 'outline'
  lang: 'en'
  reader: Reader
  draft: boolean
  /** For the head of a page and the list of files. */
  title: string
  /** The first words of the sheet. */
  heading: string
  blocks: Block[]
  sections: Section[]
}

/** No sheet can be given, and what would change that. */
export interface Refusal {
  kind: 'refusal'
  why: string
  missing: string[]
  whatToDo: string
}

export function paragraph(text: string, from?: string): Block {
  return { kind: 'paragraph', line: line(text, from) }
}

export function line(text: string, from?: string): Line {
  return from === undefined ? { text } : { text, from }
}

export function list(items: readonly (Line | string)[]): Block {
  return { kind: 'list', items: items.map((item) => (typeof item === 'string' ? { text: item } : item)) }
}

export function section(heading: string, blocks: Block[], sections: Section[] = []): Section {
  return { heading, blocks, sections }
}

/** A line for what nobody has given: shown as such, and reported by `lint`. */
export function gap(label: string, from: string): Line {
  return { text: `${label}: not recorded.`, from, missing: true }
}
