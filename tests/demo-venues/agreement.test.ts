import { describe, expect, test } from 'vitest'
import { judgeSurvey, runToEnd } from '../../src/judge/judge.ts'
import type { Assessment, SegmentResult } from '../../src/judge/result.ts'
import { clearance } from '../../src/leash/clearance.ts'
import { loopNote } from '../../src/plan/loop-note.ts'
import { demoSurvey } from '../fixtures/demo/survey.ts'
import { type DemoVenue, demoVenues, expectedOf } from '../fixtures/demo/venues.ts'

/** Three figures, and what rounding of a figure worked by hand adds. */
const withinUsual = 0.002

const assessments = new Map<string, Assessment>()

/** One walk judged by itself, once. */
function assessmentOf(venue: DemoVenue, walk: string): Assessment {
  const key = `${venue}/${walk}`
  const known = assessments.get(key)
  if (known) return known
  const judged = runToEnd(judgeSurvey(demoSurvey(venue), { planner: clearance, walk }))
  assessments.set(key, judged)
  return judged
}

function segmentOf(venue: DemoVenue, key: string): SegmentResult {
  const [walk = '', segment] = key.split('/')
  const found = assessmentOf(venue, walk).walks[0]?.segments.find((one) => one.id === segment)
  if (!found) throw new Error(`no segment ${key} was judged`)
  return found
}

/** The check that governs, as it is listed: the one with that id and the greatest ratio. */
function governingCheck({ checks, governing }: SegmentResult) {
  const high = (ratio: [number | null, number | null] | null) => (ratio ? (ratio[1] ?? Number.POSITIVE_INFINITY) : -1)
  return checks.filter((one) => one.id === governing).sort((a, b) => high(b.ratio) - high(a.ratio))[0]
}

/** As near as three figures and the planner's own tolerance allow; null where the record says null. */
function close(found: number | null | undefined, figure: number | null, within: number, where: string): void {
  if (figure === null || found === null || found === undefined) expect(found, where).toBe(figure)
  else expect(Math.abs(found - figure), `${where}: ${found} for ${figure}`).toBeLessThanOrEqual(within * figure)
}

function anyOf(governing: string | string[] | null): (string | null)[] {
  return Array.isArray(governing) ? governing : [governing]
}

// A walk is judged whole at its first segment: side doors are searched at every end of their readings.
const patience = { timeout: 900_000 }

describe.each(demoVenues)('the judgement of %s agrees with its record', patience, (venue) => {
  const expected = expectedOf(venue)

  test.each(Object.entries(expected.segments))('%s', (key, wanted) => {
    const judged = segmentOf(venue, key)
    const told = `${judged.sentence} ${JSON.stringify(judged.why.map((why) => why.text))}`
    expect(judged.verdict, told).toBe(wanted.verdict)
    expect(anyOf(wanted.governing), told).toContain(judged.governing)
    const check = governingCheck(judged)
    const within = wanted.ratio?.within ?? withinUsual
    if (wanted.demand) close(check?.demand, wanted.demand.figure, within, `${key}, demand`)
    if (wanted.capacity) close(check?.capacity, wanted.capacity.figure, within, `${key}, capacity`)
    for (const [end, figure] of (wanted.ratio?.figure ?? []).entries()) {
      close(check?.ratio?.[end], figure, within, `${key}, ratio at end ${end}`)
    }
    if (wanted.leash !== undefined) expect(judged.leash?.recommended).toBe(wanted.leash)
    expect(judged.pauses).toBe(wanted.pauses ?? 0)
    for (const why of wanted.why ?? []) expect(judged.why.map((one) => one.kind)).toContain(why)
    for (const condition of wanted.conditions ?? []) expect(judged.conditions).toContain(condition)
    if (wanted.window) expect([...(judged.window?.closedBy ?? [])].sort()).toEqual([...wanted.window].sort())
  })

  test.each(Object.entries(expected.walks))('walk %s', (id, wanted) => {
    const walk = assessmentOf(venue, id).walks[0]
    expect(walk?.verdict).toBe(wanted.verdict)
    expect(anyOf(wanted.governing)).toContain(walk?.governing)
    expect({ leash: walk?.leash, pace: walk?.pace }).toEqual({ leash: wanted.leash, pace: wanted.pace })
  })

  test('is of the day in the file, for the team in the file', () => {
    const [first = ''] = Object.keys(expected.walks)
    const { on, team } = assessmentOf(venue, first)
    expect(on).toBe('2026-11-30')
    expect(team.name).toBe(demoSurvey(venue).view.team?.name)
  })
})

test('the loop of the museum misses its start by what its record says', () => {
  const { figures } = expectedOf('museum')
  const walk = demoSurvey('museum').view.walks.find((one) => one.id === 'gallery-round')
  const note = walk ? loopNote(walk) : null
  if (!note?.known) throw new Error('the loop has all its lengths and turns')
  expect(note.misclosure.x).toBeCloseTo(figures['loop x']?.figure ?? Number.NaN, 3)
  expect(note.misclosure.y).toBeCloseTo(figures['loop y']?.figure ?? Number.NaN, 3)
  expect(note.misclosure.linear).toBeCloseTo(figures['loop misclosure']?.figure ?? Number.NaN, 3)
})
