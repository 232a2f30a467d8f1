import type { Database } from './database.ts'

/** What the planner worked out before, by the planner's own key. */
export async function readMemo(database: Database, key: string): Promise<unknown> {
  return database.get('memo', key)
}

/** The whole memo, to hand to a worker at its start. */
export async function readWholeMemo(database: Database): Promise<Map<string, unknown>> {
  const tx = database.transaction('memo')
  const [keys, values] = await Promise.all([tx.store.getAllKeys(), tx.store.getAll()])
  return new Map(keys.map((key, i) => [key, values[i]]))
}

/** Keeps entries of the memo. Only a shortcut: where there is no room for them, nothing is lost. */
export async function keepMemo(database: Database, entries: ReadonlyMap<string, unknown>): Promise<void> {
  const tx = database.transaction('memo', 'readwrite', { durability: 'relaxed' })
  const puts = [...entries].map(([key, value]) => tx.store.put(value, key))
  await Promise.all([...puts, tx.done]).catch(() => undefined)
}

/** Forgets it all, after a change of the planner. */
export async function clearMemo(database: Database): Promise<void> {
  await database.clear('memo')
}
