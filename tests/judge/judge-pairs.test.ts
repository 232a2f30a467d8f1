import { describe, expect, test } from 'vitest'
import { lowPoint } from '../../src/judge/checks/slack-leash.ts'
import type { SegmentResult } from '../../src/judge/result.ts'
import type { Feature, Segment } from '../../src/record/survey.ts'
import { check, feature, type Judge, judged, judgedWalk, reading, stretch, wholeHelp, zone } from './build.ts'

/** Checks that depend on leash and pace, on both sides of their boundary. One length is on offer where the figure asks. */
const one = (length: number) => ({ leash: { lengths: [length] } })
const stands = { standsWhenSlack: { name: 'C. Trainer', date: '2026-10-01' } }

describe('stop', () => {
  test('0.7 m/s quiet: 0.873 with slack for 1.048 behind a robot on 1.2 m', () => {
    const { demand, capacity, ratio, at, state } = check(judged(stretch(), { team: one(1.2) }), 'stop')
    expect(at).toEqual({ leash: 1.2, pace: 0.7 })
    expect(demand).toBeCloseTo(0.8733, 4)
    expect(capacity).toBeCloseTo(1.0478, 3)
    expect(ratio?.[1]).toBeCloseTo(0.8335, 3)
    expect(state).toBe('passes')
  })

  test("a shorter leash walks slower, and none is advised above the handler's own pace", () => {
    // 0.8 m: 0.5233 for 0.6194 at 0.40 m/s is 0.845; at 0.45 it is 0.932.
    expect(judged(stretch(), { team: one(0.8) }).pace).toBe(0.4)
    expect(judged(stretch(), { team: { leash: { lengths: [1.8] }, handler: { pace: 0.55 } } }).pace).toBe(0.55)
  })

  test('slow to react, or a crowd, takes 1.2 s', () => {
    const slow = check(judged(stretch(), { team: { ...one(1.8), handler: { slowToReact: true } } }), 'stop')
    expect(slow.demand).toBeCloseTo(0.7 * 1.2 + 0.49 / 3 + 0.15, 9)
    const busy = check(judged(stretch(), { team: one(1), zone: zone({}, { crowd: 'busy' }) }), 'stop')
    expect(busy.demand).toBeCloseTo(0.4 * 1.2 + 0.16 / 3 + 0.15, 9)
  })

  test('downhill takes g sin from the braking; where nothing is left, nothing holds', () => {
    const down = (deceleration: number) =>
      judged(
        stretch({ features: [feature('ramp', { gradient: reading(0.08, 'level') }, { direction: 'down' })] }, ['step']),
        { team: { ...one(1.8), handler: { deceleration }, robot: { holdsSlopeWithPowerLost: true } } },
      )
    const alpha = Math.atan(0.08 + Math.tan((0.2 * Math.PI) / 180))
    const found = check(down(1.5), 'stop')
    const pace = found.at?.pace as number
    expect(found.demand).toBeCloseTo(pace * 0.8 + (pace * pace) / (2 * (1.5 - 9.81 * Math.sin(alpha))) + 0.15, 6)
    const hopeless = down(0.8)
    expect(hopeless.verdict).toBe('do-not-use')
    expect(check(hopeless, 'stop').ratio).toEqual([null, null])
  })

  test("the robot's own run-out counts only where its braking is measured, and stop-at-edge comes with it", () => {
    const kerb = () =>
      stretch({ features: [feature('kerb', { height: reading(0.01, 'steel-rule') }, { direction: 'up' })] }, ['step'])
    const without = judged(kerb(), { team: one(1.2) })
    expect(without.checks.some((one) => one.id === 'stop-at-edge')).toBe(false)
    const measured = judged(kerb(), { team: { ...one(1.2), robot: { hardestBraking: 3 } } })
    // 0.49 / (2 x 3) = 0.0817 more.
    expect(check(measured, 'stop').capacity).toBeCloseTo((check(without, 'stop').capacity as number) + 0.49 / 6, 6)
    // S_min + 0.325 + 0.15 + 0.15 - 0.175 - 0.15.
    expect(check(measured, 'stop-at-edge').capacity).toBeCloseTo(1.3978 + 0.325 + 0.15 + 0.15 - 0.175 - 0.15, 3)
  })
})

