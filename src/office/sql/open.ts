import { join } from 'node:path'
import { Kysely, PostgresDialect } from 'kysely'
import Libsql from 'libsql'
import pg from 'pg'
import { inTurn } from './in-turn.ts'
import { lockFolder } from './lock-file.ts'
import { migrate } from './migrate.ts'
import type { Tables } from './tables.ts'

export interface Opened {
  db: Kysely<Tables>
  engine: 'sqlite' | 'postgres'
  close(): Promise<void>
}

/** Opens the office's database, migrated: PostgreSQL where a URL names one, else the SQLite file of the data folder. */
export async function openDatabase(where: { folder: string; url?: string | undefined }): Promise<Opened> {
  const opened = where.url ? openPostgres(where.url) : openSqlite(where.folder)
  try {
    await migrate(opened.db, new Date().toISOString())
    return opened
  } catch (error) {
    await opened.close()
    throw error
  }
}

function openSqlite(folder: string): Opened {
  const unlock = lockFolder(folder)
  const file = new Libsql(join(folder, 'office.sqlite'))
  // Every commit is on the disk before anybody is told.
  for (const pragma of ['journal_mode = WAL', 'synchronous = FULL', 'busy_timeout = 5000']) file.pragma(pragma)
  const db = new Kysely<Tables>({ dialect: inTurn(file) })
  return {
    db,
    engine: 'sqlite',
    async close() {
      await db.destroy()
      unlock()
    },
  }
}

/** bigint comes as text from this driver; ours all fit a number. */
const bigintId = 20

function openPostgres(url: string): Opened {
  const types = {
    getTypeParser: (id: number, format?: 'text' | 'binary') =>
      id === bigintId ? Number : pg.types.getTypeParser(id, format as 'text'),
  }
  const pool = new pg.Pool({ connectionString: url, max: 10, types, connectionTimeoutMillis: 10_000 })
  // An idle connection that breaks is replaced by the pool; unheard, the event would end the process.
  pool.on('error', () => undefined)
  const db = new Kysely<Tables>({ dialect: new PostgresDialect({ pool }) })
  return { db, engine: 'postgres', close: () => db.destroy() }
}
