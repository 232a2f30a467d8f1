import { describe, expect, it } from 'vitest'
import { instruments } from '../../src/record/instruments.ts'

/**
 * Greatest permissible error of a tape, metres: a + b L with L in metres rounded up to the next whole metre.
 * EU measuring instruments directive, annex MI-008, chapter I, 2 (UK SI 2016/1153, schedule 1I), in line with OIML R 35.
 */
const classes = { I: [0.1, 0.1], II: [0.3, 0.2], III: [0.6, 0.4] } as const

function permissible(grade: keyof typeof classes, length: number): number {
  const [a, b] = classes[grade]
  return (a + b * Math.ceil(length)) / 1000
}

/** Expanded (k = 2) uncertainty of an error that may lie anywhere within its limits: 2 / root 3 times the limit (GUM, 4.3.7). */
function expanded(limit: number): number {
  return (2 * limit) / Math.sqrt(3)
}

describe('class II tape against the default uncertainty of a tape on the floor', () => {
  it('the rule gives 1.3 mm at 5 m, 2.3 mm at 10 m, 6.3 mm at 30 m', () => {
    expect(permissible('II', 5)).toBeCloseTo(0.0013, 12)
    expect(permissible('II', 9.2)).toBeCloseTo(0.0023, 12)
    expect(permissible('II', 30)).toBeCloseTo(0.0063, 12)
  })

  it('5 mm covers the tape in one lay of 5 m, and leaves 4.7 mm for reading and sag', () => {
    const tape = expanded(permissible('II', 5))
    expect(tape).toBeLessThan(instruments.tape.absolute)
    expect(Math.sqrt(instruments.tape.absolute ** 2 - tape ** 2)).toBeGreaterThan(0.0047)
  })

  it('even a class III tape stays within 5 mm in one lay', () => {
    expect(expanded(permissible('III', 5))).toBeLessThanOrEqual(instruments.tape.absolute)
  })

  it('over 5 m, in lays, 1 % covers a class II and a class III tape up to a walk of 100 m', () => {
    for (let length = 5; length <= 100; length += 0.5) {
      expect(expanded(permissible('III', length))).toBeLessThan(instruments['tape-in-lays'].relative * length)
    }
  })

  it('one lay of 5 mm would not do for a class II tape of 30 m: the reason why lays have their own row', () => {
    expect(expanded(permissible('II', 30))).toBeGreaterThan(instruments.tape.absolute)
  })

  it('a steel rule of 1 m read to 1 mm covers class II', () => {
    expect(expanded(permissible('II', 1))).toBeLessThan(instruments['steel-rule'].absolute)
  })
})
