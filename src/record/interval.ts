import { type Instrument, instrument } from './instruments.ts'
import type { Reading } from './survey.ts'

/**
 * What the readings of one quantity say together. Never a mean: repeats at one place keep the one at the unsafe end;
 * several people's repeats join from the least unsafe end to the greatest safe end; of several places along a stretch
 * the worst rules.
 */
export interface Interval {
  /** The ends in the quantity's SI unit; -Infinity or Infinity beyond a bound. low <= value <= high. */
  low: number
  value: number
  high: number
  /** The end that a limit of the team uses, and the other. */
  unsafe: number
  safe: number
  /** Readings of one place lie further apart than their joint uncertainty and nobody has settled them. */
  differs: boolean
  /** Nobody measured: every reading that counts was told or by eye. */
  told: boolean
  /** A sweep confirmed more quickly than a person walks. */
  tooQuick: boolean
  /** Ids of the readings that count. */
  ids: string[]
}

/** Changed uncertainties by instrument, as a survey has them. */
export type Changed = Readonly<Record<string, { absolute: number; relative: number }>>

export type Unsafe = 'low' | 'high' | 'size' | 'both'

export interface IntervalOptions {
  /**
   * The end at which the quantity does harm: 'low' for what there is (a clear width), 'high' for what is in the way,
   * 'size' for the end greater in size, whatever its sign (a gradient, an angle); 'both' where neither end is the unsafe
   * one (a distance between two things, a thickness): taken on the safe side it is still tried at both.
   */
  unsafe: Unsafe
  changed?: Changed | undefined
  /** Readings taken as known exactly at this value, by id: a judgement "if the truth were at this end". */
  pins?: ReadonlyMap<string, number> | undefined
}

/** Expanded uncertainty (k = 2) of one reading, in its SI unit. An unknown instrument counts as told. */
export function uncertainty(reading: Pick<Reading, 'instrument' | 'value'>, changed: Changed = {}): number {
  const row = changed[reading.instrument] ?? instrument(reading.instrument) ?? (instrument('told') as Instrument)
  return Math.max(0, row.absolute) + Math.max(0, row.relative) * Math.abs(reading.value)
}

/** The same interval of the sizes, for what may be entered with a sign: a step down as less than nothing. */
export function magnitude(one: Interval): Interval {
  if (one.low >= 0) return one
  const most = Math.max(Math.abs(one.low), Math.abs(one.high))
  const low = one.high < 0 ? -one.high : 0
  return { ...one, low, value: Math.abs(one.value), high: most, unsafe: most, safe: low }
}

/** The value that a limit is compared with "at the reading itself"; beyond a bound, where the harm lies, without end. */
export function atReading({ low, value, high }: Interval, unsafe: 'low' | 'high'): number {
  const end = unsafe === 'low' ? low : high
  return Number.isFinite(end) ? value : end
}

/** The joined interval, or null where there is no reading that counts. A value that is no number breaks a promise: throws. */
export function interval(readings: readonly Reading[] | undefined, options: IntervalOptions): Interval | null {
  const [only] = readings ?? []
  if (only && readings?.length === 1) {
    refuseNaN(only)
    return single(only, options)
  }
  const settled = new Set((readings ?? []).flatMap((one) => (isAct(one) ? one.settles.readings : [])))
  const places: Reading[][] = []
  for (const one of readings ?? []) {
    refuseNaN(one)
    const here = places.at(-1)
    if (here && one.place !== 'another') here.push(one)
    else places.push([one])
  }
  const counted = places
    .map((place) => place.filter((one) => !settled.has(one.id)))
    .filter((place) => place.length > 0)
    .map((place) => joined(place, options))
  if (counted.length === 0) return null
  return counted.reduce((worst, next) => worse(worst, next, options.unsafe))
}

function refuseNaN(one: Reading): void {
  if (Number.isNaN(one.value)) throw new Error(`record/no-number: reading ${one.id}`)
}

/** A reading replaces others only by a named person's act with a reason. */
function isAct(one: Reading): one is Reading & { settles: NonNullable<Reading['settles']> } {
  return Boolean(one.settles?.by.trim() && one.settles.reason.trim())
}

interface Span {
  low: number
  value: number
  high: number
  /** Expanded uncertainty. */
  u: number
}

