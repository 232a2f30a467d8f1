import type { StateMark, WalkState } from '../../record/survey.ts'
import { own } from './own.ts'
import type { Scope } from './scope.ts'
import type { Refusal } from './tree.ts'
import { dayWords } from './words.ts'

/** A trial is one robot's, one card's: a mark that does not say which proves nothing for this one. */
const bound: readonly WalkState[] = ['tried', 'walked']

/**
 * The last mark of a state that holds for this sheet: made by its date, and not with another version of the team card.
 */
export function markOf(scope: Scope, state: WalkState): StateMark | null {
  const held = scope.walk.states.filter(
    (mark) =>
      mark.state === state &&
      mark.date <= scope.options.on &&
      (mark.team === scope.assessment.team.version || (mark.team === undefined && !bound.includes(state))),
  )
  return held.at(-1) ?? null
}

/** A tape survey alone never reaches a client: no directions before staff tried the walk with this robot. null: go on. */
export function clientRefusal(scope: Scope): Refusal | null {
  if (markOf(scope, 'tried')) return null
  const { name, version } = scope.assessment.team
  const other = scope.walk.states.filter((mark) => mark.state === 'tried').at(-1)
  const tried = `tried by staff with this robot (${own(name)}, version ${own(version)})`
  const found = other
    ? `it was tried on ${dayWords(other.date)} with ${other.team === undefined ? 'a team card that the mark does not name' : `version ${own(other.team)}`}`
    : 'nobody has tried it'
  return {
    kind: 'refusal',
    why: `${own(scope.walk.name)} has no client sheet yet: ${found}`,
    missing: [tried],
    whatToDo: 'have staff try the walk with this robot and mark the walk "tried" with name and date',
  }
}

const order: readonly WalkState[] = ['issued', 'reviewed', 'walked', 'tried', 'judged', 'surveyed']
const words: Record<WalkState, string> = {
  issued: 'issued',
  reviewed: 'reviewed',
  walked: 'walked with the client',
  tried: 'tried by staff',
  judged: 'judged',
  surveyed: 'surveyed',
}

/** "walked with the client: Ana Ruiz, 3 May 2026": the furthest state reached, or null. */
export function furthest(scope: Scope): string | null {
  for (const state of order) {
    const mark = markOf(scope, state)
    if (mark) return `${words[state]}: ${own(mark.name)}, ${dayWords(mark.date)}`
  }
  return null
}
