import { describe, expect, test } from 'vitest'
import {
  asksSingly,
  finishAsBefore,
  isTooQuick,
  plainButtons,
  shorelineAsBefore,
  zoneAsBefore,
} from '../../src/app/components/strip/plain-rules.ts'
import { addListed, featuresOf, removeListed } from '../../src/app/screens/strip/listed.ts'
import type { Recorder } from '../../src/app/screens/strip/recorder.ts'
import { answersLeft, partLine } from '../../src/app/screens/strip/so-far-line.ts'
import { sweptHeight } from '../../src/app/screens/strip/swept-height.ts'
import type { SegmentResult } from '../../src/judge/result.ts'
import { type Item, items, neverInherited } from '../../src/record/answers.ts'
import { foldSurvey } from '../../src/record/fold.ts'
import { appendDrafts, emptyLog } from '../../src/record/log.ts'
import { addSegment } from '../../src/record/operations/segment.ts'
import { addWalk } from '../../src/record/operations/walk.ts'
import type { Segment, SurveyView } from '../../src/record/survey.ts'
import { defaultTeamCard } from '../../src/record/team-card.ts'

const noon = Date.parse('2026-11-30T12:00:00Z')

function segment(over: Partial<Segment> = {}): Segment {
  return { id: 's', name: '', ledBy: 'robot', readings: {}, words: {}, features: [], ...over }
}

const carpet = { says: 'carpet', how: 'swept' as const, time: '2026-11-30T11:30:00Z' }

describe('the plain stretch card', () => {
  test('its keys name every item in words once, but those with a key of their own', () => {
    const own: Item[] = ['overhead', 'shoreline', 'end-sign']
    const named = plainButtons.flatMap((one) => one.writes.map((write) => write.item))
    const wanted = (Object.keys(items) as Item[]).filter((item) => !own.includes(item))
    expect(named.toSorted()).toEqual(wanted.toSorted())
  })

  test('overhead, edge, step and door are never taken over from the part before', () => {
    for (const button of plainButtons)
      for (const write of button.writes)
        if (neverInherited.includes(write.item)) expect([write.item, write.how]).toEqual([write.item, 'swept'])
  })

  test('15 m confirmed after 9.9 s is too quick, after 10 s is not', () => {
    expect(isTooQuick(15, noon, noon + 9_900)).toBe(true)
    expect(isTooQuick(15, noon, noon + 10_000)).toBe(false)
  })

  test('of ten parts two ask one by one', () => {
    expect(Array.from({ length: 10 }, (_, i) => asksSingly(i)).filter(Boolean)).toHaveLength(2)
  })

  test('the finish is as before within the hour, the zone and the finish alone', () => {
    const before = segment({ words: { finish: carpet }, zone: 'hall' })
    expect(finishAsBefore(segment(), before, noon)).toEqual({ says: 'carpet' })
    expect(finishAsBefore(segment({ zone: 'hall' }), before, noon)).toEqual({ says: 'carpet' })
    expect(finishAsBefore(segment({ zone: 'yard' }), before, noon)).toHaveProperty('refused')
    expect(finishAsBefore(segment(), before, noon + 31 * 60_000)).toHaveProperty('refused')
    expect(finishAsBefore(segment(), undefined, noon)).toHaveProperty('refused')
    const mat = { id: 'm', kind: 'floor-edge', readings: {}, words: {} }
    expect(finishAsBefore(segment(), { ...before, features: [mat] }, noon)).toHaveProperty('refused')
    const unknown = segment({ words: { finish: { ...carpet, says: 'unknown' } } })
    expect(finishAsBefore(segment(), unknown, noon)).toHaveProperty('refused')
  })

  test('the surroundings are as before within the hour and the zone', () => {
    const before = segment({ words: { finish: carpet }, zone: 'hall' })
    expect(zoneAsBefore(segment(), before, noon)).toEqual({ says: 'hall' })
    expect(zoneAsBefore(segment(), before, noon + 31 * 60_000)).toHaveProperty('refused')
    expect(zoneAsBefore(segment(), segment({ words: { finish: carpet } }), noon)).toHaveProperty('refused')
  })

  test('the shoreline is as before within the hour and straight on alone', () => {
    const shoreline = { says: 'left', how: 'swept' as const, time: '2026-11-30T11:30:00Z' }
    const before = segment({ words: { shoreline } })
    expect(shorelineAsBefore(before, noon)).toEqual({ says: 'left' })
    expect(shorelineAsBefore(before, noon + 31 * 60_000)).toHaveProperty('refused')
    const turn = { id: 't', kind: 'turn', readings: {}, words: {} }
    expect(shorelineAsBefore({ ...before, turn }, noon)).toHaveProperty('refused')
    expect(shorelineAsBefore(segment(), noon)).toHaveProperty('refused')
  })

  test('the rod stands at strike + 0.10 m with its own 10 mm, or at the headroom of the pack', () => {
    const view = { name: 'v', floors: [], zones: [], places: [], walks: [] }
    // 1.844 + 0.03 + 0.025 + 0.02 = 1.919; + 0.10 + 0.01 = 2.029, below the 2.03 m of the pack.
    expect(sweptHeight(view)).toBeCloseTo(2.03, 9)
    const tall = { ...defaultTeamCard, handler: { ...defaultTeamCard.handler, stature: 2 } }
    // 2 + 0.03 + 0.025 + 0.02 + 0.10 + 0.01 = 2.185.
    expect(sweptHeight({ ...view, team: tall })).toBeCloseTo(2.19, 9)
  })
})

