import { describe, expect, test } from 'vitest'
import type { CheckState } from '../../src/judge/result.ts'
import type { Segment } from '../../src/record/survey.ts'
import { above, check, feature, type Judge, judged, reading, says, stretch, wholeHelp, zone } from './build.ts'

/** Each check on both sides of its boundary, worked by hand with the default card. */
type Row = [what: string, segment: () => Segment, options: Judge, state: CheckState]

function rows(id: string, table: Row[]) {
  describe(id, () => {
    test.each(table)('%s', (_, segment, options, state) => {
      expect(check(judged(segment(), options), id).state).toBe(state)
    })
  })
}

const width = (value: number) => stretch({ readings: { width: [reading(value)] } })
rows('straight-width', [
  // Envelope 0.713; fails under 0.913, clear from 1.013; tape 5 mm.
  ['0.907: over even at the safe end', () => width(0.907), {}, 'fails'],
  ['0.908: the safe end just meets 0.913', () => width(0.908), {}, 'unsure'],
  ['0.917: the unsafe end misses by 1 mm', () => width(0.917), {}, 'unsure'],
  ['0.918: the unsafe end meets 0.913', () => width(0.918), {}, 'tight'],
  ['1.017: 1 mm inside the caution band', () => width(1.017), {}, 'tight'],
  ['1.018: clear of the band', () => width(1.018), {}, 'passes'],
  ['a stick that passed at 0.918', () => stretch({ readings: { width: [above(0.918, 'stick')] } }), {}, 'tight'],
  ['0.813 with the bag in front', () => width(0.818), { team: { handler: { bag: 'in-front' } } }, 'tight'],
  [
    '0.812 less the tape with the bag in front',
    () => width(0.817),
    { team: { handler: { bag: 'in-front' } } },
    'unsure',
  ],
])

describe('straight-width of things on the way', () => {
  const seats = (value: number, found?: 'in-use') =>
    stretch({ features: [feature('seats-facing', { clearWidth: reading(value, 'tape', found ? { found } : {}) })] })
  const of = (segment: Segment) =>
    judged(segment)
      .checks.filter((one) => one.id === 'straight-width')
      .at(-1)?.state
  test('seats pushed in take 0.85 m more when somebody sits', () => {
    expect(of(seats(1.868))).toBe('passes')
    expect(of(seats(1.867))).toBe('tight')
    expect(of(seats(1.757))).toBe('fails')
    // Measured while in use: nothing more to take off.
    expect(of(seats(1.018, 'in-use'))).toBe('passes')
  })
  test('a narrowing is a stretch from 0.6 m of length', () => {
    const squeeze = (length: number) =>
      stretch({ features: [feature('narrowing', { clearWidth: reading(0.9), length: reading(length) })] })
    expect(judged(squeeze(0.594)).checks.filter((one) => one.id === 'straight-width')).toHaveLength(1)
    expect(of(squeeze(0.596))).toBe('fails')
  })
})

const swept = (value: number) => stretch({ readings: { overhead: [above(value)] } })
const hung = (value: number) =>
  stretch({ features: [feature('overhang', { lowest: reading(value, 'rod') })] }, ['overhead'])
const lowest = (segment: Segment) =>
  judged(segment, { code: 'uk-adm-k' })
    .checks.filter((one) => one.id === 'overhead')
    .at(-1)?.state
describe('overhead', () => {
  // Strike height 1.919, rod 10 mm; the headroom of AD K, 2.00 m, lies under the band and stays out of the way.
  test.each([
    [1.908, 'fails'],
    [1.909, 'unsure'],
    [1.928, 'unsure'],
    [1.929, 'tight'],
    [2.028, 'tight'],
    [2.029, 'passes'],
  ])('hung at %d: %s', (value, state) => {
    expect(lowest(hung(value))).toBe(state)
  })
  test('swept to a height is a bound: nothing hung lower', () => {
    expect(lowest(swept(2.028))).toBe('tight')
    expect(lowest(swept(2.029))).toBe('passes')
    expect(check(judged(swept(1.92)), 'overhead').state).toBe('unsure')
  })
  test('a door head has half the band and no headroom of the pack', () => {
    const door = (value: number) =>
      stretch({
        features: [
          feature('opening', { clearWidth: reading(1.2), headHeight: reading(value, 'rod') }, { position: 'ahead' }),
        ],
      })
    const head = (value: number) =>
      judged(door(value))
        .checks.filter((one) => one.id === 'overhead')
        .at(-1)?.state
    expect(head(1.979)).toBe('passes')
    expect(head(1.978)).toBe('tight')
  })
  test('the ratio is 0.10 for what is left above the strike and 0.10', () => {
    const found = judged(hung(2)).checks.filter((one) => one.id === 'overhead')
    const [low, high] = found.at(-1)?.ratio ?? [Number.NaN, Number.NaN]
    expect(low).toBeCloseTo(0.1 / (0.1 + 2.01 - 1.919), 4)
    expect(high).toBeCloseTo(0.1 / (0.1 + 1.99 - 1.919), 4)
  })
})

