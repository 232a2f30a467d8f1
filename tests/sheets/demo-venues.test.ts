import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { attributeOf } from '../../src/catalogue/attribute-of.ts'
import { judgeSurvey, runToEnd } from '../../src/judge/judge.ts'
import type { Planner } from '../../src/leash/answer.ts'
import { readSurveyFile } from '../../src/record/file/index.ts'
import { lint } from '../../src/sheets/content/lint.ts'
import { outline } from '../../src/sheets/content/outline.ts'
import { demoVenues } from '../fixtures/demo/venues.ts'
import { given, itemsOf, partsOf, textsOf } from '../fixtures/sheets/words-of.ts'

/** Every pinch has 70 mm a side: here the words are tried, not the rooms. */
const roomy: Planner = () => ({
  mTaut: 0.07,
  mTautHigh: 0.08,
  mSlack: 0.07,
  mSlackHigh: 0.08,
  pauses: 0,
  tightest: null,
  swing: 0,
  motion: null,
  tautMotion: null,
  decided: true,
})

/** The only words of the demo venues that a client could not use: on a walk that nobody may be sent on. */
const known: Readonly<Record<string, string[]>> = {
  'lodge-to-magnet-lab': ['colour alone: "yellow"'],
}

describe.each(demoVenues)('the sheets of the demo venue %s', (name) => {
  const file = readSurveyFile(
    readFileSync(new URL(`../../demo-venues/${name}.json`, import.meta.url), 'utf8'),
    attributeOf,
  )
  if (!file.ok) throw new Error(JSON.stringify(file.problems))
  const { survey } = file
  const assessment = runToEnd(judgeSurvey(survey, { planner: roomy }))
  const on = assessment.on

  it.each(assessment.walks.map((walk) => [walk.id, walk] as const))(
    '%s: were it tried and to be walked, a client could use every word',
    (id, walk) => {
      const real = survey.view.walks.find((one) => one.id === id)
      if (!real) throw new Error('no such walk')
      const tried = {
        ...real,
        states: [{ state: 'tried' as const, name: 'Cy Dale', date: on, team: assessment.team.version }],
      }
      const forced = { ...walk, verdict: 'with-help' as const, leash: walk.leash ?? 1, pace: walk.pace ?? 0.5 }
      const asked = { ...survey, view: { ...survey.view, walks: [tried] } }
      const sheet = given(outline(asked, forced, assessment, 'client', { on }))
      expect(lint(sheet).map(({ problem }) => problem)).toEqual(known[id] ?? [])
      const texts = textsOf(sheet)
      expect(`${texts[0]} ${texts[1]}`.length).toBeLessThanOrEqual(200)
      const told = partsOf(sheet).flatMap(itemsOf).join(' ')
      for (const segment of walk.segments.filter((one) => one.ledBy === 'robot')) {
        const stops = new Set(
          segment.checks
            .filter(({ id: of, state }) => of === 'stop-item' || state === 'stop-item' || of === 'edge')
            .map(({ feature }) => feature),
        )
        for (const caution of segment.cautions.filter(({ feature }) => !stops.has(feature)))
          expect(told, caution.text).toContain(caution.text.split(/[.;]/)[0]?.replace(/ here$/, ''))
      }
    },
  )

  it('have the desk sheets of every walk', () => {
    for (const walk of assessment.walks)
      for (const reader of ['venue', 'file', 'reception'] as const) {
        const texts = textsOf(given(outline(survey, walk, assessment, reader, { on })))
        expect(texts).toContain('This venue and its people are invented, for trying the tool.')
        expect(texts.join('\n')).not.toMatch(/undefined|NaN|\[object|sighted guide|\bcommand\b/)
      }
  })
})
