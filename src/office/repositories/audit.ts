import type { Kysely } from 'kysely'
import { type Caller, isoOf } from '../office.ts'
import { timedId } from '../secrets.ts'
import type { Tables } from '../sql/tables.ts'

/** Adds a line to the branch's log of who did what; in the same transaction as the deed, so that neither stands alone. */
export async function note(
  db: Kysely<Tables>,
  caller: Pick<Caller, 'branch' | 'account' | 'device'>,
  now: number,
  act: string,
  survey: string | null,
  detail: Record<string, unknown> = {},
): Promise<void> {
  await db
    .insertInto('audit')
    .values({
      branch: caller.branch,
      entry: timedId(now),
      at: isoOf(now),
      account: caller.account,
      device: caller.device,
      act,
      survey,
      detail: JSON.stringify(detail),
    })
    .execute()
}

/** A page of the branch's log, oldest first, after the entry given. */
export async function auditAfter(db: Kysely<Tables>, branch: string, after: string, most: number) {
  const rows = await db
    .selectFrom('audit')
    .leftJoin('accounts', 'accounts.account', 'audit.account')
    .select([
      'audit.entry',
      'audit.at',
      'audit.account',
      'accounts.name',
      'audit.device',
      'audit.act',
      'audit.survey',
      'audit.detail',
    ])
    .where('audit.branch', '=', branch)
    .where('audit.entry', '>', after)
    .orderBy('audit.entry')
    .limit(most)
    .execute()
  return rows.map((row) => ({ ...row, detail: JSON.parse(row.detail) as unknown }))
}
