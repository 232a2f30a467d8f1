import { describe, expect, it } from 'vitest'
import { items } from '../../src/record/answers.ts'
import type { FactDraft } from '../../src/record/facts.ts'
import { foldSurvey } from '../../src/record/fold.ts'
import type { FactLog } from '../../src/record/log.ts'
import * as operations from '../../src/record/operations/index.ts'
import { defaultTeamCard } from '../../src/record/team-card.ts'
import { act, smallVenue, tape } from './build.ts'

const help = { role: 'guard', call: 'desk' }
const mark = { state: 'surveyed' as const, name: 'Ada', date: '2026-03-01' }
const override = {
  id: 'o1',
  segment: 's1',
  verdict: 'with-help' as const,
  reason: 'seen',
  name: 'Ada',
  role: 'specialist',
  until: '2026-12-01',
}
const settles = { readings: ['s1-length'], by: 'Ada', reason: 'finer', on: '2026-03-01' }
const says = { says: 'none', how: 'swept' as const }

/** Each named operation once, and what the view then shows of it. */
const each: Record<keyof typeof operations, [(log: FactLog) => FactDraft[], object]> = {
  nameVenue: [(log) => operations.nameVenue(log, { contact: 'desk 0' }), { contact: 'desk 0' }],
  setTeam: [(log) => operations.setTeam(log, defaultTeamCard), { team: { revision: '1' } }],
  setCode: [(log) => operations.setCode(log, 'uk-adm-k'), { code: 'uk-adm-k' }],
  setAnchor: [
    (log) => operations.setAnchor(log, { place: 'p', lat: 1, lon: 2, bearingDegrees: 3 }),
    { anchor: { place: 'p', lat: 1 } },
  ],
  addFloor: [
    (log) => operations.addFloor(log, { id: 'f', name: 'Ground', level: 0 }),
    { floors: [{ id: 'f', level: 0 }] },
  ],
  addZone: [
    (log) => operations.addZone(log, { id: 'y', name: 'Yard', outdoors: true }),
    { zones: [{}, { id: 'y', outdoors: true }] },
  ],
  setZoneField: [
    (log) => operations.setZoneField(log, 'z', 'nearOutsideDoor', true),
    { zones: [{ nearOutsideDoor: true }] },
  ],
  setZoneWord: [
    (log) => operations.setZoneWord(log, 'z', 'signal', { says: 'yes', how: 'swept' }),
    { zones: [{ words: { signal: { says: 'yes' } } }] },
  ],
  observeZone: [
    (log) =>
      operations.observeZone(log, 'z', { id: 'o', from: '09:00', to: '10:00', words: { crowd: says }, readings: {} }),
    { zones: [{ observations: [{ id: 'o', words: { crowd: says } }] }] },
  ],
  addPlace: [
    (log) => operations.addPlace(log, { id: 'p', name: 'Desk', x: 1, y: 2 }),
    { places: [{ id: 'p0' }, { id: 'p', x: 1, y: 2 }] },
  ],
  setPlaceField: [
    (log) => operations.setPlaceField(log, 'p0', 'note', 'by the lift'),
    { places: [{ id: 'p0', note: 'by the lift' }] },
  ],
  movePlace: [
    (log) => operations.movePlace(log, 'p0', { x: 5, y: 6 }),
    { places: [{ id: 'p0', name: 'Start', x: 5, y: 6 }] },
  ],
  addWalk: [
    (log) => operations.addWalk(log, { id: 'v', name: 'Back' }),
    { walks: [{}, { id: 'v', segments: [], states: [], words: {} }] },
  ],
  setWalkField: [(log) => operations.setWalkField(log, 'w', 'heading', 1.5), { walks: [{ heading: 1.5 }] }],
  setWalkWord: [
    (log) => operations.setWalkWord(log, 'w', 'wayOut', { says: 'yes', how: 'swept' }),
    { walks: [{ words: { wayOut: { says: 'yes' } } }] },
  ],
  setAlarm: [(log) => operations.setAlarm(log, 'w', help), { walks: [{ alarm: help }] }],
  markState: [(log) => operations.markState(log, 'w', mark), { walks: [{ states: [mark] }] }],
  addOverride: [(log) => operations.addOverride(log, 'w', override), { walks: [{ overrides: [override] }] }],
  addSegment: [
    (log) => operations.addSegment(log, 'w', { id: 'n', name: 'New', ledBy: 'staff' }, 's1'),
    { walks: [{ segments: [{ id: 's1' }, { id: 'n', ledBy: 'staff' }, { id: 's2' }] }] },
  ],
  splitSegment: [
    (log) => operations.splitSegment(log, 's1', { id: 'n', name: 'New', ledBy: 'robot', at: 4 }),
    { walks: [{ segments: [{ id: 's1' }, { id: 'n' }, { id: 's2' }] }] },
  ],
  joinSegments: [(log) => operations.joinSegments(log, 's1', 's2', 12), { walks: [{ segments: [{ id: 's1' }] }] }],
  moveSegment: [
    (log) => operations.moveSegment(log, 'w', 's2', null),
    { walks: [{ segments: [{ id: 's2' }, { id: 's1' }] }] },
  ],
  setSegmentField: [
    (log) => operations.setSegmentField(log, 's1', 'zone', undefined),
    { walks: [{ segments: [expect.not.objectContaining({ zone: 'z' }), {}] }] },
  ],
  setWord: [
    (log) => operations.setWord(log, 's1', 'edge', says),
    { walks: [{ segments: [{ words: { edge: says } }, {}] }] },
  ],
  settleAnswer: [
    (log) => operations.settleAnswer(log, 's1', 'step', says),
    { walks: [{ segments: [{ words: { step: says } }, {}] }] },
  ],
  clearWord: [(log) => operations.clearWord(log, 's2', 'door'), { walks: [{ segments: [{}, { words: {} }] }] }],
  addReading: [
    (log) => operations.addReading(log, 's1', 'width', tape('r')),
    { walks: [{ segments: [{ readings: { width: [{ id: 'r' }] } }, {}] }] },
  ],
  amendReading: [
    (log) => operations.amendReading(log, 's1', 'length', tape('r', 12), settles),
    { walks: [{ segments: [{ readings: { length: [{ id: 's1-length' }, { id: 'r', settles }] } }, {}] }] },
  ],
  takeSafeSide: [
    (log) => operations.takeSafeSide(log, 's1-length'),
    { walks: [{ segments: [{ readings: { length: [{ value: 12, safeSide: true }] } }, {}] }] },
  ],
  addFeature: [
    (log) => operations.addFeature(log, 's1', { id: 'd', kind: 'mat', along: 1, offset: 0.5 }),
    { walks: [{ segments: [{ features: [{ id: 'd', offset: 0.5 }] }, {}] }] },
  ],
  setTurn: [
    (log) => operations.setTurn(log, 's1', { id: 't', kind: 'turn', side: 'left' }),
    { walks: [{ segments: [{ turn: { id: 't', side: 'left' } }, {}] }] },
  ],
  setFeatureField: [
    (log) => operations.setFeatureField(log, 'm', 'along', 7),
    { walks: [{ segments: [{}, { features: [{ id: 'm', along: 7 }] }] }] },
  ],
  setHelp: [(log) => operations.setHelp(log, 'm', help), { walks: [{ segments: [{}, { features: [{ help }] }] }] }],
  addPhoto: [
    (log) => operations.addPhoto(log, 's1-length', 'ph'),
    { walks: [{ segments: [{ readings: { length: [{ photos: ['ph'] }] } }, {}] }] },
  ],
  remove: [(log) => operations.remove(log, 'm'), { walks: [{ segments: [{}, { features: [] }] }] }],
  restore: [
    (log) => operations.restore(log, 'gone'),
    { walks: [{ segments: [{}, { features: [{ id: 'm' }, { id: 'gone' }] }] }] },
  ],
}