const door = (words: Record<string, string>, values: Record<string, number> = {}, more: Partial<Feature> = {}) =>
  stretch(
    {
      features: [
        feature(
          'hinged-door',
          {
            clearWidth: reading(1.2, 'door-tape'),
            force: reading(values.force ?? 20, 'force-gauge'),
            closedRoom: reading(values.closedRoom ?? 0.6),
            ...(values.hold === undefined ? {} : { hold: reading(values.hold, 'stopwatch') }),
          },
          { position: 'ahead', action: 'pull', keptOpen: 'stays', robotPlace: 'yes', fire: 'no', ...words },
          more,
        ),
      ],
    },
    ['door'],
  )

describe('doors', () => {
  const timed = (hold: number, more: Partial<Feature> = {}) =>
    judged(door({ keptOpen: 'closer' }, { hold }, more), { team: one(1.2) })
  // 0.8 + 1.0 + (1.592 + 0.65) / 0.455 = 6.728 s; stopwatch 0.5 s.
  const needed = 1.8 + (Math.sqrt(1.88 * 1.88 - 1) + 0.325 + 0.15 + 0.175) / 0.455
  test.each([
    [needed / 0.85 + 0.51, 'passes'],
    [needed / 0.85 + 0.49, 'tight'],
    [needed + 0.51, 'tight'],
    [needed + 0.49, 'unsure'],
    [needed - 0.51, 'fails'],
  ])('door-time: a hold of %d s is %s', (hold, state) => {
    expect(check(timed(hold), 'door-time').state).toBe(state)
  })
  test('no limit where it stays, and help settles a hold that is too short', () => {
    expect(judged(door({ keptOpen: 'stays' })).checks.some((one) => one.id === 'door-time')).toBe(false)
    expect(check(timed(3, { help: wholeHelp }), 'door-time').state).toBe('helped')
    expect(timed(3, { help: wholeHelp }).verdict).toBe('with-help')
  })
  test('a closing door is given no time by a slower walk than 0.455 m/s', () => {
    const slow = check(
      judged(door({ keptOpen: 'closer' }, { hold: 30 }), { team: { ...one(1.2), handler: { pace: 0.3 } } }),
      'door-time',
    )
    expect(slow.demand).toBeCloseTo(1.8 + (Math.sqrt(1.88 * 1.88 - 1) + 0.65) / 0.3, 6)
  })
  test('door-force: you open it; else somebody does', () => {
    const force = (value: number, opensDoors: boolean | null) =>
      check(judged(door({}, { force: value }), { team: { handler: { opensDoors } } }), 'door-force')
    expect(force(22.2, true).caution).toBe('You open it.')
    expect(force(22.3, true)).toMatchObject({ caution: 'Heavy door.', source: 'ADA 404.2.9', state: 'tight' })
    expect(force(20, false).state).toBe('needs-help')
    const silent = judged(door({}), { team: { handler: { opensDoors: null } } })
    expect(silent.verdict).toBe('not-known')
    expect(silent.why.map((one) => one.kind)).toContain('card')
  })
  test('a fire door found held open is judged shut as well', () => {
    const held = (more: Partial<Feature>, fire = 'yes') => judged(door({ keptOpen: 'stop', fire }, {}, more))
    expect(held({}, 'no').verdict).toBe('with-cautions')
    expect(held({}, 'no').checks.some((one) => one.id === 'door-force')).toBe(false)
    expect(held({}).verdict).toBe('not-known')
    expect(held({ help: wholeHelp }).verdict).toBe('with-help')
    const unmeasured = door({ keptOpen: 'stop', fire: 'yes' }, {}, { help: wholeHelp })
    const feature0 = unmeasured.features[0] as Feature
    const { closedRoom, ...rest } = feature0.readings
    expect(closedRoom).toHaveLength(1)
    expect(judged({ ...unmeasured, features: [{ ...feature0, readings: rest }] }).verdict).toBe('not-known')
  })
  test("door-room: a place for the robot is the team's, the room beside the latch the pack's", () => {
    const room = (closedRoom: number, words: Record<string, string> = {}) =>
      check(judged(door(words, { closedRoom })), 'door-room')
    expect(room(0.455).state).toBe('passes')
    expect(room(0.454)).toMatchObject({ state: 'tight', source: 'ADA 404.2.4.1' })
    expect(room(0.1, { action: 'push' }).state).toBe('passes')
    expect(room(0.6, { robotPlace: 'no' }).state).toBe('fails')
  })
})

