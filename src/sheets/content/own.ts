/** First strong isolate and its end: the only invisible marks that a sheet's text may hold. */
export const isolate = '\u2068'
export const isolateEnd = '\u2069'

const spaces = /[\t\n\v\f\r\u0085\u2028\u2029\s]+/gu
/** Controls, soft hyphens, zero-width and direction marks; joiners stay, scripts and emoji need them. */
const invisible =
  /[\p{Cc}\p{Surrogate}\p{Noncharacter_Code_Point}\u00ad\u061c\u180e\u200b\u200e\u200f\u202a-\u202e\u2060-\u206f\ufeff\ufff9-\ufffb]/gu
const rightToLeft = /[\p{Script=Arabic}\p{Script=Hebrew}\p{Script=Syriac}\p{Script=Thaana}\p{Script=Nko}]/u

/** A name in a heading or a sentence is cut here; the handler's file gives it whole. */
const longestName = 80

/**
 * Words that somebody typed, made fit for a sheet: one line, invisible marks shown as text ("[U+202E]"), words of a
 * right-to-left script isolated so that they cannot reorder what stands beside them. Cut at `most` characters with "…".
 */
export function own(typed: string, most = longestName): string {
  const shown = cut(typed.replace(spaces, ' ').trim(), most).replace(invisible, asText)
  return rightToLeft.test(shown) ? `${isolate}${shown}${isolateEnd}` : shown
}

/** Whole text, never cut: readings, notes, reasons. */
export function ownWhole(typed: string): string {
  return own(typed, Number.POSITIVE_INFINITY)
}

function asText(mark: string): string {
  return `[U+${(mark.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, '0')}]`
}

const letters = new Intl.Segmenter('en')

/** Cut between letters as a reader sees them, never inside one. */
function cut(text: string, most: number): string {
  if (text.length <= most) return text
  let kept = ''
  let count = 0
  for (const { segment } of letters.segment(text.slice(0, most * 40))) {
    if (count >= most - 1) break
    kept += segment
    count++
  }
  return kept.length < text.length ? `${kept.trimEnd()}…` : kept
}
