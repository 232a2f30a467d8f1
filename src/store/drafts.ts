import { type Database, openWriting } from './database.ts'
import { type Trouble, troubleOf } from './trouble.ts'

/** Keeps the half-typed entry of a survey across a restart; null forgets it. */
export async function keepDraft(
  database: Database,
  survey: string,
  draft: unknown,
): Promise<{ saved: true } | Trouble> {
  try {
    const tx = openWriting(database, ['drafts'])
    const drafts = tx.objectStore('drafts')
    await (draft === null ? drafts.delete(survey) : drafts.put(draft, survey))
    await tx.done
    return { saved: true }
  } catch (error) {
    return troubleOf(error)
  }
}

/** The half-typed entry of a survey, or null. */
export async function readDraft(database: Database, survey: string): Promise<unknown> {
  return (await database.get('drafts', survey)) ?? null
}