const lift = (values: Record<string, number>, words: Record<string, string> = {}, more: Partial<Feature> = {}) =>
  stretch(
    {
      features: [
        feature(
          'lift',
          {
            clearWidth: reading(0.95, 'door-tape'),
            carDepth: reading(values.carDepth ?? 2),
            carWidth: reading(1.4),
            hold: reading(values.hold ?? 20, 'stopwatch'),
            sillGap: reading(0.01, 'steel-rule'),
          },
          { position: 'ahead', wayOut: 'through', ...words },
          more,
        ),
      ],
    },
    ['door'],
  )
const ownWay = { team: { ...one(1.2), handler: { ownWayThroughLifts: { name: 'C. Trainer', date: '2026-10-01' } } } }

describe('lifts', () => {
  const fitOf = (result: SegmentResult) => result.checks.find((one) => one.id === 'lift-fit')
  test("lift-fit: 1.10 m gathered and 0.20 in the car's depth", () => {
    expect(fitOf(judged(lift({ carDepth: 1.306 }), ownWay))?.state).toBe('tight')
    expect(fitOf(judged(lift({ carDepth: 1.304 }), ownWay))?.state).toBe('unsure')
    expect(fitOf(judged(lift({ carDepth: 1.294 }, {}, { help: wholeHelp }), ownWay))?.state).toBe('fails')
    expect(fitOf(judged(lift({ carDepth: 1.54 }), ownWay))?.state).toBe('passes')
  })
  test("lift-time: with help unless the handler's own way is shown, then as a door", () => {
    // 1.8 + 1.1 / 0.455 = 4.218 s; stopwatch 0.5 s.
    const time = (hold: number) => check(judged(lift({ hold }), ownWay), 'lift-time').state
    expect(time(4.73)).toBe('tight')
    expect(time(4.71)).toBe('unsure')
    expect(time(3.71)).toBe('fails')
    expect(check(judged(lift({})), 'lift-time').state).toBe('needs-help')
    expect(judged(lift({}, {}, { help: wholeHelp })).verdict).toBe('with-help')
  })
  test('backing out must be shown', () => {
    const backs = (shown: string) => judged(lift({}, { wayOut: 'backs-out', backsOutShown: shown }), ownWay)
    expect(backs('no').verdict).toBe('not-known')
    expect(backs('yes').verdict).toBe('with-cautions')
  })
})

const corner = (w1: number, w2: number, degrees = 90, more: Partial<Segment> = {}) => [
  stretch({
    readings: { width: [reading(w1)] },
    turn: feature('turn', { angle: reading((degrees * Math.PI) / 180, 'square') }),
    ...more,
  }),
  stretch({ readings: { width: [reading(w2)] } }),
]

