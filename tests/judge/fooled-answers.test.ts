import { describe, expect, test } from 'vitest'
import { judgeSurvey, runToEnd } from '../../src/judge/judge.ts'
import type { SegmentResult, WalkResult } from '../../src/judge/result.ts'
import type { Conflict, Segment, Zone } from '../../src/record/survey.ts'
import {
  above,
  card,
  check,
  doublePlanner,
  feature,
  judged,
  judgedWalk,
  on,
  reading,
  says,
  stretch,
  survey,
  walkOf,
  zone,
} from './build.ts'

/** Answers that were left out, contradicted or put where nobody looks: each once read as a pass. */

const about = (result: { why: { text: string }[] }) => result.why.map((one) => one.text).join('\n')

function withConflict(segment: Segment, conflict: Conflict, place?: Zone): WalkResult {
  const recorded = { ...survey([walkOf([segment])], [place ?? zone()]), conflicts: [conflict] }
  return runToEnd(judgeSurvey(recorded, { planner: doublePlanner, on, team: card() })).walks[0] as WalkResult
}

const versions = [
  { fact: 'a', value: 1, clock: '1' },
  { fact: 'b', value: 2, clock: '2' },
]

describe('surroundings', () => {
  test.each(['crowd', 'noise', 'flow'])('two people answered %s differently for the same hours', (item) => {
    const place = zone()
    const shown = place.observations[0]?.words[item]
    if (shown) shown.rivals = [{ says: 'packed', how: 'swept', person: 'B' }]
    const result = judged(stretch(), { zone: place })
    expect(result.verdict).toBe('not-known')
    expect(about(result)).toContain(`answers to ${item} differ`)
  })

  test.each(['outdoors', 'nearOutsideDoor'])('nobody said of the zone %s: a wet floor is reckoned with', (field) => {
    const { [field]: _, ...rest } = zone() as unknown as Record<string, unknown>
    expect(judged(stretch(), { zone: rest as unknown as Zone }).conditions).toContain('dry floor only')
  })

  test('nobody said whether the zone is outdoors: rain is reckoned with', () => {
    const { outdoors, ...rest } = zone()
    const textured = stretch({ words: { finish: says('textured') } })
    expect(judged(textured, { zone: rest }).conditions).toContain('dry floor only')
  })

  test('nobody answered whether the floor is mopped: a wet floor is reckoned with', () => {
    const place = zone()
    delete place.words.mopped
    expect(judged(stretch(), { zone: place }).conditions).toContain('dry floor only')
  })

  test('what nobody said of the zone turns nothing into do-not-use', () => {
    const { outdoors, ...rest } = zone()
    const open = stretch()
    delete open.words.sensing
    expect(judged(open, { zone: rest }).verdict).toBe('not-known')
    expect(judged({ ...stretch(), zone: 'none' }).verdict).toBe('not-known')
  })

  test('nobody answered whether a strong magnet is near', () => {
    const place = zone()
    delete place.words.magnet
    expect(judged(stretch(), { zone: place }).verdict).toBe('not-known')
  })

  test('mopped "sometimes" is reckoned wet', () => {
    const place = zone()
    place.words.mopped = says('sometimes')
    expect(judged(stretch(), { zone: place }).conditions).toContain('dry floor only')
  })

  test('magnet "perhaps" is no answer', () => {
    const place = zone()
    place.words.magnet = says('perhaps')
    expect(judged(stretch(), { zone: place }).verdict).toBe('not-known')
  })

  test('hours over midnight are not covered by a day', () => {
    const recorded = survey([walkOf([stretch()])], [zone()], { hours: { from: '17:00', to: '09:00' } })
    const result = runToEnd(judgeSurvey(recorded, { planner: doublePlanner, on, team: card() })).walks[0]
    expect(result?.verdict).toBe('not-known')
  })

  test('a noise that masks stands beside the way of a quiet zone: slower reaction, and a caution', () => {
    const loud = judged(stretch({ features: [feature('noise-source', { level: reading(78, 'sound-meter') })] }))
    expect(check(loud, 'noise').state).toBe('tight')
    expect(check(loud, 'stop').demand).toBeGreaterThan(check(judged(stretch()), 'stop').demand as number)
    // The row is called noise that masks: unmeasured, it masks.
    expect(check(judged(stretch({ features: [feature('noise-source')] })), 'noise').state).toBe('tight')
  })
})

