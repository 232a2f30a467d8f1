import { judgeSurvey, runToEnd } from '../judge/judge.ts'
import type { ClearanceAnswer, Planner } from '../leash/answer.ts'
import { clearance } from '../leash/clearance.ts'
import type { Survey } from '../record/survey.ts'
import type { TeamCard } from '../record/team-card.ts'
import { outline } from '../sheets/content/outline.ts'
import { scopeOf } from '../sheets/content/scope.ts'
import { validUntil } from '../sheets/content/valid-until.ts'
import { toHtml } from '../sheets/html/to-html.ts'
import type { Judged, MadeSheet, SheetOrder } from './office.ts'

/** Scenes solved in this process; a new team card meets the same doors and corners in judging before and after. */
const solved = new Map<string, ClearanceAnswer>()
const mostSolved = 400

const planner: Planner = (...asked) => {
  const key = JSON.stringify(asked)
  const before = solved.get(key)
  if (before) return before
  const answer = clearance(...asked)
  if (solved.size >= mostSolved) solved.clear()
  solved.set(key, answer)
  return answer
}

/** The core as the office asks it: the same judge and the same sheets as on the phone. */
export function judgeNow(survey: Survey, team: TeamCard, on: string): Judged {
  const assessment = runToEnd(judgeSurvey(survey, { planner, team, on }))
  const ends = assessment.walks.map((walk) =>
    validUntil(scopeOf(survey, walk, assessment, { on: assessment.on }, team)),
  )
  return {
    walks: assessment.walks.map(({ id, name, verdict, segments, governing }) => ({
      id,
      name,
      verdict,
      sentence: segments.find((one) => one.governing !== null && one.governing === governing)?.sentence ?? '',
    })),
    goodUntil: ends.filter((end) => end !== null).sort()[0] ?? null,
  }
}

export function makeSheetNow({ survey, walk, form, number, on }: SheetOrder): MadeSheet {
  const assessment = runToEnd(judgeSurvey(survey, { planner, on, walk }))
  const result = assessment.walks[0]
  if (!result) return { ok: false, why: 'The walk was not judged.', whatToDo: 'Look at the walk on the screen.' }
  // A demo venue is judged as on its own day; the sheet is made on that day too.
  const options = { on: assessment.on, number: String(number) }
  const written = outline(survey, result, assessment, form, options)
  if (written.kind === 'refusal') return { ok: false, why: `${written.why}.`, whatToDo: `${written.whatToDo}.` }
  return {
    ok: true,
    title: written.title,
    verdict: result.verdict,
    html: toHtml(written),
    goodUntil: validUntil(scopeOf(survey, result, assessment, options, undefined)),
  }
}
