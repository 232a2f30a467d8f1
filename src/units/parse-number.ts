import { type Refusal, refuse } from './parse-answer.ts'

export interface NumberRead {
  ok: true
  value: number
  /** As it would be typed again. */
  text: string
  /** 'fraction': no whole part before it ("3/8"). */
  form: 'whole' | 'decimal' | 'mixed' | 'fraction'
  /** Zeros in front and no decimal sign: "091" has lost its decimal sign, perhaps. */
  zeros: boolean
}

/** "1,240" is 1.240 to one reader and 1240 to another. */
export interface TwoWays {
  ok: false
  kind: 'two-ways'
  token: string
  readings: [string, string]
}

/** Where a number begins in a body: mixed, fraction, grouped by spaces, or digits with decimal signs. */
export const numberToken = /\d+[ -]\d+\/\d+|\d+\/\d+|[1-9]\d{0,2}(?: \d{3})+(?![\d/])(?:[.,]\d+)?|[\d.,]*\d[.,]*/y

/** One token of `numberToken`, read. Point and comma are both decimal signs; groups of three are read only where they can be nothing else. */
export function readNumber(token: string): NumberRead | TwoWays | Refusal {
  const parts = /^(?:(\d+)[ -])?(\d+)\/(\d+)$/.exec(token)
  if (parts) return readFraction(token, parts[1], Number(parts[2]), Number(parts[3]))
  if (/^\d+$/.test(token)) return whole(token)
  if (/[.,]$/.test(token)) return refuse(`“${token}” ends with a decimal sign: half typed`)
  const group = /^([1-9]\d{0,2})[, ](\d{3})$/.exec(token)
  if (group) {
    return {
      ok: false,
      kind: 'two-ways',
      token,
      readings: [`${group[1]}.${group[2]}`, `${group[1]}${group[2]}`],
    }
  }
  if (/^\d*[.,]\d+$/.test(token)) return decimal(token.replace(',', '.'))
  if (/^[1-9]\d{0,2}(?:(?:,\d{3})+\.\d+|(?: \d{3})+[.,]\d+|(?:\.\d{3})+,\d+)$/.test(token)) {
    const [before = '', after = ''] = token.split(/[.,](?=\d+$)/)
    return decimal(`${before.replace(/[ .,]/g, '')}.${after}`)
  }
  if (/^[1-9]\d{0,2}(?:(?:,\d{3}){2,}|(?:\.\d{3}){2,}|(?: \d{3}){2,})$/.test(token))
    return whole(token.replace(/[ .,]/g, ''))
  return refuse(`“${token}” is not one number`)
}

function whole(digits: string): NumberRead {
  return { ok: true, value: Number(digits), text: digits, form: 'whole', zeros: /^0\d/.test(digits) }
}

function decimal(digits: string): NumberRead {
  const text = digits.startsWith('.') ? `0${digits}` : digits
  return { ok: true, value: Number(text), text, form: 'decimal', zeros: false }
}

function readFraction(token: string, before: string | undefined, over: number, under: number): NumberRead | Refusal {
  if (![2, 4, 8, 16, 32, 64].includes(under)) return refuse(`“${token}”: a tape has halves down to sixty-fourths`)
  if (over >= under) return refuse(`“${token}” is more than one: leave a gap, as in 1 1/2`)
  const form = before === undefined ? 'fraction' : 'mixed'
  return { ok: true, value: Number(before ?? 0) + over / under, text: token.replace('-', ' '), form, zeros: false }
}
