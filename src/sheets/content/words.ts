import type { Verdict } from '../../judge/result.ts'
import type { LedBy } from '../../record/survey.ts'

/** The five words, as a reader meets them. */
export const verdictWords: Readonly<Record<Verdict, string>> = {
  usable: 'Usable',
  'with-cautions': 'With cautions',
  'with-help': 'Only with help',
  'do-not-use': 'Do not use',
  'not-known': 'Not known',
}

export const leadWords: Readonly<Record<LedBy, string>> = {
  robot: 'the robot',
  'human-guide': 'a human guide',
  'own-cane': 'own cane',
  staff: 'staff',
}

const months = 'January February March April May June July August September October November December'.split(' ')

/** "30 November 2026" of "2026-11-30", or of a moment that begins with it. Anything else comes back as it is. */
export function dayWords(date: string): string {
  const [, year, month, day] = /^(\d{4})-(\d{2})-(\d{2})/.exec(date) ?? []
  const name = months[Number(month) - 1]
  return year && name ? `${Number(day)} ${name} ${year}` : date
}

export function hoursWords(hours: { from: string; to: string } | undefined): string {
  return hours ? `${hours.from} to ${hours.to}` : 'hours not given'
}

/** "1 part", "3 parts". */
export function count(n: number, one: string, many = `${one}s`): string {
  return `${n} ${n === 1 ? one : many}`
}

/** "a", "a and b", "a, b and c". */
export function joined(items: readonly string[]): string {
  const last = items.at(-1) ?? ''
  return items.length < 2 ? last : `${items.slice(0, -1).join(', ')} and ${last}`
}

export function capital(text: string): string {
  const first = text.codePointAt(0)
  if (first === undefined) return text
  const letter = String.fromCodePoint(first)
  return letter.toUpperCase() + text.slice(letter.length)
}

/** Ends with a full stop, once. */
export function stopped(text: string): string {
  return /[.!?…]\u2069?$/.test(text) ? text : `${text}.`
}

/** More words than this in one breath are cut at an "and" before a verb ("offers an arm and leads"). */
const longBreath = 12

/** Words with semicolons become sentences: "offers an arm; a second person carries it" are two. */
export function sentences(text: string): string[] {
  return text
    .split(/;\s+|(?<=[.!?])\s+/)
    .flatMap((piece) => cutAtAnd(piece.trim()))
    .filter((piece) => piece !== '')
    .map((piece) => stopped(capital(piece)))
}

function cutAtAnd(piece: string): string[] {
  const words = piece.split(' ')
  if (words.length <= longBreath) return [piece]
  const middle = words.length / 2
  const ands = words.flatMap((word, i) => (word === 'and' && /^[a-z]+s$/.test(words[i + 1] ?? '') ? [i] : []))
  const at = ands.sort((one, other) => Math.abs(one - middle) - Math.abs(other - middle))[0]
  return at === undefined ? [piece] : [words.slice(0, at).join(' ').replace(/,$/, ''), words.slice(at + 1).join(' ')]
}

/** No two equal, first come first kept. */
export function distinct(items: readonly string[]): string[] {
  return [...new Set(items)]
}
