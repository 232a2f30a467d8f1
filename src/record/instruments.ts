/**
 * The instruments a surveyor reads, and the default expanded uncertainty (k = 2) of one reading with each.
 * Common practice, no source, unless a row says otherwise; editable in a survey under `instruments`.
 * U = absolute (in the quantity's SI unit) + relative x |value|.
 */
export interface Instrument {
  /** What a surveyor calls it. */
  name: string
  /** Absolute part, in metres, radians, gradient, newtons, seconds or dB(A), as the quantity is. */
  absolute: number
  /** Relative part, a fraction of the reading. */
  relative: number
  /** What kind of quantity it reads. */
  reads: 'length' | 'angle' | 'gradient' | 'force' | 'time' | 'sound' | 'any'
  /** True: the figure was not measured by the team. It may lower a verdict, never lift it. */
  hearsay?: true
}

const degree = Math.PI / 180

export const instruments = {
  tape: { name: 'tape on the floor', absolute: 0.005, relative: 0, reads: 'length' },
  'door-tape': { name: 'tape, door face to stop', absolute: 0.01, relative: 0, reads: 'length' },
  'overhead-tape': { name: 'tape overhead, one hand', absolute: 0.02, relative: 0, reads: 'length' },
  rod: { name: 'rod', absolute: 0.01, relative: 0, reads: 'length' },
  'tape-in-lays': { name: 'tape in lays, over 5 m', absolute: 0, relative: 0.01, reads: 'length' },
  laser: { name: 'laser', absolute: 0.003, relative: 0, reads: 'length' },
  stick: { name: 'go/no-go stick', absolute: 0.005, relative: 0, reads: 'length' },
  wheel: { name: 'measuring wheel', absolute: 0, relative: 0.01, reads: 'length' },
  paces: { name: 'paces', absolute: 0, relative: 0.08, reads: 'length' },
  plan: { name: 'read off a plan', absolute: 0.05, relative: 0, reads: 'length' },
  'steel-rule': { name: 'steel rule', absolute: 0.001, relative: 0, reads: 'length' },
  'coin-gauge': { name: 'coin gauge', absolute: 0.0005, relative: 0, reads: 'length' },
  square: { name: 'square by 3-4-5 or plan', absolute: degree, relative: 0, reads: 'angle' },
  gyro: { name: "phone's gyro, just made", absolute: 5 * degree, relative: 0, reads: 'angle' },
  compass: { name: "phone's compass, indoors", absolute: 20 * degree, relative: 0, reads: 'angle' },
  level: { name: 'level', absolute: Math.tan(0.2 * degree), relative: 0, reads: 'gradient' },
  'level-turned': {
    name: 'level, turned end for end',
    absolute: Math.tan(0.1 * degree),
    relative: 0,
    reads: 'gradient',
  },
  'force-gauge': { name: 'force gauge', absolute: 3, relative: 0, reads: 'force' },
  stopwatch: { name: 'stopwatch', absolute: 0.5, relative: 0, reads: 'time' },
  'sound-meter': { name: 'sound meter', absolute: 5, relative: 0, reads: 'sound' },
  pendulum: { name: 'pendulum test value', absolute: 3, relative: 0, reads: 'any' },
  'by-eye': { name: 'by eye', absolute: 0, relative: 0.5, reads: 'any', hearsay: true },
  told: { name: 'told by someone', absolute: 0, relative: 0.5, reads: 'any', hearsay: true },
} as const satisfies Record<string, Instrument>

export type InstrumentId = keyof typeof instruments

export const instrumentIds = Object.keys(instruments) as InstrumentId[]

/** The row of an instrument with its optional parts, or undefined for an unknown name. */
export function instrument(id: string): Instrument | undefined {
  return (instruments as Record<string, Instrument>)[id]
}
