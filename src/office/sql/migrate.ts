import { type Kysely, sql } from 'kysely'
import { migrations } from './migrations.ts'
import type { Tables } from './tables.ts'
import { transact } from './transact.ts'

/**
 * Brings the database to this program's version; several processes may try at once, each migration runs in one of them.
 * Refuses a database that a newer program has migrated further: throws.
 */
export async function migrate(db: Kysely<Tables>, at: string, list = migrations): Promise<void> {
  await transact(
    db,
    (tx) =>
      sql`create table if not exists migrations (number integer primary key, name text not null, at text not null)`.execute(
        tx,
      ),
    // Another process has just made the same table.
    ['40001', '40P01', '42P07', '23505', 'SQLITE_BUSY'],
  )
  for (const [i, { name, statements }] of list.entries())
    await transact(db, async (tx) => {
      const taken = await sql`insert into migrations (number, name, at) values (${i + 1}, ${name}, ${at})
        on conflict (number) do nothing returning number`.execute(tx)
      if (taken.rows.length === 0) return
      for (const statement of statements) await sql.raw(statement).execute(tx)
    })
  const { rows } = await sql<{ number: number | null }>`select max(number) as number from migrations`.execute(db)
  const reached = Number(rows[0]?.number ?? 0)
  if (reached > list.length)
    throw new Error(
      `office/newer-database: the database is at version ${reached}, this program knows ${list.length}. Start the newer program.`,
    )
}