describe('what is left', () => {
  const view = (one: Segment): SurveyView => ({
    name: 'v',
    floors: [],
    zones: [],
    places: [],
    walks: [{ id: 'w', name: 'w', words: {}, states: [], segments: [one] }],
  })
  const left = (over: Partial<Segment>) => {
    const one = segment(over)
    return answersLeft(one, view(one))
  }
  const none = { says: 'none', how: 'swept' as const }

  test('an empty part lacks length, width and its ten items, one led by staff three', () => {
    expect(left({})).toBe(12)
    expect(left({ ledBy: 'staff' })).toBe(3)
  })

  test('an answer counts, but not one that was too quick or taken over', () => {
    expect(left({ words: { edge: none } })).toBe(11)
    expect(left({ words: { edge: { ...none, tooQuick: true } } })).toBe(12)
    expect(left({ words: { edge: { ...none, how: 'inherited' } } })).toBe(12)
  })

  test('while answers are missing the line has no verdict word, whatever the judge said before', () => {
    const one = segment({ words: { edge: none } })
    const old = { verdict: 'usable', sentence: 'Width governs.' } as SegmentResult
    const line = partLine(one, view(one), old, false)
    expect(line.text).toBe('So far: nothing against it; 11 answers left')
    expect(line.detail).toMatch(/and 8 more$/)
    expect(`${line.text} ${line.detail}`).not.toMatch(/usable|cautions|with help|do not use|not known/)
  })

  test('a narrow width stands against it at once', () => {
    const width = { id: 'r', raw: '0.6 m', value: 0.6, bound: 'exact' as const, instrument: 'tape' as const }
    const one = segment({ readings: { width: [width] } })
    expect(partLine(one, view(one), undefined, true).text).toMatch(/^So far against it: .* 11 answers left$/)
  })

  test('a complete part has its verdict, but not while it is judged anew', () => {
    const words = Object.fromEntries(
      (Object.keys(items) as Item[]).map((item) => [
        item,
        { says: item === 'end-sign' ? 'mat' : 'none', how: 'swept' as const },
      ]),
    )
    const taken = (id: string, value: number) => [
      { id, raw: `${value} m`, value, bound: 'exact' as const, instrument: 'tape' as const },
    ]
    const one = segment({ words, readings: { length: taken('l', 8), width: taken('w', 2), overhead: taken('o', 2.1) } })
    const judged = { verdict: 'with-cautions', sentence: 'Width governs.' } as SegmentResult
    expect(partLine(one, view(one), judged, false)).toEqual({
      text: 'with cautions',
      detail: 'Width governs.',
      complete: true,
      verdict: 'with-cautions',
    })
    expect(partLine(one, view(one), judged, true).text).toBe('Complete, being judged')
  })
})

describe('a thing and the answer "listed"', () => {
  function recording() {
    const log = emptyLog('s', 'phone')
    const stamp = { device: 'phone', clock: '2026-11-30T12:00:00Z' }
    appendDrafts(log, addWalk(log, { id: 'w', name: 'walk' }), stamp)
    appendDrafts(log, addSegment(log, 'w', { id: 'p', name: '', ledBy: 'robot' }), stamp)
    const now = () => foldSurvey(log).view.walks[0]?.segments[0] as Segment
    const recorder = () =>
      ({ segment: now(), answer: (says: string, how: 'swept') => ({ says, how }) }) as unknown as Recorder
    const add = (id: string, kind: string) => appendDrafts(log, addListed(recorder(), log, id, kind), stamp)
    const remove = (id: string) => {
      const feature = now().features.find((one) => one.id === id)
      if (feature) appendDrafts(log, removeListed(log, now(), feature), stamp)
    }
    return { now, add, remove }
  }

  test('the first door answers the door, and taking the last one away asks again', () => {
    const { now, add, remove } = recording()
    add('one', 'hinged-door')
    expect(now().words.door?.says).toBe('listed')
    add('two', 'gate')
    expect(featuresOf(now(), 'door')).toHaveLength(2)
    remove('one')
    expect(now().words.door?.says).toBe('listed')
    remove('two')
    expect(now().words.door).toBeUndefined()
  })

  test('a grating answers the slots, a wet patch the wetness, a narrowing nothing', () => {
    const { now, add } = recording()
    add('one', 'grating')
    expect(now().words.slots?.says).toBe('listed')
    add('two', 'wet-patch')
    expect(now().words.wetness?.says).toBe('wet')
    const before = Object.keys(now().words).length
    add('three', 'narrowing')
    expect(Object.keys(now().words)).toHaveLength(before)
  })
})
