import { expect } from 'vitest'
import type { Field, FieldQuantity } from '../../src/units/parse.ts'
import { parseQuantity } from '../../src/units/parse.ts'

/** A field as a form gives it: "length in m". */
export function field(quantity: FieldQuantity, unit: string, signed?: boolean): Field {
  return signed === undefined ? { quantity, unit } : { quantity, unit, signed }
}

/** Typed, then the SI value to twelve figures and the unit as understood. */
export function reads(typed: string, into: Field, value: number, unit?: string, bound = 'exact'): void {
  const parsed = parseQuantity(typed, into)
  expect(parsed, typed).toMatchObject({ ok: true, bound })
  if (!parsed.ok) return
  expect(Math.abs(parsed.value - value), `${typed} read as ${parsed.value}`).toBeLessThanOrEqual(
    1e-12 * Math.max(1, Math.abs(value)),
  )
  if (unit !== undefined) expect(parsed.unit, typed).toBe(unit)
}

/** Typed, then the texts of the choices in their order; each of them must be understood when typed instead. */
export function asks(typed: string, into: Field, ...texts: string[]): void {
  const parsed = parseQuantity(typed, into)
  expect(parsed, typed).toMatchObject({ ok: false, kind: 'ambiguous', choices: texts.map((text) => ({ text })) })
  for (const text of texts) expect(parseQuantity(text, into), `${typed} -> ${text}`).toMatchObject({ ok: true })
}

/** Typed, then what the reason must say. */
export function refuses(typed: string, into: Field, reason: RegExp): void {
  expect(parseQuantity(typed, into), typed).toMatchObject({
    ok: false,
    kind: 'refused',
    reason: expect.stringMatching(reason),
  })
}
