import { ask, type Body, type FieldQuantity, type Refusal, refuse } from './parse-answer.ts'
import { askBare } from './parse-bare.ts'
import { type NumberRead, numberToken, readNumber, type TwoWays } from './parse-number.ts'
import { findUnit, type Unit, units, unitToken } from './parse-units.ts'

type Measured = Exclude<FieldQuantity, 'gradient' | 'count' | 'number'>

interface Part {
  number: NumberRead
  unit: Unit | undefined
}

/** A body of numbers and units: "1.24", "2 m 13 cm", "4'3 1/2", "62 db(a)". `bare` is the unit of a number without one. */
export function readMeasure(body: string, quantity: Measured, bare: Unit): Body {
  const parts = split(body, quantity)
  if ('ok' in parts) {
    if (parts.kind === 'refused') return parts
    const { token, readings } = parts
    const unitless = body === token ? ` ${bare.name}` : ''
    return ask(readings.map((reading) => body.replace(token, reading) + unitless))
  }
  const last = parts.at(-1)
  if (last === undefined) return refuse('nothing typed')
  if (parts.length === 1 && last.unit === undefined) {
    return askBare(last.number, quantity, bare) ?? toSi(parts, [bare])
  }
  const known: Unit[] = []
  for (const [i, part] of parts.entries()) {
    const before = known.at(-1)
    if (part.unit) known.push(part.unit)
    else if (before === undefined || i < parts.length - 1)
      return refuse(`which unit is ${part.number.text}? One reading at a time`)
    else return withoutUnit(body, parts, quantity, before)
  }
  return toSi(parts, known)
}

function split(body: string, quantity: Measured): Part[] | TwoWays | Refusal {
  const parts: Part[] = []
  let at = 0
  while (at < body.length) {
    numberToken.lastIndex = at
    const token = numberToken.exec(body)?.[0]
    if (token === undefined) return refuse(`“${body.slice(at)}” is not a ${at === 0 ? 'number' : unitKind(quantity)}`)
    const number = readNumber(token)
    if (!number.ok) return number
    at = afterSpace(body, at + token.length)
    const finder = unitToken(quantity)
    finder.lastIndex = at
    const found = finder.exec(body)
    parts.push({ number, unit: found?.[1] === undefined ? undefined : findUnit(quantity, found[1]) })
    if (found) {
      at = afterSpace(body, at + found[0].length)
      // 4'-3": a draughtsman's dash between feet and inches.
      if (/-\d/.test(body.slice(at, at + 2))) at += 1
    } else if (at < body.length && !/[\d.,]/.test(body.charAt(at))) {
      return refuse(`“${body.slice(at)}” is not a ${unitKind(quantity)}`)
    }
  }
  return parts
}

function unitKind(quantity: Measured): string {
  return `unit of ${quantity} (${units[quantity].map((one) => one.name).join(', ')})`
}

function afterSpace(body: string, at: number): number {
  return body.charAt(at) === ' ' ? at + 1 : at
}

/** The last number has no unit: 4'3 (inches), 2 m 13 (asked), 4'3" 1/2 (of an inch). */
function withoutUnit(body: string, parts: Part[], quantity: Measured, before: Unit): Body {
  const previous = parts.at(-2)?.number
  const last = parts.at(-1)?.number
  if (previous === undefined || last === undefined) return refuse('nothing typed')
  const head = body.slice(0, body.length - last.text.length).trim()
  if (before.name === 'in' && last.form === 'fraction' && previous.form === 'whole') {
    const merged: NumberRead = { ...previous, value: previous.value + last.value, form: 'mixed' }
    const joined = [...parts.slice(0, -2), { number: merged, unit: before }]
    return toSi(
      joined,
      joined.map((part) => part.unit ?? before),
    )
  }
  if (before.name === 'ft' && last.form === 'fraction') {
    return ask([`${head} 0 ${last.text} in`, `${previous.text} ${last.text} ft`])
  }
  const smaller = units[quantity].filter(
    (one) => one.family === before.family && one.times / one.over < before.times / before.over,
  )
  if (smaller.length === 0) return refuse(`which unit is ${last.text}? One reading at a time`)
  return ask(smaller.map((one) => `${body} ${one.name}`))
}

function toSi(parts: Part[], known: readonly Unit[]): Body {
  const smallest = known.at(-1)
  if (smallest === undefined) return refuse('nothing typed')
  let total = 0
  for (const [i, part] of parts.entries()) {
    const unit = known[i] ?? smallest
    const greater = known[i - 1]
    if (greater) {
      const ratio = Math.round((greater.times * unit.over) / (greater.over * unit.times))
      if (unit.family !== greater.family || ratio <= 1) return refuse(`${unit.name} cannot follow ${greater.name}`)
      if (part.number.value >= ratio)
        return refuse(`${part.number.text} ${unit.name} is a whole ${greater.name} or more`)
    }
    if (i < parts.length - 1 && part.number.form !== 'whole')
      return refuse(`only the last part may be broken: ${part.number.text} ${unit.name}`)
    total += part.number.value * Math.round((unit.times * smallest.over) / (unit.over * smallest.times))
  }
  return { ok: true, value: (total * smallest.times) / smallest.over, unit: known.map((one) => one.name).join(' ') }
}
