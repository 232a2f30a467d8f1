import { describe, expect, test } from 'vitest'
import { judgeSurvey, runToEnd } from '../../src/judge/judge.ts'
import type { Override, Segment } from '../../src/record/survey.ts'
import {
  card,
  check,
  doublePlanner,
  feature,
  judged,
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

/** Overrides, cards, help and pauses that reached further than they were given for. */

const square = Math.PI / 2
const stands = { standsWhenSlack: { name: 'C. Trainer', date: '2026-10-01' } }

describe('overrides', () => {
  const spoken = (more: Partial<Override> = {}): Override => ({
    id: 'x',
    segment: 's',
    verdict: 'usable',
    reason: 'walked it twice',
    name: 'D. Specialist',
    role: 'O&M specialist',
    until: '2027-01-01',
    ...more,
  })
  const verdictOf = (segment: Segment, override: Override) =>
    judgedWalk([{ ...segment, id: 's' }], {}, { overrides: [override] }).segments[0]?.verdict
  /** For the team and leash that the part is judged with. */
  const whole = (segment: Segment) => {
    const leash = judged(segment).checks.find((one) => one.at !== null)?.at?.leash as number
    return spoken({ team: '1', leash })
  }
  const narrow = () => stretch({ readings: { width: [reading(0.85)] } })

  test('one that names no team or no leash is carried to none', () => {
    const { leash = 0, ...rest } = whole(narrow())
    expect(verdictOf(narrow(), { ...rest, leash })).toBe('usable')
    expect(verdictOf(narrow(), rest)).toBe('do-not-use')
    expect(verdictOf(narrow(), spoken({ leash }))).toBe('do-not-use')
  })

  const drop = feature('drop-off', { distance: reading(2), height: reading(1) }, { guard: 'none' })
  test.each([
    ['of an edge that may be within reach', stretch({ features: [drop] }, ['edge'])],
    ['of a thing that no catalogue knows', stretch({ features: [feature('trapdoor')] })],
    ['of an edge that somebody told', stretch({ words: { edge: says('none', 'told') } })],
    ['of a head height by eye', stretch({ readings: { overhead: [reading(9, 'by-eye')] } })],
  ])('%s it goes no further than with help', (_, segment) => {
    expect(judged(segment).verdict).toBe('not-known')
    expect(verdictOf(segment, whole(segment))).toBe('with-help')
  })
})

describe('the card', () => {
  test.each(['standsWhenSlack', 'ownWayThroughLifts'] as const)('%s "shown" to nobody is not shown', (field) => {
    const nobody = { name: ' ', date: '2026-10-01' }
    const lift = feature(
      'lift',
      {
        clearWidth: reading(1.2),
        carDepth: reading(2.5),
        carWidth: reading(2),
        hold: reading(30, 'stopwatch'),
        sillGap: reading(0.01, 'steel-rule'),
      },
      { position: 'ahead', wayOut: 'through' },
    )
    const corner = feature('turn', { angle: reading(square, 'square') })
    const segments = () =>
      field === 'standsWhenSlack'
        ? [
            stretch({ readings: { width: [reading(0.95)] }, turn: corner }),
            stretch({ readings: { width: [reading(0.95)] } }),
          ]
        : [stretch({ features: [lift] }, ['door'])]
    const team = (shown: { name: string; date: string } | null) => ({ team: { handler: { [field]: shown } } })
    const verdict = (shown: { name: string; date: string } | null) =>
      judgedWalk(segments(), team(shown)).segments[0]?.verdict
    expect(verdict(nobody)).toBe(verdict(null))
    expect(verdict({ name: 'C', date: '2026-10-01' })).not.toBe(verdict(null))
  })

  test('a leash that cannot be changed is not shortened in the crowd', () => {
    // A steep way down holds with the long leash alone; the crowd past it allows the short one alone.
    const down = feature('ramp', { gradient: reading(0.1, 'level-turned') }, { direction: 'down' })
    const wide = { width: [reading(3)] }
    const quiet = stretch({ readings: wide, features: [down] }, ['step'])
    const crowded = stretch({ readings: wide, zone: 'busy' })
    const grip = { dry: 0.9, wet: 0.9 }
    const team = (changeable: boolean) =>
      card({
        robot: { slope: 0.2, holdsSlopeWithPowerLost: true, friction: { smooth: grip, textured: grip, carpet: grip } },
        handler: { deceleration: 1.05, slowToReact: true },
        leash: { lengths: [0.8, 1.5], changeable },
      })
    const busy = { ...zone({}, { crowd: 'busy' }), id: 'busy' }
    const judgedWith = (changeable: boolean) =>
      runToEnd(
        judgeSurvey(survey([walkOf([quiet, crowded])], [zone(), busy]), {
          planner: doublePlanner,
          on,
          team: team(changeable),
        }),
      ).walks[0]
    expect(judgedWith(true)?.changes).toHaveLength(1)
    expect(judgedWith(true)?.verdict).toBe('with-cautions')
    expect(judgedWith(false)?.verdict).toBe('do-not-use')
  })
})

describe('help', () => {
  test('help of the stretch for something else leads nobody down the stairs', () => {
    const stairs = feature('stairs', { risers: reading(5, 'told') }, { direction: 'down', wayRound: 'the lift' })
    expect(judged(stretch({ help: wholeHelp, features: [stairs] }, ['step'])).verdict).toBe('do-not-use')
    const led = { ...stairs, ledBy: 'human-guide' as const }
    expect(judged(stretch({ help: wholeHelp, features: [led] }, ['step'])).verdict).toBe('with-help')
    const own = { ...stairs, help: wholeHelp }
    expect(judged(stretch({ features: [own] }, ['step'])).verdict).toBe('with-help')
  })
})

describe('slack pauses', () => {
  const corner = () => feature('turn', { angle: reading(square, 'square') })
  const narrow = { width: [reading(0.95)] }
  const first = () => stretch({ readings: narrow, turn: corner() })
  const pausesAt = (next: ReturnType<typeof stretch>, before = first()) =>
    judgedWalk([before, next], { team: { handler: { ...stands, gathersLeash: true } } }).segments[0]?.pauses

  test('none at a corner past which stairs, an edge, a road, a lift or a ramp begin', () => {
    expect(pausesAt(stretch({ readings: narrow }))).toBeGreaterThan(0)
    const stairs = feature(
      'stairs',
      { risers: reading(5, 'told') },
      { direction: 'down', wayRound: 'lift' },
      { along: 1 },
    )
    const road = feature('road-crossing', { width: reading(6) }, { signal: 'none', wayRound: 'guide' }, { along: 0.5 })
    const drop = feature('drop-off', { distance: reading(2.5), height: reading(1) }, { guard: 'none' })
    const ramp = feature('ramp', { gradient: reading(0.06, 'level') }, { direction: 'down' }, { along: 0.5 })
    for (const near of [stairs, road, drop, ramp])
      expect(
        pausesAt(stretch({ readings: narrow, features: [near], ledBy: near === stairs ? 'human-guide' : 'robot' })),
      ).toBe(0)
  })

  test('stairs three metres past the corner forbid none', () => {
    const stairs = feature(
      'stairs',
      { risers: reading(5, 'told') },
      { direction: 'down', wayRound: 'lift' },
      { along: 3 },
    )
    expect(pausesAt(stretch({ readings: narrow, features: [stairs] }))).toBeGreaterThan(0)
  })
})

describe('turns and doors', () => {
  test('a side door far before the corner does not stand for it', () => {
    const door = (along?: number) =>
      feature(
        'opening',
        { clearWidth: reading(1.8), wallThickness: reading(0.1) },
        { position: 'left' },
        along === undefined ? {} : { along },
      )
    const turn = () => feature('turn', { angle: reading(square, 'square') })
    const at = (along?: number) =>
      judgedWalk([stretch({ features: [door(along)], turn: turn() }), stretch()]).segments[0]?.checks.filter(
        (one) => one.id === 'turn',
      ).length
    expect(at(8)).toBe(1)
    expect(at()).toBe(1)
    expect(at(2)).toBe(2)
  })

  test('a turn at the end of the walk with a way measured past it is a corner', () => {
    const turn = feature('turn', { angle: reading(square, 'square'), widthAfter: reading(0.8) })
    expect(check(judged(stretch({ turn })), 'turn').state).toBe('fails')
  })

  test('an observation by a meter alone grows old too', () => {
    const place = zone({}, {}, [reading(45, 'sound-meter', { time: '2024-01-01T09:00:00Z' })])
    delete place.observations[0]?.words.noise
    expect(judged(stretch(), { zone: place }).verdict).toBe('not-known')
    expect(on).toBe('2026-11-30')
  })
})
