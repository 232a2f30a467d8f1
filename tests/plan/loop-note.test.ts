import { describe, expect, it } from 'vitest'
import { loopNote } from '../../src/plan/loop-note.ts'
import type { InstrumentId } from '../../src/record/instruments.ts'
import type { Reading, Segment, Walk } from '../../src/record/survey.ts'

const square = Math.PI / 2

function read(id: string, value: number, instrument: InstrumentId, bound: Reading['bound'] = 'exact'): Reading {
  return { id, raw: String(value), value, bound, instrument }
}

function part(id: string, lengths: Reading[], angle?: Reading): Segment {
  const turn = { id: `${id}-turn`, kind: 'turn', readings: angle ? { angle: [angle] } : {}, words: {} }
  return {
    id,
    name: id,
    ledBy: 'robot',
    readings: { length: lengths },
    words: {},
    features: [],
    ...(angle ? { turn } : {}),
  }
}

function loop(segments: Segment[]): Walk {
  return { id: 'w', name: 'round the block', loop: true, words: {}, segments, states: [] }
}

/** Round a courtyard, 20 by 12, by the tape in lays and the square. */
function courtyard(first: number): Segment[] {
  return [
    part('a', [read('a1', first, 'tape-in-lays')], read('a2', square, 'square')),
    part('b', [read('b1', 12, 'tape-in-lays')], read('b2', square, 'square')),
    part('c', [read('c1', 20, 'tape-in-lays')], read('c2', square, 'square')),
    part('d', [read('d1', 12, 'tape-in-lays')]),
  ]
}

describe('a loop before leaving', () => {
  it('that closes names no reading', () => {
    expect(loopNote(loop(courtyard(20.1)))).toMatchObject({ known: true, suspects: [] })
  })

  it('with a tape length too many names both courses along that line, with the readings used', () => {
    const note = loopNote(loop(courtyard(25)))
    if (!note?.known) return expect.unreachable('all readings were there')
    expect(note.misclosure.linear).toBeCloseTo(5, 9)
    expect(note.suspects.slice(0, 2)).toMatchObject([
      { reading: 'length', segment: 'a', readings: ['a1'] },
      { reading: 'length', segment: 'c', readings: ['c1'] },
    ])
    expect(note.suspects[0]?.excess).toBeCloseTo(5, 9)
  })

  it('allows what its instruments allow: 1 % of each length, 1 degree at each turn', () => {
    const note = loopNote(loop(courtyard(20)))
    if (!note?.known) return expect.unreachable('all readings were there')
    const degree = Math.PI / 180
    const lengths = [0.2, 0.12, 0.2, 0.12]
    // From the corners to the end: the diagonal's foot 20, the diagonal 23.32, the last side 12.
    const turns = [20, Math.hypot(20, 12), 12].map((reach) => reach * degree)
    expect(note.allowed).toBeCloseTo(Math.hypot(...lengths, ...turns), 9)
    const wide = loopNote(loop(courtyard(25)), { 'tape-in-lays': { absolute: 0, relative: 0.3 } })
    expect(wide).toMatchObject({ known: true, suspects: [] })
  })

  it('takes the last exact reading, never a bound or a mean', () => {
    const twice = courtyard(20)
    twice[0] = part(
      'a',
      [read('a0', 30, 'paces'), read('a1', 20, 'tape-in-lays'), read('a9', 19, 'stick', 'above')],
      read('a2', square, 'square'),
    )
    const note = loopNote(loop(twice))
    expect(note?.known && note.misclosure.linear).toBeCloseTo(0, 9)
  })

  it('says which readings are missing', () => {
    const gaps = courtyard(20)
    gaps[1] = part('b', [read('b1', 10, 'stick', 'above')], read('b2', square, 'square'))
    gaps[2] = { ...part('c', [], read('c2', square, 'square', 'above')) }
    expect(loopNote(loop(gaps))).toEqual({
      known: false,
      missing: [
        { segment: 'b', reading: 'length' },
        { segment: 'c', reading: 'length' },
        { segment: 'c', reading: 'turn' },
      ],
    })
  })

  it('a length below nothing in a file counts as missing', () => {
    expect(loopNote(loop(courtyard(-1)))).toEqual({ known: false, missing: [{ segment: 'a', reading: 'length' }] })
  })

  it('is no matter for a walk from one place to another', () => {
    expect(loopNote({ ...loop(courtyard(20)), loop: false })).toBeNull()
    expect(loopNote(loop([]))).toBeNull()
  })
})
