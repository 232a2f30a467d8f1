import { describe, expect, test } from 'vitest'
import { judgeSurvey, runToEnd } from '../../src/judge/judge.ts'
import type { SegmentResult, Verdict, WalkResult } from '../../src/judge/result.ts'
import type { Feature, Reading, Segment } from '../../src/record/survey.ts'
import {
  above,
  card,
  doublePlanner,
  feature,
  on,
  reading,
  says,
  stretch,
  survey,
  walkOf,
  wholeHelp,
  zone,
} from './build.ts'

/** Random surveys near their limits; a seed that fails is printed by its name and can be kept. */
function random(seed: number): () => number {
  let state = seed * 2654435761 + 1
  return () => {
    state = (state * 1664525 + 1013904223) >>> 0
    return state / 4294967296
  }
}

const order: Verdict[] = ['usable', 'with-cautions', 'with-help', 'not-known', 'do-not-use']
/** Usable, with cautions, with help: where a worse tolerance never brings a part into, nor up within. */
const held = (one: Verdict) => order.indexOf(one) <= 2

function made(seed: number): Segment[] {
  const next = random(seed)
  const between = (low: number, high: number) => low + next() * (high - low)
  const maybe = (chance: number) => next() < chance
  const features: Feature[] = []
  const aspects: string[] = []
  const add = (aspect: string, one: Feature) => {
    features.push(one)
    aspects.push(aspect)
  }
  const help = maybe(0.5) ? { help: wholeHelp } : {}
  if (maybe(0.3))
    add('step', feature('threshold', { height: reading(between(0.002, 0.024), 'steel-rule') }, { direction: 'up' }))
  if (maybe(0.3)) add('overhead', feature('overhang', { lowest: reading(between(1.88, 2.1), 'rod') }))
  if (maybe(0.3))
    add(
      'edge',
      feature('drop-off', { distance: reading(between(1.9, 3.1)), height: reading(1) }, { guard: 'none' }, help),
    )
  if (maybe(0.3))
    add('step', feature('cross-fall', { gradient: reading(between(0.01, 0.05), 'level') }, { falls: 'left' }))
  if (maybe(0.3))
    add(
      'door',
      feature(
        'automatic-door',
        { clearWidth: reading(between(0.78, 1.1), 'door-tape'), hold: reading(between(4, 12), 'stopwatch') },
        { position: 'ahead', staysOpen: 'no' },
        help,
      ),
    )
  if (maybe(0.3))
    add('surface', feature('grating', { slot: reading(between(0.008, 0.016), 'steel-rule') }, { direction: 'across' }))
  const turn = maybe(0.5)
    ? { turn: feature('turn', { angle: reading(Math.PI / 2, maybe(0.5) ? 'square' : 'gyro') }) }
    : {}
  return [
    stretch(
      { readings: { width: [reading(between(0.88, 1.5))], overhead: [above(between(1.9, 2.3))] }, features, ...turn },
      aspects,
    ),
    stretch({ readings: { width: [reading(between(1, 1.5))] } }),
  ]
}

const everyTool = ['tape', 'door-tape', 'rod', 'steel-rule', 'level', 'stopwatch', 'square', 'gyro'] as const
const usual: Record<string, number> = {
  tape: 0.005,
  'door-tape': 0.01,
  rod: 0.01,
  'steel-rule': 0.001,
  level: 0.0035,
  stopwatch: 0.5,
  square: 0.0175,
  gyro: 0.087,
}

function walkOfSeed(segments: Segment[], worse = 1): WalkResult {
  const instruments = Object.fromEntries(
    everyTool.map((tool) => [tool, { absolute: (usual[tool] ?? 0) * worse, relative: 0 }]),
  )
  const made = survey([walkOf(segments)], [zone()], { instruments })
  return runToEnd(judgeSurvey(made, { planner: doublePlanner, on, team: card() })).walks[0] as WalkResult
}

const own = (walk: WalkResult) => walk.segments[0] as SegmentResult
const seeds = Array.from({ length: 150 }, (_, i) => i + 1)

