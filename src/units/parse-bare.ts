import { ask, type FieldQuantity, type Question } from './parse-answer.ts'
import type { NumberRead } from './parse-number.ts'
import type { Unit } from './parse-units.ts'

/** A segment is 25 m at most: a greater bare length is a slip of unit more often than a long way. */
const longest = 25

/** Doors and waits are shorter, in seconds; longer was read off in milliseconds, perhaps. */
const slowest = 600

/** Nobody is led faster, in metres per second; more was meant in kilometres an hour, perhaps. */
const fastest = 2.5

/**
 * The question about a number without a unit that the field's own unit makes implausible; null where it is plain.
 * Asked: a length over 25 m; decimals in a millimetre field, or under 3 in a centimetre field (1.24 was read in
 * metres); a tape's fraction in a metric field or in feet; zeros in front (091 lost its decimal sign).
 */
export function askBare(number: NumberRead, quantity: FieldQuantity, unit: Unit): Question | null {
  const { value, text } = number
  const inUnits = (...names: string[]) => ask(names.map((name) => `${text} ${name}`))
  if (quantity === 'time' && unit.name === 's' && value > slowest) return inUnits('ms', 's')
  if (quantity === 'speed' && unit.name === 'm/s' && value > fastest) return inUnits('km/h', 'm/s')
  if (quantity !== 'length') return null
  if (number.form === 'mixed' || number.form === 'fraction') {
    if (unit.name === 'in') return null
    return unit.name === 'ft' || unit.name === 'yd' ? inUnits('in', unit.name) : inUnits('in', 'ft', unit.name)
  }
  if (number.zeros) {
    const digits = text.replace(/^0+/, '')
    return ask([`0.${text.slice(1)} ${unit.name}`, `${digits === '' ? '0' : digits} ${unit.name}`])
  }
  if (unit.name === 'mm' && number.form === 'decimal') return inUnits('m', 'mm')
  if (unit.name === 'cm' && number.form === 'decimal' && value < 3) return inUnits('m', 'cm')
  if ((value * unit.times) / unit.over <= longest) return null
  if (unit.family === 'imperial') return inUnits('in', unit.name === 'in' ? 'ft' : unit.name)
  return value < 1000 ? inUnits('cm', 'mm', 'm') : inUnits('mm', unit.name === 'mm' ? 'cm' : unit.name)
}
