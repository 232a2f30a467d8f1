import { describe, expect, it } from 'vitest'
import { parseQuantity } from '../../src/units/parse.ts'
import { asks, field, reads, refuses } from './field-sheet.ts'

const metres = field('length', 'm')
const millimetres = field('length', 'mm')
const inches = field('length', 'in')
const feet = field('length', 'ft')

// Typed | field | metres | unit as understood. Inch 25.4 mm and foot 304.8 mm exactly.
const sheet = [
  ['1.24', metres, 1.24, 'm'],
  ['1,24', metres, 1.24, 'm'],
  ['1,24 m', metres, 1.24, 'm'],
  ['1.240', metres, 1.24, 'm'],
  ['1.240 m', metres, 1.24, 'm'],
  ['0,914', metres, 0.914, 'm'],
  ['.91', metres, 0.91, 'm'],
  [',91', metres, 0.91, 'm'],
  ['25', metres, 25, 'm'],
  ['124cm', metres, 1.24, 'cm'],
  ['124 CM', metres, 1.24, 'cm'],
  ['57 cm', metres, 0.57, 'cm'],
  ['1240 mm', metres, 1.24, 'mm'],
  ['1240mm\r\n', metres, 1.24, 'mm'],
  ['1.240m\t', metres, 1.24, 'm'],
  ['1 240.5 mm', metres, 1.2405, 'mm'],
  ['1,240.5 mm', metres, 1.2405, 'mm'],
  ['1.240,5 mm', metres, 1.2405, 'mm'],
  ['1\u00a0m', metres, 1, 'm'],
  ['1,24\u202fm', metres, 1.24, 'm'],
  ['\u200e1.24 m\u200f', metres, 1.24, 'm'],
  ['１．２４ｍ', metres, 1.24, 'm'],
  ['2 m 13 cm', metres, 2.13, 'm cm'],
  ['2m13cm', metres, 2.13, 'm cm'],
  ['2 m 130 mm', metres, 2.13, 'm mm'],
  ['1 m 24 cm 5 mm', metres, 1.245, 'm cm mm'],
  ['3 metres', metres, 3, 'm'],
  ['1 1/2 m', metres, 1.5, 'm'],
  ['4\'3"', metres, 1.2954, 'ft in'],
  ["4'3", metres, 1.2954, 'ft in'],
  ['4′ 3″', metres, 1.2954, 'ft in'],
  ['4’3”', metres, 1.2954, 'ft in'],
  ["4'3''", metres, 1.2954, 'ft in'],
  ['4\'-3"', metres, 1.2954, 'ft in'],
  ['4\'-3 1/2"', metres, 1.3081, 'ft in'],
  ['4 ft 3 1/2 in', metres, 1.3081, 'ft in'],
  ['4 ft. 3 1/2 in.', metres, 1.3081, 'ft in'],
  ['4 feet 3.5 inches', metres, 1.3081, 'ft in'],
  ['4ft3½in', metres, 1.3081, 'ft in'],
  ['4\'03"1/2', metres, 1.3081, 'ft in'],
  ['4\' 0 3/8"', metres, 1.228725, 'ft in'],
  ['4 ft 3/8 in', metres, 1.228725, 'ft in'],
  ["4'", metres, 1.2192, 'ft'],
  ['51 1/2"', metres, 1.3081, 'in'],
  ['51 1/2 in', metres, 1.3081, 'in'],
  ['51-1/2 in', metres, 1.3081, 'in'],
  ['51½″', metres, 1.3081, 'in'],
  ['51.5 in', metres, 1.3081, 'in'],
  ['¼"', metres, 0.00635, 'in'],
  ['¾ in', metres, 0.01905, 'in'],
  ['3⁄8 in', metres, 0.009525, 'in'],
  ['13', millimetres, 0.013, 'mm'],
  ['1.5 mm', millimetres, 0.0015, 'mm'],
  ['51 1/2', inches, 1.3081, 'in'],
  ['36', inches, 0.9144, 'in'],
  ['4', feet, 1.2192, 'ft'],
  ['0', metres, 0, 'm'],
] as const

describe('a length as typed', () => {
  it.each(sheet)('%j', (typed, into, value, unit) => reads(typed, into, value, unit))

  it('keeps 57 cm at the nearest number to 0.57', () => {
    expect(parseQuantity('57 cm', metres)).toEqual({ ok: true, value: 0.57, bound: 'exact', unit: 'cm' })
  })
})

describe('a bound', () => {
  it.each([
    ['>2.1', 2.1, 'above'],
    ['> 2,1 m', 2.1, 'above'],
    ['≥2.1', 2.1, 'above'],
    ['>=2.1', 2.1, 'above'],
    ['>6\'8"', 2.032, 'above'],
    ['<20', 20, 'below'],
    ['<20 mm', 0.02, 'below'],
    ['≤ 20 mm', 0.02, 'below'],
    ['<=20mm', 0.02, 'below'],
  ] as const)('%s', (typed, value, bound) => reads(typed, metres, value, undefined, bound))
})

