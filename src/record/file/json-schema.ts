import { type JsonSchema, toJsonSchema } from '@valibot/to-json-schema'
import * as v from 'valibot'
import { factSchema } from '../log.ts'
import { surveyViewFile } from '../survey.ts'
import { teamCardFile } from '../team-card.ts'

const surveyFactsFile = v.looseObject({
  kind: v.literal('tautline-survey'),
  version: v.literal(1),
  survey: v.string(),
  facts: v.array(factSchema),
})

/** Keys that reading a file fills in, so that nobody who writes one by hand need write them. */
const filledIn = {
  survey: [
    'id',
    'value',
    'bound',
    'readings',
    'words',
    'features',
    'segments',
    'states',
    'observations',
    'floors',
    'zones',
    'places',
    'walks',
  ],
  team: ['name', 'revision', 'date', 'robot', 'handler', 'leash'],
}

/** The JSON Schema of a file that `readSurveyFile` or `readTeamFile` takes, from the validator that they use. */
export function jsonSchema(of: 'survey' | 'team'): JsonSchema {
  const options = { errorMode: 'ignore' } as const
  if (of === 'team') return withoutRequired(toJsonSchema(teamCardFile, options), filledIn.team)
  return {
    $schema: 'http://json-schema.org/draft-07/schema#',
    title: 'Tautline survey',
    anyOf: [
      toJsonSchema(surveyFactsFile, options),
      withoutRequired(toJsonSchema(surveyViewFile, options), filledIn.survey),
    ],
  }
}

/** The JSON Schema of any other validator of this program. */
export function schemaOf(validator: v.GenericSchema): JsonSchema {
  return toJsonSchema(validator, { errorMode: 'ignore' })
}

function withoutRequired<T>(schema: T, keys: readonly string[]): T {
  if (Array.isArray(schema)) return schema.map((one) => withoutRequired(one, keys)) as T
  if (typeof schema !== 'object' || schema === null) return schema
  return Object.fromEntries(
    Object.entries(schema).map(([key, value]) =>
      key === 'required' && Array.isArray(value)
        ? [key, value.filter((name) => !keys.includes(name))]
        : [key, withoutRequired(value, keys)],
    ),
  ) as T
}
