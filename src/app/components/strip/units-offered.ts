import type { FieldQuantity } from '../../../units/parse.ts'

const more: Partial<Record<FieldQuantity, readonly string[]>> = {
  length: ['m', 'cm', 'mm', 'ft', 'in'],
  gradient: ['1:n', '%', 'deg'],
  force: ['N', 'kgf', 'lbf'],
}

/** Units to choose from, the field's own first; the chosen one is locked and shown beside the value. */
export function unitsOffered(field: { quantity: FieldQuantity; unit: string }): readonly string[] {
  return [...new Set([field.unit, ...(more[field.quantity] ?? [])])]
}
