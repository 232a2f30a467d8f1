import type { Assessment } from '../../judge/result.ts'
import type { Survey } from '../../record/survey.ts'
import { scopeOf } from '../../sheets/content/scope.ts'
import { validUntil } from '../../sheets/content/valid-until.ts'

/** The first of a survey's walks to go stale, and the last day on which it still holds; null: nothing is dated. */
export function firstToExpire(survey: Survey, assessment: Assessment): { walk: string; last: string } | null {
  const ends = assessment.walks.flatMap((result) => {
    const last = validUntil(scopeOf(survey, result, assessment, { on: assessment.on }, undefined))
    return last === null ? [] : [{ walk: result.name, last }]
  })
  return ends.sort((a, b) => (a.last < b.last ? -1 : 1))[0] ?? null
}