const box = (projection: number, low: number, mounted = 'wall') =>
  stretch(
    { features: [feature('wall-projection', { projection: reading(projection), lowest: reading(low) }, { mounted })] },
    ['overhead'],
  )
const sensesAll = { team: { robot: { sensingPlane: 1.5 } } }
rows('protrusion', [
  ['100 mm from a wall', () => box(0.1, 1), sensesAll, 'passes'],
  ['101 mm from a wall', () => box(0.101, 1), sensesAll, 'tight'],
  ['300 mm from a post', () => box(0.3, 1, 'post'), sensesAll, 'passes'],
  ['306 mm from a post', () => box(0.306, 1, 'post'), sensesAll, 'tight'],
  ['under 685 mm a cane finds it', () => box(0.3, 0.685), sensesAll, 'passes'],
  ['sensed under: the plane at 0.20 m', () => box(0.05, 0.21), {}, 'tight'],
  ['at the plane', () => box(0.05, 0.2), {}, 'passes'],
])

const lip = (height: number, kind = 'threshold', words: Record<string, string> = { direction: 'up' }) =>
  stretch({ features: [feature(kind, { height: reading(height, 'steel-rule') }, words)] }, ['step'])
rows('level', [
  // Riser 20 mm, steel rule 1 mm; ADA lip 6.4 mm and bevel 13 mm at the reading itself.
  ['6.4 mm', () => lip(0.0064), {}, 'passes'],
  ['6.5 mm', () => lip(0.0065), {}, 'tight'],
  ['16 mm, 17 at most: 0.85', () => lip(0.016), {}, 'tight'],
  ['19 mm: the unsafe end meets the riser', () => lip(0.019), {}, 'tight'],
  ['19.1 mm', () => lip(0.0191), {}, 'unsure'],
  ['21.1 mm: over even at the safe end', () => lip(0.0211), {}, 'fails'],
  ['a ridge with flanks of 1:2 has no lip', () => lip(0.012, 'ridge', { flank: 'yes' }), {}, 'passes'],
  ['the same, steeper', () => lip(0.012, 'ridge', { flank: 'no' }), {}, 'tight'],
  [
    'a kerb of 25 mm led otherwise with whole help',
    () => lip25({ ledBy: 'human-guide', help: wholeHelp }),
    {},
    'helped',
  ],
  ['the same led by the robot, whatever the help', () => lip25({ help: wholeHelp }), {}, 'fails'],
])

function lip25(more: object): Segment {
  return stretch({ features: [feature('kerb', { height: reading(0.025, 'steel-rule') }, { direction: 'up' }, more)] }, [
    'step',
  ])
}

const ramp = (gradient: number, direction = 'up') =>
  stretch({ features: [feature('ramp', { gradient: reading(gradient, 'level') }, { direction })] }, ['step'])
const holds = { team: { robot: { holdsSlopeWithPowerLost: true } } }
describe('slope', () => {
  // Robot 1:10, level 0.2 degrees = 0.00349; ADA 1:12 at the reading itself.
  const states = (gradient: number, options: Judge = holds) =>
    judged(ramp(gradient), options)
      .checks.filter((one) => one.id === 'slope')
      .map((one) => one.state)
  test.each([
    [1 / 12, 'tight', '0.0833 + 0.0035 is over 0.85 of 0.1'],
    [0.08, 'passes', '0.0835 of 0.1'],
    [0.0964, 'tight', 'at most 0.0999'],
    [0.0966, 'unsure', 'at most 0.1001'],
    [0.1036, 'fails', 'at least 0.1001'],
  ] as const)('%d is %s: %s', (gradient, state, _because) => {
    expect(states(gradient)).toEqual([state])
  })
  test('over 1:20 at the reading it asks that power lost is held', () => {
    expect(states(0.05, {})).toEqual(['passes'])
    expect(states(0.0501, {})).toEqual(['passes', 'needs-help'])
    expect(states(0.0501, holds)).toEqual(['passes'])
  })
})

