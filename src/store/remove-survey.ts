import { type Database, keysUnder, openWriting } from './database.ts'
import { type Trouble, troubleOf } from './trouble.ts'

/** Deletes a survey from this phone for good: its entries, drafts and the photos given. One transaction: all or nothing. */
export async function removeSurvey(
  database: Database,
  survey: string,
  photos: readonly string[],
): Promise<{ saved: true } | Trouble> {
  try {
    const tx = openWriting(database, ['facts', 'marks', 'surveys', 'snapshots', 'drafts', 'photos'])
    await Promise.all([
      tx.objectStore('facts').delete(keysUnder(survey)),
      tx.objectStore('marks').delete(keysUnder(survey)),
      ...(['surveys', 'snapshots', 'drafts'] as const).map((name) => tx.objectStore(name).delete(survey)),
      ...photos.map((photo) => tx.objectStore('photos').delete(photo)),
    ])
    await tx.done
    return { saved: true }
  } catch (error) {
    return troubleOf(error)
  }
}
