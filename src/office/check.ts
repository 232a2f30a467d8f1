import { createHash } from 'node:crypto'
import type { Kysely } from 'kysely'
import { allFacts } from '../record/log.ts'
import type { PhotoStore } from './photo-store.ts'
import { haveOf, logOf } from './repositories/facts.ts'
import type { Tables } from './sql/tables.ts'

/** Reads everything the office holds and says what does not fit together; no problem: an empty list. */
export async function checkOffice(db: Kysely<Tables>, photos: PhotoStore) {
  const problems: string[] = []
  let facts = 0
  const surveys = await db.selectFrom('surveys').select(['survey', 'size']).orderBy('survey').execute()
  for (const { survey, size } of surveys) {
    const held = await haveOf(db, survey)
    const log = await logOf(db, survey)
    const read = allFacts(log)
    facts += read.length
    if (read.length !== size)
      problems.push(`survey ${survey}: ${size} entries counted, ${read.length} read without a gap`)
    for (const [device, n] of Object.entries(held))
      if ((log.devices.get(device)?.length ?? 0) !== n)
        problems.push(
          `survey ${survey}: device ${device} marked up to ${n}, held up to ${log.devices.get(device)?.length ?? 0}`,
        )
  }
  const rows = await db.selectFrom('photos').select(['survey', 'photo']).orderBy('photo').execute()
  for (const photo of new Set(rows.map((row) => row.photo))) {
    const bytes = await photos.get(photo)
    if (!bytes) problems.push(`photo ${photo}: missing`)
    else if (createHash('sha256').update(bytes).digest('hex') !== photo) problems.push(`photo ${photo}: damaged`)
  }
  const sheets = await db.selectFrom('sheets').select(['survey', 'number', 'facts']).orderBy('number').execute()
  for (const sheet of sheets)
    try {
      JSON.parse(sheet.facts)
    } catch {
      problems.push(`sheet ${sheet.number} of ${sheet.survey}: its entries cannot be read`)
    }
  return { surveys: surveys.length, facts, photos: rows.length, sheets: sheets.length, problems }
}
