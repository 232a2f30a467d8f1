import type { Survey } from '../record/survey.ts'
import { defaultTeamCard, type TeamCard } from '../record/team-card.ts'
import type { Judge } from './office.ts'

export interface TrialResult {
  walks: { walk: string; name: string; before: string; after: string; sentence: string; changes: boolean }[]
}

/** A survey judged with its own team card and with another, walk by walk: what would change. */
export async function tryTeam(judge: Judge, survey: Survey, team: TeamCard, on: string): Promise<TrialResult> {
  const before = await judge(survey, survey.view.team ?? defaultTeamCard, on)
  const after = await judge(survey, team, on)
  return {
    walks: after.walks.map((walk) => {
      const old = before.walks.find((one) => one.id === walk.id)?.verdict ?? 'not-known'
      return {
        walk: walk.id,
        name: walk.name,
        before: old,
        after: walk.verdict,
        sentence: walk.sentence,
        changes: old !== walk.verdict,
      }
    }),
  }
}
