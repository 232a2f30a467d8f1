import type { FieldQuantity } from './parse-answer.ts'

/**
 * A unit that can be typed. A value in SI = value x times / over: the two whole numbers keep 57 cm at 0.57 m, where a
 * factor of 0.01 gives 0.5700000000000001.
 */
export interface Unit {
  name: string
  spellings: readonly string[]
  times: number
  over: number
  /** Units of one family may stand together, the greater first: 4 ft 3 in. */
  family: string
}

function unit(name: string, family: string, times: number, over: number, ...more: string[]): Unit {
  return { name, family, times, over, spellings: [name.toLowerCase(), ...more] }
}

/** Quantity -> its units. Gradient has its own reader. Exact by definition: inch 25.4 mm, pound 0.45359237 kg, g 9.80665 m/s2. */
export const units: Readonly<Record<Exclude<FieldQuantity, 'gradient'>, readonly Unit[]>> = {
  length: [
    unit('km', 'metric', 1000, 1, 'kilometre', 'kilometres', 'kilometer', 'kilometers'),
    unit('m', 'metric', 1, 1, 'metre', 'metres', 'meter', 'meters'),
    unit('cm', 'metric', 1, 100, 'centimetre', 'centimetres', 'centimeter', 'centimeters'),
    unit('mm', 'metric', 1, 1000, 'millimetre', 'millimetres', 'millimeter', 'millimeters'),
    unit('yd', 'imperial', 9144, 10000, 'yard', 'yards'),
    unit('ft', 'imperial', 3048, 10000, "'", 'foot', 'feet'),
    unit('in', 'imperial', 254, 10000, '"', 'inch', 'inches'),
  ],
  angle: [
    unit('deg', 'degrees', Math.PI, 180, '°', 'degree', 'degrees'),
    unit('arcmin', 'degrees', Math.PI, 10800, "'"),
    unit('arcsec', 'degrees', Math.PI, 648000, '"'),
    unit('rad', 'radians', 1, 1, 'radian', 'radians'),
  ],
  force: [
    unit('N', 'newton', 1, 1, 'newton', 'newtons'),
    unit('kN', 'newton', 1000, 1),
    // A luggage scale used as a gauge shows kg or lb.
    unit('kgf', 'kilogram', 980665, 100000, 'kg'),
    unit('lbf', 'pound', 4.4482216152605, 1, 'lb', 'lbs', 'pound', 'pounds'),
  ],
  time: [
    unit('h', 'time', 3600, 1, 'hour', 'hours'),
    unit('min', 'time', 60, 1, 'minute', 'minutes'),
    unit('s', 'time', 1, 1, 'sec', 'secs', 'second', 'seconds'),
    unit('ms', 'milliseconds', 1, 1000),
  ],
  sound: [unit('dB(A)', 'sound', 1, 1, 'dba', 'db a', 'db (a)', 'db')],
  speed: [
    unit('m/s', 'speed', 1, 1, 'mps'),
    unit('km/h', 'speed-kmh', 10, 36, 'kph', 'kmh'),
    unit('ft/s', 'speed-fts', 3048, 10000),
    unit('mph', 'speed-mph', 44704, 100000),
  ],
  mass: [
    unit('kg', 'mass', 1, 1, 'kilogram', 'kilograms'),
    unit('g', 'mass', 1, 1000, 'gram', 'grams'),
    unit('lb', 'mass-pound', 45359237, 100000000, 'lbs', 'pound', 'pounds'),
  ],
  area: [
    unit('m2', 'area', 1, 1, 'm²', 'm^2', 'sq m', 'square metres', 'square meters'),
    unit('cm2', 'area-cm', 1, 10000, 'cm²', 'cm^2', 'sq cm'),
    unit('ft2', 'area-ft', 9290304, 100000000, 'ft²', 'ft^2', 'sq ft', 'square feet'),
  ],
  illuminance: [
    unit('lx', 'light', 1, 1, 'lux'),
    unit('fc', 'light-fc', 10000, 929.0304, 'foot-candle', 'foot-candles', 'footcandle', 'footcandles'),
  ],
  count: [],
  number: [],
}

/** The unit that a field names, by any spelling. */
export function findUnit(quantity: Exclude<FieldQuantity, 'gradient'>, name: string): Unit | undefined {
  return units[quantity].find((one) => one.name === name || one.spellings.includes(name.toLowerCase()))
}

/** Finds the longest spelling at a place in a body; a full stop after it ("in.") belongs to it. */
const finders = new Map<FieldQuantity, RegExp>()
export function unitToken(quantity: Exclude<FieldQuantity, 'gradient'>): RegExp {
  let finder = finders.get(quantity)
  if (!finder) {
    const spellings = units[quantity].flatMap((one) => one.spellings).sort((a, b) => b.length - a.length)
    const escaped = spellings.map((one) => one.replace(/[.*+?^${}()|[\]\\]/g, '\\$&'))
    finder = new RegExp(`(${escaped.join('|')})(?![a-z²^(])(?:\\.(?!\\d))?`, 'y')
    finders.set(quantity, finder)
  }
  finder.lastIndex = 0
  return finder
}
