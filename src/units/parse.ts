import { ask, type Body, type Choice, type Field, type Parsed, refuse } from './parse-answer.ts'
import { isGradientUnit, readGradient } from './parse-gradient.ts'
import { readMeasure } from './parse-measure.ts'
import { numberToken, readNumber } from './parse-number.ts'
import { type Tidied, tidy } from './parse-text.ts'
import { findUnit } from './parse-units.ts'

export type { Bound, Field, FieldQuantity, Parsed } from './parse-answer.ts'

/** Quantity -> the greatest value that can have been read at a venue, SI; beyond it something slipped. */
const most: Readonly<Record<Field['quantity'], number>> = {
  length: 10_000,
  angle: 2 * Math.PI + 1e-9,
  gradient: 1,
  force: 5000,
  time: 86_400,
  sound: 160,
  speed: 50,
  mass: 1000,
  area: 1_000_000,
  count: 1_000_000,
  illuminance: 200_000,
  number: 1e12,
}

/**
 * Reads what a person types, or a laser meter's keyboard sends, into SI.
 *
 * Understood: 1.24; 1,24 m; 124cm; 4'3"; 4 ft 3 1/2 in; 2 m 13 cm; >2.1; <20; 1:12; 1 in 12; 8.3 %; 4.8°; 62 dB(A).
 * Asked, never guessed: whatever two readers would read differently (1,240; 1240 in a metre field; 12 in a 1:n field).
 * Each choice's `text` is understood when it is typed instead. Where all readings but one are impossible, that one is
 * taken. Refused with the reason: everything else.
 *
 * @param text as typed; any length, read in time that does not grow past 256 characters.
 * @param field what is filled in. A field's unit that does not exist is an Error: the form is wrong, not the reading.
 */
export function parseQuantity(text: string, field: Field): Parsed {
  const tidied = tidy(text)
  if (!tidied.ok) return tidied
  const parsed = readTidied(tidied, field)
  return parsed.ok || parsed.kind === 'refused' ? parsed : settle(parsed.choices, tidied, field)
}

function readTidied(tidied: Tidied, field: Field): Parsed {
  const { negative, bound } = tidied
  if (negative && !takesSign(field)) return refuse(`a ${field.quantity} has no minus sign: give the side or way apart`)
  if (negative && bound !== 'exact') return refuse('a bound on a minus value reads two ways: give the value')
  const body = readBody(tidied, field)
  return body.ok ? finish(body, tidied, field) : body
}

function takesSign(field: Field): boolean {
  return field.signed ?? ['angle', 'gradient', 'number'].includes(field.quantity)
}

function readBody({ body, bound }: Tidied, field: Field): Body {
  const { quantity, unit } = field
  if (body === '') return refuse('a number is missing')
  if (/\de[+-]?\d/.test(body)) return refuse('write the number out, without a power of ten')
  if (/^[\d.,]+ ?-+ ?[\d.,]+/.test(body) && !/^\d+-\d+\//.test(body))
    return refuse('two values: type one reading at a time')
  if (quantity === 'gradient') {
    if (!isGradientUnit(unit)) throw new Error(`no unit of gradient: '${unit}'`)
    return readGradient(body, bound, unit)
  }
  if (quantity === 'count' || quantity === 'number') return readPlain(body, quantity, unit)
  const bare = findUnit(quantity, unit)
  if (bare === undefined) throw new Error(`no unit of ${quantity}: '${unit}'`)
  const clock = quantity === 'time' ? /^(\d{1,3}):([0-5]\d)$/.exec(body) : null
  if (clock)
    return ask([`${Number(clock[1])} min ${Number(clock[2])} s`, `${Number(clock[1])} h ${Number(clock[2])} min`])
  return readMeasure(body, quantity, bare)
}

/** A count or a plain number; the field's own word for it may follow ("3 risers"). */
function readPlain(body: string, quantity: 'count' | 'number', unit: string): Body {
  numberToken.lastIndex = 0
  const token = numberToken.exec(body)?.[0]
  if (token === undefined) return refuse(`“${body}” is not a number`)
  const rest = body.slice(token.length).trim()
  if (rest !== '' && rest !== unit.toLowerCase()) return refuse(`“${rest}” after ${token}: a number alone is wanted`)
  const read = readNumber(token)
  if (!read.ok) return read.kind === 'refused' ? read : ask(read.readings)
  if (quantity === 'count' && !Number.isInteger(read.value)) return refuse(`${read.text} is not a whole number`)
  return { ok: true, value: read.value, unit }
}

function finish(body: { value: number; unit: string }, { bound, negative }: Tidied, field: Field): Parsed {
  if (!Number.isFinite(body.value) || body.value > most[field.quantity])
    return refuse(`too great for a ${field.quantity} at a venue: look again at the unit and the decimal sign`)
  return { ok: true, value: negative && body.value !== 0 ? -body.value : body.value, bound, unit: body.unit }
}

function sameValue(a: Parsed, b: Parsed): boolean {
  return a.ok && b.ok && a.value === b.value && a.bound === b.bound
}

/** Drops the choices that cannot stand, or would be asked again; asks if what is left differs. */
function settle(offered: readonly Choice[], tidied: Tidied, field: Field): Parsed {
  const choices = offered.map(({ label, text }) => {
    const full = /^[<>]/.test(text) ? text : tidied.prefix + text
    const again = tidy(full)
    return { label: label === text ? full : label, text: full, parsed: again.ok ? readTidied(again, field) : again }
  })
  const standing = choices.filter((choice) => choice.parsed.ok)
  const [only] = standing
  if (only === undefined) {
    const refused = choices.map((choice) => choice.parsed).find((parsed) => !parsed.ok && parsed.kind === 'refused')
    return refused ?? refuse('it can be read in too many ways: write it with its unit, without groups of digits')
  }
  if (standing.every((choice) => sameValue(choice.parsed, only.parsed))) return only.parsed
  return ask(standing.map(({ label, text }) => ({ label, text })))
}
