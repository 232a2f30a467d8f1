import { describe, expect, test } from 'vitest'
import type { Answer, Help, Segment } from '../../src/record/survey.ts'
import { feature, type Judge, judged, judgedWalk, reading, says, stretch, wholeHelp, zone } from './build.ts'

const kinds = (segment: Segment, options: Judge = {}) => judged(segment, options).why.map((one) => one.kind)

describe('the five words, first that applies', () => {
  test('a plain stretch with everything answered is usable', () => {
    const result = judged(stretch())
    expect(result.verdict).toBe('usable')
    expect(result.governing).toBe('stop')
    expect(result.why).toEqual([])
    expect(result.missing).toEqual([])
    expect(result.conditions).toEqual(['09:00 to 17:00'])
  })

  test('a failing check is do not use, whatever else is missing; everything missing is still listed', () => {
    const narrow = stretch({ readings: { width: [reading(0.8)] } })
    const { edge, ...words } = narrow.words
    expect(edge).toBeDefined()
    const result = judged({ ...narrow, words })
    expect(result.verdict).toBe('do-not-use')
    expect(result.governing).toBe('straight-width')
    expect(result.missing).toEqual(['edge'])
    expect(result.score).toBe(0)
    expect(result.sentence).toMatch(/^Width at .* governs: 795 mm for 913 mm with clearance\.$/)
  })

  test('an unanswered aspect is not known, not even with a caution', () => {
    for (const item of [
      'overhead',
      'step',
      'edge',
      'finish',
      'wetness',
      'slots',
      'door',
      'sensing',
      'shoreline',
      'end-sign',
    ]) {
      const whole = stretch()
      const { [item]: gone, ...words } = whole.words
      expect(gone).toBeDefined()
      expect(judged({ ...whole, words }).verdict, item).toBe('not-known')
    }
    for (const quantity of ['length', 'width', 'overhead']) {
      const whole = stretch()
      const { [quantity]: gone, ...readings } = whole.readings
      expect(gone).toHaveLength(1)
      expect(judged({ ...whole, readings }).verdict, quantity).toBe('not-known')
    }
  })

  test('"listed" with nothing listed is no answer, and neither is a word outside the item', () => {
    expect(judged(stretch({ words: { step: says('listed') } })).verdict).toBe('not-known')
    expect(judged(stretch({ words: { finish: says('marbled') } })).verdict).toBe('not-known')
  })

  test('a kind that the catalogue does not know is not known', () => {
    expect(judged(stretch({ features: [feature('hover-field')] })).verdict).toBe('not-known')
  })

  test('help over cautions over usable', () => {
    const edge = () =>
      feature('drop-off', { distance: reading(2.5), height: reading(1) }, { guard: 'none' }, { help: wholeHelp })
    expect(judged(stretch({ features: [edge()] }, ['edge'])).verdict).toBe('with-help')
    expect(
      judged(stretch({ features: [edge(), feature('glass', {}, { marks: 'none' })] }, ['edge', 'sensing'])).verdict,
    ).toBe('with-help')
    expect(judged(stretch({ features: [feature('glass', {}, { marks: 'none' })] }, ['sensing'])).verdict).toBe(
      'with-cautions',
    )
    // A row that is a note moves nothing.
    expect(judged(stretch({ features: [feature('seat')] })).verdict).toBe('usable')
  })
})

describe('told and by eye', () => {
  test.each(['overhead', 'step', 'edge', 'door'])('%s told or by eye never lifts a verdict above not known', (item) => {
    for (const how of ['told', 'by-eye'] as const) {
      expect(judged(stretch({ words: { [item]: says('none', how) } })).verdict).toBe('not-known')
      expect(kinds(stretch({ words: { [item]: says('none', how) } }))).toContain('told')
    }
    expect(judged(stretch({ words: { [item]: says('none', 'inherited') } })).verdict).toBe('not-known')
  })
  test('they do not block where they may be told', () => {
    expect(
      judged(stretch({ words: { shoreline: says('left', 'told'), finish: says('smooth', 'inherited') } })).verdict,
    ).toBe('usable')
  })
  test('a width by eye may lower, never lift', () => {
    const eye = (value: number) => judged(stretch({ readings: { width: [reading(value, 'by-eye')] } }))
    expect(eye(4).verdict).toBe('not-known')
    expect(eye(4).why.map((one) => one.kind)).toContain('told')
    // 0.6 m by eye may be 0.9 m: still under 0.913 m.
    expect(eye(0.6).verdict).toBe('do-not-use')
  })
  test('a sweep confirmed too quickly is no answer', () => {
    expect(judged(stretch({ words: { edge: { ...says('none'), tooQuick: true } } })).verdict).toBe('not-known')
  })
})

