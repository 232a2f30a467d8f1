import * as v from 'valibot'
import { describe, expect, it } from 'vitest'
import { factId } from '../../src/record/facts.ts'
import { foldSurvey } from '../../src/record/fold.ts'
import { appendDrafts, emptyLog, headsOf } from '../../src/record/log.ts'
import {
  addFeature,
  addPhoto,
  addReading,
  addWalk,
  markState,
  nameVenue,
  observeZone,
  setSegmentField,
  setTurn,
  setWord,
  setZoneWord,
  takeSafeSide,
} from '../../src/record/operations/index.ts'
import { root } from '../../src/record/placement.ts'
import { surveyView } from '../../src/record/survey.ts'
import { act, copyOf, exchange, segmentsOf, smallVenue, tape } from './build.ts'

describe('the folded view', () => {
  it('shows an empty log as an empty venue', () => {
    expect(foldSurvey(emptyLog('x')).view).toEqual({ name: '', floors: [], zones: [], places: [], walks: [] })
  })

  it('shows what the operations wrote, signed and dated, and is valid', () => {
    const one = smallVenue()
    act(one, (log) => addFeature(log, 's1', { id: 'd', kind: 'hinged-door', along: 3, side: 'across' }))
    act(one, (log) => setTurn(log, 's1', { id: 't', kind: 'turn' }))
    act(one, (log) => setWord(log, 's1', 'door', { says: 'listed', how: 'swept' }))
    act(one, (log) => addPhoto(log, 'd', 'photo-1'))
    const { view, conflicts, setAside } = foldSurvey(one.log)
    expect(v.safeParse(surveyView, view).issues).toBeUndefined()
    expect([conflicts, setAside]).toEqual([undefined, undefined])
    expect(view.name).toBe('Harbour Hall')
    expect(view.zones).toEqual([{ id: 'z', name: 'Foyer', outdoors: false, words: {}, observations: [] }])
    expect(segmentsOf(one)[0]).toEqual({
      id: 's1',
      name: 'Foyer',
      zone: 'z',
      ledBy: 'robot',
      readings: { length: [{ ...tape('s1-length', 12), person: 'Ada', time: '2026-03-01T10:00:05.000Z' }] },
      words: { door: { says: 'listed', how: 'swept', person: 'Ada', time: '2026-03-01T10:00:08.000Z' } },
      features: [
        { id: 'd', kind: 'hinged-door', along: 3, side: 'across', readings: {}, words: {}, photos: ['photo-1'] },
      ],
      turn: { id: 't', kind: 'turn', readings: {}, words: {} },
    })
  })

  it('shows a zone as it was observed, and a walk with its states in order of date', () => {
    const one = smallVenue()
    const noise = { ...tape('n', 48), raw: '48 dB(A)', instrument: 'sound-meter' as const }
    act(one, (log) =>
      observeZone(log, 'z', {
        id: 'o',
        from: '09:00',
        to: '12:00',
        words: { crowd: { says: 'few', how: 'swept' } },
        readings: { noise: [noise] },
      }),
    )
    act(one, (log) => setZoneWord(log, 'z', 'allowed', { says: 'allowed', how: 'told', role: 'manager' }))
    act(one, (log) => markState(log, 'w', { state: 'judged', name: 'Ada', date: '2026-03-02' }))
    act(one, (log) => markState(log, 'w', { state: 'surveyed', name: 'Ada', date: '2026-03-01' }))
    const { view } = foldSurvey(one.log)
    expect(view.zones[0]?.words.allowed).toMatchObject({ says: 'allowed', role: 'manager' })
    expect(view.zones[0]?.observations[0]).toMatchObject({
      id: 'o',
      from: '09:00',
      readings: { noise: [{ value: 48 }] },
    })
    expect(view.walks[0]?.states.map((mark) => mark.state)).toEqual(['surveyed', 'judged'])
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

  it('marks a reading settled at its safe side without changing it', () => {
    const one = smallVenue()
    act(one, (log) => takeSafeSide(log, 's1-length'))
    expect(segmentsOf(one)[0]?.readings.length?.[0]).toMatchObject({ ...tape('s1-length', 12), safeSide: true })
  })

  it('shows a reading as it was read, whatever facts stand beside it', () => {
    const one = smallVenue()
    const before = segmentsOf(one)[0]?.readings.length?.[0]
    const written = headsOf(one.log, 's1-length', 'reading').map(factId)
    act(one, () => [
      { entity: 's1-length', field: 'value', value: 99, replaces: [] },
      { entity: 's1-length', field: 'raw', value: '99 m', replaces: [] },
      { entity: 's1-length', field: 'reading', value: tape('s1-length', 99), replaces: written },
    ])
    expect(segmentsOf(one)[0]?.readings.length?.[0]).toEqual(before)
    expect(foldSurvey(one.log).conflicts).toMatchObject([{ entity: 's1-length', field: 'reading' }])
  })

  it('keeps fields of a later version in view, and sets aside values it cannot read', () => {
    const one = smallVenue()
    const put = (entity: string, field: string, value: unknown) =>
      act(one, () => [{ entity, field, value, replaces: [] }])
    put('s1', 'floorMarking', { colour: 'yellow' })
    put(root, 'opening', null)
    act(one, (log) => setSegmentField(log, 's2', 'zone', 17))
    put('s2', 'word/edge', { says: 'none', how: 'guessed' })
    const { view, setAside } = foldSurvey(one.log)
    expect(view.walks[0]?.segments[0]?.floorMarking).toEqual({ colour: 'yellow' })
    expect(view.opening).toBeNull()
    expect(view.walks[0]?.segments[1]?.words).toEqual({})
    expect(setAside?.map(({ entity, field }) => [entity, field])).toEqual([
      ['s2', 'zone'],
      ['s2', 'word/edge'],
    ])
    expect(v.safeParse(surveyView, view).issues).toBeUndefined()
  })

  it('keeps a feature in view whose kind has not arrived', () => {
    const one = smallVenue()
    act(one, (log) => addFeature(log, 's1', { id: 'd', kind: 'drop' }).filter((draft) => draft.field === 'in'))
    expect(segmentsOf(one)[0]?.features).toEqual([{ id: 'd', kind: 'unknown', readings: {}, words: {} }])
  })

  it('is not reached through a key that every object has', () => {
    const one = smallVenue()
    act(one, () => [
      { entity: 's1', field: '__proto__', value: { polluted: true }, replaces: [] },
      { entity: 's1', field: 'word/constructor', value: { says: 'none', how: 'swept' }, replaces: [] },
      { entity: 's1', field: 'toString', value: 'own', replaces: [] },
      { entity: 's1', field: 'own/id', value: 'other', replaces: [] },
    ])
    act(one, (log) => addReading(log, 's1', '__proto__', tape('p')))
    const segment = segmentsOf(one)[0]
    expect(Object.getPrototypeOf(segment)).toBe(Object.prototype)
    expect([segment?.id, segment?.words, ({} as Record<string, unknown>).polluted]).toEqual(['s1', {}, undefined])
    expect(Object.keys(segment?.readings ?? {})).toEqual(['length'])
  })

  it('shows both versions where two people changed one field at once, and both turns', () => {
    const ada = smallVenue()
    const ben = copyOf(ada, 'b', 'Ben')
    act(ada, (log) => nameVenue(log, { contact: 'desk' }))
    act(ben, (log) => nameVenue(log, { contact: 'guard' }))
    act(ada, (log) => setTurn(log, 's1', { id: 'ta', kind: 'turn' }))
    act(ben, (log) => setTurn(log, 's1', { id: 'tb', kind: 'u-turn' }))
    exchange(ada, ben)
    const shown = foldSurvey(ada.log)
    expect(foldSurvey(ben.log)).toEqual(shown)
    expect(shown.conflicts?.map(({ entity, field, versions }) => [entity, field, versions.length])).toEqual([
      [root, 'contact', 2],
      ['s1', 'turn', 2],
    ])
    expect(shown.conflicts?.[0]?.versions[0]?.value).toBe(shown.view.contact)
    act(ben, (log) => nameVenue(log, { contact: 'desk' }))
    exchange(ada, ben)
    expect(foldSurvey(ada.log).conflicts?.map(({ field }) => field)).toEqual(['turn'])
  })
})

describe('what an operation refuses', () => {
  it('an id that is taken: nothing is overwritten', () => {
    const one = smallVenue()
    expect(() => addReading(one.log, 's1', 'width', tape('s1-length'))).toThrow('record/id-taken')
    expect(() => addWalk(one.log, { id: 's1', name: 'again' })).toThrow('record/id-taken')
  })

  it.each([Number.NaN, Number.POSITIVE_INFINITY])('the value %s, in a reading and in any field', (value) => {
    const one = smallVenue()
    expect(() => addReading(one.log, 's1', 'width', tape('r', value))).toThrow('record/no-reading')
    const drafts = [{ entity: 'w', field: 'heading', value: { deep: [value] }, replaces: [] }]
    const before = one.log.devices.get('a')?.length
    expect(() => appendDrafts(one.log, drafts, { device: 'a', clock: '2026-03-01T10:00:00Z' })).toThrow('deep/0')
    expect(one.log.devices.get('a')?.length).toBe(before)
  })
})
