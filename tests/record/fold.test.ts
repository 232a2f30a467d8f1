import * as v from 'valibot'
import { describe, expect, it } from 'vitest'
import { foldSurvey } from '../../src/record/fold.ts'
import { allFacts, appendDrafts, emptyLog, mergeFacts } from '../../src/record/log.ts'
import {
  addFeature,
  addReading,
  addSegment,
  amendReading,
  joinSegments,
  markState,
  moveSegment,
  remove,
  restore,
  setSegmentField,
  setTurn,
  settleAnswer,
  setWord,
  splitSegment,
  takeSafeSide,
} from '../../src/record/operations/index.ts'
import { surveyView } from '../../src/record/survey.ts'
import { act, phone, smallVenue, tape } from './build.ts'

/** Takes each phone's facts to the other. */
function exchange(a: ReturnType<typeof phone>, b: ReturnType<typeof phone>): void {
  const [mine, theirs] = [allFacts(a.log), allFacts(b.log)]
  expect(mergeFacts(a.log, theirs).refused).toEqual([])
  expect(mergeFacts(b.log, mine).refused).toEqual([])
}

function copyOf(one: ReturnType<typeof phone>, device: string, person: string): ReturnType<typeof phone> {
  const other = phone(device, person)
  mergeFacts(other.log, allFacts(one.log))
  return { ...other, tick: one.tick }
}

const segmentsOf = (one: ReturnType<typeof phone>) => foldSurvey(one.log).view.walks[0]?.segments ?? []

describe('the folded view', () => {
  it('shows an empty log as an empty venue', () => {
    expect(foldSurvey(emptyLog('x')).view).toEqual({ name: '', floors: [], zones: [], places: [], walks: [] })
  })

  it('shows what the operations wrote, and is valid', () => {
    const one = smallVenue()
    act(one, (log) => addFeature(log, 's1', { id: 'd', kind: 'hinged-door', along: 3, side: 'across' }))
    act(one, (log) => setTurn(log, 's1', { id: 't', kind: 'turn' }))
    act(one, (log) => setWord(log, 's1', 'door', { says: 'listed', how: 'swept' }))
    const { view, conflicts, setAside } = foldSurvey(one.log)
    expect(v.safeParse(surveyView, view).issues).toBeUndefined()
    expect([conflicts, setAside]).toEqual([undefined, undefined])
    expect(view.name).toBe('Harbour Hall')
    expect(view.zones).toEqual([{ id: 'z', name: 'Foyer', outdoors: false, words: {}, observations: [] }])
    const [first] = view.walks[0]?.segments ?? []
    expect(first).toEqual({
      id: 's1',
      name: 'Foyer',
      zone: 'z',
      ledBy: 'robot',
      readings: { length: [{ ...tape('s1-length', 12), person: 'Ada', time: '2026-03-01T10:00:05.000Z' }] },
      words: { door: { says: 'listed', how: 'swept', person: 'Ada', time: '2026-03-01T10:00:08.000Z' } },
      features: [{ id: 'd', kind: 'hinged-door', along: 3, side: 'across', readings: {}, words: {} }],
      turn: { id: 't', kind: 'turn', readings: {}, words: {} },
    })
  })

  it('keeps every untouched part the same object', () => {
    const one = smallVenue()
    const before = foldSurvey(one.log).view
    act(one, (log) => addReading(log, 's2', 'width', tape('r2', 1.1)))
    const after = foldSurvey(one.log).view
    expect(after).not.toBe(before)
    expect(after.zones[0]).toBe(before.zones[0])
    expect(after.walks[0]?.segments[0]).toBe(before.walks[0]?.segments[0])
    expect(after.walks[0]?.segments[1]).not.toBe(before.walks[0]?.segments[1])
    expect(before.walks[0]?.segments[1]?.readings).toEqual({})
    expect(foldSurvey(one.log).view).toBe(after)
  })
})