const camber = (gradient: number) =>
  stretch({ features: [feature('cross-fall', { gradient: reading(gradient, 'level') }, { falls: 'left' })] }, ['step'])
rows('cross-fall', [
  ['1:48 measured is 1:48', () => camber(1 / 48), {}, 'passes'],
  ['0.0209', () => camber(0.0209), {}, 'tight'],
  ['0.0365: at most 0.04', () => camber(0.0365), {}, 'tight'],
  ['0.0366: at most 0.0401', () => camber(0.0366), {}, 'unsure'],
  ['0.0436: at least 0.0401', () => camber(0.0436), {}, 'fails'],
])

/** The same friction on every floor, dry and wet. */
function friction(mu: number) {
  const both = { dry: mu, wet: mu }
  return { friction: { smooth: both, textured: both, carpet: both } }
}

describe('traction', () => {
  const pull = (segment: Segment, options: Judge = {}) => check(judged(segment, options), 'traction')
  const wet = zone({ nearOutsideDoor: true })
  const dried = (finish: string) =>
    stretch({ words: { finish: says(finish) }, readings: { pendulum: [reading(60, 'pendulum')] } })
  test('pull before slip, wet smooth: 29 N level, 17 N on 1:12, which is under a clear tug', () => {
    const level = pull(dried('smooth'), { zone: wet })
    expect(level.capacity).toBeCloseTo(15 * 9.81 * 0.2, 6)
    expect(Math.floor(level.capacity as number)).toBe(29)
    expect(level.state).toBe('passes')
    // Not even at the gentle end: 18 N. Wet does not stand; dry does, with its condition.
    const steep = stretch(
      {
        readings: { pendulum: [reading(60, 'pendulum')] },
        features: [feature('ramp', { gradient: reading(1 / 12, 'level') }, { direction: 'up' })],
      },
      ['step'],
    )
    expect(judged(steep, { zone: wet, ...holds }).conditions).toContain('dry floor only')
    const slippery = judged(steep, { zone: wet, team: { robot: { ...friction(0.05), holdsSlopeWithPowerLost: true } } })
    expect(check(slippery, 'traction').state).toBe('fails')
    expect(slippery.verdict).toBe('do-not-use')
  })
  test.each([
    ['textured', 0.35],
    ['carpet', 0.35],
    ['unknown', 0.2],
  ])('%s wet has %d', (finish, mu) => {
    const segment = stretch({ words: { finish: says(finish) }, readings: { pendulum: [reading(60, 'pendulum')] } })
    expect(pull(segment, { zone: wet }).capacity).toBeCloseTo(15 * 9.81 * mu, 6)
  })
  test('both sides of a clear tug', () => {
    const of = (mass: number) => pull(dried('smooth'), { zone: wet, team: { robot: { mass } } }).state
    expect(of(20 / (9.81 * 0.2) / 0.85)).toBe('passes')
    expect(of(20 / (9.81 * 0.2) / 0.86)).toBe('tight')
    expect(of(20 / (9.81 * 0.2))).toBe('tight')
  })
})

describe('slip', () => {
  const wet = zone({ outdoors: true })
  const dryable = { zone: wet, team: { robot: { rainRating: 'splash' } } }
  const with_ = (value: number, finish = 'smooth') =>
    stretch({ words: { finish: says(finish) }, readings: { pendulum: [reading(value, 'pendulum')] } })
  test.each([
    // 36 for a value 3 either way.
    [46, 'passes'],
    [45, 'tight'],
    [39, 'tight'],
  ] as const)('a pendulum value of %d: %s', (value, state) => {
    expect(check(judged(with_(value), dryable), 'slip').state).toBe(state)
  })
  test('38 may be 35: wet is not known, dry stands with its condition', () => {
    const result = judged(with_(38), dryable)
    expect(result.conditions).toContain('dry floor only')
    expect(result.verdict).toBe('usable')
  })
  test('without a value: not known when wet on smooth, a caution on textured', () => {
    expect(judged(stretch(), dryable).conditions).toContain('dry floor only')
    const textured = judged(stretch({ words: { finish: says('textured') } }), dryable)
    expect(check(textured, 'slip').state).toBe('tight')
    expect(textured.verdict).toBe('with-cautions')
    expect(textured.conditions).not.toContain('dry floor only')
  })
})

