import { furthest } from './gate.ts'
import { own, ownWhole } from './own.ts'
import type { Scope } from './scope.ts'
import { list, paragraph, type Section, section } from './tree.ts'
import { capital, dayWords, hoursWords, joined, stopped } from './words.ts'

/** What every sheet says: for whom, with what, when and under which limits it holds. */
export function basis(scope: Scope, goodUntil: string | null): Section {
  const { assessment, result, options, view } = scope
  const state = furthest(scope)
  const lines = [
    `Venue: ${own(view.name)}.`,
    `Walk: ${own(result.name)}.`,
    `Team: ${own(assessment.team.name)}.`,
    `Team card: version ${own(assessment.team.version)}.`,
    leashLine(scope),
    `Date of this sheet: ${dayWords(options.on)}.`,
    `Hours: ${hoursWords(view.hours)}.`,
    `Conditions: ${conditionWords(scope)}.`,
    `Code pack: ${own(assessment.code)}.`,
    goodUntil ? `Good until ${dayWords(goodUntil)}.` : 'Good until: not known, no reading is dated.',
    options.number === undefined ? 'Sheet number: none, not issued.' : `Sheet number: ${own(options.number)}.`,
    state ? `${capital(state)}.` : 'State: nobody has signed for this walk.',
  ]
  const invented = view.demo ? [paragraph('This venue and its people are invented, for trying the tool.')] : []
  return section('What this sheet holds for', [...invented, list(lines)])
}

/** The hours are named on their own line. */
export function conditionWords(scope: Scope): string {
  const said = scope.result.conditions.filter((condition) => !/\d{2}:\d{2}/.test(condition)).map(conditionPhrase)
  return said.length > 0 ? joined(said) : 'as surveyed'
}

/** "dry" alone says too little. */
export function conditionPhrase(condition: string): string {
  return condition === 'dry' ? 'dry floor only' : own(condition)
}

function leashLine({ result }: Scope): string {
  if (result.leash === null) return 'Leash: no one length serves this walk.'
  const changes = result.changes.length > 0 ? ', changed on the way' : ''
  return `Leash: ${Number(result.leash.toFixed(2))} metres${changes}.`
}

/** The judge's own standing texts, for readers other than the client. */
export function standingCautions(scope: Scope): Section {
  return section('Limits of this sheet', [list(scope.assessment.cautions.map((text) => stopped(ownWhole(text))))])
}
