import { allFacts, type FactLog } from '../log.ts'
import { readEnvelope } from './envelope.ts'

/** The survey as a file of facts, everything kept: one fact a line, by device and number. */
export function writeSurveyFile(log: FactLog): string {
  const head = { ...readEnvelope(log), kind: 'tautline-survey', version: 1, survey: log.survey }
  const facts = allFacts(log).map((fact) => JSON.stringify(fact))
  return `${JSON.stringify(head).slice(0, -1)},"facts":[\n${facts.join(',\n')}\n]}\n`
}
