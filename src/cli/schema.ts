import { jsonSchema, schemaOf } from '../record/file/index.ts'
import { codePack } from '../standards/pack.ts'
import { readArgs } from './args.ts'
import { done, type Ended } from './ended.ts'

/** `schema survey|team|pack`: the JSON Schema of a file, from the validator that reads it. */
export function schema(args: readonly string[]): Ended {
  const read = readArgs(args, { values: [], places: 1, place: 'name: survey, team or pack' })
  if (!read.ok) return read
  const of = read.args.places[0]
  if (of === 'survey' || of === 'team') return done(`${JSON.stringify(jsonSchema(of), null, 2)}\n`)
  if (of === 'pack') return done(`${JSON.stringify(schemaOf(codePack), null, 2)}\n`)
  return { ok: false, line: `schema ${of} is not known: write schema survey, schema team or schema pack` }
}
