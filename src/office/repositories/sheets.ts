import type { Kysely } from 'kysely'
import type { Have } from '../../sync/messages.ts'
import { isoOf } from '../office.ts'
import { hashOf, newId, newToken } from '../secrets.ts'
import type { Tables } from '../sql/tables.ts'
import type { Signature } from '../standing.ts'

export async function signaturesOf(db: Kysely<Tables>, survey: string): Promise<Signature[]> {
  const rows = await db.selectFrom('signatures').selectAll().where('survey', '=', survey).orderBy('signature').execute()
  return rows.map(({ walk, account, name, have, at }) => ({ walk, account, name, at, have: JSON.parse(have) as Have }))
}

/** The branch's next sheet number. It is used up even where the sheet then cannot be made: numbers are never given twice. */
export async function takeNumber(db: Kysely<Tables>, branch: string): Promise<number> {
  const row = await db
    .updateTable('branches')
    .set((eb) => ({ next_sheet: eb('next_sheet', '+', 1) }))
    .where('branch', '=', branch)
    .returning('next_sheet')
    .executeTakeFirstOrThrow()
  return row.next_sheet - 1
}

/** The walk's sheet of this form that is neither replaced nor withdrawn. */
export function standingSheet(db: Kysely<Tables>, survey: string, walk: string, form: string) {
  return db
    .selectFrom('sheets')
    .select(['number', 'have'])
    .where('survey', '=', survey)
    .where('walk', '=', walk)
    .where('form', '=', form)
    .where('replaced_by', 'is', null)
    .where('withdrawn_at', 'is', null)
    .orderBy('number', 'desc')
    .executeTakeFirst()
}

export function sheetsOf(db: Kysely<Tables>, survey: string) {
  return db
    .selectFrom('sheets')
    .select([
      'number',
      'walk',
      'form',
      'title',
      'verdict',
      'changes',
      'issued_by',
      'issued_at',
      'good_until',
      'replaced_by',
      'withdrawn_at',
      'withdrawn_why',
    ])
    .where('survey', '=', survey)
    .orderBy('number')
    .execute()
}

export function sheetOf(db: Kysely<Tables>, survey: string, number: number) {
  return db
    .selectFrom('sheets')
    .selectAll()
    .where('survey', '=', survey)
    .where('number', '=', number)
    .executeTakeFirst()
}

/** A link to one sheet; its secret is told once and kept as a hash. */
export async function addShare(
  db: Kysely<Tables>,
  survey: string,
  number: number,
  madeBy: string,
  expires: number,
  now: number,
): Promise<{ share: string; token: string }> {
  const share = newId('share')
  const token = newToken()
  await db
    .insertInto('shares')
    .values({
      survey,
      share,
      number,
      token_hash: hashOf(token),
      made_by: madeBy,
      made_at: isoOf(now),
      expires,
      revoked_at: null,
      opened: 0,
      opened_at: null,
    })
    .execute()
  return { share, token }
}

/** What a link leads to, with all that may have ended it; undefined: no such link. */
export function sharedSheet(db: Kysely<Tables>, token: string) {
  return db
    .selectFrom('shares')
    .innerJoin('sheets', (join) =>
      join.onRef('sheets.survey', '=', 'shares.survey').onRef('sheets.number', '=', 'shares.number'),
    )
    .select([
      'shares.survey',
      'shares.share',
      'shares.token_hash',
      'shares.expires',
      'shares.revoked_at',
      'sheets.number',
      'sheets.body',
      'sheets.good_until',
      'sheets.replaced_by',
      'sheets.withdrawn_at',
    ])
    .where('shares.token_hash', '=', hashOf(token))
    .executeTakeFirst()
}

export async function countOpening(db: Kysely<Tables>, survey: string, share: string, now: number): Promise<void> {
  await db
    .updateTable('shares')
    .set((eb) => ({ opened: eb('opened', '+', 1), opened_at: isoOf(now) }))
    .where('survey', '=', survey)
    .where('share', '=', share)
    .execute()
}
