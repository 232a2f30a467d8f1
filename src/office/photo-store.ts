import { randomBytes } from 'node:crypto'
import { mkdir, open, readdir, readFile, rename, rm, stat } from 'node:fs/promises'
import { join } from 'node:path'

/** Where photos lie, by the hash of their bytes. A folder here; anything that keeps bytes by name can stand in. */
export interface PhotoStore {
  has(hash: string): Promise<boolean>
  /** Resolves when the bytes are durable. */
  put(hash: string, bytes: Uint8Array): Promise<void>
  get(hash: string): Promise<Buffer | null>
  remove(hash: string): Promise<void>
  list(): Promise<string[]>
}

export function folderOfPhotos(folder: string): PhotoStore {
  const pathOf = (hash: string) => {
    if (!/^[0-9a-f]{64}$/.test(hash)) throw new Error('office/photo-name: a photo is named by the hash of its bytes')
    return join(folder, hash.slice(0, 2), hash)
  }
  return {
    has: (hash) => stat(pathOf(hash)).then(() => true, absent(false)),
    async put(hash, bytes) {
      const path = pathOf(hash)
      await mkdir(join(folder, hash.slice(0, 2)), { recursive: true, mode: 0o700 })
      // Written beside and renamed: a cut leaves no half photo under a whole one's name.
      const beside = `${path}.${randomBytes(6).toString('hex')}`
      const file = await open(beside, 'wx', 0o600)
      try {
        await file.writeFile(bytes)
        await file.sync()
      } finally {
        await file.close()
      }
      await rename(beside, path)
      const directory = await open(join(folder, hash.slice(0, 2)), 'r')
      await directory.sync().finally(() => directory.close())
    },
    get: (hash) => readFile(pathOf(hash)).catch(absent(null)),
    remove: (hash) => rm(pathOf(hash), { force: true }),
    async list() {
      const names = await readdir(folder, { recursive: true }).catch(absent([] as string[]))
      return names.map((name) => name.slice(3)).filter((name) => /^[0-9a-f]{64}$/.test(name))
    },
  }
}

function absent<T>(instead: T): (error: unknown) => T {
  return (error) => {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return instead
    throw error
  }
}
