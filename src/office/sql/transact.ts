import type { Kysely, Transaction } from 'kysely'
import type { Tables } from './tables.ts'

/** After these the same transaction may simply be run again: serialization failure, deadlock, a busy file. */
const passing = ['40001', '40P01', 'SQLITE_BUSY']

/**
 * Runs `work` as one short transaction: all of it or nothing; again, up to eight times, where the database asks for it.
 * `work` must therefore change nothing but the database.
 */
export async function transact<T>(
  db: Kysely<Tables>,
  work: (tx: Transaction<Tables>) => Promise<T>,
  again: readonly string[] = passing,
): Promise<T> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await db.transaction().execute(work)
    } catch (error) {
      const code = (error as { code?: unknown }).code
      if (attempt >= 8 || typeof code !== 'string' || !again.includes(code)) throw error
      await new Promise((resolve) => setTimeout(resolve, 5 * 2 ** attempt * (0.5 + Math.random())))
    }
  }
}
