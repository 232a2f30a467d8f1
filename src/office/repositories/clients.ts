import type { Kysely } from 'kysely'
import { type Caller, isoOf } from '../office.ts'
import type { Tables } from '../sql/tables.ts'
import { note } from './audit.ts'

/** Everything the office holds that belongs to one client, as plain data. */
export async function exportClient(db: Kysely<Tables>, branch: string, client: string) {
  const surveys = await db
    .selectFrom('surveys')
    .selectAll()
    .where('branch', '=', branch)
    .where('client', '=', client)
    .orderBy('survey')
    .execute()
  const parts = surveys.map(async ({ survey, name }) => ({
    survey,
    name,
    facts: (
      await db
        .selectFrom('facts')
        .select(['body', 'author', 'at'])
        .where('survey', '=', survey)
        .orderBy('device')
        .orderBy('n')
        .execute()
    ).map(({ body, author, at }) => ({ fact: JSON.parse(body) as unknown, broughtBy: author, at })),
    photos: await db.selectFrom('photos').selectAll().where('survey', '=', survey).orderBy('photo').execute(),
    signatures: await db.selectFrom('signatures').selectAll().where('survey', '=', survey).execute(),
    sheets: await db.selectFrom('sheets').selectAll().where('survey', '=', survey).orderBy('number').execute(),
    links: await db
      .selectFrom('shares')
      .select(['share', 'number', 'made_at', 'expires', 'revoked_at', 'opened', 'opened_at'])
      .where('survey', '=', survey)
      .execute(),
    givings: await db.selectFrom('givings').selectAll().where('survey', '=', survey).execute(),
    fixes: await db.selectFrom('fixes').selectAll().where('survey', '=', survey).execute(),
  }))
  return { client, surveys: await Promise.all(parts) }
}

/**
 * Erases what belongs to one client, inside the caller's transaction: every entry, sheet, link and note of their surveys.
 * What stays is that a survey of that id was erased and when, so that a phone that still holds it is told and cannot bring
 * it back. Returns the surveys, and the photos that nothing refers to any more.
 */
export async function eraseClient(
  tx: Kysely<Tables>,
  caller: Caller,
  client: string,
  now: number,
): Promise<{ surveys: string[]; photos: string[] }> {
  const rows = await tx
    .updateTable('surveys')
    .set({
      erased_at: isoOf(now),
      client: null,
      name: '',
      size: 0,
      judged_size: 0,
      verdict: null,
      good_until: null,
      changed_at: isoOf(now),
    })
    .where('branch', '=', caller.branch)
    .where('client', '=', client)
    .where('erased_at', 'is', null)
    .returning('survey')
    .execute()
  const surveys = rows.map(({ survey }) => survey).sort()
  if (surveys.length === 0) return { surveys, photos: [] }
  const held = await tx.selectFrom('photos').select('photo').distinct().where('survey', 'in', surveys).execute()
  for (const table of [
    'facts',
    'marks',
    'photos',
    'signatures',
    'sheets',
    'shares',
    'givings',
    'fixes',
    'job_items',
  ] as const)
    await tx.deleteFrom(table).where('survey', 'in', surveys).execute()
  // Lines of the log stay, without what they told of the client.
  await tx.updateTable('audit').set({ detail: '{"erased":true}' }).where('survey', 'in', surveys).execute()
  for (const survey of surveys) await note(tx, caller, now, 'survey erased', survey)
  const photos = held.map(({ photo }) => photo)
  const still =
    photos.length === 0
      ? []
      : await tx.selectFrom('photos').select('photo').distinct().where('photo', 'in', photos).execute()
  const kept = new Set(still.map(({ photo }) => photo))
  return { surveys, photos: photos.filter((photo) => !kept.has(photo)) }
}
