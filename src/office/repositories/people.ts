import type { Kysely } from 'kysely'
import type { Role } from '../../sync/messages.ts'
import { type Caller, isoOf } from '../office.ts'
import { Refusal } from '../refusal.ts'
import { hashOf, newCode, newId, newToken, plainCode, sameHash } from '../secrets.ts'
import type { Tables } from '../sql/tables.ts'
import { transact } from '../sql/transact.ts'

/** How long a one-time code holds. */
export const codeHolds = 10 * 60 * 1000

export async function addBranch(db: Kysely<Tables>, name: string, now: number): Promise<string> {
  const branch = newId('branch')
  await db
    .insertInto('branches')
    .values({ branch, name, next_sheet: 1, made_at: isoOf(now) })
    .execute()
  return branch
}

export async function addAccount(
  db: Kysely<Tables>,
  branch: string,
  name: string,
  role: Role,
  now: number,
): Promise<string> {
  const account = newId('account')
  await db
    .insertInto('accounts')
    .values({ account, branch, name, role, made_at: isoOf(now), left_at: null })
    .execute()
  return account
}

/** A code by which one device may enrol for the account. Only its hash is kept. */
export async function addCode(
  db: Kysely<Tables>,
  account: string,
  madeBy: string,
  now: number,
): Promise<{ code: string; expires: string }> {
  const code = newCode()
  const expires = now + codeHolds
  await db
    .insertInto('codes')
    .values({ code_hash: hashOf(code), account, made_by: madeBy, expires, used_at: null })
    .execute()
  return { code, expires: isoOf(expires) }
}

/**
 * Turns a code into a device and its token, once: of two that try at the same time one is refused. Used, old and mistyped
 * codes get the same answer, so that nobody learns which codes there were.
 */
export async function redeem(
  db: Kysely<Tables>,
  { code, label, record }: { code: string; label: string; record: string },
  now: number,
): Promise<{ token: string; caller: Caller; branchName: string }> {
  return transact(db, async (tx) => {
    const used = await tx
      .updateTable('codes')
      .set({ used_at: isoOf(now) })
      .where('code_hash', '=', hashOf(plainCode(code)))
      .where('used_at', 'is', null)
      .where('expires', '>', now)
      .returning('account')
      .executeTakeFirst()
    const account =
      used &&
      (await tx
        .selectFrom('accounts')
        .innerJoin('branches', 'branches.branch', 'accounts.branch')
        .select([
          'accounts.account',
          'accounts.name',
          'accounts.role',
          'accounts.branch',
          'branches.name as branchName',
        ])
        .where('accounts.account', '=', used.account)
        .where('accounts.left_at', 'is', null)
        .executeTakeFirst())
    if (!account)
      throw new Refusal(
        410,
        'code',
        'This code does not work: it was used, is older than ten minutes, or was mistyped.',
        'Ask the administrator for a new code.',
      )
    const token = newToken()
    const device = newId('device')
    await tx
      .insertInto('devices')
      .values({
        device,
        account: account.account,
        label,
        token_hash: hashOf(token),
        record,
        made_at: isoOf(now),
        seen_at: null,
        revoked_at: null,
      })
      .execute()
    const { branchName, ...rest } = account
    return { token, caller: { ...rest, role: rest.role as Role, device }, branchName }
  })
}

/** Who holds the token; a device signed out is told so; null: nobody. */
export async function callerOf(db: Kysely<Tables>, token: string): Promise<Caller | { revokedAt: string } | null> {
  const hash = hashOf(token)
  const row = await db
    .selectFrom('devices')
    .innerJoin('accounts', 'accounts.account', 'devices.account')
    .select([
      'devices.device',
      'devices.token_hash',
      'devices.revoked_at',
      'accounts.account',
      'accounts.name',
      'accounts.role',
      'accounts.branch',
      'accounts.left_at',
    ])
    .where('devices.token_hash', '=', hash)
    .executeTakeFirst()
  if (!row || !sameHash(row.token_hash, hash)) return null
  const ended = row.revoked_at ?? row.left_at
  if (ended !== null) return { revokedAt: ended }
  return { account: row.account, name: row.name, role: row.role as Role, branch: row.branch, device: row.device }
}

/** Notes that the device was heard of, once a minute at most: every note is a write to the disk. */
export async function seen(db: Kysely<Tables>, device: string, now: number): Promise<void> {
  await db
    .updateTable('devices')
    .set({ seen_at: isoOf(now) })
    .where('device', '=', device)
    .where((eb) => eb.or([eb('seen_at', 'is', null), eb('seen_at', '<', isoOf(now - 60_000))]))
    .execute()
}

/** The account in the branch, or undefined. */
export function accountIn(db: Kysely<Tables>, branch: string, account: string) {
  return db
    .selectFrom('accounts')
    .select(['account', 'name', 'role', 'left_at'])
    .where('branch', '=', branch)
    .where('account', '=', account)
    .executeTakeFirst()
}

export function peopleOf(db: Kysely<Tables>, branch: string) {
  return db
    .selectFrom('accounts')
    .select(['account', 'name', 'role', 'made_at', 'left_at'])
    .where('branch', '=', branch)
    .orderBy('name')
    .orderBy('account')
    .execute()
}

export function devicesOf(db: Kysely<Tables>, branch: string) {
  return db
    .selectFrom('devices')
    .innerJoin('accounts', 'accounts.account', 'devices.account')
    .select([
      'devices.device',
      'devices.account',
      'accounts.name',
      'devices.label',
      'devices.record',
      'devices.made_at',
      'devices.seen_at',
      'devices.revoked_at',
    ])
    .where('accounts.branch', '=', branch)
    .orderBy('devices.made_at')
    .execute()
}

/** Ends a device's token; false where the branch has no such device. What it brought stays. */
export async function revoke(db: Kysely<Tables>, branch: string, device: string, now: number): Promise<boolean> {
  const ours = db.selectFrom('accounts').select('account').where('branch', '=', branch)
  const found = await db
    .updateTable('devices')
    .set((eb) => ({ revoked_at: eb.fn.coalesce('revoked_at', eb.val(isoOf(now))) }))
    .where('device', '=', device)
    .where('account', 'in', ours)
    .returning('device')
    .executeTakeFirst()
  return found !== undefined
}

/** Changes a person's role, or lets them go (their devices then no longer work); false where there is no such person. */
export async function changeAccount(
  db: Kysely<Tables>,
  branch: string,
  account: string,
  change: { role: Role } | { left_at: string },
): Promise<boolean> {
  const found = await db
    .updateTable('accounts')
    .set(change)
    .where('branch', '=', branch)
    .where('account', '=', account)
    .returning('account')
    .executeTakeFirst()
  return found !== undefined
}
