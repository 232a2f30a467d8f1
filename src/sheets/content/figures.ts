import { kind } from '../../catalogue/kinds.ts'
import { instrument } from '../../record/instruments.ts'
import type { Reading } from '../../record/survey.ts'

/** SI units by what a quantity measures; an angle also in degrees, a gradient is rise over run. */
const units = {
  length: 'm',
  angle: 'rad',
  gradient: 'rise/run',
  force: 'N',
  time: 's',
  sound: 'dB(A)',
  any: '',
} as const

/** "1.08 m", "> 2.1 m": the value as it is judged, unrounded beyond noise. `of`: the kind and attribute it was read for. */
export function siValue(reading: Reading, of?: { kind: string; attribute: string }): string {
  const attribute = of ? kind(of.kind)?.attributes.find((one) => one.id === of.attribute) : undefined
  const quantity =
    attribute?.type === 'quantity' ? attribute.quantity : (instrument(reading.instrument)?.reads ?? 'any')
  const unit = quantity in units ? units[quantity as keyof typeof units] : ''
  const bound = reading.bound === 'above' ? '> ' : reading.bound === 'below' ? '< ' : ''
  return `${bound}${figure(reading.value)}${unit === '' ? '' : ` ${unit}`}`
}

/** Six figures, no trailing zeros: enough to work a check again by hand. */
export function figure(value: number | null): string {
  return value === null ? 'none' : String(Number(value.toPrecision(6)))
}
