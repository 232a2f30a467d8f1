import { describe, expect, test } from 'vitest'
import type { Kind } from '../../src/catalogue/kind.ts'
import { kind, kinds } from '../../src/catalogue/kinds.ts'

/** The principles of wording, held over every row and over planted breaches. */
const stopWords = 'Stop. Leash off. Wait for {role}.'
/** Carrying on, blind steps, ways round without a guide, and keeping away from something without a thing to touch. */
const neverSaid =
  /\b(carry on|go on|keep going|walk on|continue|step (over|across|up|down|off)|(long|big|high) step|lift your|jump|stay (left|right|away|clear)|keep (left|right|away|clear|to)|detour|go (round|around)|avoid|safe|trust|see|look|over there)\b/i
const hazards = /drop|water|platform|traffic|road|stair|escalator|walk|revolving|magnet/

function breaches(row: Pick<Kind, 'spoken' | 'stopItem' | 'aspect' | 'id'>): string[] {
  const found: string[] = []
  if (row.stopItem && row.spoken !== stopWords) found.push('stop item')
  if (row.aspect === 'edge' && row.id !== 'kerb-edge' && row.spoken !== stopWords) found.push('edge')
  if (row.aspect === 'edge' && /walk|ahead|forward|paces|straight/i.test(row.spoken)) found.push('beside an edge')
  if (neverSaid.test(row.spoken)) found.push('never said')
  for (const sentence of row.spoken.split(/(?<=[.!?:;])\s+/))
    if (sentence.split(/\s+/).length > 15) found.push('long sentence')
  return found
}

describe('what a row says to a handler', () => {
  test.each(kinds.map((row) => [row.id, row] as const))('%s keeps the rules of wording', (_, row) => {
    expect(breaches(row)).toEqual([])
    expect(row.spoken.length).toBeGreaterThan(5)
  })

  test.each([
    ['stop item', { id: 'stairs', aspect: 'step', stopItem: true, spoken: 'Stairs. Take the rail.' }],
    ['edge', { id: 'drop-off', aspect: 'edge', spoken: 'Open edge on the left.' }],
    ['beside an edge', { id: 'kerb-edge', aspect: 'edge', spoken: 'Kerb on the left for ten paces.' }],
    ['never said', { id: 'ridge', aspect: 'step', spoken: 'Ridge. Step over.' }],
    ['never said', { id: 'mirror', aspect: 'sensing', spoken: 'Mirror on the right. Keep left.' }],
    ['long sentence', { id: 'x', aspect: null, spoken: 'a b c d e f g h i j k l m n o p.' }],
  ] as const)('a planted breach is found: %s', (name, row) => {
    expect(breaches(row)).toContain(name)
  })

  test.each(['stairs', 'escalator', 'moving-walk', 'revolving-door', 'road-crossing', 'magnet-area'])(
    '%s is a stop item, led otherwise, and asks for the way round',
    (id) => {
      const row = kind(id)
      expect(row?.stopItem).toBe(true)
      expect(row?.ledBy).not.toBe('robot')
      expect(row?.feeds).toContain('stop-item')
      expect(row?.attributes.find((one) => one.id === 'wayRound')?.required).toBe('always')
    },
  )

  test('no fix asks that a door be propped or held open by a thing', () => {
    for (const row of kinds) expect(row.fix, row.id).not.toMatch(/\b(prop|wedge|hold (it |the door )?open)\b/i)
  })

  test('no row names what only eyes can follow', () => {
    for (const row of kinds.filter((one) => hazards.test(one.id)))
      expect(row.spoken, row.id).not.toMatch(/\b(yellow|red|white|sign)\b/i)
  })
})
