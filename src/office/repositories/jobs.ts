import type { Kysely } from 'kysely'
import { isoOf } from '../office.ts'
import { newId } from '../secrets.ts'
import type { Tables } from '../sql/tables.ts'
import { transact } from '../sql/transact.ts'

/** How long a worker that says nothing more keeps an item before another takes it over. */
export const leaseHolds = 5 * 60 * 1000

/** A job over every survey of the branch that is here now. */
export async function addJob(
  db: Kysely<Tables>,
  { branch, account }: { branch: string; account: string },
  kind: string,
  detail: unknown,
  now: number,
): Promise<{ job: string; total: number }> {
  return transact(db, async (tx) => {
    const surveys = await tx
      .selectFrom('surveys')
      .select('survey')
      .where('branch', '=', branch)
      .where('erased_at', 'is', null)
      .where('size', '>', 0)
      .orderBy('survey')
      .execute()
    const job = newId('job')
    await tx
      .insertInto('jobs')
      .values({
        job,
        branch,
        kind,
        detail: JSON.stringify(detail),
        made_by: account,
        made_at: isoOf(now),
        total: surveys.length,
      })
      .execute()
    for (let i = 0; i < surveys.length; i += 500)
      await tx
        .insertInto('job_items')
        .values(
          surveys
            .slice(i, i + 500)
            .map(({ survey }) => ({ job, survey, state: 'waiting', lease_owner: null, lease_until: 0, result: null })),
        )
        .execute()
    return { job, total: surveys.length }
  })
}

export interface Leased {
  job: string
  survey: string
  kind: string
  detail: unknown
}

/** Takes one waiting item, or one whose worker let its lease run out; null: nothing to do. Of two workers one gets it. */
export async function lease(db: Kysely<Tables>, owner: string, now: number): Promise<Leased | null> {
  for (;;) {
    const next = await db
      .selectFrom('job_items')
      .select(['job', 'survey'])
      .where('state', '=', 'waiting')
      .where('lease_until', '<=', now)
      .orderBy('job')
      .orderBy('survey')
      .limit(1)
      .executeTakeFirst()
    if (!next) return null
    const taken = await db
      .updateTable('job_items')
      .set({ lease_owner: owner, lease_until: now + leaseHolds })
      .where('job', '=', next.job)
      .where('survey', '=', next.survey)
      .where('state', '=', 'waiting')
      .where('lease_until', '<=', now)
      .returning('job')
      .executeTakeFirst()
    if (!taken) continue
    const job = await db
      .selectFrom('jobs')
      .select(['kind', 'detail'])
      .where('job', '=', next.job)
      .executeTakeFirstOrThrow()
    return { ...next, kind: job.kind, detail: JSON.parse(job.detail) as unknown }
  }
}

/** Keeps an item that is being worked on from being taken over. */
export async function renew(db: Kysely<Tables>, { job, survey }: Leased, owner: string, now: number): Promise<void> {
  await db
    .updateTable('job_items')
    .set({ lease_until: now + leaseHolds })
    .where('job', '=', job)
    .where('survey', '=', survey)
    .where('state', '=', 'waiting')
    .where('lease_owner', '=', owner)
    .execute()
}

/** Ends an item with its result; false where the lease has gone to another worker meanwhile: then theirs counts. */
export async function finish(
  db: Kysely<Tables>,
  { job, survey }: Leased,
  owner: string,
  state: 'done' | 'failed',
  result: unknown,
): Promise<boolean> {
  const done = await db
    .updateTable('job_items')
    .set({ state, result: JSON.stringify(result), lease_owner: null, lease_until: 0 })
    .where('job', '=', job)
    .where('survey', '=', survey)
    .where('state', '=', 'waiting')
    .where('lease_owner', '=', owner)
    .returning('survey')
    .executeTakeFirst()
  return done !== undefined
}

/** A job of the branch with its progress; undefined: there is none of that id. */
export async function jobOf(db: Kysely<Tables>, branch: string, job: string) {
  const row = await db
    .selectFrom('jobs')
    .selectAll()
    .where('branch', '=', branch)
    .where('job', '=', job)
    .executeTakeFirst()
  if (!row) return undefined
  const counts = await db
    .selectFrom('job_items')
    .select('state')
    .select((eb) => eb.fn.countAll<number>().as('items'))
    .where('job', '=', job)
    .groupBy('state')
    .execute()
  const of = (state: string) => Number(counts.find((one) => one.state === state)?.items ?? 0)
  return {
    job,
    kind: row.kind,
    detail: JSON.parse(row.detail) as unknown,
    madeBy: row.made_by,
    madeAt: row.made_at,
    total: row.total,
    done: of('done'),
    failed: of('failed'),
    waiting: of('waiting'),
  }
}

export async function resultsOf(db: Kysely<Tables>, job: string, after: string, most: number) {
  const rows = await db
    .selectFrom('job_items')
    .innerJoin('surveys', 'surveys.survey', 'job_items.survey')
    .select(['job_items.survey', 'surveys.name', 'job_items.state', 'job_items.result'])
    .where('job_items.job', '=', job)
    .where('job_items.state', '!=', 'waiting')
    .where('job_items.survey', '>', after)
    .orderBy('job_items.survey')
    .limit(most)
    .execute()
  return rows.map(({ result, ...row }) => ({ ...row, result: JSON.parse(result ?? 'null') as unknown }))
}
