import { type ReadonlySignal, signal } from '@preact/signals'
import { measuredIn } from '../../catalogue/measured-in.ts'
import { type Problem, readSurveyFile, writeSurveyFile } from '../../record/file/index.ts'
import { allFacts, emptyLog } from '../../record/log.ts'
import { nameVenue } from '../../record/operations/venue.ts'
import { newId } from './new-id.ts'
import { catchUpSessions } from './open-session.ts'
import { phoneStore } from './phone.ts'
import { choices } from './settings.ts'

/** One line of the list of venues. */
export interface OnPhone {
  survey: string
  name: string
  /** When an entry last came in, ISO. */
  changed: string
}

const rows = signal<readonly OnPhone[] | null>(null)
/** The venues on this phone, the last changed first; null: not read yet. */
export const surveysOnPhone: ReadonlySignal<readonly OnPhone[] | null> = rows

export async function listSurveys(): Promise<void> {
  rows.value = await (await phoneStore()).surveys()
}

/** `before`: entries of it that were here; `added`: those that came in. */
export type Begun =
  | { ok: true; survey: string; name: string; before: number; added: number }
  | Refused
  | { ok: false; what: string; whatToDo: string }

/** A file that does not read as a survey. */
export interface Refused {
  ok: false
  problems: readonly Problem[]
}

/** A new venue with nothing but its name. */
export async function beginVenue(name: string): Promise<Begun> {
  const survey = newId('survey')
  const store = await phoneStore()
  const saved = await store.append(survey, nameVenue(emptyLog(survey), { name }), choices.value.person)
  return saved.saved ? { ok: true, survey, name, before: 0, added: saved.facts.length } : refused(saved)
}

/** Takes a survey file's facts in beside what is here: nothing here is changed or lost by it. */
export async function takeInFile(text: string): Promise<Begun> {
  const file = readSurveyFile(text, measuredIn)
  if (!file.ok) return { ok: false, problems: file.problems }
  const { survey, view } = file.survey
  const store = await phoneStore()
  const before = (await store.seen(survey)).reduce((all, [, n]) => all + n, 0)
  const taken = await store.takeIn(allFacts(file.log))
  if (!taken.saved) return refused(taken)
  await catchUpSessions()
  return { ok: true, survey, name: view.name, before, added: taken.added.length }
}

/** The last file made of a survey: when, and how many entries were in it. */
export interface Copy {
  at: string
  facts: number
}

const copyKey = (survey: string) => `copy ${survey}`

/** Remembers that a file was made of a survey. */
export async function copyMade(survey: string, facts: number): Promise<void> {
  const copy: Copy = { at: new Date().toISOString(), facts }
  await (await phoneStore()).changeSettings({ [copyKey(survey)]: copy })
}

/** Null: no file was ever made of it on this phone. */
export async function lastCopy(survey: string): Promise<Copy | null> {
  const copy = (await (await phoneStore()).settings())[copyKey(survey)] as Partial<Copy> | undefined
  return typeof copy?.at === 'string' && typeof copy.facts === 'number' ? { at: copy.at, facts: copy.facts } : null
}

/** A survey as a file, everything kept. */
export async function surveyFile(survey: string): Promise<{ text: string; facts: number }> {
  const log = await (await phoneStore()).openSurvey(survey)
  return { text: writeSurveyFile(log), facts: allFacts(log).length }
}

function refused({ what, whatToDo }: { what: string; whatToDo: string }): Begun {
  return { ok: false, what, whatToDo }
}
