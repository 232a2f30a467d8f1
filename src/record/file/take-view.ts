import * as v from 'valibot'
import { undated } from '../facts.ts'
import { appendDrafts, type FactLog } from '../log.ts'
import { root } from '../placement.ts'
import { type SurveyView, surveyView } from '../survey.ts'
import { completeView, isNode } from './complete-view.ts'
import { envelope } from './envelope.ts'
import { type Problem, problemsOf } from './problem.ts'
import type { AttributeOf } from './reading-field.ts'
import { factsOfView } from './view-to-facts.ts'

/** Takes a hand-written view into an empty log; returns what stands in the way, and then takes nothing. */
export function takeView(log: FactLog, view: unknown, attributeOf: AttributeOf): Problem[] {
  if (!isNode(view))
    return [{ path: 'view', expected: 'a venue', found: typeof view, whatToDo: 'Write the venue as an object.' }]
  const completed = completeView(view, attributeOf)
  const read = v.safeParse(surveyView, completed.view)
  const problems = [...completed.problems, ...(read.success ? [] : problemsOf(read.issues, 'view'))]
  if (problems.length > 0) return problems
  const drafts = factsOfView(completed.view as SurveyView, log.device)
  const used = new Set([root, envelope])
  for (const { entity, field } of drafts) {
    if (field !== 'in') continue
    if (used.has(entity)) problems.push(usedTwice(entity))
    used.add(entity)
  }
  if (problems.length === 0) appendDrafts(log, drafts, { device: log.device, clock: undated })
  return problems
}

function usedTwice(id: string): Problem {
  return {
    path: 'view',
    expected: 'ids that stand once in the whole file',
    found: `"${id}" again`,
    whatToDo: 'Give each part its own id.',
  }
}
