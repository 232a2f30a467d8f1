import type { Kysely } from 'kysely'
import { type Caller, isoOf } from '../office.ts'
import { notFound, Refusal } from '../refusal.ts'
import type { Tables } from '../sql/tables.ts'

/** One line of the list of venues. */
export interface SurveyLine {
  survey: string
  name: string
  client: string | null
  size: number
  changed_at: string
  verdict: string | null
  good_until: string | null
  judged_size: number
}

export interface SurveyFilter {
  /** Part of the venue's name, in any case. */
  name?: string | undefined
  verdict?: string | undefined
  client?: string | undefined
  /** Day: what no longer holds on it. */
  expiredBy?: string | undefined
  /** The last line of the page before, for the next one. */
  after?: { name: string; survey: string } | undefined
  most: number
}

export function surveysOf(db: Kysely<Tables>, branch: string, filter: SurveyFilter): Promise<SurveyLine[]> {
  let query = db
    .selectFrom('surveys')
    .select(['survey', 'name', 'client', 'size', 'changed_at', 'verdict', 'good_until', 'judged_size'])
    .where('branch', '=', branch)
    .where('erased_at', 'is', null)
  if (filter.name)
    query = query.where((eb) =>
      eb(eb.fn<string>('lower', ['name']), 'like', `%${(filter.name as string).toLowerCase().replace(/[%_\\]/g, '')}%`),
    )
  if (filter.verdict) query = query.where('verdict', '=', filter.verdict)
  if (filter.client) query = query.where('client', '=', filter.client)
  if (filter.expiredBy) query = query.where('good_until', '<=', filter.expiredBy)
  const { after } = filter
  if (after)
    query = query.where((eb) =>
      eb.or([eb('name', '>', after.name), eb.and([eb('name', '=', after.name), eb('survey', '>', after.survey)])]),
    )
  return query.orderBy('name').orderBy('survey').limit(filter.most).execute()
}

/** Throws unless the survey is the branch's and still here. A foreign one is not told from one that never was. */
export async function expectSurvey(db: Kysely<Tables>, branch: string, survey: string): Promise<void> {
  const row = await find(db, survey)
  if (row?.branch !== branch) throw notFound('This survey')
  if (row.erased_at !== null) throw erased(row.erased_at)
}

/** As `expectSurvey`, but one that nobody has sent yet will do: true where it is here already. */
export async function expectOwnOrNew(db: Kysely<Tables>, branch: string, survey: string): Promise<boolean> {
  const row = await find(db, survey)
  if (!row) return false
  if (row.branch !== branch) throw notFound('This survey')
  if (row.erased_at !== null) throw erased(row.erased_at)
  return true
}

/**
 * Makes the survey's row where it is new and holds it until the transaction ends: what is added to one survey is added one
 * after the other, in whatever process. Throws where it is another branch's.
 */
export async function holdSurvey(tx: Kysely<Tables>, caller: Caller, survey: string, now: number): Promise<void> {
  const at = isoOf(now)
  await tx
    .insertInto('surveys')
    .values({
      survey,
      branch: caller.branch,
      name: '',
      client: null,
      size: 0,
      made_at: at,
      changed_at: at,
      erased_at: null,
      verdict: null,
      good_until: null,
      judged_size: 0,
    })
    .onConflict((conflict) => conflict.column('survey').doNothing())
    .execute()
  const held = await tx
    .updateTable('surveys')
    .set((eb) => ({ changed_at: eb.ref('changed_at') }))
    .where('survey', '=', survey)
    .where('branch', '=', caller.branch)
    .returning('erased_at')
    .executeTakeFirst()
  if (!held) throw notFound('This survey')
  if (held.erased_at !== null) throw erased(held.erased_at)
}

function find(db: Kysely<Tables>, survey: string) {
  return db.selectFrom('surveys').select(['branch', 'erased_at']).where('survey', '=', survey).executeTakeFirst()
}

function erased(at: string): Refusal {
  return new Refusal(
    410,
    'erased',
    `This survey was erased at the office on ${at.slice(0, 10)}, at the client's wish or the law's.`,
    'Remove it from this phone as well.',
  )
}
