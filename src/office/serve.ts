import { existsSync } from 'node:fs'
import { join } from 'node:path'
import { createAdmin } from './admin.ts'
import { startCore } from './core-thread.ts'
import { invitation } from './invite.ts'
import type { Office } from './office.ts'
import { folderOfPhotos } from './photo-store.ts'
import { addCode } from './repositories/people.ts'
import { newId } from './secrets.ts'
import { buildServer } from './server.ts'
import { type Settings, summary } from './settings.ts'
import { openDatabase } from './sql/open.ts'
import { startWorker } from './worker.ts'

/** Starts the office and keeps it until it is told to stop; then it ends what is under way and lets go of its folder. */
export async function serve(settings: Settings, program: { file: URL; dist: string; version: string }): Promise<void> {
  const { db, engine, close } = await openDatabase({ folder: settings.folder, url: settings.databaseUrl })
  // Two threads: a sheet that somebody waits for never stands behind a venue judged in the background.
  const background = startCore(program.file)
  const desk = startCore(program.file)
  const office: Office = {
    db,
    photos: folderOfPhotos(join(settings.folder, 'photos')),
    now: Date.now,
    judge: background.judge,
    makeSheet: desk.makeSheet,
    version: program.version,
    process: newId('process'),
  }
  const dist = existsSync(join(program.dist, 'index.html')) ? program.dist : null
  const { app } = await buildServer(office, { ...settings, dist })
  const worker = startWorker(office, (error) => app.log.error({ err: error }, 'work in the background failed'))
  let stopping = false
  const stop = async (signal: string) => {
    if (stopping) return
    stopping = true
    app.log.info({ signal }, 'stopping')
    await app.close()
    const idle = worker.stop()
    // A judgement under way may have minutes to go: it is broken off, and begun again after the next start.
    await Promise.all([background.close(), desk.close()])
    await idle
    await close()
    process.exitCode = 0
  }
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, () => void stop(signal))
  const address = await app.listen({ host: settings.host, port: settings.port }).catch(async (error: unknown) => {
    const idle = worker.stop()
    await Promise.all([background.close(), desk.close()])
    await idle
    await close()
    throw error
  })
  const lines = [`Tautline's office, version ${program.version}, on ${engine}`, ...summary(settings)]
  if (!dist) lines.push('The app is not built: only the interface for phones is served. Run `npm run build`.')
  lines.push(...(await firstInvitation(office, settings)), `Tautline's office is at ${address}`)
  console.log(lines.join('\n'))
}

/** While no administrator has a working device, the start prints a code for one. */
async function firstInvitation({ db, now }: Office, settings: Settings): Promise<string[]> {
  const enrolled = await db
    .selectFrom('devices')
    .innerJoin('accounts', 'accounts.account', 'devices.account')
    .select('devices.device')
    .where('accounts.role', '=', 'administrator')
    .where('accounts.left_at', 'is', null)
    .where('devices.revoked_at', 'is', null)
    .limit(1)
    .executeTakeFirst()
  if (enrolled) return []
  const administrator = await db
    .selectFrom('accounts')
    .select(['account', 'name'])
    .where('role', '=', 'administrator')
    .where('left_at', 'is', null)
    .orderBy('made_at')
    .limit(1)
    .executeTakeFirst()
  if (!administrator) return createAdmin(db, settings, 'Office', 'Administrator', now())
  const { code, expires } = await addCode(db, administrator.account, 'start', now())
  return invitation(settings.origin, administrator.name, code, expires)
}
