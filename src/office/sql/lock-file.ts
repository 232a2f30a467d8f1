import { closeSync, mkdirSync, openSync, readFileSync, rmSync, writeSync } from 'node:fs'
import { join } from 'node:path'

/**
 * One data folder, one process: takes `office.lock` in the folder, which holds the process's id. A lock left behind by a
 * process that is gone is taken over. Returns how to let go; throws where another process holds it.
 */
export function lockFolder(folder: string): () => void {
  mkdirSync(folder, { recursive: true, mode: 0o700 })
  const path = join(folder, 'office.lock')
  for (let attempt = 0; attempt < 3; attempt++) {
    try {
      const file = openSync(path, 'wx', 0o600)
      writeSync(file, String(process.pid))
      closeSync(file)
      return () => rmSync(path, { force: true })
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error
      const holder = Number(readText(path))
      if (holder !== process.pid && !isRunning(holder)) rmSync(path, { force: true })
      else
        throw new Error(
          `office/folder-taken: ${folder} is in use by process ${holder}. Stop that office first, or give this one another folder (TAUTLINE_DATA).`,
        )
    }
  }
  throw new Error(`office/folder-taken: ${folder} cannot be locked. Look at ${path}.`)
}

function readText(path: string): string {
  try {
    return readFileSync(path, 'utf8')
  } catch {
    return ''
  }
}

function isRunning(pid: number): boolean {
  if (!Number.isSafeInteger(pid) || pid <= 0) return false
  try {
    process.kill(pid, 0)
    return true
  } catch (error) {
    // EPERM: it runs under another user.
    return (error as NodeJS.ErrnoException).code === 'EPERM'
  }
}
