import { openStore, type Store } from '../../src/store/open-store.ts'

let made = 0

/** A name that no other test uses: a phone of its own. */
export function freshName(): string {
  return `tautline-test-${made++}-${Math.floor(performance.now() * 1000)}`
}

/** The store of that phone, as one of its tabs opens it. */
export async function openTab(name: string): Promise<Store> {
  const opened = await openStore(name)
  if (!opened.ok) throw new Error(opened.what)
  return opened.store
}
