import { describe, expect, test } from 'vitest'
import { interval } from '../../src/record/interval.ts'
import type { Reading } from '../../src/record/survey.ts'
import { above, check, feature, judged, on, reading, says, stretch, wholeHelp, zone } from './build.ts'

/** Measures that were signed, bounded, told or taken at the wrong place: each once came out better than it was. */

const below = (value: number): Reading => reading(value, 'tape', { bound: 'below' })
const kerb = (height: Reading, distance: Reading = reading(1.2)) =>
  stretch({ features: [feature('kerb-edge', { distance, height }, { guard: 'none' })] }, ['edge'])

describe('signs and bounds', () => {
  test('a step down entered as a negative height is a step', () => {
    const step = feature('single-step', { height: reading(-0.15) }, { direction: 'down' })
    expect(judged(stretch({ features: [step] }, ['step'])).verdict).toBe('do-not-use')
  })

  test('a kerb entered as a negative height is as deep as it is', () => {
    expect(judged(kerb(reading(-0.5))).verdict).toBe('do-not-use')
  })

  test('a kerb of "more than 0.10 m" may be a drop', () => {
    expect(judged(kerb(above(0.1, 'tape'))).verdict).toBe('do-not-use')
  })

  test('a kerb "less than 0.8 m" away may be underfoot', () => {
    expect(check(judged(kerb(reading(0.1), below(0.8))), 'edge').state).toBe('needs-help')
    expect(check(judged(kerb(reading(0.1), below(1.2))), 'edge').state).toBe('needs-help')
  })

  test('a kerb of "less than 0.1 m" may not hold a wheel back', () => {
    const traffic = feature('traffic-edge', { distance: reading(1.2), kerb: below(0.1) }, { guard: 'none' })
    expect(check(judged(stretch({ features: [traffic] }, ['edge'])), 'edge').state).toBe('needs-help')
  })

  test('beyond a kerb of 0.4 m lies a drop, whatever drives there', () => {
    const traffic = feature('traffic-edge', { distance: reading(1.2), kerb: reading(0.4) }, { guard: 'none' })
    expect(judged(stretch({ features: [traffic] }, ['edge'])).verdict).toBe('do-not-use')
  })

  test('a tape that is "uncertain by less than nothing" gains no room', () => {
    const changed = { tape: { absolute: -0.1, relative: -0.1 } }
    const joined = interval([reading(1)], { unsafe: 'low', changed })
    expect(joined?.low).toBe(1)
    expect(joined?.high).toBe(1)
  })
})

describe('told and by eye', () => {
  test.each(['told', 'by-eye'] as const)('a gap in the floor %s', (instrument) => {
    const gap = feature('gap', { gap: reading(0.005, instrument) }, { place: 'joint' })
    expect(judged(stretch({ features: [gap] }, ['step'])).verdict).toBe('not-known')
  })

  const lift = (more: Record<string, Reading>) =>
    feature(
      'lift',
      {
        clearWidth: reading(1.2),
        carDepth: reading(2.5),
        carWidth: reading(2),
        hold: reading(30, 'stopwatch'),
        sillGap: reading(0.01, 'steel-rule'),
        ...more,
      },
      { position: 'ahead', wayOut: 'through' },
      { help: wholeHelp },
    )
  test.each(['carDepth', 'carWidth'])('the %s of a lift by eye', (quantity) => {
    expect(judged(stretch({ features: [lift({})] }, ['door'])).verdict).toBe('with-help')
    expect(judged(stretch({ features: [lift({ [quantity]: reading(6, 'by-eye') })] }, ['door'])).verdict).toBe(
      'not-known',
    )
  })

  test('the sill gap of a lift told', () => {
    expect(judged(stretch({ features: [lift({ sillGap: reading(0.01, 'told') })] }, ['door'])).verdict).toBe(
      'not-known',
    )
  })

  test('a car in which nobody fits stays so where backing out is not shown', () => {
    const narrow = lift({ carWidth: reading(0.6), clearWidth: reading(0.6) })
    narrow.words.wayOut = says('backs-out')
    narrow.words.backsOutShown = says('no')
    const result = judged(stretch({ features: [narrow] }, ['door']))
    expect(result.checks.filter((one) => one.id === 'lift-fit').map((one) => one.state)).toContain('fails')
  })
})

