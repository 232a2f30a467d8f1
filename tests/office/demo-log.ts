import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { readSurveyFile } from '../../src/record/file/read-survey-file.ts'
import type { FactLog } from '../../src/record/log.ts'
import { attributeOf } from '../fixtures/demo/survey.ts'

/** A demo venue as the log a phone has of it once it has read the file. */
export function demoLog(venue: string): FactLog {
  const path = join(import.meta.dirname, '..', '..', 'demo-venues', `${venue}.json`)
  const read = readSurveyFile(readFileSync(path, 'utf8'), attributeOf)
  if (!read.ok) throw new Error(JSON.stringify(read.problems[0]))
  return read.log
}
