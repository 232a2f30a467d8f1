import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  formatAngle,
  formatForce,
  formatGradient,
  formatLength,
  formatMm,
  formatSound,
  formatSpeed,
  formatTime,
} from '../../src/units/format.ts'
import { parseQuantity } from '../../src/units/parse.ts'

const degree = Math.PI / 180

describe('a width is shown down, a demand up', () => {
  it.each([
    [0.91, 'down', '0.91 m'],
    [0.57, 'down', '0.57 m'],
    [1.1, 'down', '1.10 m'],
    [0.919, 'down', '0.91 m'],
    [0.9199999, 'down', '0.91 m'],
    [0.91, 'up', '0.91 m'],
    [0.9101, 'up', '0.92 m'],
    [0.3, 'up', '0.30 m'],
    [0.1 + 0.2, 'up', '0.30 m'],
    [0.914, 'nearest', '0.91 m'],
    [-0.013, 'down', '-0.02 m'],
    [-0.013, 'up', '-0.01 m'],
    [-0.004, 'up', '0.00 m'],
  ] as const)('%d %s', (value, towards, text) => {
    expect(formatLength(value, { system: 'metric', towards })).toBe(text)
  })

  it('in other metric units, with a comma where it is the custom', () => {
    expect(formatLength(1.249, { system: 'metric', unit: 'cm', towards: 'down' })).toBe('124 cm')
    expect(formatLength(1.2499, { system: 'metric', unit: 'mm', towards: 'down' })).toBe('1249 mm')
    expect(formatLength(1.249, { system: 'metric', unit: 'mm', step: 0.01, towards: 'down' })).toBe('1240 mm')
    expect(formatLength(1.249, { system: 'metric', towards: 'up', decimal: ',' })).toBe('1,25 m')
    expect(formatLength(12.34, { system: 'metric', step: 0.5, towards: 'up' })).toBe('12.5 m')
    expect(formatMm(0.8201, { towards: 'down' })).toBe('820 mm')
    expect(formatMm(0.9126, { towards: 'up' })).toBe('913 mm')
    expect(formatMm(0.829, { towards: 'down', step: 10 })).toBe('820 mm')
  })

  it.each([
    [1.3081, 'down', '4 ft 3 1/2 in'],
    [1.308, 'down', '4 ft 3 3/8 in'],
    [1.3082, 'up', '4 ft 3 5/8 in'],
    [1.228725, 'down', '4 ft 0 3/8 in'],
    [1.2192, 'up', '4 ft 0 in'],
    [0.0127, 'down', '0 1/2 in'],
    [0.003, 'down', '0 in'],
    [-0.003, 'down', '-0 1/8 in'],
    [0.9144, 'nearest', '3 ft 0 in'],
  ] as const)('%d %s in feet and eighths', (value, towards, text) => {
    expect(formatLength(value, { system: 'imperial', towards })).toBe(text)
  })

  it('in inches alone, and to a sixteenth', () => {
    expect(formatLength(1.3081, { system: 'imperial', unit: 'in', towards: 'down' })).toBe('51 1/2 in')
    expect(formatLength(0.0143, { system: 'imperial', unit: 'in', step: 1 / 16, towards: 'down' })).toBe('0 9/16 in')
  })
})

it('angles, forces, times, speeds and levels say their unit', () => {
  expect(formatAngle(Math.PI / 2, { towards: 'nearest' })).toBe('90°')
  expect(formatAngle(-45 * degree, { towards: 'down' })).toBe('-45°')
  expect(formatAngle(89.2 * degree, { towards: 'up' })).toBe('90°')
  expect(formatAngle(4.83 * degree, { towards: 'down', step: 0.1, decimal: ',' })).toBe('4,8°')
  expect(formatForce(22.2, { towards: 'up' })).toBe('23 N')
  expect(formatTime(4.96, { towards: 'down' })).toBe('4.9 s')
  expect(formatTime(4.96, { towards: 'up', step: 1 })).toBe('5 s')
  expect(formatSpeed(0.49, { system: 'metric', towards: 'down' })).toBe('0.45 m/s')
  expect(formatSpeed(0.45, { system: 'metric', towards: 'down' })).toBe('0.45 m/s')
  expect(formatSpeed(0.45, { system: 'imperial', towards: 'down' })).toBe('1.4 ft/s')
  expect(formatSound(62.4, { towards: 'up' })).toBe('63 dB(A)')
})

