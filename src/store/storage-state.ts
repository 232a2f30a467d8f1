/** How the browser keeps what is on this phone. Null: the browser does not say. */
export interface StorageState {
  /** True: the browser does not delete it on its own. */
  persisted: boolean | null
  usedBytes: number | null
  roomBytes: number | null
}

export async function storageState(storage = browserStorage()): Promise<StorageState> {
  const persisted = await storage?.persisted?.().catch(() => null)
  const estimate = await storage?.estimate?.().catch(() => null)
  return {
    persisted: persisted ?? null,
    usedBytes: estimate?.usage ?? null,
    roomBytes: estimate?.quota ?? null,
  }
}

/** Asks the browser not to delete what is kept. False: it may, so export and back up; null: it does not say. */
export async function askToPersist(storage = browserStorage()): Promise<boolean | null> {
  return (await storage?.persist?.().catch(() => null)) ?? null
}

/** Undefined in some engines and outside secure pages, whatever the types say. */
function browserStorage(): Partial<StorageManager> | undefined {
  return (navigator as { storage?: StorageManager }).storage
}
