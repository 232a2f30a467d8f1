import type { FieldQuantity } from '../../../units/parse.ts'

/** What lengths are shown in, and typed in until another unit was chosen. */
export type Units = 'metric' | 'imperial'

const more: Partial<Record<FieldQuantity, readonly string[]>> = {
  length: ['m', 'cm', 'mm', 'ft', 'in'],
  gradient: ['1:n', '%', 'deg'],
  force: ['N', 'kgf', 'lbf'],
}

/** The customary unit in place of a metric one. */
const customary: Record<string, string> = { m: 'ft', mm: 'in' }

/** Units to choose from, the likeliest first; the chosen one is locked and shown beside the value. */
export function unitsOffered(field: { quantity: FieldQuantity; unit: string }, units: Units): readonly string[] {
  const first = units === 'imperial' && field.quantity === 'length' ? (customary[field.unit] ?? field.unit) : field.unit
  return [...new Set([first, ...(more[field.quantity] ?? [field.unit])])]
}
