import { join } from 'node:path'
import { parseArgs } from 'node:util'
import type { Kysely } from 'kysely'
import { backUp, restore } from './back-up.ts'
import { checkOffice } from './check.ts'
import { invitation } from './invite.ts'
import { isoOf } from './office.ts'
import { folderOfPhotos } from './photo-store.ts'
import { note } from './repositories/audit.ts'
import { addAccount, addBranch, addCode } from './repositories/people.ts'
import type { Settings } from './settings.ts'
import { openDatabase } from './sql/open.ts'
import type { Tables } from './sql/tables.ts'
import { transact } from './sql/transact.ts'

export const commands = ['create-admin', 'enrol', 'back-up', 'restore', 'check'] as const
export type Command = (typeof commands)[number]

/** Whose deeds the log calls those of the machine's keeper. */
const keeper = (branch: string) => ({ branch, account: 'terminal', device: 'terminal' })

/**
 * One act on the office's data from its own machine. On the embedded database the office must not be running: two programs
 * never share the file. Returns the lines to print and the exit code.
 */
export async function administer(
  command: Command,
  rest: readonly string[],
  settings: Settings,
  now: number,
): Promise<{ lines: string[]; code: number }> {
  const { values, positionals } = parseArgs({
    args: [...rest],
    options: { name: { type: 'string' }, branch: { type: 'string' } },
    allowPositionals: true,
  })
  const { db, close } = await openDatabase({ folder: settings.folder, url: settings.databaseUrl })
  const photos = folderOfPhotos(join(settings.folder, 'photos'))
  try {
    if (command === 'create-admin')
      return {
        lines: await createAdmin(db, settings, values.branch ?? 'Office', values.name ?? 'Administrator', now),
        code: 0,
      }
    if (command === 'enrol') return { lines: await enrol(db, settings, required(values.name, '--name'), now), code: 0 }
    if (command === 'check') {
      const { problems, ...counts } = await checkOffice(db, photos)
      return {
        lines: [JSON.stringify({ ...counts, problems: problems.length }), ...problems],
        code: problems.length > 0 ? 1 : 0,
      }
    }
    const folder = required(positionals[0], 'a folder')
    const done =
      command === 'back-up' ? await backUp(db, photos, folder, isoOf(now)) : await restore(db, photos, folder)
    return { lines: [JSON.stringify(done)], code: 0 }
  } finally {
    await close()
  }
}

/** A new administrator, in the branch of that name or a new one, with a code to enrol by. */
export async function createAdmin(
  db: Kysely<Tables>,
  settings: Pick<Settings, 'origin'>,
  branchName: string,
  name: string,
  now: number,
): Promise<string[]> {
  const { code, expires } = await transact(db, async (tx) => {
    const known = await tx.selectFrom('branches').select('branch').where('name', '=', branchName).executeTakeFirst()
    const branch = known?.branch ?? (await addBranch(tx, branchName, now))
    const account = await addAccount(tx, branch, name, 'administrator', now)
    await note(tx, keeper(branch), now, 'administrator made', null, { account, name })
    return addCode(tx, account, 'terminal', now)
  })
  return invitation(settings.origin, name, code, expires)
}

async function enrol(db: Kysely<Tables>, settings: Settings, name: string, now: number): Promise<string[]> {
  const people = await db
    .selectFrom('accounts')
    .select(['account', 'branch'])
    .where('name', '=', name)
    .where('left_at', 'is', null)
    .execute()
  const [person] = people
  if (!person || people.length > 1)
    throw new Error(`--name: ${people.length} people are called "${name}". Invite from the app, where they are listed.`)
  const { code, expires } = await addCode(db, person.account, 'terminal', now)
  await note(db, keeper(person.branch), now, 'code made', null, { account: person.account })
  return invitation(settings.origin, name, code, expires)
}

function required(value: string | undefined, what: string): string {
  if (!value) throw new Error(`${what} is missing`)
  return value
}