function span(one: Reading, { unsafe, changed, pins }: IntervalOptions): Span {
  const pin = pins?.get(one.id)
  const u = pin === undefined ? uncertainty(one, changed) : 0
  const value = pin ?? one.value
  const low = one.bound === 'below' ? Number.NEGATIVE_INFINITY : value - u
  const high = one.bound === 'above' ? Number.POSITIVE_INFINITY : value + u
  if (!one.safeSide || unsafe === 'both') return { low, value, high, u }
  const end = unsafe === 'low' || (unsafe === 'size' && value < 0) ? low : high
  return Number.isFinite(end) ? { low: end, value: end, high: end, u: 0 } : { low, value, high, u }
}

/** One place: every reading there, whoever took it. */
function joined(place: readonly Reading[], options: IntervalOptions): Interval {
  const [only] = place
  if (only && place.length === 1) return single(only, options)
  const spans = place.map((one) => ({ one, at: span(one, options) }))
  // Whether people differ is a matter of record: a pinned reading is compared as it was taken.
  const taken = options.pins ? place.map((one) => ({ one, at: span(one, { ...options, pins: undefined }) })) : spans
  const { unsafe } = options
  const order = (s: Span) =>
    unsafe === 'low' ? s.low : unsafe === 'high' ? -s.high : -Math.max(Math.abs(s.low), Math.abs(s.high))
  // Each person's repeats: the unsafe-most speaks for that person, with its own uncertainty.
  const voices = new Map<string, { one: Reading; at: Span }>()
  for (const next of spans) {
    const name = next.one.person ?? ''
    const known = voices.get(name)
    if (!known || order(next.at) < order(known.at)) voices.set(name, next)
  }
  const worst = spans.reduce((a, b) => (order(b.at) < order(a.at) ? b : a))
  const apart = taken.some((a) => taken.some((b) => disagree(a.one, a.at, b.one, b.at)))
  // "Take the safe side" of the unsafe-most reading settles the place there.
  const settled = worst.one.safeSide === true
  const either = unsafe === 'both' || unsafe === 'size'
  const heard = settled && unsafe !== 'both' ? [worst] : apart || either ? spans : [...voices.values()]
  const low = Math.min(...heard.map(({ at }) => at.low))
  const high = Math.max(...heard.map(({ at }) => at.high))
  return {
    low,
    high,
    value: worst.at.value,
    ...ends(low, high, unsafe),
    differs: apart && !settled,
    told: place.every((one) => instrument(one.instrument)?.hearsay === true || !instrument(one.instrument)),
    tooQuick: place.some((one) => one.tooQuick === true),
    ids: place.map((one) => one.id),
  }
}

function single(one: Reading, options: IntervalOptions): Interval {
  const { low, value, high } = span(one, options)
  const told = instrument(one.instrument)?.hearsay ?? !instrument(one.instrument)
  const tooQuick = one.tooQuick === true
  return { low, value, high, ...ends(low, high, options.unsafe), differs: false, told, tooQuick, ids: [one.id] }
}

/** Beyond the root of the sum of squares two readings of one place differ; two bounds never do. */
function disagree(a: Reading, atA: Span, b: Reading, atB: Span): boolean {
  const joint = Math.hypot(atA.u, atB.u) + 1e-9
  if (a.bound === 'exact' && b.bound === 'exact') return Math.abs(atA.value - atB.value) > joint
  if (a.bound === 'above' && b.bound !== 'above') return atB.value < atA.value - joint
  if (a.bound === 'below' && b.bound !== 'below') return atB.value > atA.value + joint
  return false
}

/** The worst of two places, end by end; what differs or was told at either stays said. */
function worse(a: Interval, b: Interval, unsafe: Unsafe): Interval {
  const low = unsafe === 'high' ? Math.max(a.low, b.low) : Math.min(a.low, b.low)
  const high = unsafe === 'low' ? Math.min(a.high, b.high) : Math.max(a.high, b.high)
  const rules = (unsafe === 'low' ? b.low < a.low : b.high > a.high) ? b : a
  return {
    low,
    high,
    value: rules.value,
    ...ends(low, high, unsafe),
    differs: a.differs || b.differs,
    told: a.told || b.told,
    tooQuick: a.tooQuick || b.tooQuick,
    ids: rules === a ? [...a.ids, ...b.ids] : [...b.ids, ...a.ids],
  }
}

function ends(low: number, high: number, unsafe: Unsafe): { unsafe: number; safe: number } {
  const lower = unsafe === 'low' || ((unsafe === 'both' || unsafe === 'size') && Math.abs(low) > Math.abs(high))
  return lower ? { unsafe: low, safe: high } : { unsafe: high, safe: low }
}
