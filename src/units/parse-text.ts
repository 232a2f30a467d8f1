import { type Bound, type Refusal, refuse } from './parse-answer.ts'

/** No reading is longer; what is longer was pasted by mistake. */
const longest = 64

/** Fractions on one key, as they are spelled out. */
const vulgar: Readonly<Record<string, string>> = {
  '¼': '1/4',
  '½': '1/2',
  '¾': '3/4',
  '⅛': '1/8',
  '⅜': '3/8',
  '⅝': '5/8',
  '⅞': '7/8',
  '⅓': '1/3',
  '⅔': '2/3',
}

export interface Tidied {
  ok: true
  body: string
  bound: Bound
  negative: boolean
  /** Bound and sign as they go before a choice. */
  prefix: string
}

/**
 * One spelling for what keyboards, laser meters and pasted text spell in many: spaces, primes, fractions, minus signs,
 * full-width digits, case. Splits off the bound and the sign.
 */
export function tidy(typed: string): Tidied | Refusal {
  if (typed.length > 4 * longest) return refuse('too long for one reading')
  const line = typed.replace(/[\u00ad\u200b-\u200f\u2060\ufeff]/g, '').trim()
  if (line === '') return refuse('nothing typed')
  if (/[\r\n\v\f\u2028\u2029]/.test(line)) return refuse('more than one line: type one reading at a time')
  const text = line
    .replace(/[\uff01-\uff5e]/g, (wide) => String.fromCharCode(wide.charCodeAt(0) - 0xfee0))
    .replace(/[¼½¾⅛⅜⅝⅞⅓⅔]/g, (one) => ` ${vulgar[one]}`)
    .replace(/[′‘’ʹʼ´`]/g, "'")
    .replace(/[″“”ʺ]/g, '"')
    .replace(/''/g, '"')
    .replace(/[−–‐‑]/g, '-')
    .replace(/[º˚]/g, '°')
    .replace(/⁄/g, '/')
    .replace(/∶/g, ':')
    .replace(/\s+/g, ' ')
    .replace(/(\d) ?\/ ?(?=\d)/g, '$1/')
    .toLowerCase()
    .trim()
  if (text.length > longest) return refuse('too long for one reading')
  const about = /^(?:~|≈|ca?\. ?|±)|±|\+\/-/.exec(text)
  if (about) return refuse(`“${about[0].trim()}” is not part of a reading: the instrument gives its uncertainty`)
  const parts = /^(>=|=>|≥|>|<=|=<|≤|<)? ?([+-])? ?(.*)$/.exec(text)
  const mark = parts?.[1] ?? ''
  const negative = parts?.[2] === '-'
  const bound: Bound = mark === '' ? 'exact' : /[>≥]/.test(mark) ? 'above' : 'below'
  const arrow = { exact: '', above: '>', below: '<' }[bound]
  return { ok: true, body: parts?.[3] ?? '', bound, negative, prefix: `${arrow}${negative ? '-' : ''}` }
}