describe('the right place', () => {
  test('what hangs over a narrowing is no door head', () => {
    const narrowing = (headHeight: number) =>
      feature('narrowing', {
        clearWidth: reading(1.6),
        length: reading(0.3),
        headHeight: reading(headHeight, 'rod'),
      })
    const state = (height: number) =>
      judged(stretch({ features: [narrowing(height)] })).checks.find(
        (one) => one.id === 'overhead' && one.capacity !== null && one.capacity < 0.25,
      )?.state
    expect(state(1.99)).toBe('tight')
    expect(state(2.025)).toBe('tight')
  })

  test('a long obstruction narrows the stretch, not only a frame', () => {
    const cabinet = (length?: number) =>
      feature(
        'obstruction',
        { depth: reading(0.95), ...(length === undefined ? {} : { length: reading(length) }) },
        {},
        { side: 'left' },
      )
    expect(judged(stretch({ features: [cabinet(0.4)] })).verdict).not.toBe('do-not-use')
    expect(judged(stretch({ features: [cabinet(3)] })).verdict).toBe('do-not-use')
    // Where nobody measured how long it is, it is long.
    expect(judged(stretch({ features: [cabinet()] })).verdict).toBe('do-not-use')
  })

  test('a passage through a thick wall is a narrow stretch', () => {
    const opening = (wallThickness: number) =>
      feature('opening', { clearWidth: reading(0.86), wallThickness: reading(wallThickness) }, { position: 'ahead' })
    expect(judged(stretch({ features: [opening(0.3)] })).verdict).toBe('with-cautions')
    expect(judged(stretch({ features: [opening(2)] })).verdict).toBe('do-not-use')
  })

  test('chairs in use that were settled away do not count as pushed out', () => {
    const first = reading(1.1, 'tape', { found: 'in-use' })
    const second = reading(1.75, 'tape', {
      found: 'empty',
      settles: { readings: [first.id], by: 'A', reason: 'chairs moved', on },
    })
    const seats = feature('seats-facing', { clearWidth: [first, second] })
    expect(judged(stretch({ features: [seats] })).verdict).toBe('do-not-use')
  })

  test('a smooth floor after a mat gives the hold of a smooth floor', () => {
    const mat = feature('floor-edge', { height: reading(0.002, 'steel-rule') }, { finish: 'smooth' })
    const segment = stretch({ features: [mat], words: { finish: says('carpet') } }, ['step'])
    const plain = stretch({ words: { finish: says('smooth') } })
    expect(check(judged(segment), 'traction').capacity).toBe(check(judged(plain), 'traction').capacity)
  })

  test('a pendulum value of a grid says nothing of the wet floor round it', () => {
    const grid = feature(
      'grating',
      { slot: reading(0.008, 'steel-rule'), pendulum: reading(60, 'pendulum') },
      { direction: 'across' },
    )
    const result = judged(stretch({ features: [grid] }, ['surface']), { zone: zone({ nearOutsideDoor: true }) })
    expect(result.conditions).toContain('dry floor only')
  })

  test('ice on a smooth floor without a value is not known', () => {
    const ice = feature('loose-ground', {}, { what: 'ice' })
    const grips = { smooth: { dry: 0.5, wet: 0.5 }, textured: { dry: 0.6, wet: 0.5 }, carpet: { dry: 0.6, wet: 0.5 } }
    const result = judged(stretch({ features: [ice] }), { team: { robot: { friction: grips } } })
    expect(result.conditions).toContain('dry floor only')
  })
})