describe('help', () => {
  const door = (help?: Help) =>
    stretch(
      {
        features: [
          feature(
            'hinged-door',
            { clearWidth: reading(1.2), force: reading(20, 'force-gauge'), closedRoom: reading(0.6) },
            { position: 'ahead', action: 'push', keptOpen: 'stays', robotPlace: 'yes', fire: 'no' },
            help ? { help } : {},
          ),
        ],
      },
      ['door'],
    )
  const shut = { team: { handler: { opensDoors: false } } }
  test('none begun: not known, help not named; begun: not known; whole: with help', () => {
    expect(judged(door(), shut).verdict).toBe('not-known')
    expect(judged(door(), shut).why.at(-1)?.text).toMatch(/not named/)
    const { ifNobody, ...begun } = wholeHelp
    expect(ifNobody).toBeDefined()
    expect(judged(door(begun), shut).verdict).toBe('not-known')
    expect(judged(door(begun), shut).why.at(-1)?.text).toMatch(/not complete/)
    expect(judged(door(wholeHelp), shut).verdict).toBe('with-help')
  })
  test('a failing check without help is do not use, with begun help not known', () => {
    const noPlace = (help?: Help) => {
      const one = door(help)
      const [first] = one.features
      return { ...one, features: [{ ...first, words: { ...first?.words, robotPlace: says('no') } }] } as Segment
    }
    expect(judged(noPlace()).verdict).toBe('do-not-use')
    expect(judged(noPlace({ role: 'porter' })).verdict).toBe('not-known')
    expect(judged(noPlace(wholeHelp)).verdict).toBe('with-help')
  })
  test('a part led by somebody else asks three aspects and whole help', () => {
    const led = (help?: Help): Segment => ({
      ...stretch(),
      ledBy: 'human-guide',
      words: { overhead: says('none'), step: says('none'), edge: says('none') },
      ...(help ? { help } : {}),
    })
    expect(judged(led(wholeHelp)).verdict).toBe('with-help')
    expect(judged(led(wholeHelp)).score).toBeNull()
    expect(judged(led()).verdict).toBe('not-known')
    const { edge, ...two } = led(wholeHelp).words
    expect(edge).toBeDefined()
    expect(judged({ ...led(wholeHelp), words: two }).missing).toEqual(['edge'])
  })
})

describe('readings that differ', () => {
  const two = (a: number, b: number) =>
    judged(stretch({ readings: { width: [reading(a), reading(b, 'tape', { person: 'B' })] } }))
  test('the joined interval stands where it is usable or with cautions, and says so', () => {
    expect(two(1.5, 1.6).verdict).toBe('usable')
    expect(two(1.5, 1.6).why.map((one) => one.kind)).toEqual(['differs'])
    expect(two(1.0, 1.6).verdict).toBe('with-cautions')
  })
  test('else it is not known until settled, even where both would fail', () => {
    expect(two(0.9, 1.6).verdict).toBe('not-known')
    expect(two(0.7, 0.8).verdict).toBe('not-known')
  })
  test('rival answers in words are not known', () => {
    const rivals: Answer = { ...says('none'), rivals: [{ says: 'listed', how: 'swept', person: 'B' }] }
    expect(kinds(stretch({ words: { edge: rivals } }))).toContain('differs')
    expect(judged(stretch({ words: { edge: rivals } })).verdict).toBe('not-known')
  })
})

describe('hours, age and leave', () => {
  test('hours that nobody observed are not known', () => {
    const short = { ...zone(), observations: zone().observations.map((one) => ({ ...one, from: '12:00' })) }
    expect(kinds(stretch(), { zone: short })).toContain('hours')
    expect(judged(stretch(), { zone: short, hour: '13:00' }).verdict).toBe('usable')
    expect(judged(stretch(), { zone: short, hour: '11:00' }).verdict).toBe('not-known')
  })
  test.each([
    ['structure 365 days', (time: string) => stretch({ readings: { width: [reading(1.8, 'tape', { time })] } }), 365],
    ['a door 180 days', (time: string) => stretch({ words: { door: { ...says('none'), time } } }), 180],
    [
      'furniture 60 days',
      (time: string) =>
        stretch({
          features: [feature('furniture', { clearWidth: reading(1.5, 'tape', { time }) }, { moves: 'daily' })],
        }),
      60,
    ],
  ] as const)('%s, and not a day more', (_, segment, days) => {
    const day = (ago: number) => `${new Date(Date.UTC(2026, 10, 30 - ago)).toISOString().slice(0, 10)}T09:00:00Z`
    expect(kinds(segment(day(days)))).not.toContain('stale')
    expect(kinds(segment(day(days + 1)))).toContain('stale')
    expect(judged(segment(day(days + 1))).verdict).toBe('not-known')
  })
  test('forbidden is do not use, not asked is not known', () => {
    const of = (word: string) => judged(stretch(), { zone: zone({ words: { allowed: says(word) } }) })
    expect(of('forbidden').verdict).toBe('do-not-use')
    expect(of('not-asked').verdict).toBe('not-known')
    expect(of('not-asked').why.map((one) => one.kind)).toContain('not-asked')
    expect(of('not-asked').governing).toBe('allowed')
  })
})

