import { describe, expect, test } from 'vitest'
import type { SegmentResult } from '../../src/judge/result.ts'
import type { Segment } from '../../src/record/survey.ts'
import { check, feature, type Judge, judged, judgedWalk, reading, stretch, zone } from './build.ts'

const square = (w: number, more: Partial<Segment> = {}) => [
  stretch({
    readings: { width: [reading(w)] },
    turn: feature('turn', { angle: reading(Math.PI / 2, 'square') }),
    ...more,
  }),
  stretch({ readings: { width: [reading(w)] } }),
]
const first = (segments: Segment[], options: Judge = {}) => judgedWalk(segments, options).segments[0] as SegmentResult

describe('leash, pace, window', () => {
  test('a straight stretch: the highest pace, from the shortest that is timely to the longest', () => {
    // At 0.70 m/s 1.0 m has 0.873 for 0.837 and fails; 1.2 m has 0.8335.
    expect(judged(stretch())).toMatchObject({ leash: { least: 1.2, greatest: 1.8, recommended: 1.2 }, pace: 0.7 })
  })

  test('a corner of 1.2 m by 1.2 m takes the 0.8 m leash at 0.40 m/s', () => {
    // The double leaves 0.084 m at S = 1.091 and 0.017 m at 1.35, at 0.6 m of leash 0.17 m: that one only creeps.
    const corner = first(square(1.2))
    expect(corner).toMatchObject({ verdict: 'with-cautions', governing: 'turn', pace: 0.4 })
    expect(corner.leash).toEqual({ least: 0.8, greatest: 0.8, recommended: 0.8 })
  })

  test('in a crowd no length above 1.0 m is on offer', () => {
    const busy = judged(stretch(), { zone: zone({}, { crowd: 'busy' }) })
    expect(busy.leash?.greatest).toBe(1.0)
    expect(busy.ladder.find((cell) => cell.leash === 1.2)).toMatchObject({ verdict: 'do-not-use', check: 'crowd' })
  })

  test('0.25 and 0.30 m/s are a caution', () => {
    // 0.6 m alone: 0.25 m/s asks 0.371 m for 0.387 m, which is tight as well.
    const creeping = judged(stretch(), { team: { leash: { lengths: [0.6] } } })
    expect(creeping).toMatchObject({ verdict: 'with-cautions', pace: 0.25 })
    // 0.8 m in a crowd: 0.30 m/s asks 0.54 m for 0.619 m; 0.25 is 0.471, 0.76: both creep.
    const slow = judged(stretch(), { team: { leash: { lengths: [0.8] }, handler: { slowToReact: true } } })
    expect(slow).toMatchObject({ verdict: 'with-cautions', pace: 0.25 })
    expect(check(slow, 'stop').state).toBe('passes')
  })

  test('no length on offer is no way to use it', () => {
    expect(judged(stretch(), { team: { leash: { lengths: [0.4] } } }).verdict).toBe('do-not-use')
  })
})

describe('an empty window', () => {
  test('names the two checks that close it and the least widening that opens it', () => {
    const closed = first(square(1.0), { team: { handler: { slowToReact: true } } })
    expect(closed.verdict).toBe('do-not-use')
    expect(closed.leash).toBeNull()
    expect(closed.window?.closedBy).toEqual(['stop', 'turn'])
    expect(closed.window?.opens).toMatchObject({ unit: 'mm' })
    const amount = closed.window?.opens?.amount as number
    // By that much it opens, by a centimetre less it does not.
    expect(first(square(1.0 + amount / 1000), { team: { handler: { slowToReact: true } } }).leash).not.toBeNull()
    expect(first(square(1.0 + amount / 1000 - 0.01), { team: { handler: { slowToReact: true } } }).leash).toBeNull()
  })

  test('a door that closes too soon asks for seconds', () => {
    const door = (hold: number) =>
      stretch(
        {
          features: [
            feature(
              'automatic-door',
              { clearWidth: reading(1.3), hold: reading(hold, 'stopwatch') },
              { position: 'ahead', staysOpen: 'no' },
            ),
          ],
        },
        ['door'],
      )
    const closed = judged(door(3))
    expect(closed.verdict).toBe('do-not-use')
    const seconds = closed.window?.opens
    expect(seconds).toMatchObject({ unit: 's' })
    expect(judged(door(3 + (seconds?.amount as number))).leash).not.toBeNull()
    expect(judged(door(3 + (seconds?.amount as number) - 0.11)).leash).toBeNull()
  })

  test('where at least one pair has no failing check it is not known', () => {
    const door = stretch(
      {
        features: [
          feature(
            'automatic-door',
            { clearWidth: reading(1.3), hold: reading(5.2, 'stopwatch') },
            { position: 'ahead', staysOpen: 'no' },
          ),
        ],
      },
      ['door'],
    )
    const result = judged(door)
    expect(result.verdict).toBe('not-known')
    expect(result.why.map((one) => one.kind)).toContain('too-close')
  })
})

describe('the ladder', () => {
  test('each cell is the verdict with that length alone, and the room at its worst check', () => {
    const corner = square(1.2)
    const whole = first(corner)
    for (const cell of whole.ladder) {
      const alone = first(corner, { team: { leash: { lengths: [cell.leash] } } })
      expect(cell.verdict, `${cell.leash}`).toBe(alone.verdict)
      expect(cell.pace).toBe(alone.pace)
      const worst = Math.max(
        ...alone.checks.flatMap((one) => (one.ratio ? [one.ratio[1] ?? Number.POSITIVE_INFINITY] : [])),
      )
      if (Number.isFinite(worst)) expect(cell.room).toBeCloseTo(1 - worst, 9)
      else expect(cell.room).toBeNull()
    }
    expect(whole.ladder.map((cell) => cell.leash)).toEqual([0.6, 0.8, 1, 1.2, 1.5, 1.8])
  })
})
