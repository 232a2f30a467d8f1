import type { Field } from '../units/parse.ts'
import { kind } from './kinds.ts'

/** What a feature kind's attribute is measured in, for whoever reads a survey file; undefined for one that no row knows. */
export function measuredIn(kindId: string, attribute: string): Field | undefined {
  const row = kind(kindId)?.attributes.find((one) => one.id === attribute)
  return row?.type === 'quantity' ? { quantity: row.quantity, unit: row.unit } : undefined
}
