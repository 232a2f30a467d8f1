import type { Block, Line, Outline, Refusal, Section } from '../content/tree.ts'

/** Scripts that the letters of these faces can be set in as they stand, one after the other from the left. */
const set = /[\p{Script=Latin}\p{Script=Greek}\p{Script=Cyrillic}\p{Script=Common}\p{Script=Inherited}]/u

/** What to call a script in a refusal; others are named by the letter alone. */
const scripts: readonly [string, RegExp][] = [
  ['Arabic', /\p{Script=Arabic}/u],
  ['Chinese', /\p{Script=Han}/u],
  ['Hebrew', /\p{Script=Hebrew}/u],
  ['Japanese', /[\p{Script=Hiragana}\p{Script=Katakana}]/u],
  ['Korean', /\p{Script=Hangul}/u],
  ['Devanagari', /\p{Script=Devanagari}/u],
  ['Thai', /\p{Script=Thai}/u],
  ['emoji', /\p{Extended_Pictographic}/u],
]

/**
 * Null where every letter of a sheet can be shown; otherwise in words which cannot, and where they stand.
 * @param hasGlyph whether all faces in use have a glyph for a code point.
 */
export function refuseUnshown(outline: Outline, hasGlyph: (point: number) => boolean): Refusal | null {
  const letters = new Set<string>()
  const places = new Set<string>()
  for (const { text, from } of linesOf(outline))
    for (const letter of text) {
      if (set.test(letter) && hasGlyph(letter.codePointAt(0) ?? 0)) continue
      letters.add(nameOf(letter))
      places.add(from ?? text)
    }
  if (letters.size === 0) return null
  return {
    kind: 'refusal',
    why: `The letters of a PDF are Latin, Greek and Cyrillic; this sheet has ${[...letters].slice(0, 8).join(', ')}.`,
    missing: [...places].slice(0, 10),
    whatToDo: 'Write these words in Latin letters as well, or give the sheet as HTML or text.',
  }
}

function nameOf(letter: string): string {
  const script = scripts.find(([, pattern]) => pattern.test(letter))?.[0]
  const code = `U+${(letter.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, '0')}`
  return script ?? (/[\p{L}\p{P}\p{S}]/u.test(letter) ? `"${letter}" (${code})` : code)
}

function linesOf(outline: Outline): Line[] {
  const ofSection = (section: Section): Line[] => [
    { text: section.heading },
    ...section.blocks.flatMap(ofBlock),
    ...section.sections.flatMap(ofSection),
  ]
  return [
    { text: outline.title },
    { text: outline.heading },
    ...outline.blocks.flatMap(ofBlock),
    ...outline.sections.flatMap(ofSection),
  ]
}

function ofBlock(block: Block): Line[] {
  if (block.kind === 'paragraph') return [block.line]
  if (block.kind === 'verdict') return [{ text: block.text }]
  if (block.kind === 'list') return block.items
  return [block.caption, ...block.head, ...block.rows.flat()].map((text) => ({ text }))
}
