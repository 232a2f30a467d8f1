import type { Fact } from '../record/facts.ts'
import { foldSurvey } from '../record/fold.ts'
import { allFacts, emptyLog, type FactLog, loadFacts } from '../record/log.ts'
import type { StateMark, Survey, Walk, WalkState } from '../record/survey.ts'
import { defaultTeamCard } from '../record/team-card.ts'
import { type Have, isOfficeDevice, numberIn } from '../sync/messages.ts'
import type { Form } from './office.ts'

/** A signature as it is kept: for exactly these facts. */
export interface Signature {
  walk: string
  account: string
  name: string
  have: Have
  at: string
}

/**
 * The survey as a sheet may rest on it: marks "reviewed" and "issued" count where the office itself made them, whatever a
 * phone claims.
 */
export function trustedSurvey(log: FactLog): Survey {
  const trusted = emptyLog(log.survey, log.device)
  const claimed = /^state\/(reviewed|issued)\//
  const facts = allFacts(log)
  const isTrusted = (fact: Fact) => isOfficeDevice(fact.device) || !claimed.test(fact.field)
  // Numbers must follow on: what is left out stands in the log under a field that nothing reads.
  loadFacts(
    trusted,
    facts.map((fact) => (isTrusted(fact) ? fact : { ...fact, entity: '@claimed', field: 'own/claimed' })),
  )
  return foldSurvey(trusted)
}

/** Whether anything but marks of state has been added since the signature: then it no longer holds. */
export function hasChangedSince(log: FactLog, have: Have): boolean {
  return allFacts(log).some((fact) => fact.n > numberIn(have, fact.device) && !fact.field.startsWith('state/'))
}

/** What stands in the way of issuing a walk's sheet in this form, in words; empty: nothing. */
export function obstacles(
  survey: Survey,
  log: FactLog,
  walk: Walk,
  form: Form,
  signatures: readonly Signature[],
): string[] {
  const found: string[] = []
  const version = (survey.view.team ?? defaultTeamCard).revision
  const marked = (state: WalkState) =>
    walk.states.some((mark: StateMark) => mark.state === state && (mark.team === undefined || mark.team === version))
  if (!marked('surveyed')) found.push('nobody has marked the walk as surveyed for this team card')
  // A tape survey alone never reaches a client.
  if ((form === 'client' || form === 'reception') && !marked('tried'))
    found.push('staff have not tried the walk with this robot and this team card')
  const own = signatures.filter((signature) => signature.walk === walk.id)
  if (own.length === 0) found.push('no reviewer has signed it')
  else if (own.every((signature) => hasChangedSince(log, signature.have)))
    found.push('entries have come in since the reviewer signed: it must be reviewed again')
  // The file shows both versions of a dispute; a sheet that is acted on must not rest on one.
  const disputed = (survey.conflicts ?? []).some(({ entity }) => [walk.id, null].includes(walkOf(log, entity)))
  if (form !== 'file' && disputed) found.push('people do not agree on some of it: settle the disputes first')
  return found
}

/** The walk that an entity stands in; null: none, so that it counts for all. */
function walkOf(log: FactLog, entity: string): string | null {
  const visited = new Set<string>()
  let at = entity
  for (;;) {
    const placement = log.places.of.get(at)
    if (!placement || visited.has(at)) return null
    if (placement.list === 'walks') return at
    visited.add(at)
    at = placement.parent
  }
}
