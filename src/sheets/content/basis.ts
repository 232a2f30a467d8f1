import { packIds } from '../../standards/pack.ts'
import { pack } from '../../standards/packs.ts'
import { markWords } from './directions.ts'
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
    `Conditions: ${joined(conditionsOf(scope)) || 'as surveyed'}.`,
    `Code pack: ${own(packName(assessment.code))}.`,
    goodUntil ? `Good until ${dayWords(goodUntil)}.` : 'Good until: not known, no reading is dated.',
    options.number === undefined ? 'Sheet number: none, not issued.' : `Sheet number: ${own(options.number)}.`,
    state ? `${capital(state)}.` : 'State: nobody has signed for this walk.',
  ]
  const invented = view.demo ? [paragraph('This venue and its people are invented, for trying the tool.')] : []
  return section('What this sheet holds for', [...invented, list(lines)])
}

/** What the walk holds under, besides its hours, which have their own line; "dry" alone says too little. */
export function conditionsOf({ result }: Scope): string[] {
  return result.conditions
    .filter((condition) => !/\d{2}:\d{2}|^shown at/.test(condition))
    .map((condition) => (condition === 'dry' ? 'dry floor only' : own(condition)))
}

/** The published name of the pack judged with; its id where this program has none of that name. */
function packName(code: string): string {
  const id = packIds.find((one) => one === code)
  return id ? pack(id).name : code
}

function leashLine({ result }: Scope): string {
  if (result.leash === null) return 'Leash: no one length serves this walk.'
  const changes = result.changes.length > 0 ? ', changed on the way' : ''
  return `Leash: ${markWords(result.leash)}${changes}.`
}

/** The judge's own standing texts, for readers other than the client. */
export function standingCautions(scope: Scope): Section {
  return section('Limits of this sheet', [list(scope.assessment.cautions.map((text) => stopped(ownWhole(text))))])
}