it('a gradient goes to its steeper or its gentler side, whatever its sign', () => {
  expect(formatGradient(1 / 12, { unit: '1:n', towards: 'steeper' })).toBe('1:12')
  expect(formatGradient(1 / 12.7, { unit: '1:n', towards: 'steeper' })).toBe('1:12')
  expect(formatGradient(1 / 12.7, { unit: '1:n', towards: 'gentler' })).toBe('1:13')
  expect(formatGradient(-1 / 19.5, { unit: '1:n', towards: 'steeper' })).toBe('-1:19')
  expect(formatGradient(1 / 8.35, { unit: '1:n', towards: 'steeper' })).toBe('1:8.3')
  expect(formatGradient(1 / 12, { unit: '%', towards: 'steeper' })).toBe('8.4 %')
  expect(formatGradient(-1 / 12, { unit: '%', towards: 'gentler', decimal: ',' })).toBe('-8,3 %')
  expect(formatGradient(1 / 12, { unit: 'deg', towards: 'steeper' })).toBe('4.8°')
  expect(formatGradient(0, { unit: '1:n', towards: 'steeper' })).toBe('0 %')
  expect(formatGradient(-0.0001, { unit: '%', towards: 'gentler' })).toBe('0.0 %')
})

it('has no form for what is no number', () => {
  for (const bad of [Number.NaN, Number.POSITIVE_INFINITY]) {
    expect(() => formatLength(bad, { system: 'metric', towards: 'down' })).toThrow(RangeError)
    expect(() => formatLength(bad, { system: 'imperial', towards: 'nearest' })).toThrow(RangeError)
    expect(() => formatGradient(bad, { unit: '1:n', towards: 'steeper' })).toThrow(RangeError)
    expect(() => formatMm(bad, { towards: 'up' })).toThrow(RangeError)
  }
})