describe('two readings of one text are asked', () => {
  it('a bare length that is too long in metres', () => {
    asks('1240', metres, '1240 mm', '1240 m')
    asks('124', metres, '124 cm', '124 mm', '124 m')
    asks('25.1', metres, '25.1 cm', '25.1 mm', '25.1 m')
    asks('>1240', metres, '>1240 mm', '>1240 m')
  })
  it('puts the question in words', () => {
    expect(parseQuantity('1240', metres)).toMatchObject({ question: '1240 mm or 1240 m?' })
    expect(parseQuantity('124', metres)).toMatchObject({ question: '124 cm, 124 mm or 124 m?' })
  })
  it('a comma or a gap before three digits', () => {
    asks('1,240', metres, '1.240 m', '1240 m')
    asks('1,240', millimetres, '1.240 mm', '1240 mm')
    asks('1,240 mm', metres, '1.240 mm', '1240 mm')
    asks('1 240 mm', metres, '1.240 mm', '1240 mm')
    asks('12,500', millimetres, '12.500 mm', '12500 mm')
  })
  it('a decimal where whole units are read', () => {
    asks('1.24', millimetres, '1.24 m', '1.24 mm')
    asks('0.02', millimetres, '0.02 m', '0.02 mm')
    asks('1.24', field('length', 'cm'), '1.24 m', '1.24 cm')
    reads('12.5', field('length', 'cm'), 0.125, 'cm')
  })
  it('zeros in front: the decimal sign is lost, perhaps', () => {
    asks('091', metres, '0.91 m', '91 m')
    asks('05', metres, '0.5 m', '5 m')
  })
  it("a tape's fraction in a field of another unit", () => {
    asks('51 1/2', metres, '51 1/2 in', '51 1/2 ft', '51 1/2 m')
    asks('4 1/2', feet, '4 1/2 in', '4 1/2 ft')
  })
  it('a last number without a unit', () => {
    asks('2 m 13', metres, '2 m 13 cm', '2 m 13 mm')
    asks('4 ft 3/8', metres, '4 ft 0 3/8 in', '4 3/8 ft')
    asks('120', feet, '120 in', '120 ft')
  })
  it('is no question where one reading alone can stand', () => {
    reads('2 m 130', metres, 2.13, 'm mm')
    reads('12 cm 5', metres, 0.125, 'cm mm')
    reads('00', metres, 0)
  })
})

describe('refused, with the reason', () => {
  it.each([
    ['', /nothing typed/],
    ['  \r\n', /nothing typed/],
    ['wide enough', /not a number/],
    ['m', /not a number/],
    ['>', /number is missing/],
    ['1.', /half typed/],
    ['1.24.3', /not one number/],
    ['1,24,3', /not one number/],
    ['1.2 1.3', /which unit is 1.2/],
    ['1.2 - 1.3', /one reading at a time/],
    ['1.24\n1.25', /one reading at a time/],
    ['~1.2', /gives its uncertainty/],
    ['1.24 ± 0.01', /gives its uncertainty/],
    ['-1.2', /no minus sign/],
    ['1e3', /power of ten/],
    ['1e999', /power of ten/],
    ['NaN', /not a number/],
    ['Infinity', /not a number/],
    ['-Infinity', /no minus sign/],
    ['1.24 kg', /not a unit of length/],
    ['12 m²', /not a unit of length/],
    ['1.24 m wide', /“wide” is not a unit/],
    ['4 ft 15 in', /whole ft or more/],
    ['4.5 ft 3 in', /last part may be broken/],
    ['3 in 4 ft', /cannot follow/],
    ['4 ft 3 cm', /cannot follow/],
    ['3/2 in', /more than one/],
    ['1/0 in', /sixty-fourths/],
    ['1/3 in', /sixty-fourths/],
    ['1,240 m 13', /too many ways/],
    ['1 222 1 222 1 222 1 222 1 222 1 222', /too many ways/],
    ['99999999 m', /too great/],
    [`${'9'.repeat(60)} m`, /too great/],
    ['9'.repeat(10_240), /too long/],
    [`${' '.repeat(10_240)}1.24`, /too long/],
  ] as const)('%j', (typed, reason) => refuses(typed, metres, reason))

  it('a minus sign is for a level difference', () => {
    reads('-20 mm', field('length', 'mm', true), -0.02, 'mm')
    reads('−20', field('length', 'mm', true), -0.02, 'mm')
    refuses('>-20', field('length', 'mm', true), /reads two ways/)
  })

  it("a form's unit that does not exist is a broken promise, not a reading", () => {
    expect(() => parseQuantity('1', field('length', 'furlong'))).toThrow("no unit of length: 'furlong'")
    expect(() => parseQuantity('1', field('gradient', 'm'))).toThrow('no unit of gradient')
  })
})
