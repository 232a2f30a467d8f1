import { type DatabaseConnection, type Dialect, type SqliteDatabase, SqliteDialect, SqliteDriver } from 'kysely'

/**
 * SQLite has one connection, handed out in the order it was asked for. The library's own waiting lets whoever comes at the
 * right moment pass the others, and a phone could wait for seconds while later ones are served.
 */
export function inTurn(database: SqliteDatabase): Dialect {
  const dialect = new SqliteDialect({ database })
  return {
    createDriver: () => new DriverInTurn({ database }),
    createAdapter: () => dialect.createAdapter(),
    createIntrospector: (db) => dialect.createIntrospector(db),
    createQueryCompiler: () => dialect.createQueryCompiler(),
  }
}

class DriverInTurn extends SqliteDriver {
  #last: Promise<void> = Promise.resolve()
  #free: () => void = () => undefined

  override async acquireConnection(): Promise<DatabaseConnection> {
    const before = this.#last
    let free: () => void = () => undefined
    this.#last = new Promise((resolve) => {
      free = resolve
    })
    await before
    this.#free = free
    return super.acquireConnection()
  }

  override async releaseConnection(): Promise<void> {
    await super.releaseConnection()
    this.#free()
  }
}
