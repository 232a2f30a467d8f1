import type { Field } from '../../units/parse.ts'

/** Looks up what a feature kind's attribute is measured in: the catalogue's rows, passed in. */
export type AttributeOf = (kind: string, attribute: string) => Field | undefined

/** What a reading on a segment or an observation is measured in; features ask the catalogue. */
const ownFields: Readonly<Record<string, Readonly<Record<string, Field>>>> = {
  segments: {
    length: { quantity: 'length', unit: 'm' },
    width: { quantity: 'length', unit: 'm' },
    overhead: { quantity: 'length', unit: 'm' },
    pendulum: { quantity: 'number', unit: '' },
  },
  observations: {
    noise: { quantity: 'sound', unit: 'dB(A)' },
    light: { quantity: 'illuminance', unit: 'lx' },
    crowd: { quantity: 'number', unit: '' },
  },
}

/** The field of a quantity on a holder in `list` (a feature's `kind` given), or undefined where nobody knows it. */
export function fieldOfReading(
  list: string,
  kind: string | undefined,
  quantity: string,
  attributeOf: AttributeOf,
): Field | undefined {
  const own = Object.hasOwn(ownFields, list) ? ownFields[list] : undefined
  if (own) return Object.hasOwn(own, quantity) ? own[quantity] : undefined
  return kind === undefined ? undefined : attributeOf(kind, quantity)
}