const slot = (value: number, direction = 'across') =>
  stretch({ features: [feature('grating', { slot: reading(value, 'coin-gauge') }, { direction })] }, ['surface'])
const sill = (value: number) =>
  stretch({ features: [feature('gap', { gap: reading(value, 'steel-rule') }, { place: 'bridge-plate' })] }, ['step'])
rows('gap', [
  ['a slot of 10 mm', () => slot(0.01), {}, 'passes'],
  ['12.5 mm: at most 13', () => slot(0.0125), {}, 'tight'],
  ['12.6 mm: at most 13.1', () => slot(0.0126), {}, 'unsure'],
  ['13.6 mm', () => slot(0.0136), {}, 'fails'],
  ['a slot along the way', () => slot(0.008, 'along'), {}, 'tight'],
  ['a bridge plate gap of 13 mm', () => sill(0.013), {}, 'passes'],
  ['of 13.1 mm', () => sill(0.0131), {}, 'tight'],
  ['of 34 mm: at most 35', () => sill(0.034), {}, 'tight'],
  ['of 34.1 mm', () => sill(0.0341), {}, 'unsure'],
])

function edgeOf(
  kind: string,
  distance: number,
  values: Record<string, number> = {},
  guard = 'none',
  more: object = {},
): Segment {
  const others = Object.fromEntries(Object.entries(values).map(([key, value]) => [key, reading(value, 'steel-rule')]))
  return stretch({ features: [feature(kind, { distance: reading(distance), ...others }, { guard }, more)] }, ['edge'])
}
const drop = (distance: number, guard = 'none', more: object = {}) =>
  edgeOf('drop-off', distance, { height: 1 }, guard, more)
rows('edge', [
  ['a kerb at 0.60 m', () => edgeOf('kerb-edge', 0.6, { height: 0.12 }), {}, 'tight'],
  ['a kerb at 0.59 m', () => edgeOf('kerb-edge', 0.59, { height: 0.12 }), {}, 'needs-help'],
  ['a kerb at 1.00 m', () => edgeOf('kerb-edge', 1.0, { height: 0.12 }), {}, 'passes'],
  ['a kerb at 0.99 m', () => edgeOf('kerb-edge', 0.99, { height: 0.18 }), {}, 'tight'],
  ['a drop from 1.995 to 2.005 m', () => drop(2), {}, 'unsure'],
  ['a drop from 2.000 m', () => drop(2.005), {}, 'needs-help'],
  ['the same with whole help', () => drop(2.005, 'none', { help: wholeHelp }), {}, 'helped'],
  ['a drop from 3.000 m', () => drop(3.005), {}, 'needs-help'],
  ['a drop from 3.001 m', () => drop(3.006), {}, 'passes'],
  ['a drop at 0.5 m behind a rail', () => drop(0.5, 'rail'), {}, 'passes'],
  ['traffic from 1.999 m', () => edgeOf('traffic-edge', 2.004, { kerb: 0 }), {}, 'needs-help'],
  ['traffic from 2.000 m', () => edgeOf('traffic-edge', 2.005, { kerb: 0 }), {}, 'tight'],
  ['traffic from 3.001 m', () => edgeOf('traffic-edge', 3.006, { kerb: 0 }), {}, 'passes'],
  ['traffic behind a kerb of 60 mm is a kerb', () => edgeOf('traffic-edge', 1.2, { kerb: 0.06 }), {}, 'passes'],
  ['behind one of 59 mm it is not', () => edgeOf('traffic-edge', 1.2, { kerb: 0.059 }), {}, 'needs-help'],
])

rows('stop-item', [
  ['a drop wholly under 2.0 m', () => drop(1.994), {}, 'stop-item'],
  ['a rope is no guard', () => drop(1.0, 'rope'), {}, 'stop-item'],
  ['help does not let the robot lead past it', () => drop(1.0, 'none', { help: wholeHelp }), {}, 'stop-item'],
  ['led by a guide with whole help', () => drop(1.0, 'none', { ledBy: 'human-guide', help: wholeHelp }), {}, 'helped'],
  ['a kerb of 181 mm is a drop', () => edgeOf('kerb-edge', 1.2, { height: 0.181 }), {}, 'stop-item'],
  ['stairs', () => stairs({}), {}, 'stop-item'],
  ['stairs with begun help', () => stairs({ help: { role: 'porter' } }), {}, 'needs-help'],
  ['stairs with whole help', () => stairs({ help: wholeHelp }), {}, 'helped'],
  ['a magnet area by its zone', () => stretch(), { zone: zone({ words: { magnet: says('yes') } }) }, 'stop-item'],
])

