import { describe, expect, test } from 'vitest'
import { judgeSurvey, runToEnd } from '../../src/judge/judge.ts'
import type { Segment } from '../../src/record/survey.ts'
import {
  card,
  check,
  doublePlanner,
  feature,
  judgedWalk,
  on,
  reading,
  says,
  stretch,
  survey,
  walkOf,
  wholeHelp,
  zone,
} from './build.ts'

const straight = (more: Partial<Segment> = {}) => stretch(more)
const corner = (w: number) =>
  stretch({ readings: { width: [reading(w)] }, turn: feature('turn', { angle: reading(Math.PI / 2, 'square') }) })

describe('one length for the walk', () => {
  test('worst first by r_high: without a turn the longest, with a tight corner the one that it leaves', () => {
    expect(judgedWalk([straight(), straight()])).toMatchObject({ leash: 1.8, pace: 0.7, changes: [] })
    const walk = judgedWalk([straight(), corner(1.2), straight({ readings: { width: [reading(1.2)] } })])
    expect(walk).toMatchObject({ leash: 0.8, pace: 0.4, verdict: 'with-cautions', governing: 'turn' })
    // One pace for the walk, the lowest: every part is shown at it.
    for (const segment of walk.segments) expect(check(segment, 'stop').at).toEqual({ leash: 0.8, pace: 0.4 })
  })

  test('where none serves, the fewest changes, at standing places', () => {
    // The tight corner takes 0.8 m at most; slow to react, the downhill takes more than that.
    const hill = straight({
      features: [feature('ramp', { gradient: reading(0.09, 'level') }, { direction: 'down' })],
      words: { step: says('listed') },
    })
    const steep = { robot: { holdsSlopeWithPowerLost: true }, handler: { deceleration: 1.0 } }
    const segments = [straight(), corner(1.2), straight({ readings: { width: [reading(1.2)] } }), hill]
    const walk = judgedWalk(segments, { team: { ...steep, leash: { lengths: [0.8, 1.8] } } })
    expect(walk.changes).toEqual([{ segment: hill.id, leash: 1.8 }])
    expect(walk.leash).toBe(0.8)
    expect(walk.ladder.best).toBeNull()
    // Not changeable: one of the two is shown with a length that does not hold.
    const fixed = judgedWalk(segments, { team: { ...steep, leash: { lengths: [0.8, 1.8], changeable: false } } })
    expect(fixed.changes).toEqual([])
    expect(fixed.verdict).toBe('do-not-use')
  })

  test('parts led otherwise ask for no length', () => {
    const led: Segment = { ...straight(), ledBy: 'human-guide', help: wholeHelp }
    expect(judgedWalk([straight(), led])).toMatchObject({ leash: 1.8, verdict: 'with-help', score: null })
  })
})

describe('the worst rules', () => {
  test("of segments and of the walk's own checks", () => {
    const narrow = straight({ readings: { width: [reading(0.95)] } })
    expect(judgedWalk([straight(), narrow]).verdict).toBe('with-cautions')
    expect(judgedWalk([straight(), narrow, straight({ readings: { width: [reading(0.5)] } })])).toMatchObject({
      verdict: 'do-not-use',
      governing: 'straight-width',
      score: 0,
      leash: null,
      pace: null,
    })
  })
  test('a walk without parts is not known', () => {
    expect(judgedWalk([]).verdict).toBe('not-known')
  })
})

describe('battery', () => {
  // 100 m at 0.7 m/s is 142.9 s, 185.7 s with reserve; lengths in lays 1 %.
  const of = (minutes: number) => {
    const walk = judgedWalk([straight({ readings: { length: [reading(100, 'tape-in-lays')] } })], {
      team: { robot: { batteryMinutes: minutes } },
    })
    return { ...walk, battery: check(walk, 'battery') }
  }
  const needed = ((101 / 0.7) * 1.3) / 60
  test('walking with a reserve of 1.3 for 70 % of the rated time', () => {
    expect(of(90).battery.demand).toBeCloseTo(needed * 60, 6)
    expect(of(90).battery.capacity).toBe(90 * 60 * 0.7)
    expect(of(needed / 0.7 / 0.84).battery.state).toBe('passes')
    expect(of(needed / 0.7 / 0.86).battery.state).toBe('tight')
    expect(of(needed / 0.7 / 1.001).battery.state).toBe('unsure')
    expect(of(needed / 0.7 / 1.03)).toMatchObject({ verdict: 'do-not-use', governing: 'battery' })
  })
})

describe('emergency', () => {
  const of = (word: string | null, alarm: object | undefined = wholeHelp) => {
    const words = word === null ? {} : { wayOut: says(word) }
    const { alarm: _, ...rest } = walkOf([straight()], { words })
    const whole = alarm ? { ...rest, alarm } : rest
    return runToEnd(judgeSurvey(survey([whole]), { planner: doublePlanner, on, team: card() })).walks[0]
  }
  test('a way out that needs neither robot nor lift, else a role, else do not use; unanswered is not known', () => {
    expect(of('yes')?.verdict).toBe('usable')
    expect(of('lift')?.verdict).toBe('with-help')
    expect(of('lift', { role: 'porter' })?.verdict).toBe('not-known')
    expect(of('robot', {})?.verdict).toBe('do-not-use')
    expect(of('none', {})?.governing).toBe('emergency')
    expect(of(null)?.verdict).toBe('not-known')
    expect(of(null)?.why[0]?.kind).toBe('unanswered')
  })
})

describe('the assessment', () => {
  test('says for whom, when and with what, and that it certifies nothing', () => {
    const found = runToEnd(
      judgeSurvey(survey([walkOf([straight()])]), { planner: doublePlanner, on, team: card(), code: 'iso-21542' }),
    )
    expect(found).toMatchObject({
      venue: 'test hall',
      team: { name: 'default team', version: '1' },
      code: 'iso-21542',
      on,
    })
    expect(found.cautions.join(' ')).toMatch(/Local codes.*precedence/)
    expect(found.cautions.join(' ')).toMatch(/certifies nothing/)
  })
  test("there is no clock: a day must be given, unless it is a demo's own", () => {
    expect(() => runToEnd(judgeSurvey(survey([]), { planner: doublePlanner }))).toThrow(/no-day/)
    const demo = survey([], [zone()], { demo: true, asOn: '2026-05-01' })
    expect(runToEnd(judgeSurvey(demo, { planner: doublePlanner, on })).on).toBe('2026-05-01')
  })
  test('one walk alone, and a walk that is not there', () => {
    const two = survey([walkOf([straight()]), walkOf([straight()], { id: 'w2' })])
    expect(runToEnd(judgeSurvey(two, { planner: doublePlanner, on, walk: 'w2' })).walks.map((one) => one.id)).toEqual([
      'w2',
    ])
    expect(() => runToEnd(judgeSurvey(two, { planner: doublePlanner, on, walk: 'w3' }))).toThrow(/no-walk/)
  })
  test('progress counts up to its total, and everything is plain data', () => {
    const judgement = judgeSurvey(survey([walkOf([straight(), straight()])]), { planner: doublePlanner, on })
    const seen: number[] = []
    let step = judgement.next()
    while (!step.done) {
      seen.push(step.value.done)
      expect(step.value.total).toBe(4)
      step = judgement.next()
    }
    expect(seen).toEqual([0, 1, 2, 3])
    expect(JSON.parse(JSON.stringify(step.value))).toEqual(step.value)
  })
})
