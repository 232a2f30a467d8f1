import { createHash } from 'node:crypto'
import { createReadStream } from 'node:fs'
import { mkdir, open, readFile } from 'node:fs/promises'
import { join } from 'node:path'
import { createInterface } from 'node:readline'
import type { Kysely } from 'kysely'
import type { PhotoStore } from './photo-store.ts'
import { newId } from './secrets.ts'
import { migrations } from './sql/migrations.ts'
import type { Tables } from './sql/tables.ts'

/** Everything but one-time codes. The same file goes back into SQLite or PostgreSQL. */
const kept = [
  'meta',
  'branches',
  'accounts',
  'devices',
  'surveys',
  'marks',
  'facts',
  'photos',
  'signatures',
  'sheets',
  'shares',
  'givings',
  'fixes',
  'audit',
  'jobs',
  'job_items',
] as const

const rowsFile = 'office.jsonl'

/**
 * Writes everything into a new folder: rows as JSON lines with a checksum as the last, photos beside them. One transaction
 * reads it all, so that it is the office at one moment. Returns how much.
 */
export async function backUp(db: Kysely<Tables>, photos: PhotoStore, folder: string, at: string) {
  await mkdir(join(folder, 'photos'), { recursive: true, mode: 0o700 })
  const file = await open(join(folder, rowsFile), 'wx', 0o600)
  const hash = createHash('sha256')
  let rows = 0
  const write = async (line: object) => {
    const text = `${JSON.stringify(line)}\n`
    hash.update(text)
    await file.writeFile(text)
  }
  try {
    await write({ kind: 'tautline-office', version: 1, migration: migrations.length, at })
    // SQLite has one connection and one writer: its transactions see one moment as they are.
    await db
      .transaction()
      .setIsolationLevel('repeatable read')
      .execute(async (tx) => {
        for (const table of kept)
          for await (const row of rowsOf(tx, table)) {
            rows++
            await write({ table, row })
          }
      })
    await file.writeFile(`${JSON.stringify({ rows, sha256: hash.digest('hex') })}\n`)
    await file.sync()
  } finally {
    await file.close()
  }
  const names = await photos.list()
  for (const name of names) {
    const bytes = await photos.get(name)
    if (bytes) await writeWhole(join(folder, 'photos', name), bytes)
  }
  return { rows, photos: names.length }
}

/** Facts survey by survey: the only table that may not fit the memory at once. */
async function* rowsOf(db: Kysely<Tables>, table: (typeof kept)[number]): AsyncGenerator<object> {
  if (table !== 'facts') {
    yield* await db.selectFrom(table).selectAll().execute()
    return
  }
  for (const { survey } of await db.selectFrom('surveys').select('survey').orderBy('survey').execute())
    yield* await db
      .selectFrom('facts')
      .selectAll()
      .where('survey', '=', survey)
      .orderBy('device')
      .orderBy('n')
      .execute()
}

/** Brings a back-up into an empty office: all of it, or thrown, nothing. The office then writes under a new name. */
export async function restore(db: Kysely<Tables>, photos: PhotoStore, folder: string) {
  await expectWhole(join(folder, rowsFile))
  let rows = 0
  await db.transaction().execute(async (tx) => {
    const present = await tx.selectFrom('branches').select('branch').limit(1).executeTakeFirst()
    if (present)
      throw new Error('office/not-empty: this office already holds data; restore into an empty folder or database')
    for await (const text of lines(join(folder, rowsFile))) {
      const line = JSON.parse(text) as { table?: (typeof kept)[number]; row?: never; kind?: string; migration?: number }
      if (line.kind !== undefined && line.migration !== migrations.length)
        throw new Error(
          `office/other-version: the back-up is of version ${line.migration}, this program of ${migrations.length}`,
        )
      if (line.table === undefined || line.row === undefined) continue
      if (!kept.includes(line.table)) throw new Error(`office/back-up: a table that is not ours: ${line.table}`)
      await tx.insertInto(line.table).values(line.row).execute()
      rows++
    }
    // Phones may hold entries that the office made after the back-up: it must not give their numbers again.
    await tx
      .updateTable('meta')
      .set({ value: `@${newId('office')}` })
      .where('name', '=', 'office-device')
      .execute()
  })
  const names = (await db.selectFrom('photos').select('photo').distinct().execute()).map(({ photo }) => photo)
  let missing = 0
  for (const name of names) {
    const bytes = await readFile(join(folder, 'photos', name)).catch(() => null)
    if (bytes) await photos.put(name, bytes)
    else missing++
  }
  return { rows, photos: names.length - missing, missing }
}

async function expectWhole(path: string): Promise<void> {
  const hash = createHash('sha256')
  let end: { rows?: number; sha256?: string } = {}
  let held: string | null = null
  for await (const line of lines(path)) {
    if (held !== null) hash.update(`${held}\n`)
    held = line
  }
  try {
    end = JSON.parse(held ?? '{}') as typeof end
  } catch {
    end = {}
  }
  if (end.sha256 !== hash.digest('hex'))
    throw new Error('office/damaged: the back-up is cut short or changed: its checksum differs. Nothing was restored.')
}

function lines(path: string): AsyncIterable<string> {
  return createInterface({ input: createReadStream(path, 'utf8'), crlfDelay: Number.POSITIVE_INFINITY })
}

async function writeWhole(path: string, bytes: Uint8Array): Promise<void> {
  const file = await open(path, 'wx', 0o600)
  try {
    await file.writeFile(bytes)
    await file.sync()
  } finally {
    await file.close()
  }
}