function stairs(more: object): Segment {
  return stretch(
    {
      features: [feature('stairs', { risers: reading(2, 'by-eye') }, { direction: 'up', wayRound: 'the lift' }, more)],
    },
    ['step'],
  )
}

describe('crowd', () => {
  const busy = (flow: string, crowd = 'busy') => ({ zone: zone({}, { crowd, flow }) })
  const of = (value: number, options: Judge) =>
    judged(stretch({ readings: { width: [reading(value)] } }), options).checks.filter((one) => one.id === 'crowd')
  test('band 1 has none, band 2 a caution, with the width for one oncoming person where two-way', () => {
    expect(of(1.8, busy('two-way', 'few'))).toHaveLength(0)
    expect(of(1.2, busy('one-way')).map(({ state, ratio }) => [state, ratio])).toEqual([['tight', null]])
    // 0.713 + 0.20 + 0.90 = 1.813.
    expect(of(1.818, busy('two-way')).map((one) => one.state)).toEqual(['tight'])
    expect(of(1.817, busy('two-way')).map((one) => one.state)).toEqual(['unsure'])
    expect(of(1.807, busy('two-way')).map((one) => one.state)).toEqual(['fails'])
  })
  test('band 3 is with help', () => {
    expect(of(2.5, busy('one-way', 'packed')).map((one) => one.state)).toEqual(['tight', 'needs-help'])
  })
})

describe('noise', () => {
  // Sound meter 5 dB.
  test.each([
    [50, 'passes', 0.8],
    [50.1, 'tight', 0.8],
    [60, 'tight', 0.8],
    [60.1, 'tight', 1.2],
    [68.1, 'tight', 1.2],
  ] as const)('a meter at %d dB(A): %s, reaction %d s', (level, state, reaction) => {
    const result = judged(stretch(), { zone: zone({}, {}, [reading(level, 'sound-meter')]) })
    expect(check(result, 'noise').state).toBe(state)
    const { at, demand } = check(result, 'stop')
    const pace = at?.pace ?? 0
    expect(demand).toBeCloseTo(pace * reaction + (pace * pace) / 3 + 0.15, 6)
  })
})

describe('sensing', () => {
  const of = (segment: Segment, options: Judge = {}) =>
    judged(segment, options)
      .checks.filter((one) => one.id === 'sensing')
      .map((one) => one.state)
  const glass = () => stretch({ features: [feature('glass', {}, { marks: 'none' })] }, ['sensing'])
  test('glass by the flag of the card', () => {
    expect(of(glass())).toEqual(['tight'])
    expect(
      of(glass(), { team: { robot: { senses: { glass: true, darkFloor: false, overhangs: false, drops: false } } } }),
    ).toEqual([])
  })
  test("a rope across is the helper's", () => {
    const rope = (place: string) =>
      stretch({ features: [feature('rope', { lowest: reading(0.9) }, { place })] }, ['sensing'])
    expect(of(rope('across'))).toEqual(['needs-help'])
    expect(of(rope('beside'))).toEqual(['tight'])
  })
  test('let go: a caution, with help near an edge, on a slope over 1:20 and in a crowd', () => {
    const unknown: Judge = { team: { robot: { onLetGo: 'unknown', holdsSlopeWithPowerLost: true } } }
    expect(of(stretch(), unknown)).toEqual(['tight'])
    expect(of(drop(0.5, 'rail'), unknown)).toEqual(['needs-help'])
    expect(of(ramp(0.05), unknown)).toEqual(['tight'])
    expect(of(ramp(0.0501), unknown)).toEqual(['needs-help'])
    expect(of(stretch(), { ...unknown, zone: zone({}, { crowd: 'busy' }) })).toEqual(['needs-help'])
  })
  test('no rain rating fails outdoors when wet, so that only a dry floor stands', () => {
    const outdoors = zone({ outdoors: true })
    const textured = () =>
      stretch({ words: { finish: says('textured') }, readings: { pendulum: [reading(60, 'pendulum')] } })
    expect(judged(textured(), { zone: outdoors }).conditions).toContain('dry floor only')
    expect(judged(textured(), { zone: outdoors, team: { robot: { rainRating: 'splash' } } }).conditions).not.toContain(
      'dry floor only',
    )
  })
})