describe('what is shown is read back, on the promised side and within one step', () => {
  const towards = fc.constantFrom('down' as const, 'up' as const)
  const run = { seed: 20_260_301, numRuns: 2000 }

  function within(text: string, value: number, back: number, side: 'down' | 'up', step: number): void {
    const slack = 1e-9 * Math.max(step, Math.abs(value))
    const over = side === 'down' ? value - back : back - value
    expect(over, `${value} -> ${text} -> ${back}`).toBeGreaterThanOrEqual(-slack)
    expect(over, `${value} -> ${text} -> ${back}`).toBeLessThanOrEqual(step + slack)
  }

  function back(text: string, quantity: Parameters<typeof parseQuantity>[1]['quantity'], unit: string): number {
    const parsed = parseQuantity(text, { quantity, unit, signed: true })
    if (!parsed.ok) return expect.unreachable(`${text} was not understood`)
    return parsed.value
  }

  it('metric lengths, with point and comma', () => {
    const unit = fc.constantFrom('m' as const, 'cm' as const, 'mm' as const)
    const decimal = fc.constantFrom('.' as const, ',' as const)
    const lengths = fc.double({ min: -30, max: 30, noNaN: true })
    fc.assert(
      fc.property(lengths, towards, unit, decimal, (value, side, shown, sign) => {
        const text = formatLength(value, { system: 'metric', unit: shown, towards: side, decimal: sign })
        within(text, value, back(text, 'length', 'm'), side, shown === 'mm' ? 0.001 : 0.01)
      }),
      run,
    )
  })

  it('a length on the step exactly is that step', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 30_000 }), towards, (steps, side) => {
        const text = formatLength(steps / 100, { system: 'metric', towards: side })
        expect(text).toBe(`${Math.floor(steps / 100)}.${String(steps % 100).padStart(2, '0')} m`)
      }),
      run,
    )
  })

  it('feet and inches', () => {
    const unit = fc.constantFrom('ft' as const, 'in' as const)
    fc.assert(
      fc.property(fc.double({ min: 0, max: 30, noNaN: true }), towards, unit, (value, side, shown) => {
        const text = formatLength(value, { system: 'imperial', unit: shown, towards: side })
        within(text, value, back(text, 'length', 'm'), side, 0.0254 / 8)
      }),
      run,
    )
  })

  it('gradients: never gentler than they are when shown steeper', () => {
    const unit = fc.constantFrom('1:n' as const, '%' as const, 'deg' as const)
    fc.assert(
      fc.property(fc.double({ min: 0.001, max: 0.9, noNaN: true }), fc.boolean(), unit, (size, falls, shown) => {
        const value = falls ? -size : size
        const steep = Math.abs(back(formatGradient(value, { unit: shown, towards: 'steeper' }), 'gradient', '%'))
        const gentle = Math.abs(back(formatGradient(value, { unit: shown, towards: 'gentler' }), 'gradient', '%'))
        expect(steep).toBeGreaterThanOrEqual(size * (1 - 1e-8))
        expect(gentle).toBeLessThanOrEqual(size * (1 + 1e-8))
      }),
      run,
    )
  })

  it('angles, forces, times, speeds', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 300, noNaN: true }), towards, (value, side) => {
        const angle = formatAngle(value * degree, { towards: side })
        within(angle, value * degree, back(angle, 'angle', 'deg'), side, degree)
        const force = formatForce(value, { towards: side })
        within(force, value, back(force, 'force', 'N'), side, 1)
        const time = formatTime(value, { towards: side })
        within(time, value, back(time, 'time', 's'), side, 0.1)
        const speed = formatSpeed(value / 100, { system: 'metric', towards: side })
        within(speed, value / 100, back(speed, 'speed', 'm/s'), side, 0.05)
      }),
      run,
    )
  })

  it('any text at all is answered: a finite value, a question whose choices are understood, or a reason', () => {
    const piece = fc.constantFrom(
      ...[
        '1',
        '0',
        '24',
        '240',
        '.',
        ',',
        ' ',
        '-',
        '/',
        ':',
        '<',
        '>',
        "'",
        '"',
        'm',
        'mm',
        'ft',
        'in',
        '%',
        '°',
        '½',
        'e9',
      ],
    )
    const typed = fc.oneof(
      fc.string(),
      fc.array(piece, { maxLength: 9 }).map((pieces) => pieces.join('')),
    )
    const into = fc.constantFrom(
      { quantity: 'length' as const, unit: 'm' },
      { quantity: 'length' as const, unit: 'mm' },
      { quantity: 'gradient' as const, unit: '1:n' },
      { quantity: 'angle' as const, unit: 'deg' },
      { quantity: 'time' as const, unit: 's' },
      { quantity: 'count' as const, unit: '' },
    )
    fc.assert(
      fc.property(typed, into, (text, field) => {
        const parsed = parseQuantity(text, field)
        if (parsed.ok) expect(Number.isFinite(parsed.value) && !Object.is(parsed.value, -0)).toBe(true)
        else if (parsed.kind === 'refused') expect(parsed.reason).not.toBe('')
        else {
          expect(parsed.choices.length).toBeGreaterThan(1)
          for (const choice of parsed.choices) expect(parseQuantity(choice.text, field)).toMatchObject({ ok: true })
        }
      }),
      { seed: 20_260_302, numRuns: 20_000 },
    )
  })
})
