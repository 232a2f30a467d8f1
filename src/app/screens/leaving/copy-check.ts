import { attributeOf } from '../../../catalogue/attribute-of.ts'
import { readSurveyFile, writeSurveyFile } from '../../../record/file/index.ts'
import type { FactLog } from '../../../record/log.ts'
import { allFacts } from '../../../record/log.ts'

export type CopyCheck = { ok: true; facts: number } | { ok: false; what: string; whatToDo: string }

/** Reads a copy's text as a file is read and compares it with the log, fact for fact. */
export function checkCopy(text: string, log: FactLog): CopyCheck {
  const read = readSurveyFile(text, attributeOf)
  if (!read.ok) {
    const [first] = read.problems
    return {
      ok: false,
      what: `The copy cannot be read: ${first ? `${first.path} ${first.found}` : 'no reason given'}.`,
      whatToDo: 'Make it again; keep this phone until another copy is checked.',
    }
  }
  if (writeSurveyFile(read.log) !== writeSurveyFile(log))
    return {
      ok: false,
      what: 'The copy does not hold the same entries as this phone.',
      whatToDo: 'Make it again now: something was entered since, or it is another survey.',
    }
  return { ok: true, facts: allFacts(log).length }
}
