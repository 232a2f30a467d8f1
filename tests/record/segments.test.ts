import { describe, expect, it } from 'vitest'
import { foldSurvey } from '../../src/record/fold.ts'
import {
  addFeature,
  addReading,
  addSegment,
  amendReading,
  joinSegments,
  moveSegment,
  remove,
  restore,
  setSegmentField,
  setTurn,
  settleAnswer,
  setWord,
  splitSegment,
} from '../../src/record/operations/index.ts'
import { act, copyOf, exchange, segmentsOf, smallVenue, tape } from './build.ts'

const swept = (says: string, person?: string) => ({ says, how: 'swept' as const, ...(person ? { person } : {}) })
const namesOf = (one: ReturnType<typeof smallVenue>) => segmentsOf(one).map((segment) => segment.id)

describe('segments in their order', () => {
  it('are added at the end, first, and behind another; and moved', () => {
    const one = smallVenue()
    act(one, (log) => addSegment(log, 'w', { id: 's0', name: 'x', ledBy: 'robot' }, null))
    act(one, (log) => addSegment(log, 'w', { id: 's1b', name: 'x', ledBy: 'robot' }, 's1'))
    act(one, (log) => addSegment(log, 'w', { id: 's1a', name: 'x', ledBy: 'robot' }, 's1'))
    expect(namesOf(one)).toEqual(['s0', 's1', 's1a', 's1b', 's2'])
    act(one, (log) => moveSegment(log, 'w', 's2', 's0'))
    expect(namesOf(one)).toEqual(['s0', 's2', 's1', 's1a', 's1b'])
    act(one, (log) => moveSegment(log, 'w', 's1b', null))
    expect(namesOf(one)).toEqual(['s1b', 's0', 's2', 's1', 's1a'])
  })

  it('of two phones that went on at once stay together by phone', () => {
    const ada = smallVenue()
    const ben = copyOf(ada, 'b', 'Ben')
    for (const i of [1, 2, 3]) {
      act(ada, (log) => addSegment(log, 'w', { id: `a${i}`, name: 'x', ledBy: 'robot' }))
      act(ben, (log) => addSegment(log, 'w', { id: `b${i}`, name: 'x', ledBy: 'robot' }))
    }
    exchange(ada, ben)
    expect(namesOf(ada)).toEqual(namesOf(ben))
    expect(namesOf(ada).slice(2).join(' ')).toMatch(/^(a1 a2 a3 b1 b2 b3|b1 b2 b3 a1 a2 a3)$/)
  })
})

describe('splitting and joining', () => {
  function furnished() {
    const one = smallVenue()
    act(one, (log) => setWord(log, 's1', 'edge', swept('none')))
    act(one, (log) => addReading(log, 's1', 'width', tape('w1', 1.3)))
    act(one, (log) => addFeature(log, 's1', { id: 'near', kind: 'mat', along: 2 }))
    act(one, (log) => addFeature(log, 's1', { id: 'far', kind: 'hinged-door', along: 9 }))
    act(one, (log) => setTurn(log, 's1', { id: 't', kind: 'turn' }))
    return one
  }

  it('a cut leaves the new stretch unanswered, takes what lies beyond with it, and asks both lengths again', () => {
    const one = furnished()
    act(one, (log) => splitSegment(log, 's1', { id: 'new', name: 'Beyond', ledBy: 'robot', at: 5 }))
    const [first, second] = segmentsOf(one)
    expect(namesOf(one)).toEqual(['s1', 'new', 's2'])
    expect(first).toMatchObject({ words: { edge: { says: 'none' } }, readings: { width: [{ id: 'w1' }] } })
    expect(first?.readings.length).toBeUndefined()
    expect([first?.features.map((one) => one.id), first?.turn]).toEqual([['near'], undefined])
    expect(second).toMatchObject({ words: {}, readings: {}, turn: { id: 't' }, features: [{ id: 'far', along: 4 }] })
  })

  it('a joint keeps an answer only where both gave it, and every reading but the lengths', () => {
    const one = furnished()
    act(one, (log) => setWord(log, 's1', 'step', swept('none')))
    act(one, (log) => setWord(log, 's2', 'step', swept('none')))
    act(one, (log) => setWord(log, 's2', 'door', swept('none')))
    act(one, (log) => addReading(log, 's2', 'width', tape('w2', 1.1)))
    act(one, (log) => addFeature(log, 's2', { id: 'later', kind: 'mat', along: 1 }))
    act(one, (log) => joinSegments(log, 's1', 's2', 12))
    const [joined, ...others] = segmentsOf(one)
    expect(others).toEqual([])
    expect(Object.keys(joined?.words ?? {})).toEqual(['step'])
    expect(joined?.readings.width).toMatchObject([{ id: 'w1' }, { id: 'w2', place: 'another' }])
    expect(joined?.readings.length).toBeUndefined()
    expect(joined?.features.map((one) => [one.id, one.along])).toEqual([
      ['near', 2],
      ['far', 9],
      ['later', 13],
    ])
    expect(joined?.turn).toBeUndefined()
  })
})

