import type { Kysely } from 'kysely'
import type { FactDraft } from '../../record/facts.ts'
import { type FactLog, stampDraft } from '../../record/log.ts'
import { numberIn } from '../../sync/messages.ts'
import { type Caller, isoOf } from '../office.ts'
import { newId } from '../secrets.ts'
import type { Tables } from '../sql/tables.ts'
import { addFacts, haveOf, logOf } from './facts.ts'
import { holdSurvey } from './surveys.ts'

/** The office's own device in facts: settlements and signatures made at the desk's request. */
export async function officeDevice(db: Kysely<Tables>): Promise<string> {
  await db
    .insertInto('meta')
    .values({ name: 'office-device', value: `@${newId('office')}` })
    .onConflict((conflict) => conflict.column('name').doNothing())
    .execute()
  const row = await db.selectFrom('meta').select('value').where('name', '=', 'office-device').executeTakeFirstOrThrow()
  return row.value
}

/**
 * Adds the office's own entries, made from the log as it stands, inside the caller's transaction: the survey is held, so
 * that nothing comes in between. They travel to the phones like any other. Returns how many.
 */
export async function addOwnEntries(
  tx: Kysely<Tables>,
  caller: Caller,
  survey: string,
  now: number,
  make: (log: FactLog) => FactDraft[],
): Promise<number> {
  await holdSurvey(tx, caller, survey, now)
  const device = await officeDevice(tx)
  const drafts = make(await logOf(tx, survey, device))
  const held = numberIn(await haveOf(tx, survey), device)
  const stamp = { device, clock: isoOf(now), person: caller.name }
  return addFacts(
    tx,
    caller,
    survey,
    drafts.map((draft, i) => stampDraft(survey, draft, stamp, held + 1 + i)),
    now,
  )
}
