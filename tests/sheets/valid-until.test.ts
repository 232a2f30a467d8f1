import { readFileSync } from 'node:fs'
import { expect, it } from 'vitest'
import { attributeOf } from '../../src/catalogue/attribute-of.ts'
import { judgeSurvey, runToEnd } from '../../src/judge/judge.ts'
import type { Planner } from '../../src/leash/answer.ts'
import { readSurveyFile } from '../../src/record/file/index.ts'
import type { Survey } from '../../src/record/survey.ts'
import { scopeOf } from '../../src/sheets/content/scope.ts'
import { validUntil } from '../../src/sheets/content/valid-until.ts'

/** Rooms do not age: no scene is solved here. */
const idle: Planner = () => ({
  mTaut: null,
  mTautHigh: 1,
  mSlack: null,
  mSlackHigh: 1,
  pauses: null,
  tightest: null,
  swing: 0,
  motion: null,
  tautMotion: null,
  decided: true,
})

function venue(name: string): Survey {
  const file = readSurveyFile(
    readFileSync(new URL(`../../demo-venues/${name}.json`, import.meta.url), 'utf8'),
    attributeOf,
  )
  if (!file.ok) throw new Error(JSON.stringify(file.problems))
  const { demo: _, asOn: __, ...view } = file.survey.view
  return { ...file.survey, view }
}

function staleOn(survey: Survey, walk: string, on: string): boolean {
  const { walks } = runToEnd(judgeSurvey(survey, { planner: idle, on, walk }))
  return walks[0]?.why.some(({ kind }) => kind === 'stale') ?? false
}

function dayAfter(day: string): string {
  return new Date(Date.parse(`${day}T00:00:00Z`) + 86_400_000).toISOString().slice(0, 10)
}

it.each(['museum', 'clinic', 'interchange', 'teaching'])(
  'is the last day that the judge does not call stale: %s',
  (name) => {
    const survey = venue(name)
    let held = 0
    for (const walk of survey.view.walks) {
      const assessment = runToEnd(judgeSurvey(survey, { planner: idle, on: '2026-11-30', walk: walk.id }))
      const result = assessment.walks[0]
      if (!result) throw new Error('not judged')
      const until = validUntil(scopeOf(survey, result, assessment, { on: '2026-11-30' }, undefined))
      if (until === null) throw new Error('no reading is dated')
      expect(staleOn(survey, walk.id, until), `${walk.id} on ${until}`).toBe(false)
      expect(staleOn(survey, walk.id, dayAfter(until)), `${walk.id} after ${until}`).toBe(true)
      held++
    }
    expect(held).toBeGreaterThan(2)
  },
)

/** Every observation's word, or its noise meter, taken at another time. */
function seenAt(survey: Survey, what: 'flow' | 'meter', time: string): Survey {
  const zones = survey.view.zones.map((zone) => ({
    ...zone,
    observations: zone.observations.map((one) => {
      const { flow } = one.words
      if (what === 'flow') return flow ? { ...one, words: { ...one.words, flow: { ...flow, time } } } : one
      const noise = (one.readings.noise ?? []).map((reading) => ({ ...reading, time }))
      return { ...one, readings: { ...one.readings, noise } }
    }),
  }))
  return { ...survey, view: { ...survey.view, zones } }
}

it.each(['flow', 'meter'] as const)('ends with what was seen first, the %s too', (what) => {
  const survey = seenAt(venue('museum'), what, '2026-10-20T09:00:00Z')
  const [walk] = survey.view.walks
  if (!walk) throw new Error('the museum has no walk')
  const assessment = runToEnd(judgeSurvey(survey, { planner: idle, on: '2026-11-30', walk: walk.id }))
  const [result] = assessment.walks
  if (!result) throw new Error('not judged')
  const until = validUntil(scopeOf(survey, result, assessment, { on: '2026-11-30' }, undefined))
  expect(until).toBe('2026-12-19')
  expect(staleOn(survey, walk.id, '2026-12-19')).toBe(false)
  expect(staleOn(survey, walk.id, '2026-12-20')).toBe(true)
})
