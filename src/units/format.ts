import type { Decibels, Gradient, Metres, MetresPerSecond, Newtons, Radians, Seconds } from './quantity.ts'

/**
 * Values in words for people. Rounding happens only here, and the caller says to which side: what there is (a clear
 * width, time a door stays open) goes 'down', what is needed (an envelope, a stop) goes 'up'. 'down' is towards minus
 * infinity, so that a shortage of 13 mm shown to 10 mm is -0.02 m and never looks smaller than it is.
 *
 * A value within a billionth of a step of a multiple is that multiple: 0.91 / 0.01 is 91.00000000000001 in floating
 * point, and 0.57 / 0.01 is 56.99999999999999. No NaN or infinity has a form: they throw a RangeError.
 */
export type Towards = 'down' | 'up' | 'nearest'

export interface Look {
  towards: Towards
  /** The decimal sign; default a point. */
  decimal?: '.' | ','
  /** The smallest step shown; each function names its unit and default. */
  step?: number
}

export interface LengthLook extends Look {
  system: 'metric' | 'imperial'
  /** Default 'm' or 'ft'. 'ft' is feet, whole inches and eighths; 'in' inches and eighths alone. */
  unit?: 'm' | 'cm' | 'mm' | 'ft' | 'in'
}

const inch = 0.0254

/**
 * A length: "1.24 m", "124 cm", "1240 mm", "4 ft 3 1/2 in", "51 1/2 in". Spoken by a screen reader as it stands.
 * Step: metres in metric, default 0.01 (0.001 in mm); inches in imperial, a half to a sixty-fourth, default 1/8.
 */
export function formatLength(value: Metres, look: LengthLook): string {
  const unit = look.unit ?? (look.system === 'metric' ? 'm' : 'ft')
  if (unit === 'ft' || unit === 'in') return formatInches(value / inch, unit, look)
  const perMetre = { m: 1, cm: 100, mm: 1000 }[unit]
  const step = look.step ?? (unit === 'mm' ? 0.001 : 0.01)
  return `${decimals(value * perMetre, tidyStep(step * perMetre), look)} ${unit}`
}

/** A length in whole millimetres: "820 mm". Step in millimetres, default 1. */
export function formatMm(value: Metres, look: Look): string {
  return `${decimals(value * 1000, look.step ?? 1, look)} mm`
}

/** An angle, left positive: "90°", "-45°". Step in degrees, default 1. */
export function formatAngle(value: Radians, look: Look): string {
  return `${decimals((value * 180) / Math.PI, look.step ?? 1, look)}°`
}

export interface GradientLook {
  unit: '1:n' | '%' | 'deg'
  /** A slope that must be held is shown 'steeper', one that is allowed 'gentler'; the sign (up, down) stays. */
  towards: 'steeper' | 'gentler' | 'nearest'
  decimal?: '.' | ','
}

/** A gradient: "1:12", "-1:20", "8.4 %", "4.8°". 1:n in whole n from 10, in tenths below; the rest in tenths. Level is "0 %". */
export function formatGradient(value: Gradient, look: GradientLook): string {
  refuseNan(value)
  const size = Math.abs(value)
  if (size === 0) return '0 %'
  const sign = value < 0 ? '-' : ''
  const decimal = look.decimal ?? '.'
  if (look.unit === '1:n') {
    const towards = { steeper: 'down', gentler: 'up', nearest: 'nearest' } as const
    const run = 1 / size
    return `${sign}1:${decimals(run, run < 10 ? 0.1 : 1, { towards: towards[look.towards], decimal }).replace(/[.,]0$/, '')}`
  }
  const towards = ({ steeper: 'up', gentler: 'down', nearest: 'nearest' } as const)[look.towards]
  const shown = look.unit === '%' ? 100 * size : (Math.atan(size) * 180) / Math.PI
  const digits = decimals(shown, 0.1, { towards, decimal })
  return `${/[1-9]/.test(digits) ? sign : ''}${digits}${look.unit === '%' ? ' %' : '°'}`
}

/** A force: "12 N". Step in newtons, default 1. */
export function formatForce(value: Newtons, look: Look): string {
  return `${decimals(value, look.step ?? 1, look)} N`
}

/** A time: "4.5 s". Step in seconds, default 0.1. */
export function formatTime(value: Seconds, look: Look): string {
  return `${decimals(value, look.step ?? 0.1, look)} s`
}

/** A speed: "0.45 m/s", in imperial "1.4 ft/s". Step in the unit shown, default 0.05 m/s or 0.1 ft/s. */
export function formatSpeed(value: MetresPerSecond, look: Look & { system: 'metric' | 'imperial' }): string {
  return look.system === 'metric'
    ? `${decimals(value, look.step ?? 0.05, look)} m/s`
    : `${decimals(value / (12 * inch), look.step ?? 0.1, look)} ft/s`
}

/** A sound level: "62 dB(A)". Step in dB, default 1. */
export function formatSound(value: Decibels, look: Look): string {
  return `${decimals(value, look.step ?? 1, look)} dB(A)`
}

/** The whole number of steps in a value, on the promised side. */
export function stepsIn(value: number, step: number, towards: Towards): number {
  refuseNan(value)
  const exact = value / step
  const nearest = Math.round(exact)
  if (towards === 'nearest' || Math.abs(exact - nearest) <= 1e-9 * Math.max(1, Math.abs(exact))) return nearest
  return towards === 'down' ? Math.floor(exact) : Math.ceil(exact)
}

function refuseNan(value: number): void {
  if (!Number.isFinite(value)) throw new RangeError(`no form for ${value}`)
}

/** 0.01 m in centimetres is 1, not 1.0000000000000002. */
function tidyStep(step: number): number {
  return Number(step.toPrecision(12))
}

function decimals(value: number, step: number, { towards, decimal }: Look): string {
  const places = step.toString().split('.')[1]?.length ?? 0
  const digits = (stepsIn(value, step, towards) * step).toFixed(places)
  // -0.00 reads as a shortage where there is none.
  const plain = /[1-9]/.test(digits) ? digits : digits.replace('-', '')
  return decimal === ',' ? plain.replace('.', ',') : plain
}

function formatInches(inches: number, unit: 'ft' | 'in', look: LengthLook): string {
  const parts = Math.round(1 / (look.step ?? 1 / 8))
  const steps = stepsIn(inches, 1 / parts, look.towards)
  const size = Math.abs(steps)
  const whole = Math.floor(size / parts)
  const fraction = lowest(size % parts, parts)
  const feet = unit === 'ft' ? Math.floor(whole / 12) : 0
  const words = [feet > 0 ? `${feet} ft` : '', `${whole - 12 * feet}${fraction} in`]
  return `${steps < 0 ? '-' : ''}${words.filter((word) => word !== '').join(' ')}`
}

/** " 3/8", or nothing. */
function lowest(over: number, under: number): string {
  if (over === 0) return ''
  let [top, bottom] = [over, under]
  while (top % 2 === 0 && bottom % 2 === 0) [top, bottom] = [top / 2, bottom / 2]
  return ` ${top}/${bottom}`
}
