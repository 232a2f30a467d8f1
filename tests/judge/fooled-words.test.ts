import { describe, expect, test } from 'vitest'
import { kinds } from '../../src/catalogue/kinds.ts'
import { feature, judgedWalk, reading, stretch, zone } from './build.ts'

/** What a handler is told says where by side, clock and name: "here" and "there" say nothing to who does not look. */

const pointing = /\b(here|there)\b/i
const square = Math.PI / 2

describe('words that only point', () => {
  test.each(kinds.map((row) => [row.id, row.spoken]))('none in the row %s', (_, spoken) => {
    expect(spoken).not.toMatch(pointing)
  })

  test('none in the cautions of checks: width, turn, pause, noise, a creeping pace', () => {
    const narrow = { width: [reading(0.95)] }
    const segments = [
      stretch({ readings: narrow, turn: feature('turn', { angle: reading(square, 'square') }) }),
      stretch({ readings: narrow }),
    ]
    const shown = { name: 'C', date: '2026-10-01' }
    const paused = judgedWalk(segments, {
      zone: zone({}, { noise: 'loud' }),
      team: { handler: { standsWhenSlack: shown, gathersLeash: true } },
    })
    const tight = judgedWalk([
      { ...segments[0], readings: { ...segments[0]?.readings, width: [reading(1.0)] } } as never,
      stretch({ readings: { width: [reading(1.0)] } }),
    ])
    const texts = [...paused.cautions, ...tight.cautions].map((one) => one.text)
    expect(paused.pauses).toBeGreaterThan(0)
    for (const word of ['Narrow', 'Tight', 'slack', 'Loud', 'Very slow'])
      expect(
        texts.some((text) => text.includes(word)),
        word,
      ).toBe(true)
    for (const text of texts) expect(text).not.toMatch(pointing)
  })

  test('a side that nobody said is not called "the way"', () => {
    const rail = feature('handrail')
    const glass = feature('glass', {}, { marks: 'none' })
    const texts = judgedWalk([stretch({ features: [rail, glass] }, ['sensing'])]).cautions.map((one) => one.text)
    expect(texts).toContain('Glass on the left or right. Slow.')
  })
})
