import type { Kysely } from 'kysely'
import type { Fact } from '../../record/facts.ts'
import { sameJson } from '../../record/json.ts'
import { emptyLog, type FactLog, loadFacts } from '../../record/log.ts'
import { root } from '../../record/placement.ts'
import { type Have, numberIn, page } from '../../sync/messages.ts'
import { type Caller, isoOf } from '../office.ts'
import { Refusal } from '../refusal.ts'
import type { Tables } from '../sql/tables.ts'
import { holdSurvey } from './surveys.ts'

/**
 * Adds facts to a survey, inside the caller's transaction: all of them or, thrown, none. Those that are here already pass.
 * A number that does not follow on is a gap; other content under a number already here is a fork (a copied or restored
 * phone). What was stored is read off the insert itself, never off what was sent, so that two phones that send the same
 * numbers at the same moment cannot both be told "stored".
 */
export async function addFacts(
  tx: Kysely<Tables>,
  caller: Caller,
  survey: string,
  facts: readonly Fact[],
  now: number,
): Promise<number> {
  if (facts.length === 0) return 0
  await holdSurvey(tx, caller, survey, now)
  const marks = await haveOf(tx, survey)
  const sorted = [...facts].sort((a, b) => (a.device === b.device ? a.n - b.n : a.device < b.device ? -1 : 1))
  const top = new Map(Object.entries(marks))
  for (const { device, n } of sorted) {
    const next = (top.get(device) ?? 0) + 1
    if (n > next) throw gap(device, next, n)
    if (n === next) top.set(device, n)
  }
  const stored = await insert(tx, caller, survey, sorted, now)
  await expectSame(
    tx,
    survey,
    sorted.filter((fact) => !stored.has(keyOf(fact))),
  )
  // A number sent twice in one message with two contents: only one of them was stored.
  const twice = twiceOver(sorted)
  if (twice) throw fork(twice)
  for (const [device, n] of top)
    if (n !== numberIn(marks, device))
      await tx
        .insertInto('marks')
        .values({ survey, device, n })
        .onConflict((conflict) => conflict.columns(['survey', 'device']).doUpdateSet({ n }))
        .execute()
  if (stored.size > 0) await touch(tx, survey, sorted, stored.size, now)
  return stored.size
}

/** How far each device is held. */
export async function haveOf(db: Kysely<Tables>, survey: string): Promise<Have> {
  const rows = await db
    .selectFrom('marks')
    .select(['device', 'n'])
    .where('survey', '=', survey)
    .orderBy('device')
    .execute()
  return Object.fromEntries(rows.map(({ device, n }) => [device, n]))
}

/** A page of what `have` does not cover, by device and number, and whether more waits behind it. */
export async function factsBeyond(
  db: Kysely<Tables>,
  survey: string,
  held: Have,
  have: Have,
): Promise<{ facts: Fact[]; more: boolean }> {
  const facts: Fact[] = []
  let characters = 0
  for (const [device, n] of Object.entries(held)) {
    const from = numberIn(have, device)
    if (from >= n) continue
    const rows = await db
      .selectFrom('facts')
      .select('body')
      .where('survey', '=', survey)
      .where('device', '=', device)
      .where('n', '>', from)
      .where('n', '<=', n)
      .orderBy('n')
      .limit(page.facts + 1)
      .execute()
    for (const { body } of rows) {
      characters += body.length
      if (facts.length > 0 && (facts.length >= page.facts || characters > page.characters)) return { facts, more: true }
      facts.push(JSON.parse(body) as Fact)
    }
  }
  return { facts, more: false }
}

/** The whole survey as a log, for folding, up to `have` where that is given. */
export async function logOf(db: Kysely<Tables>, survey: string, device = 'office', have?: Have): Promise<FactLog> {
  const rows = await db.selectFrom('facts').select('body').where('survey', '=', survey).execute()
  const facts = rows.map(({ body }) => JSON.parse(body) as Fact)
  const log = emptyLog(survey, device)
  loadFacts(log, have ? facts.filter((fact) => fact.n <= numberIn(have, fact.device)) : facts)
  return log
}

/** Whose tokens brought the survey's facts, and how many each. */
export function authorsOf(db: Kysely<Tables>, survey: string) {
  return db
    .selectFrom('facts')
    .select(['author', 'device'])
    .select((eb) => eb.fn.countAll<number>().as('facts'))
    .where('survey', '=', survey)
    .groupBy(['author', 'device'])
    .orderBy('author')
    .orderBy('device')
    .execute()
}

async function insert(
  tx: Kysely<Tables>,
  caller: Caller,
  survey: string,
  facts: readonly Fact[],
  now: number,
): Promise<Set<string>> {
  const rows = await tx
    .insertInto('facts')
    .values(
      facts.map((fact) => ({
        survey,
        device: fact.device,
        n: fact.n,
        body: JSON.stringify(fact),
        author: caller.account,
        via: caller.device,
        at: isoOf(now),
      })),
    )
    .onConflict((conflict) => conflict.columns(['survey', 'device', 'n']).doNothing())
    .returning(['device', 'n'])
    .execute()
  return new Set(rows.map(keyOf))
}

async function expectSame(tx: Kysely<Tables>, survey: string, facts: readonly Fact[]): Promise<void> {
  for (const device of new Set(facts.map((fact) => fact.device))) {
    const own = facts.filter((fact) => fact.device === device)
    const rows = await tx
      .selectFrom('facts')
      .select(['n', 'body'])
      .where('survey', '=', survey)
      .where('device', '=', device)
      .where('n', '>=', own[0]?.n ?? 0)
      .where('n', '<=', own.at(-1)?.n ?? 0)
      .execute()
    const bodies = new Map(rows.map(({ n, body }) => [n, body]))
    for (const fact of own) {
      const body = bodies.get(fact.n)
      if (body === undefined || !sameJson(JSON.parse(body), fact)) throw fork(fact)
    }
  }
}

function twiceOver(sorted: readonly Fact[]): Fact | null {
  return (
    sorted.find((fact, i) => {
      const before = sorted[i - 1]
      return before !== undefined && keyOf(before) === keyOf(fact) && !sameJson(before, fact)
    }) ?? null
  )
}

async function touch(tx: Kysely<Tables>, survey: string, facts: readonly Fact[], added: number, now: number) {
  const name = facts.findLast((fact) => fact.entity === root && fact.field === 'name' && typeof fact.value === 'string')
  await tx
    .updateTable('surveys')
    .set((eb) => ({
      size: eb('size', '+', added),
      changed_at: isoOf(now),
      // A NUL cannot be kept in a text column of PostgreSQL; in the fact itself it is escaped.
      ...(name ? { name: (name.value as string).replaceAll('\0', '').slice(0, 400) } : {}),
    }))
    .where('survey', '=', survey)
    .execute()
}

function keyOf({ device, n }: { device: string; n: number }): string {
  return `${device}:${n}`
}

function gap(device: string, next: number, found: number): Refusal {
  return new Refusal(
    409,
    'gap',
    `Entry ${next} of ${device} has not arrived; entry ${found} cannot come before it. Nothing of this message was stored.`,
    'Send from the entry named.',
    { device, next },
  )
}

function fork(fact: Fact): Refusal {
  return new Refusal(
    409,
    'fork',
    `The office holds other content under entry ${fact.n} of ${fact.device}: a copied or restored phone. Nothing of this message was stored.`,
    'Share the survey as a file from this phone, then give it a new identity and enter again what only it holds.',
    { device: fact.device, next: fact.n },
  )
}
