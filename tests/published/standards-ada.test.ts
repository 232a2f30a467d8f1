import { describe, expect, test } from 'vitest'
import { type LimitId, limitIds, packIds } from '../../src/standards/pack.ts'
import { limit, pack } from '../../src/standards/packs.ts'
import { above, check, feature, judged, reading, says, stretch } from '../judge/build.ts'

/**
 * Limits copied by hand from the 2010 ADA Standards for Accessible Design (text twin of the ABA Standards and the
 * Access Board's guide), metric as printed. A limit gives a caution, compared at the reading itself: on it meets it.
 */
const printed: readonly [LimitId, number, string][] = [
  ['headroom', 2.03, 'ADA 307.4'],
  ['projection-wall', 0.1, 'ADA 307.2'],
  ['projection-post', 0.305, 'ADA 307.3'],
  ['projection-band-low', 0.685, 'ADA 307.2'],
  ['projection-band-high', 2.03, 'ADA 307.2'],
  ['lip', 0.0064, 'ADA 303.2'],
  ['bevel', 0.013, 'ADA 303.3'],
  ['slope', 1 / 12, 'ADA 405.2'],
  ['cross-fall', 1 / 48, 'ADA 403.3'],
  ['slot', 0.013, 'ADA 302.3'],
  ['door-force', 22.2, 'ADA 404.2.9'],
]

describe('the pack', () => {
  test.each(printed)('%s is %d, %s', (id, value, clause) => {
    const row = limit(pack('us-ada-2010'), id)
    expect(row.value).toBeCloseTo(value, 12)
    expect(row.clause).toBe(clause)
    expect(row.seen).toBe(true)
  })
  test('it is the default', () => {
    expect(pack().id).toBe('us-ada-2010')
  })
  test.each(packIds)('%s has every limit, and what is from memory says so', (id) => {
    for (const one of limitIds) expect(limit(pack(id), one).value).toBeGreaterThanOrEqual(0)
    if (id === 'iso-21542' || id === 'own') expect(pack(id).limits.every((one) => !one.seen)).toBe(true)
  })
  test('a pack without a limit breaks a promise', () => {
    expect(() => limit({ ...pack(), limits: [] }, 'lip')).toThrow(/no-limit/)
  })
})

/** Physical limits of the team far away, so that only the pack speaks. */
const far = {
  team: {
    robot: {
      riser: 0.5,
      slope: 1,
      crossFall: 1,
      slot: 0.5,
      sillGap: 0.5,
      sensingPlane: 2,
      holdsSlopeWithPowerLost: true,
    },
    handler: { stature: 1.5 },
  },
}
const fine = 'steel-rule'
const on = (kind: string, values: Record<string, number>, words: Record<string, string>, aspect: string) =>
  stretch(
    {
      features: [
        feature(kind, Object.fromEntries(Object.entries(values).map(([key, one]) => [key, reading(one, fine)])), words),
      ],
    },
    [aspect],
  )

