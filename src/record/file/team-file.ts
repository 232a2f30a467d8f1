import * as v from 'valibot'
import { type TeamCard, teamCardFile } from '../team-card.ts'
import { completeTeam, isNode } from './complete-view.ts'
import { parseJson } from './parse-json.ts'
import { type Problem, problemsOf } from './problem.ts'

export type TeamFile = { ok: true; team: TeamCard } | { ok: false; problems: Problem[] }

/** Reads a team card's file. What it leaves out has the default card's figure; what must be asked stays unanswered. */
export function readTeamFile(text: string): TeamFile {
  const parsed = parseJson(text)
  if (!parsed.ok) return parsed
  const file = v.safeParse(teamCardFile, isNode(parsed.value) ? completeTeam(parsed.value) : parsed.value)
  if (!file.success) return { ok: false, problems: problemsOf(file.issues) }
  const { kind: _, version: __, ...team } = file.output
  return { ok: true, team }
}

export function writeTeamFile(team: TeamCard): string {
  return `${JSON.stringify({ kind: 'tautline-team', version: 1, ...team }, null, 2)}\n`
}
