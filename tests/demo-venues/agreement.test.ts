import { describe, expect, test } from 'vitest'
import { judgeSurvey, runToEnd } from '../../src/judge/judge.ts'
import type { Assessment, SegmentResult } from '../../src/judge/result.ts'
import { clearance } from '../../src/leash/clearance.ts'
import { demoSurvey } from '../fixtures/demo/survey.ts'
import { type DemoVenue, demoVenues, expectedOf } from '../fixtures/demo/venues.ts'

/** Three figures, and what rounding of a figure worked by hand adds. */
const withinUsual = 0.002

const assessments = new Map<DemoVenue, Assessment>()

function assessmentOf(venue: DemoVenue): Assessment {
  const known = assessments.get(venue)
  if (known) return known
  const judged = runToEnd(judgeSurvey(demoSurvey(venue), { planner: clearance }))
  assessments.set(venue, judged)
  return judged
}

function segmentOf(venue: DemoVenue, key: string): SegmentResult {
  const [walk, segment] = key.split('/')
  const found = assessmentOf(venue)
    .walks.find((one) => one.id === walk)
    ?.segments.find((one) => one.id === segment)
  if (!found) throw new Error(`no segment ${key} was judged`)
  return found
}

/** The check that governs, as it is listed: the one with that id and the greatest ratio. */
function governingCheck({ checks, governing }: SegmentResult) {
  const high = (ratio: [number | null, number | null] | null) => (ratio ? (ratio[1] ?? Number.POSITIVE_INFINITY) : -1)
  return checks.filter((one) => one.id === governing).sort((a, b) => high(b.ratio) - high(a.ratio))[0]
}

function anyOf(governing: string | string[] | null): (string | null)[] {
  return Array.isArray(governing) ? governing : [governing]
}

describe.each(demoVenues)('the judgement of %s agrees with its record', (venue) => {
  const expected = expectedOf(venue)

  test.each(Object.entries(expected.segments))('%s', (key, wanted) => {
    const judged = segmentOf(venue, key)
    const told = `${judged.sentence} ${JSON.stringify(judged.why.map((why) => why.text))}`
    expect(judged.verdict, told).toBe(wanted.verdict)
    expect(anyOf(wanted.governing), told).toContain(judged.governing)
    if (wanted.ratio) {
      const ratio = governingCheck(judged)?.ratio
      for (const [end, figure] of wanted.ratio.figure.entries()) {
        const found = ratio?.[end] ?? null
        if (figure === null || found === null) expect(found, `${key}, end ${end}`).toBe(figure)
        else
          expect(Math.abs(found - figure), `${found} for ${figure}, end ${end}`).toBeLessThanOrEqual(
            wanted.ratio.within ?? withinUsual,
          )
      }
    }
    if (wanted.leash !== undefined) expect(judged.leash?.recommended).toBe(wanted.leash)
    expect(judged.pauses).toBe(wanted.pauses ?? 0)
    for (const why of wanted.why ?? []) expect(judged.why.map((one) => one.kind)).toContain(why)
    for (const condition of wanted.conditions ?? []) expect(judged.conditions).toContain(condition)
    if (wanted.window) expect([...(judged.window?.closedBy ?? [])].sort()).toEqual([...wanted.window].sort())
  })

  test.each(Object.entries(expected.walks))('walk %s', (id, wanted) => {
    const walk = assessmentOf(venue).walks.find((one) => one.id === id)
    expect(walk?.verdict).toBe(wanted.verdict)
    expect(anyOf(wanted.governing)).toContain(walk?.governing)
    expect({ leash: walk?.leash, pace: walk?.pace }).toEqual({ leash: wanted.leash, pace: wanted.pace })
  })

  test('is of the day in the file, for the team in the file', () => {
    const { on, team } = assessmentOf(venue)
    expect(on).toBe('2026-11-30')
    expect(team.name).toBe(demoSurvey(venue).view.team?.name)
  })
})
