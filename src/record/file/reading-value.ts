import { type Field, parseQuantity } from '../../units/parse.ts'

export type RawValue =
  | { ok: true; value: number; bound: 'exact' | 'above' | 'below' }
  | { ok: false; expected: string; found: string }

/** The value of a raw text, for a reading that carries none. */
export function valueOfRaw(raw: string, field: Field): RawValue {
  const read = parseQuantity(raw, field)
  if (read.ok) return { ok: true, value: read.value, bound: read.bound }
  return { ok: false, expected: read.kind === 'ambiguous' ? read.question : read.reason, found: raw }
}

/**
 * Whether a raw text contradicts the value kept beside it. A text that is no quantity ("passed the stick") contradicts
 * nothing; one that reads two ways contradicts only what neither way gives. Bare numbers count in any of `units`.
 */
export function contradicts(
  raw: string,
  kept: { value: number; bound: string },
  field: Field,
  units: readonly string[],
): boolean {
  const readings = units.flatMap((unit) => {
    const read = parseQuantity(raw, { ...field, unit })
    if (read.ok) return [read]
    if (read.kind === 'refused') return []
    return read.choices.map((choice) => parseQuantity(choice.text, { ...field, unit })).filter((one) => one.ok)
  })
  return readings.length > 0 && !readings.some((one) => one.bound === kept.bound && agrees(one.value, kept.value))
}

/** Units in which a keypad may have taken a bare number. */
export function unitsOf(field: Field): readonly string[] {
  if (field.quantity === 'length') return ['m', 'cm', 'mm', 'ft', 'in']
  if (field.quantity === 'gradient') return ['1:n', '%', 'deg']
  return [field.unit]
}

/** Within half a thousandth: values written by hand are rounded. */
function agrees(a: number, b: number): boolean {
  return Math.abs(a - b) <= 1e-9 + 5e-4 * Math.max(Math.abs(a), Math.abs(b))
}
