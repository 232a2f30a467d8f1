import type { Assessment, SegmentResult, WalkResult } from '../../judge/result.ts'
import type { Segment, Survey, SurveyView, Walk } from '../../record/survey.ts'
import { defaultTeamCard, type TeamCard } from '../../record/team-card.ts'

export interface SheetOptions {
  /** The day the sheet is made, YYYY-MM-DD. */
  on: string
  /** Unfinished: says so in every heading. */
  draft?: boolean
  /** The number the office gave it. */
  number?: string
}

/** What every part of a sheet is written from: one walk as surveyed and as judged. */
export interface Scope {
  view: SurveyView
  walk: Walk
  result: WalkResult
  assessment: Assessment
  team: TeamCard
  options: SheetOptions
  /** Each segment with its result, in the order of the walk. */
  stretches: { segment: Segment; result: SegmentResult }[]
}

/** Throws where the result is not of this survey: a promise of the caller. */
export function scopeOf(
  survey: Survey,
  result: WalkResult,
  assessment: Assessment,
  options: SheetOptions,
  team: TeamCard | undefined,
): Scope {
  const walk = survey.view.walks.find((one) => one.id === result.id)
  if (!walk) throw new Error(`sheets/other-walk: the survey has no walk ${result.id}`)
  const stretches = walk.segments.map((segment) => {
    const judged = result.segments.find((one) => one.id === segment.id)
    if (!judged) throw new Error(`sheets/other-walk: segment ${segment.id} was not judged`)
    return { segment, result: judged }
  })
  return {
    view: survey.view,
    walk,
    result,
    assessment,
    team: team ?? survey.view.team ?? defaultTeamCard,
    options,
    stretches,
  }
}
