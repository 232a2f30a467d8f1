import { attributeOf } from '../catalogue/attribute-of.ts'
import { judgeSurvey, runToEnd } from '../judge/judge.ts'
import type { Assessment } from '../judge/result.ts'
import { clearance } from '../leash/clearance.ts'
import { type Problem, readSurveyFile, readTeamFile } from '../record/file/index.ts'
import type { Survey } from '../record/survey.ts'
import type { TeamCard } from '../record/team-card.ts'
import { packIds } from '../standards/pack.ts'
import { type Args, isDay, oneOf } from './args.ts'
import { type Complaint, complaint, type Machine, type OutFile } from './ended.ts'
import { memoOver } from './memo.ts'

/** What `assess` and `sheet` both take. */
export const judgingOptions = ['team', 'code', 'memo', 'walk', 'on'] as const

export interface Judged {
  ok: true
  survey: Survey
  team: TeamCard | undefined
  assessment: Assessment
  /** The memo, where it has grown. */
  files: OutFile[]
  notes: string[]
}

/** Reads the survey that the arguments name and judges it. */
export function judgedFile({ places, values }: Args, machine: Machine): Judged | Complaint {
  const path = places[0] ?? ''
  const text = machine.read(path)
  if (!text.ok) return complaint(`${path}: ${text.why}`, 'give the path of a survey file')
  const file = readSurveyFile(text.text, attributeOf)
  if (!file.ok) return problemLine(path, file.problems)
  const { survey } = file
  const team = teamFrom(values.team, machine)
  if (team && 'ok' in team) return team
  const code = values.code === undefined ? null : oneOf('code', values.code, packIds)
  if (code && !code.ok) return code
  if (values.on !== undefined && !isDay(values.on))
    return complaint(`--on ${values.on} is no day`, 'write it like 2026-11-30')
  const walks = survey.view.walks.map((walk) => walk.id)
  if (values.walk !== undefined && !walks.includes(values.walk))
    return complaint(`--walk ${values.walk} is not in ${path}`, `its walks: ${walks.join(', ') || 'none'}`)
  const kept = values.memo === undefined ? null : machine.read(values.memo)
  if (kept && !kept.ok && !kept.missing) return complaint(`--memo ${values.memo}: ${kept.why}`, 'give another file')
  const memo = values.memo === undefined ? null : memoOver(clearance, kept?.ok ? kept.text : null)
  const assessment = runToEnd(
    judgeSurvey(survey, {
      planner: memo?.planner ?? clearance,
      on: values.on ?? machine.today(),
      ...(team ? { team: team.card } : {}),
      ...(code ? { code: code.word } : {}),
      ...(values.walk === undefined ? {} : { walk: values.walk }),
    }),
  )
  const grown = memo?.text() ?? null
  return {
    ok: true,
    survey,
    team: team?.card,
    assessment,
    files: grown === null || values.memo === undefined ? [] : [{ path: values.memo, content: grown }],
    notes: memo?.note ? [`--memo ${values.memo}: ${memo.note}`] : [],
  }
}

function teamFrom(path: string | undefined, machine: Machine): { card: TeamCard } | Complaint | undefined {
  if (path === undefined) return undefined
  const text = machine.read(path)
  if (!text.ok) return complaint(`--team ${path}: ${text.why}`, 'give the path of a team card file')
  const file = readTeamFile(text.text)
  return file.ok ? { card: file.team } : problemLine(path, file.problems)
}

/** The first problem of a file, and how many more there are. */
function problemLine(path: string, problems: readonly Problem[]): Complaint {
  const first = problems[0]
  const more = problems.length > 1 ? ` (${problems.length - 1} more)` : ''
  if (!first) return complaint(path, 'it cannot be read')
  const where = first.path === '' ? path : `${path}, ${first.path}`
  return complaint(`${where}: expected ${first.expected}, found ${first.found}${more}`, first.whatToDo)
}
