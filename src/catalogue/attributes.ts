import type { QuantityAttribute, WordAttribute } from './kind.ts'

/** Short hands for the rows: each names what is asked, its unit on the keypad and the tools offered first. */
type Required = QuantityAttribute['required']
type Quantity = (id: string, name: string, required?: Required) => QuantityAttribute

const quantity =
  (of: QuantityAttribute['quantity'], unit: string, instruments: readonly string[]): Quantity =>
  (id, name, required = 'optional') => ({ type: 'quantity', id, name, quantity: of, unit, instruments, required })

/** A length on the floor, metres. */
export const metres = quantity('length', 'm', ['tape', 'laser', 'stick'])
/** Door face to stop, metres. */
export const doorMetres = quantity('length', 'm', ['door-tape', 'laser'])
/** A height above the floor, metres. */
export const headMetres = quantity('length', 'm', ['rod', 'overhead-tape', 'laser'])
/** A lip, ridge, slot: shown in millimetres, kept in metres. */
export const millimetres = quantity('length', 'mm', ['steel-rule', 'coin-gauge'])
/** A direction or change of it: shown in degrees, kept in radians, left positive. */
export const degrees = quantity('angle', 'deg', ['square', 'gyro', 'compass'])
/** Rise over run, up positive. */
export const oneIn = quantity('gradient', '1:n', ['level-turned', 'level'])
export const newtons = quantity('force', 'N', ['force-gauge'])
export const seconds = quantity('time', 's', ['stopwatch'])
/** A count: of risers, of leaves. */
export const count = quantity('count', '', ['by-eye', 'told'])
export const decibels = quantity('sound', 'dB(A)', ['sound-meter'])
/** A bare figure: a pendulum value, a light meter's. */
export const figure = quantity('number', '', ['pendulum'])

/** A choice of words; null: free text. */
export const words = (
  id: string,
  name: string,
  says: readonly string[] | null,
  required: Required = 'optional',
): WordAttribute => ({ type: 'words', id, name, says, required })

/** Asked only where `item` of the same feature says one of these words. */
export const where = (item: string, ...says: string[]): Required => ({ item, says })

/** What is said at every stop item, and nothing else. */
export const stopWords = 'Stop. Leash off. Wait for {role}.'