describe('turn', () => {
  const at = (segments: Segment[], options: Judge) => judgedWalk(segments, options).segments[0] as SegmentResult
  test('room goes by millimetres: fails under 0.05 m, clear from 0.10 m', () => {
    // The double at 1.2 m: 0.57 w - 0.278 x 1.592 - 0.2816, tape 5 mm, 3 mm off for the square.
    const room = (w: number) => 0.57 * w - 0.278 * Math.sqrt(1.88 * 1.88 - 1) - 0.2816
    const need = (m: number) => (m + 0.278 * Math.sqrt(1.88 * 1.88 - 1) + 0.2816) / 0.57
    expect(room(need(0.05))).toBeCloseTo(0.05, 9)
    const state = (w: number) => check(at(corner(w, w), { team: one(1.2) }), 'turn').state
    expect(state(need(0.103) + 0.0051)).toBe('passes')
    expect(state(need(0.103) + 0.0049)).toBe('tight')
    expect(state(need(0.053) + 0.0051)).toBe('tight')
    expect(state(need(0.053) + 0.0049)).toBe('unsure')
    expect(state(need(0.05) - 0.0051)).toBe('fails')
  })

  test('a frame fails under 0.813 m and is clear from 0.913 m; with the bag in front under 0.713 m', () => {
    const frame = (p: number, options: Judge = { team: one(1.2) }) =>
      check(
        judged(
          stretch({ features: [feature('opening', { clearWidth: reading(p, 'door-tape') }, { position: 'ahead' })] }),
          options,
        ),
        'turn',
      ).state
    expect(frame(0.923)).toBe('passes')
    expect(frame(0.922)).toBe('tight')
    expect(frame(0.823)).toBe('tight')
    expect(frame(0.822)).toBe('unsure')
    expect(frame(0.802)).toBe('fails')
    const front = { team: { leash: { lengths: [1.5] }, handler: { bag: 'in-front' as const } } }
    expect(frame(0.723, front)).toBe('tight')
    expect(frame(0.722, front)).toBe('unsure')
  })

  test('a pause counts only where standing is shown, and is a caution', () => {
    // The double gains 0.04 m by a pause.
    const w = (0.03 + 0.278 * Math.sqrt(1.88 * 1.88 - 1) + 0.2816) / 0.57
    const taut = at(corner(w, w), { team: one(1.2) })
    expect(taut.verdict).toBe('do-not-use')
    const gathers = { ...stands, gathersLeash: true }
    const paused = at(corner(w, w), { team: { ...one(1.2), handler: gathers } })
    expect(paused.verdict).toBe('with-cautions')
    expect(paused.pauses).toBe(1)
    expect(check(paused, 'turn').state).toBe('tight')
    expect(paused.checks.some((one) => one.id === 'slack-leash')).toBe(true)
    // The leash would lie on the floor, and nobody gathers it.
    expect(at(corner(w, w), { team: { ...one(1.2), handler: stands } }).verdict).toBe('do-not-use')
    // None in a two-way crowd, on a ramp, or near an edge.
    const crowd = zone({}, { crowd: 'busy', flow: 'two-way' })
    expect(at(corner(w, w), { team: { leash: { lengths: [1] }, handler: gathers }, zone: crowd }).pauses).toBe(0)
    const edge = feature('drop-off', { distance: reading(2.5), height: reading(1) }, { guard: 'rail' })
    expect(at(corner(w, w, 90, { features: [edge] }), { team: { ...one(1.2), handler: gathers } }).pauses).toBe(0)
  })

  test('a bend under 15 degrees is none, one over 150 asks for a U-turn', () => {
    expect(at(corner(1.5, 1.5, 10), {}).checks.some((one) => one.id === 'turn')).toBe(false)
    expect(at(corner(1.5, 1.5, 170), {}).verdict).toBe('not-known')
  })

  test('an angle by the gyro is tried at both ends', () => {
    const gyro = (w: number) => [
      stretch({ readings: { width: [reading(w)] }, turn: feature('turn', { angle: reading(Math.PI / 2, 'gyro') }) }),
      stretch({ readings: { width: [reading(w)] } }),
    ]
    const square = check(at(corner(1.6, 1.6), { team: one(1.2) }), 'turn').ratio as [number, number]
    const wide = check(at(gyro(1.6), { team: one(1.2) }), 'turn').ratio as [number, number]
    expect(wide[0]).toBeLessThan(square[0])
    expect(wide[1]).toBeGreaterThan(square[1])
  })
})

describe('slack-leash', () => {
  test('the low point hangs half of what the leash is longer than its span', () => {
    // (0.75 + 0.40 - sqrt(1.44 - 1.0)) / 2
    expect(lowPoint(1.2, 1, 0.75, 0.4)).toBeCloseTo(0.2433, 4)
    expect(lowPoint(1.2, 1.2, 0.75, 0.4)).toBeCloseTo(0.575, 9)
    expect(lowPoint(1.2, 0.2, 0.75, 0.4)).toBeLessThan(0)
  })
})