describe('both sides of each limit', () => {
  const rows: [string, string, () => ReturnType<typeof stretch>, 'passes' | 'tight'][] = [
    ['307.4 headroom 2030', 'overhead', () => stretch({ readings: { overhead: [above(2.03)] } }), 'passes'],
    ['307.4 headroom 2029', 'overhead', () => stretch({ readings: { overhead: [above(2.029)] } }), 'tight'],
    [
      '307.2 projection 100',
      'protrusion',
      () => on('wall-projection', { projection: 0.1, lowest: 1 }, { mounted: 'wall' }, 'overhead'),
      'passes',
    ],
    [
      '307.2 projection 101',
      'protrusion',
      () => on('wall-projection', { projection: 0.101, lowest: 1 }, { mounted: 'wall' }, 'overhead'),
      'tight',
    ],
    [
      '307.2 projection at 685',
      'protrusion',
      () => on('wall-projection', { projection: 0.3, lowest: 0.685 }, { mounted: 'wall' }, 'overhead'),
      'passes',
    ],
    [
      '307.3 post 305',
      'protrusion',
      () => on('wall-projection', { projection: 0.305, lowest: 1 }, { mounted: 'post' }, 'overhead'),
      'passes',
    ],
    [
      '307.3 post 306',
      'protrusion',
      () => on('wall-projection', { projection: 0.306, lowest: 1 }, { mounted: 'post' }, 'overhead'),
      'tight',
    ],
    ['303.2 lip 6.4', 'level', () => on('threshold', { height: 0.0064 }, { direction: 'up' }, 'step'), 'passes'],
    ['303.2 lip 6.5', 'level', () => on('threshold', { height: 0.0065 }, { direction: 'up' }, 'step'), 'tight'],
    ['303.3 bevel 13', 'level', () => on('ridge', { height: 0.013 }, { flank: 'yes' }, 'step'), 'passes'],
    ['303.3 bevel 13.1', 'level', () => on('ridge', { height: 0.0131 }, { flank: 'yes' }, 'step'), 'tight'],
    ['405.2 ramp 1:12', 'slope', () => on('ramp', { gradient: 1 / 12 }, { direction: 'up' }, 'step'), 'passes'],
    ['405.2 ramp 1:11.9', 'slope', () => on('ramp', { gradient: 1 / 11.9 }, { direction: 'up' }, 'step'), 'tight'],
    [
      '403.3 cross slope 1:48',
      'cross-fall',
      () => on('cross-fall', { gradient: 1 / 48 }, { falls: 'left' }, 'step'),
      'passes',
    ],
    [
      '403.3 cross slope 1:47',
      'cross-fall',
      () => on('cross-fall', { gradient: 1 / 47 }, { falls: 'left' }, 'step'),
      'tight',
    ],
    ['302.3 slot 13', 'gap', () => on('grating', { slot: 0.013 }, { direction: 'across' }, 'surface'), 'passes'],
    ['302.3 slot 13.1', 'gap', () => on('grating', { slot: 0.0131 }, { direction: 'across' }, 'surface'), 'tight'],
  ]
  test.each(rows)('%s', (name, id, segment, state) => {
    const found = check(judged(segment(), far), id)
    expect(found.state).toBe(state)
    if (state === 'tight') expect(found.source).toBe(`ADA ${name.split(' ')[0]}`)
  })
  test('404.2.9 a door of 22.2 N is not heavy, one of 22.3 N is', () => {
    const of = (force: number) =>
      check(
        judged(
          stretch(
            {
              features: [
                feature(
                  'hinged-door',
                  { clearWidth: reading(1.2), force: reading(force, 'force-gauge'), closedRoom: reading(1) },
                  { position: 'ahead', action: 'push', keptOpen: 'stays', robotPlace: 'yes', fire: 'no' },
                ),
              ],
            },
            ['door'],
          ),
        ),
        'door-force',
      )
    expect(of(22.2)).toMatchObject({ source: 'common practice', caution: 'You open it.' })
    expect(of(22.3)).toMatchObject({ source: 'ADA 404.2.9', caution: 'Heavy door.' })
  })
  test('another pack, other limits: AD M cross-fall 1:40', () => {
    const of = (gradient: number) =>
      check(
        judged(on('cross-fall', { gradient }, { falls: 'left' }, 'step'), { ...far, code: 'uk-adm-k' }),
        'cross-fall',
      ).state
    expect(of(1 / 41)).toBe('passes')
    expect(of(1 / 39)).toBe('tight')
  })
})

describe('slip, UKSRG and HSE', () => {
  // Printed: 36 on the level, 41 at 1:20, 45 at 1:12 (44.3 by the formula 36 + 100 tan A).
  test.each([
    [1 / 20, 41],
    [1 / 12, 44.333],
  ])('at %d a pendulum value of %d is asked', (gradient, value) => {
    const ramp = stretch(
      {
        words: { finish: says('textured') },
        readings: { pendulum: [reading(90, 'pendulum')] },
        features: [feature('ramp', { gradient: reading(gradient, 'level', { safeSide: false }) }, { direction: 'up' })],
      },
      ['step'],
    )
    const wet = { ...ramp, words: { ...ramp.words, wetness: says('wet') } }
    const { demand } = check(judged(wet, { ...far, team: { robot: { ...far.team.robot } } }), 'slip')
    // At the unsafe end of a level, 0.2 degrees, 0.35 more.
    expect(demand).toBeCloseTo(value + 100 * Math.tan((0.2 * Math.PI) / 180), 2)
  })
})