function furnished() {
  const one = smallVenue()
  act(one, (log) => operations.addPlace(log, { id: 'p0', name: 'Start' }))
  act(one, (log) => operations.addFeature(log, 's2', { id: 'm', kind: 'mat' }))
  act(one, (log) => operations.addFeature(log, 's2', { id: 'gone', kind: 'mat' }))
  act(one, (log) => operations.remove(log, 'gone'))
  act(one, (log) => operations.setWord(log, 's2', 'door', says))
  return one
}

/** The aspects of a segment that drafts answer: by a word, or by a reading of length or width. */
function aspectsAnswered(drafts: readonly FactDraft[]): Set<string> {
  const answered = drafts.flatMap(({ field, value }) => {
    const item = field.startsWith('word/') && value !== null ? field.slice(5) : ''
    if (Object.hasOwn(items, item)) return [items[item as keyof typeof items].aspect]
    const list = field === 'in' ? (value as { list: string }).list : ''
    return list.startsWith('readings/') ? [list.slice(9)] : []
  })
  return new Set(answered)
}

describe.each(Object.entries(each))('%s', (_, [operation, shown]) => {
  it('shows in the view, and answers one aspect at most', () => {
    const one = furnished()
    const drafts = operation(one.log)
    expect(aspectsAnswered(drafts).size).toBeLessThanOrEqual(1)
    act(one, () => drafts)
    expect(foldSurvey(one.log).view).toMatchObject(shown)
  })

  it('leaves the log as it is until its drafts are taken in', () => {
    const one = furnished()
    const before = foldSurvey(one.log)
    operation(one.log)
    expect(foldSurvey(one.log)).toBe(before)
  })
})