describe('answers of two people', () => {
  it('given at once are rivals until somebody settles them; the same answer is none', () => {
    const ada = smallVenue()
    const ben = copyOf(ada, 'b', 'Ben')
    act(ada, (log) => setWord(log, 's1', 'edge', swept('none', 'Ada')))
    act(ben, (log) => setWord(log, 's1', 'edge', swept('listed', 'Ben')))
    act(ada, (log) => setWord(log, 's1', 'step', swept('none', 'Ada')))
    act(ben, (log) => setWord(log, 's1', 'step', swept('none', 'Ben')))
    exchange(ada, ben)
    const { edge, step } = segmentsOf(ada)[0]?.words ?? {}
    expect([edge?.says, edge?.rivals]).toEqual(['none', [{ says: 'listed', how: 'swept', person: 'Ben' }]])
    expect(step).not.toHaveProperty('rivals')
    expect(foldSurvey(ben.log).conflicts).toMatchObject([{ entity: 's1', field: 'word/edge' }])
    act(ben, (log) => settleAnswer(log, 's1', 'edge', swept('listed', 'Ben')))
    exchange(ada, ben)
    expect(segmentsOf(ada)[0]?.words.edge).toMatchObject({ says: 'listed', person: 'Ben' })
    expect(foldSurvey(ada.log).conflicts).toBeUndefined()
  })

  it('one after the other on one phone stay both: a second look never covers the first', () => {
    const one = smallVenue()
    act(one, (log) => setWord(log, 's1', 'edge', swept('listed', 'Ada')))
    act(one, (log) => setWord(log, 's1', 'edge', swept('none', 'Ben')))
    expect(segmentsOf(one)[0]?.words.edge).toMatchObject({
      says: 'listed',
      rivals: [{ says: 'none', person: 'Ben' }],
    })
    act(one, (log) => setWord(log, 's1', 'edge', swept('listed', 'Ben')))
    expect(segmentsOf(one)[0]?.words.edge).not.toHaveProperty('rivals')
  })
})

it('an answer that names nobody replaces the only one there is, and none of two', () => {
  const one = smallVenue()
  act(one, (log) => setWord(log, 's1', 'edge', swept('listed', 'Ada')))
  act(one, (log) => setWord(log, 's1', 'edge', swept('none')))
  expect(segmentsOf(one)[0]?.words.edge).toMatchObject({ says: 'none' })
  expect(segmentsOf(one)[0]?.words.edge).not.toHaveProperty('rivals')
  act(one, (log) => setWord(log, 's1', 'edge', swept('listed', 'Ben')))
  act(one, (log) => setWord(log, 's1', 'edge', { ...swept('listed'), how: 'told' }))
  expect(segmentsOf(one)[0]?.words.edge?.rivals).toHaveLength(2)
})

describe('removing', () => {
  it('hides an entity with all in it, and restoring brings all of it back', () => {
    const one = smallVenue()
    const before = segmentsOf(one)
    act(one, (log) => remove(log, 's1'))
    expect(namesOf(one)).toEqual(['s2'])
    act(one, (log) => restore(log, 's1'))
    expect(segmentsOf(one)).toEqual(before)
  })

  it.each([
    ['a reading in it', (log: Parameters<typeof addReading>[0]) => addReading(log, 's1', 'width', tape('late', 1))],
    ['a field of it', (log: Parameters<typeof addReading>[0]) => setSegmentField(log, 's1', 'note', 'wet here')],
  ])('at the same time as another adds %s keeps it in view as a conflict', (_, edit) => {
    const ada = smallVenue()
    const ben = copyOf(ada, 'b', 'Ben')
    act(ada, (log) => remove(log, 's1'))
    act(ben, edit)
    exchange(ada, ben)
    expect(namesOf(ada)).toEqual(['s1', 's2'])
    expect(foldSurvey(ada.log).conflicts).toMatchObject([{ entity: 's1', field: 'gone' }])
    expect(foldSurvey(ada.log)).toEqual(foldSurvey(ben.log))
    // Having seen the edit, somebody settles it either way.
    act(ada, (log) => remove(log, 's1'))
    expect([namesOf(ada), foldSurvey(ada.log).conflicts]).toEqual([['s2'], undefined])
    act(ben, (log) => restore(log, 's1'))
    expect([namesOf(ben), foldSurvey(ben.log).conflicts]).toEqual([['s1', 's2'], undefined])
  })
})

it('an amended reading names whom it settles, and the old one stays', () => {
  const one = smallVenue()
  const settles = { readings: ['s1-length'], by: 'Ada', reason: 'steel rule', on: '2026-03-01' }
  act(one, (log) => amendReading(log, 's1', 'length', tape('finer', 12.01), settles))
  expect(segmentsOf(one)[0]?.readings.length).toMatchObject([{ id: 's1-length' }, { id: 'finer', settles }])
})