describe('governing and score', () => {
  test('not known is ordered by harm, then by ratio', () => {
    const result = judged(stretch({ readings: { width: [reading(0.911)], overhead: [reading(1.92, 'rod')] } }))
    expect(result.verdict).toBe('not-known')
    // Trap at 1.004 and head at about 1.1: a head comes first.
    expect(result.governing).toBe('overhead')
  })
  test('a stop item governs before a ratio without capacity', () => {
    const stairs = feature('stairs', { risers: reading(3, 'tape') }, { direction: 'down', wayRound: 'none' })
    const result = judged(stretch({ features: [stairs], readings: { width: [reading(0.5)] } }, ['step']))
    expect(result.governing).toBe('stop-item')
  })
  test.each([
    // Width governs: 0.913 over the unsafe end; 100 (1 - (r - 0.5) / 0.5).
    [1.031, 22],
    [0.918, 1],
  ])('a width of %d scores %d', (value, points) => {
    const result = judged(stretch({ readings: { width: [reading(value)] } }), { team: { leash: { lengths: [1.8] } } })
    expect(result.score).toBe(points)
    const [, high] = result.checks.find((one) => one.id === 'straight-width')?.ratio ?? [null, null]
    expect(points).toBe(Math.max(1, Math.round(100 * (1 - ((high ?? Number.NaN) - 0.5) / 0.5))))
  })
  test('at least 1 unless do not use; null where not known', () => {
    expect(judged(stretch({ readings: { width: [reading(0.911)] } })).score).toBeNull()
    expect(judged(stretch({ readings: { width: [reading(0.5)] } })).score).toBe(0)
  })
})

describe('overrides', () => {
  const spoken = {
    id: 'o1',
    verdict: 'usable' as const,
    reason: 'walked it twice',
    name: 'P. Rac',
    role: 'O&M specialist',
    until: '2026-12-31',
  }
  const of = (segment: Segment, more: object = {}) =>
    judgedWalk([segment], {}, { overrides: [{ ...spoken, ...own(segment), segment: segment.id, ...more }] }).segments[0]
  // Of this team, and of the leash that the part is judged with.
  const own = (segment: Segment) => {
    const leash = judged(segment).checks.find((one) => one.at !== null)?.at?.leash
    return { team: '1', ...(leash === undefined ? {} : { leash }) }
  }
  const narrow = () => stretch({ readings: { width: [reading(0.9)] } })
  test("whole, in date and for this team it speaks, and the machine's word is kept", () => {
    expect(of(narrow())?.verdict).toBe('usable')
    expect(of(narrow())?.override).toMatchObject({ verdict: 'usable', machine: 'do-not-use', name: 'P. Rac' })
    expect(of(narrow(), { until: '2026-11-30' })?.verdict).toBe('usable')
    expect(of(narrow(), { team: '1' })?.verdict).toBe('usable')
  })
  test.each([
    ['past its end', { until: '2026-11-29' }],
    ['without a reason', { reason: ' ' }],
    ['without a name', { name: '' }],
    ['for another team', { team: '2' }],
    ['for another leash', { leash: 0.9 }],
  ])('%s it does not', (_, more) => {
    expect(of(narrow(), more)?.verdict).toBe('do-not-use')
    expect(of(narrow(), more)?.override).toBeUndefined()
  })
  test('of a stop item or a missing overhead, edge or step it reaches with help at best', () => {
    const stairs = stretch(
      { features: [feature('stairs', { risers: reading(3) }, { direction: 'down', wayRound: 'none' })] },
      ['step'],
    )
    expect(of(stairs)?.verdict).toBe('with-help')
    const whole = stretch()
    const { edge, ...words } = whole.words
    expect(edge).toBeDefined()
    expect(of({ ...whole, words })?.verdict).toBe('with-help')
    const { sensing, ...others } = whole.words
    expect(sensing).toBeDefined()
    expect(of({ ...whole, words: others })?.verdict).toBe('usable')
  })
})
