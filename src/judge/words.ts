import { formatForce, formatGradient, formatLength, formatMm, formatTime } from '../units/format.ts'

/** Numbers in a check's sentence: what there is rounds down, what is needed rounds up. */
export const mmThere = (value: number) => shown(value, (v) => formatMm(v, { towards: 'down' }))
export const mmNeeded = (value: number) => shown(value, (v) => formatMm(v, { towards: 'up' }))
export const metresThere = (value: number) =>
  shown(value, (v) => formatLength(v, { system: 'metric', towards: 'down' }))
export const metresNeeded = (value: number) => shown(value, (v) => formatLength(v, { system: 'metric', towards: 'up' }))
export const newtonsThere = (value: number) => shown(value, (v) => formatForce(v, { towards: 'down' }))
export const newtonsNeeded = (value: number) => shown(value, (v) => formatForce(v, { towards: 'up' }))
export const secondsThere = (value: number) => shown(value, (v) => formatTime(v, { towards: 'down' }))
export const secondsNeeded = (value: number) => shown(value, (v) => formatTime(v, { towards: 'up' }))
export const slope = (value: number) => shown(value, (v) => formatGradient(v, { unit: '1:n', towards: 'steeper' }))

function shown(value: number, form: (value: number) => string): string {
  return Number.isFinite(value) ? form(value) : value > 0 ? 'no limit' : 'nothing'
}