describe('seeds', () => {
  test('they reach every verdict', () => {
    expect(new Set(seeds.map((seed) => own(walkOfSeed(made(seed))).verdict))).toEqual(new Set(order))
  })

  test('a worse tolerance never moves a part or the walk into, or up within, help, cautions, usable', () => {
    for (const seed of seeds) {
      const segments = made(seed)
      const steps = [0.1, 0.5, 1, 1.5, 3].map((worse) => walkOfSeed(segments, worse))
      for (let i = 1; i < steps.length; i++) {
        const pairs: [Verdict, Verdict][] = [
          [(steps[i - 1] as WalkResult).verdict, (steps[i] as WalkResult).verdict],
          [bestOf(steps[i - 1] as WalkResult), bestOf(steps[i] as WalkResult)],
        ]
        for (const [before, after] of pairs) {
          if (!held(after)) continue
          expect(held(before), `seed ${seed}: ${before} became ${after}`).toBe(true)
          expect(order.indexOf(after), `seed ${seed}: ${before} became ${after}`).toBeGreaterThanOrEqual(
            order.indexOf(before),
          )
        }
      }
    }
  })

  test('widening never worsens', () => {
    for (const seed of seeds) {
      const segments = made(seed)
      const wider = segments.map((one) => ({
        ...one,
        readings: { ...one.readings, width: moved(one.readings.width, 0.08) },
      }))
      const before = bestOf(walkOfSeed(segments))
      const after = bestOf(walkOfSeed(wider))
      expect(order.indexOf(after), `seed ${seed}: ${before} became ${after}`).toBeLessThanOrEqual(order.indexOf(before))
    }
  })

  test('an aspect left unanswered never improves', () => {
    const items = ['overhead', 'step', 'edge', 'finish', 'wetness', 'slots', 'door', 'sensing', 'shoreline', 'end-sign']
    for (const seed of seeds) {
      const segments = made(seed)
      const item = items[seed % items.length] as string
      const [first, ...rest] = segments as [Segment, ...Segment[]]
      const { [item]: gone, ...words } = first.words
      expect(gone).toBeDefined()
      const before = own(walkOfSeed(segments)).verdict
      const after = own(walkOfSeed([{ ...first, words }, ...rest])).verdict
      expect(order.indexOf(after), `seed ${seed}, ${item}`).toBeGreaterThanOrEqual(order.indexOf(before))
      expect(['not-known', 'do-not-use']).toContain(after)
    }
  })

  test('the order of features changes nothing', () => {
    for (const seed of seeds) {
      const segments = made(seed)
      const turned = segments.map((one) => ({ ...one, features: [...one.features].reverse() }))
      const a = own(walkOfSeed(segments))
      const b = own(walkOfSeed(turned))
      expect([b.verdict, b.governing, b.score, b.leash, b.pace], `seed ${seed}`).toEqual([
        a.verdict,
        a.governing,
        a.score,
        a.leash,
        a.pace,
      ])
      expect(b.sentence).toBe(a.sentence)
    }
  })

  test('a told answer never lifts, a caution more never lifts', () => {
    for (const seed of seeds) {
      const [first, ...rest] = made(seed) as [Segment, ...Segment[]]
      const before = own(walkOfSeed([first, ...rest])).verdict
      const told = {
        ...first,
        words: { ...first.words, edge: { ...first.words.edge, ...says(first.words.edge?.says ?? 'none', 'told') } },
      }
      expect(order.indexOf(own(walkOfSeed([told, ...rest])).verdict)).toBeGreaterThanOrEqual(order.indexOf(before))
      const glass = {
        ...first,
        features: [...first.features, feature('glass', {}, { marks: 'none' })],
        words: { ...first.words, sensing: says('listed') },
      }
      expect(order.indexOf(own(walkOfSeed([glass, ...rest])).verdict)).toBeGreaterThanOrEqual(order.indexOf(before))
    }
  })
})

/** A part's own verdict: at its own length, the best of its ladder. */
function bestOf(walk: WalkResult): Verdict {
  const cells = own(walk).ladder.map((cell) => cell.verdict)
  return cells.reduce((best, next) => (order.indexOf(next) < order.indexOf(best) ? next : best))
}

function moved(readings: Reading[] | undefined, by: number): Reading[] {
  return (readings ?? []).map((one) => ({ ...one, value: one.value + by }))
}
