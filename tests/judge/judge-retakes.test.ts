import { describe, expect, test } from 'vitest'
import { judgeSurvey, runToEnd } from '../../src/judge/judge.ts'
import type { SegmentResult } from '../../src/judge/result.ts'
import { uncertainty } from '../../src/record/interval.ts'
import type { Reading, Segment } from '../../src/record/survey.ts'
import { above, card, doublePlanner, feature, judged, on, reading, stretch, survey, walkOf } from './build.ts'

/** A stretch with a little of everything, each near something. */
const busy = () => [
  stretch(
    {
      readings: { width: [reading(1.215)], overhead: [above(2.1)], length: [reading(6)] },
      features: [
        feature('threshold', { height: reading(0.0165, 'steel-rule') }, { direction: 'up' }),
        feature('overhang', { lowest: reading(2.024, 'rod') }),
        feature('cross-fall', { gradient: reading(0.03, 'level') }, { falls: 'left' }),
        feature('opening', { clearWidth: reading(0.92, 'door-tape') }, { position: 'ahead' }, { along: 2 }),
      ],
      turn: feature('turn', { angle: reading(Math.PI / 2, 'gyro') }),
    },
    ['step', 'overhead'],
  ),
  stretch({ readings: { width: [reading(1.3)] } }),
]

const judge = (segments: Segment[], instruments: Record<string, { absolute: number; relative: number }> = {}) =>
  runToEnd(
    judgeSurvey(survey([walkOf(segments)], undefined, { instruments }), { planner: doublePlanner, on, team: card() }),
  ).walks[0]?.segments[0] as SegmentResult

/** Every list of readings, and how to put another in its place. */
function eachReading(segments: Segment[], change: (one: Reading) => Reading): Segment[] {
  const lists = (readings: Segment['readings']) =>
    Object.fromEntries(Object.entries(readings).map(([key, list]) => [key, list.map(change)]))
  return segments.map((segment) => ({
    ...segment,
    readings: lists(segment.readings),
    features: segment.features.map((one) => ({ ...one, readings: lists(one.readings) })),
    ...(segment.turn ? { turn: { ...segment.turn, readings: lists(segment.turn.readings) } } : {}),
  }))
}

/** A judgement in which one reading is known exactly at a value: taken with an instrument without uncertainty. */
function known(segments: Segment[], id: string, value: number): SegmentResult {
  const exact = { 'coin-gauge': { absolute: 0, relative: 0 } }
  return judge(
    eachReading(segments, (one) => (one.id === id ? { ...one, value, instrument: 'coin-gauge' } : one)),
    exact,
  )
}

const outcome = (one: SegmentResult) => {
  const governing = one.checks.find((check) => check.id === one.governing)
  return [one.verdict, one.governing, governing?.feature ?? null, one.leash?.recommended ?? null].join(' ')
}

describe('retakes', () => {
  const segments = busy()
  const nominal = judge(segments)
  const own = segments.slice(0, 1).flatMap((segment) => {
    const found: Reading[] = []
    eachReading([segment], (one) => {
      found.push(one)
      return one
    })
    return found
  })

  test('the example is near enough that something is to be taken again', () => {
    expect(own.length).toBeGreaterThan(7)
    expect(nominal.retakes.length).toBeGreaterThan(0)
    expect(nominal.retakes.length).toBeLessThan(own.length)
  })

  test('named is exactly what changes verdict, governing check or length at one end of its own uncertainty', () => {
    for (const one of own) {
      const u = uncertainty(one)
      const ends = [one.value - u, one.value + u].map((value) => outcome(known(segments, one.id, value)))
      const matters = ends.some((end) => end !== outcome(nominal))
      expect(
        nominal.retakes.some((retake) => retake.reading === one.id),
        `${one.id} ${one.value}: ${ends.join(' | ')}`,
      ).toBe(matters)
    }
  })

  test('the reported high end of every ratio is found by a judgement with its readings at their unsafe ends', () => {
    for (const found of nominal.checks) {
      if (!found.ratio || found.ratio[1] === null || found.id === 'turn') continue
      const used = own.filter((one) => found.readings.includes(one.id))
      const highs = [[]] as number[][]
      let tried = highs
      for (const one of used) {
        const u = uncertainty(one)
        const values = one.bound === 'above' ? [one.value - u] : [one.value - u, one.value + u]
        tried = tried.flatMap((list) => values.map((value) => [...list, value]))
      }
      const at = tried.map((values) => {
        const exact = { 'coin-gauge': { absolute: 0, relative: 0 } }
        const moved = eachReading(segments, (one) => {
          const index = used.findIndex((other) => other.id === one.id)
          return index < 0 ? one : { ...one, value: values[index] as number, instrument: 'coin-gauge' as const }
        })
        const again = judge(moved, exact).checks.find((one) => one.id === found.id && one.feature === found.feature)
        return again?.ratio?.[1] ?? Number.NaN
      })
      expect(Math.max(...at), found.id).toBeCloseTo(found.ratio[1], 9)
    }
  })

  test('ranked by harm, with a finer tool', () => {
    const order = ['fall', 'head', 'trap', 'road', 'comfort']
    const ranks = nominal.retakes.map((one) => order.indexOf(one.harm ?? ''))
    expect(ranks).toEqual([...ranks].sort((a, b) => a - b))
    const lip = judged(
      stretch({ features: [feature('threshold', { height: reading(0.0195, 'steel-rule') }, { direction: 'up' })] }, [
        'step',
      ]),
    )
    expect(lip.retakes[0]).toMatchObject({ instrument: 'coin-gauge', harm: 'fall' })
    const slope = judged(
      stretch({ features: [feature('cross-fall', { gradient: reading(0.038, 'level') }, { falls: 'left' })] }, [
        'step',
      ]),
    )
    expect(slope.retakes[0]?.instrument).toBe('level-turned')
  })

  test('estimated, told and disputed ones are named whatever they decide', () => {
    const length = judged(stretch({ readings: { length: [reading(8, 'paces')] } }))
    expect(length.verdict).toBe('usable')
    expect(length.retakes.map((one) => one.why).join()).toMatch(/estimated/)
    const disputed = judged(stretch({ readings: { width: [reading(3), reading(3.2, 'tape', { person: 'B' })] } }))
    expect(disputed.retakes.map((one) => one.why).join()).toMatch(/differ/)
  })

  test('the safe side is settled: nothing to take again', () => {
    const width = (more: Partial<Reading>) => judged(stretch({ readings: { width: [reading(0.916, 'tape', more)] } }))
    expect(width({}).verdict).toBe('not-known')
    expect(width({}).retakes).toHaveLength(1)
    expect(width({ safeSide: true }).verdict).toBe('do-not-use')
    expect(width({ safeSide: true }).retakes).toHaveLength(0)
  })
})
