import type { Field } from '../units/parse.ts'
import type { QuantityAttribute } from './kind.ts'
import { kind } from './kinds.ts'

/** What an attribute of a kind is measured in, for whoever reads what people type; undefined: no such measure. */
export function attributeOf(id: string, attribute: string): Field | undefined {
  const found = kind(id)?.attributes.find(
    (one): one is QuantityAttribute => one.type === 'quantity' && one.id === attribute,
  )
  return found ? { quantity: found.quantity, unit: found.unit } : undefined
}
