import * as v from 'valibot'
import { foldSurvey } from '../fold.ts'
import { emptyLog, type FactLog } from '../log.ts'
import type { Survey } from '../survey.ts'
import { deviceOfText } from './device-of-text.ts'
import { keepEnvelope } from './envelope.ts'
import { parseJson } from './parse-json.ts'
import { mostProblems, type Problem, problemsOf } from './problem.ts'
import type { AttributeOf } from './reading-field.ts'
import { takeFacts } from './take-facts.ts'
import { takeView } from './take-view.ts'
import { wordsOutside } from './words-outside.ts'

export type SurveyFile = { ok: true; log: FactLog; survey: Survey } | { ok: false; problems: Problem[] }

const head = v.looseObject({
  kind: v.literal('tautline-survey'),
  version: v.literal(1),
  survey: v.pipe(v.string(), v.minLength(1), v.maxLength(200)),
})

/**
 * Reads a survey file of either shape: `facts`, or a `view` written by hand. All or nothing: a file with a problem gives
 * its problems and no survey.
 * @param attributeOf what a feature kind's attribute is measured in; without it readings on features need a value.
 */
export function readSurveyFile(text: string, attributeOf: AttributeOf = () => undefined): SurveyFile {
  const parsed = parseJson(text)
  if (!parsed.ok) return parsed
  const file = v.safeParse(head, parsed.value)
  if (!file.success) return { ok: false, problems: problemsOf(file.issues) }
  const { kind: _, version: __, survey, facts, view, ...more } = file.output
  if ((facts === undefined) === (view === undefined))
    return { ok: false, problems: [shapeProblem(facts === undefined ? 'neither' : 'both')] }
  const log = emptyLog(survey, deviceOfText(text))
  const taken = facts === undefined ? takeView(log, view, attributeOf) : takeFacts(log, facts, attributeOf)
  const problems = taken.length > 0 ? taken : wordsOutside(foldSurvey(log).view)
  if (problems.length > 0) return { ok: false, problems: problems.slice(0, mostProblems) }
  keepEnvelope(log, more)
  return { ok: true, log, survey: foldSurvey(log) }
}

function shapeProblem(found: string): Problem {
  return { path: '', expected: 'either "facts" or "view"', found, whatToDo: 'Keep one of the two.' }
}
