import { describe, expect, it } from 'vitest'
import { parseQuantity } from '../../src/units/parse.ts'
import { asks, field, reads, refuses } from './field-sheet.ts'

const degree = Math.PI / 180
const ratio = field('gradient', '1:n')
const percent = field('gradient', '%')
const level = field('gradient', 'deg')
const turn = field('angle', 'deg')
const hold = field('time', 's')
const pull = field('force', 'N')

describe('a gradient, rise over run', () => {
  it.each([
    ['1:12', ratio, 1 / 12, '1:n'],
    ['1 : 12', ratio, 1 / 12, '1:n'],
    ['1 in 12', ratio, 1 / 12, '1:n'],
    ['1/12', ratio, 1 / 12, '1:n'],
    ['1:12.5', ratio, 0.08, '1:n'],
    ['1:12,5', ratio, 0.08, '1:n'],
    ['80:1000', ratio, 0.08, '1:n'],
    ['-1:20', ratio, -0.05, '1:n'],
    ['−1:20', ratio, -0.05, '1:n'],
    ['+1:20', ratio, 0.05, '1:n'],
    ['48', ratio, 1 / 48, '1:n'],
    ['0', ratio, 0, '1:n'],
    ['8.3 %', ratio, 0.083, '%'],
    ['8,3%', ratio, 0.083, '%'],
    ['-2 %', ratio, -0.02, '%'],
    ['21‰', ratio, 0.021, '‰'],
    ['4.8°', ratio, Math.tan(4.8 * degree), 'deg'],
    ['4.8 deg', percent, Math.tan(4.8 * degree), 'deg'],
    ['1:12', percent, 1 / 12, '1:n'],
    ['8.3', percent, 0.083, '%'],
    ['0.2', percent, 0.002, '%'],
    ['4.8', level, Math.tan(4.8 * degree), 'deg'],
    ['0.083', field('gradient', ''), 0.083, ''],
  ] as const)('%s', (typed, into, value, unit) => reads(typed, into, value, unit))

  it('22.5 degrees rise by the root of 2 less 1, 30 degrees by 1 over the root of 3', () => {
    reads('22.5°', ratio, Math.SQRT2 - 1, 'deg')
    reads('30°', ratio, 1 / Math.sqrt(3), 'deg')
  })

  it('asks where per cent and 1:n are both likely', () => {
    asks('12', ratio, '1:12', '12 %', '12°')
    asks('8.3', ratio, '1:8.3', '8.3 %', '8.3°')
    asks('-20', ratio, '-1:20', '-20 %', '-20°')
    // 1:0.083 would be a wall.
    reads('0.083', ratio, 0.083, '%')
  })
  it('asks where per cent and rise over run are both likely', () => {
    asks('0.083', percent, '8.3 %', '0.083 %')
    asks('48', percent, '1:48', '48 %')
  })
  it('asks which way a bound on 1:n goes', () => {
    const parsed = parseQuantity('>1:12', ratio)
    expect(parsed).toMatchObject({ choices: [{ label: 'steeper than 1:12' }, { label: 'gentler than 1:12' }] })
    if (parsed.ok || parsed.kind !== 'ambiguous') return expect.unreachable('a question was due')
    const [steeper, gentler] = parsed.choices
    reads(steeper?.text ?? '', ratio, 1 / 12, '%', 'above')
    reads(gentler?.text ?? '', ratio, 1 / 12, '%', 'below')
  })
  it('refuses what is no slope', () => {
    refuses('1:0', ratio, /wall/)
    refuses('90°', ratio, /wall/)
    refuses('3:1', ratio, /too great/)
    refuses('steep', ratio, /1:12, 8.3 % or 4.8°/)
    refuses('1:12 m', ratio, /not a unit of gradient/)
  })
})

describe('an angle, typed in degrees, read in radians', () => {
  it.each([
    ['90', Math.PI / 2, 'deg'],
    ['-90', -Math.PI / 2, 'deg'],
    ['90°', Math.PI / 2, 'deg'],
    ['90º', Math.PI / 2, 'deg'],
    ['45 degrees', Math.PI / 4, 'deg'],
    ['22,5', Math.PI / 8, 'deg'],
    ["4°30'", 4.5 * degree, 'deg arcmin'],
    ['4° 30\' 36"', 4.51 * degree, 'deg arcmin arcsec'],
    ['1.5 rad', 1.5, 'rad'],
    ['360', 2 * Math.PI, 'deg'],
  ] as const)('%s', (typed, value, unit) => reads(typed, turn, value, unit))

  it('refuses more than a full turn, and a slope', () => {
    refuses('361', turn, /too great/)
    refuses('12 %', turn, /not a unit of angle/)
  })
})

describe('force, time, sound, speed, mass, area, light', () => {
  it.each([
    ['12 N', pull, 12],
    ['12', pull, 12],
    ['<22,2 N', pull, 22.2],
    ['1.2 kN', pull, 1200],
    // 5 lbf = 22.2411 N (ADA 404.2.9 gives 22.2 N).
    ['5 lbf', pull, 22.2411081],
    ['2 kg', pull, 19.6133],
    ['5 s', hold, 5],
    ['5', hold, 5],
    ['4.5 sec', hold, 4.5],
    ['1 min 30 s', hold, 90],
    ['2 min', hold, 120],
    ['850 ms', hold, 0.85],
    ['62 dB(A)', field('sound', 'dB(A)'), 62],
    ['62 dBA', field('sound', 'dB(A)'), 62],
    ['62', field('sound', 'dB(A)'), 62],
    ['0.7', field('speed', 'm/s'), 0.7],
    ['3.6 km/h', field('speed', 'm/s'), 1],
    ['1 mph', field('speed', 'm/s'), 0.44704],
    ['15 kg', field('mass', 'kg'), 15],
    ['33 lb', field('mass', 'kg'), 14.96854821],
    ['1.4 m2', field('area', 'm2'), 1.4],
    ['1.4 m²', field('area', 'm2'), 1.4],
    ['15 sq ft', field('area', 'm2'), 1.3935456],
    ['200 lux', field('illuminance', 'lx'), 200],
    ['3', field('count', ''), 3],
    ['3 risers', field('count', 'risers'), 3],
    ['1,240', field('count', ''), 1240],
    ['36', field('number', ''), 36],
    ['-0.5', field('number', ''), -0.5],
  ] as const)('%s', (typed, into, value) => {
    const parsed = parseQuantity(typed, into)
    expect(parsed.ok && parsed.value).toBeCloseTo(value, 6)
  })

  it('asks', () => {
    asks('1:30', hold, '1 min 30 s', '1 h 30 min')
    asks('5000', hold, '5000 ms', '5000 s')
    asks('4', field('speed', 'm/s'), '4 km/h', '4 m/s')
    asks('1,240', field('number', ''), '1.240', '1240')
  })

  it('refuses', () => {
    refuses('-5', hold, /no minus sign/)
    refuses('-5 N', pull, /no minus sign/)
    refuses('62 dB(C)', field('sound', 'dB(A)'), /not a unit of sound/)
    refuses('2.5', field('count', ''), /not a whole number/)
    refuses('a few', field('count', ''), /not a number/)
    refuses('3 chairs', field('count', 'risers'), /a number alone/)
    refuses('12 m', pull, /not a unit of force/)
  })
})
