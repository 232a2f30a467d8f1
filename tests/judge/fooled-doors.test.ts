import { describe, expect, test } from 'vitest'
import { roomState, stateOf } from '../../src/judge/finding.ts'
import { check, doublePlanner, feature, judged, reading, stretch, wholeHelp } from './build.ts'

/** Doors, tables and planner's answers that looked better than they were. */

const door = (kind: string, more: Parameters<typeof feature>[1] = {}, words: Record<string, string> = {}) =>
  feature(
    kind,
    {
      clearWidth: reading(1.2, 'door-tape'),
      hold: reading(30, 'stopwatch'),
      force: reading(15, 'force-gauge'),
      closedRoom: reading(0.8),
      ...more,
    },
    { position: 'ahead', action: 'push', keptOpen: 'closer', robotPlace: 'yes', fire: 'no', ...words },
  )

describe('doors', () => {
  test('two pairs of doors with a lobby between: somebody holds both', () => {
    expect(judged(stretch({ features: [door('double-doors')] }, ['door'])).verdict).toBe('with-cautions')
    for (const lobby of [{ pairs: reading(2, 'by-eye') }, { lobbyLength: reading(1.4) }]) {
      const both = door('double-doors', lobby)
      const alone = judged(stretch({ features: [both] }, ['door']))
      expect(alone.verdict).toBe('not-known')
      expect(check(alone, 'door-time').state).toBe('needs-help')
      expect(judged(stretch({ features: [{ ...both, help: wholeHelp }] }, ['door'])).verdict).toBe('with-help')
    }
  })

  test('a sliding door held open says whether it is a fire door', () => {
    const slides = door('sliding-door', {}, { keptOpen: 'stop' })
    expect(judged(stretch({ features: [slides] }, ['door'])).verdict).toBe('with-cautions')
    const { fire, ...words } = slides.words
    expect(fire?.says).toBe('no')
    expect(judged(stretch({ features: [{ ...slides, words }] }, ['door'])).verdict).toBe('not-known')
    const fireDoor = door('sliding-door', {}, { keptOpen: 'stop', fire: 'yes' })
    expect(check(judged(stretch({ features: [fireDoor] }, ['door'])), 'door-time').state).toBe('needs-help')
  })
})

test('a table whose top lies above what the robot senses is a caution', () => {
  const table = (height: number) =>
    feature('obstruction', { depth: reading(0.3), length: reading(0.5), height: reading(height) }, {}, { side: 'left' })
  expect(judged(stretch({ features: [table(0.1)] })).verdict).toBe('usable')
  expect(check(judged(stretch({ features: [table(0.7)] })), 'sensing').state).toBe('tight')
})

test('no number is no pass', () => {
  expect(stateOf([Number.NaN, Number.NaN])).toBe('fails')
  expect(stateOf([0.5, Number.NaN])).toBe('unsure')
  expect(roomState({ low: Number.NaN, high: 1 }, 0.05, 0.05)).toBe('unsure')
  expect(roomState({ low: 0.2, high: Number.NaN }, 0.05, 0.05)).toBe('fails')
})

test('a planner that gave up without a motion leaves it not known, whatever it hopes for', () => {
  const corner = feature('turn', { angle: reading(Math.PI / 2, 'square') })
  const gaveUp: typeof doublePlanner = (...asked) => ({
    ...doublePlanner(...asked),
    mTaut: null,
    mSlack: null,
    mTautHigh: 0.3,
    mSlackHigh: 0.3,
    pauses: null,
    motion: null,
    decided: false,
  })
  const end = feature('dead-end', { clearWidth: reading(2), depth: reading(2) }, { robotWaits: 'in the niche' })
  const result = judged(stretch({ turn: { ...corner, ...end } }), { planner: gaveUp })
  expect(check(result, 'turn').state).toBe('unsure')
  expect(result.verdict).toBe('not-known')
})
