import { foldSurvey } from '../fold.ts'
import { currentValue, type FactLog, headsOf, mergeFacts } from '../log.ts'
import type { Reading } from '../survey.ts'
import { contradiction } from './complete-view.ts'
import { type Problem, shorten } from './problem.ts'
import { type AttributeOf, fieldOfReading } from './reading-field.ts'
import { contradicts, unitsOf } from './reading-value.ts'

/** Takes a file's facts into an empty log; returns what stands in the way. The log is then not to be used. */
export function takeFacts(log: FactLog, facts: unknown, attributeOf: AttributeOf): Problem[] {
  if (!Array.isArray(facts))
    return [{ path: 'facts', expected: 'a list of facts', found: typeof facts, whatToDo: 'Export the survey again.' }]
  const index = new Map(facts.map((fact: unknown, i) => [fact, i]))
  const pathOf = (fact: unknown, inner: string) => ['facts', index.get(fact), inner].filter((p) => p !== '').join('/')
  const { refused } = mergeFacts(log, facts)
  if (refused.length > 0)
    return refused.map(({ fact, path, expected, found, whatToDo }) => ({
      path: pathOf(fact, path),
      expected,
      found: shorten(found),
      whatToDo,
    }))
  const unreadable = (foldSurvey(log).setAside ?? [])
    // What a later version adds, or has not yet arrived, is kept without being read.
    .filter(({ field, found }) => field !== 'in' && found !== 'nothing yet')
    .map(({ entity, field, expected, found }) => ({
      path: pathOf(headsOf(log, entity, field.replace(/^(reading|override)\/.*/, '$1'))[0], 'value'),
      expected: `${expected} as ${field} of ${entity}`,
      found: shorten(found),
      whatToDo: 'Get the file again from the phone that wrote it.',
    }))
  return [...unreadable, ...contradictions(log, attributeOf, pathOf)]
}

function contradictions(
  log: FactLog,
  attributeOf: AttributeOf,
  pathOf: (fact: unknown, inner: string) => string,
): Problem[] {
  const problems: Problem[] = []
  for (const [entity, { parent, list }] of log.places.of) {
    if (!list.startsWith('readings/')) continue
    const kind = currentValue(log, parent, 'kind')
    const holderList = log.places.of.get(parent)?.list ?? ''
    const field = fieldOfReading(holderList, typeof kind === 'string' ? kind : undefined, list.slice(9), attributeOf)
    for (const fact of headsOf(log, entity, 'reading')) {
      const { raw, value, bound } = fact.value as Reading
      if (field && contradicts(raw, { value, bound }, field, unitsOf(field)))
        problems.push(contradiction(pathOf(fact, 'value'), raw, value))
    }
  }
  return problems
}