describe('answers and features', () => {
  test('a guard taken over from the stretch before settles no edge', () => {
    const drop = feature('drop-off', { distance: reading(1), height: reading(0.5) }, { guard: 'rail' })
    const guard = drop.words.guard
    if (guard) guard.how = 'inherited'
    expect(judged(stretch({ features: [drop] }, ['edge'])).verdict).toBe('not-known')
  })

  test('a guard swept too quickly settles no edge', () => {
    const drop = feature('drop-off', { distance: reading(1), height: reading(0.5) }, { guard: 'rail' })
    const guard = drop.words.guard
    if (guard) guard.tooQuick = true
    expect(judged(stretch({ features: [drop] }, ['edge'])).verdict).toBe('not-known')
  })

  test('slots listed, and only a wet patch is', () => {
    const patch = feature('wet-patch', { pendulum: reading(60, 'pendulum') }, { cause: 'spill' })
    const result = judged(stretch({ features: [patch] }, ['surface']))
    expect(about(result)).toContain('slots over 13 mm is said to be listed, and nothing is')
  })

  test('overhead listed, only a thing on the wall is, and nobody swept', () => {
    const box = feature('wall-projection', { projection: reading(0.12), lowest: reading(0.9, 'rod') })
    const segment = stretch({ features: [box] }, ['overhead'])
    delete segment.readings.overhead
    const result = judged(segment)
    expect(result.verdict).toBe('not-known')
    expect(result.missing).toContain('overhead')
  })

  test('two sweeps that settle one another leave none', () => {
    const act = (of: string) => ({ readings: [of], by: 'A', reason: 'better', on })
    const overhead = [
      { ...above(2.2), id: 'one', settles: act('two') },
      { ...above(2.2), id: 'two', settles: act('one') },
    ]
    expect(judged(stretch({ readings: { overhead } })).verdict).toBe('not-known')
    const lip = feature('threshold', { height: overhead.map((one) => ({ ...one, bound: 'exact' as const })) })
    lip.words.direction = says('up')
    expect(judged(stretch({ features: [lip] }, ['step'])).verdict).toBe('not-known')
  })

  test('a turn entered as a thing along the way is judged or named', () => {
    const turn = feature('turn', { angle: reading(Math.PI / 2, 'square') })
    expect(judged(stretch({ features: [turn] })).verdict).toBe('not-known')
  })

  test('a step entered as the turn is named', () => {
    const step = feature('single-step', { height: reading(0.15) }, { direction: 'up' })
    expect(judged(stretch({ turn: step })).verdict).toBe('not-known')
  })
})

describe('two versions that nobody has settled', () => {
  test('of one reading', () => {
    const segment = stretch()
    const width = segment.readings.width?.[0]?.id as string
    expect(withConflict(segment, { entity: width, field: 'reading', versions }).verdict).toBe('not-known')
  })

  test('of the hours of an observation', () => {
    expect(withConflict(stretch(), { entity: 'o', field: 'to', versions }).verdict).toBe('not-known')
  })

  test.each(['alarm', 'heading'])('of the %s of the walk', (field) => {
    expect(withConflict(stretch(), { entity: 'w', field, versions }).verdict).toBe(
      field === 'alarm' ? 'not-known' : 'usable',
    )
  })

  test.each(['instruments', 'hours', 'code'])('of the %s of the survey', (field) => {
    expect(withConflict(stretch(), { entity: '@venue', field, versions }).verdict).toBe('not-known')
  })

  test('of the team card, unless one is given', () => {
    expect(withConflict(stretch(), { entity: '@venue', field: 'team', versions }).verdict).toBe('usable')
    const recorded = {
      ...survey([walkOf([stretch()])], [zone()], { team: card() }),
      conflicts: [{ entity: '@venue', field: 'team', versions }],
    }
    expect(runToEnd(judgeSurvey(recorded, { planner: doublePlanner, on })).walks[0]?.verdict).toBe('not-known')
  })

  test.each(['segment', 'feature', 'venue'])('an answer of the %s that this version cannot read is none', (holder) => {
    const segment = stretch({ features: [feature('handrail')] })
    const entity = { segment: segment.id, feature: segment.features[0]?.id ?? '', venue: '@venue' }[holder] as string
    const field = holder === 'venue' ? 'instruments' : 'word/edge'
    const recorded = {
      ...survey([walkOf([segment])]),
      setAside: [{ entity, field, expected: 'swept', found: '"by-drone"' }],
    }
    const result = runToEnd(judgeSurvey(recorded, { planner: doublePlanner, on, team: card() })).walks[0]
    expect(result?.verdict).toBe('not-known')
  })

  test('of the way out', () => {
    const wayOut = { ...says('yes'), rivals: [{ says: 'lift', how: 'swept' as const, person: 'B' }] }
    const result = judgedWalk([stretch()], {}, { words: { wayOut, helpCall: says('0'), rest: says('none') } })
    expect(result.verdict).toBe('not-known')
    expect((result.segments[0] as SegmentResult).verdict).toBe('usable')
  })
})
