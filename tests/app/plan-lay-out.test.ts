import { describe, expect, test } from 'vitest'
import { layOut } from '../../src/app/screens/venue/lay-out.ts'
import type { Reading, Segment, SurveyView, Walk } from '../../src/record/survey.ts'

function reading(id: string, value: number): Reading {
  return { id, raw: String(value), value, bound: 'exact', instrument: 'tape' }
}

function segment(id: string, length: number | null, left: number | null | undefined): Segment {
  return {
    id,
    name: id,
    ledBy: 'robot',
    readings: length === null ? {} : { length: [reading(`${id}.length`, length)] },
    words: {},
    features: [],
    ...(left === undefined
      ? {}
      : {
          turn: {
            id: `${id}.turn`,
            kind: 'turn',
            readings: left === null ? {} : { angle: [reading(`${id}.angle`, left)] },
            words: {},
          },
        }),
  }
}

function view(walk: Walk): SurveyView {
  return {
    name: 'v',
    floors: [],
    zones: [],
    places: [
      { id: 'here', name: 'Here', x: 2, y: 1 },
      { id: 'up', name: 'Up', x: 2, y: 9 },
      { id: 'unplaced', name: 'Unplaced' },
    ],
    walks: [walk],
  }
}

function walk(segments: Segment[], more: Partial<Walk> = {}): Walk {
  return { id: 'w', name: 'w', words: {}, segments, states: [], ...more }
}

const square = Math.PI / 2

describe('a walk on the plan', () => {
  test('is laid out from its place and heading, a left turn anticlockwise', () => {
    const one = walk([segment('a', 4, square), segment('b', 3, undefined)], { from: 'here', heading: 0 })
    const { legs, notes } = layOut(view(one), one, [])
    expect(legs.map(({ number }) => number)).toEqual([1, 2])
    expect(legs[0]?.to.x).toBeCloseTo(6, 9)
    expect(legs[0]?.to.y).toBeCloseTo(1, 9)
    expect(legs[1]?.to.x).toBeCloseTo(6, 9)
    expect(legs[1]?.to.y).toBeCloseTo(4, 9)
    expect(notes).toEqual([])
  })

  test('without a heading is turned towards its end, and says so', () => {
    const one = walk([segment('a', 8, undefined)], { from: 'here', to: 'up' })
    const { legs, notes } = layOut(view(one), one, [])
    expect(legs[0]?.to.x).toBeCloseTo(2, 9)
    expect(legs[0]?.to.y).toBeCloseTo(9, 9)
    expect(notes).toEqual(['Its first direction is not given: turned towards its end.'])
  })

  test('stops before the first part without a length, and says so', () => {
    const one = walk([segment('a', 4, undefined), segment('b', null, undefined), segment('c', 2, undefined)], {
      from: 'here',
      heading: 0,
    })
    const { legs, notes } = layOut(view(one), one, [])
    expect(legs).toHaveLength(1)
    expect(notes).toEqual(['Part 2 has no length yet: the drawing stops before it.'])
  })

  test('says where a turn was not measured and where the start is not placed', () => {
    const one = walk([segment('a', 4, null), segment('b', 2, undefined)], { from: 'unplaced', heading: 0 })
    const { legs, notes } = layOut(view(one), one, [])
    expect(legs[1]?.to).toEqual({ x: 6, y: 0 })
    expect(notes).toEqual([
      'The turn after part 1 was not measured: drawn straight on.',
      'The start is not placed on the plan: drawn from its corner.',
    ])
  })

  test('shows a verdict only where there is one for the part as it is', () => {
    const one = walk([segment('a', 4, undefined)], { from: 'here', heading: 0 })
    expect(layOut(view(one), one, []).legs[0]?.verdict).toBeNull()
  })
})
