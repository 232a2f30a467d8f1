import { type ReadonlySignal, signal } from '@preact/signals'

interface Extras {
  /** "/extras/0123456789ab/": a newer set is another address. */
  folder: string
  files: readonly { path: string; bytes: number; integrity: string }[]
}
/** Filled in by the build: see scripts/extras.ts. */
declare const __EXTRAS__: Extras

/** Whether the letters of PDF files and the braille tables are on this phone. */
export type ExtrasState =
  | { kind: 'looking' }
  | { kind: 'absent' }
  /** `share` 0 to 1, of the bytes. */
  | { kind: 'coming'; share: number }
  | { kind: 'here' }
  | { kind: 'failed'; what: string; whatToDo: string }

const { folder, files } = __EXTRAS__
export const extrasFolder = folder
export const extrasBytes = files.reduce((sum, { bytes }) => sum + bytes, 0)

const current = signal<ExtrasState>({ kind: 'looking' })
export const extras: ReadonlySignal<ExtrasState> = current

const ours = 'extras '
const cacheName = ours + folder
const withoutStorage = {
  kind: 'failed',
  what: 'This browser keeps no files for this page.',
  whatToDo: 'Open the app by its https address, not in a private window, and try again.',
} as const

let running: AbortController | null = null

/** Looks once what is here; a download that runs is left alone. Whole or not at all: the browser may have dropped a part. */
export async function lookForExtras(): Promise<void> {
  if (running || current.value.kind === 'here') return
  try {
    const kept = (await caches.has(cacheName)) ? await (await caches.open(cacheName)).keys() : []
    if (!running) current.value = { kind: kept.length === files.length ? 'here' : 'absent' }
  } catch {
    current.value = withoutStorage
  }
}

/** Takes them all, each known by its hash, and then lets an older set go. Only ever by the person's own key. */
export async function takeExtras(): Promise<void> {
  if (running) return
  const stop = new AbortController()
  running = stop
  current.value = { kind: 'coming', share: 0 }
  try {
    const cache = await caches.open(cacheName)
    let done = 0
    for (const { path, bytes, integrity } of files) {
      const response = await fetch(folder + path, { integrity, signal: stop.signal })
      if (!response.ok) throw new Error(`the answer for ${path} was ${response.status}`)
      await cache.put(folder + path, response)
      done += bytes
      current.value = { kind: 'coming', share: done / extrasBytes }
    }
    for (const name of await names()) if (name !== cacheName) await caches.delete(name)
    current.value = { kind: 'here' }
  } catch (error) {
    await forget(cacheName)
    current.value = stop.signal.aborted ? { kind: 'absent' } : failure(error)
  } finally {
    running = null
  }
}

export function stopExtras(): void {
  running?.abort()
}

export async function removeExtras(): Promise<void> {
  try {
    for (const name of await names()) await caches.delete(name)
    current.value = { kind: 'absent' }
  } catch (error) {
    current.value = { kind: 'failed', what: `They were not removed: ${String(error)}.`, whatToDo: 'Try again.' }
  }
}

async function forget(name: string): Promise<void> {
  // Where nothing can be deleted nothing was kept.
  if ('caches' in globalThis) await caches.delete(name).catch(() => false)
}

async function names(): Promise<string[]> {
  return (await caches.keys()).filter((name) => name.startsWith(ours))
}

function failure(error: unknown): ExtrasState {
  if (!('caches' in globalThis)) return withoutStorage
  if (error instanceof DOMException && error.name === 'QuotaExceededError')
    return { kind: 'failed', what: 'There is no room for them on this phone.', whatToDo: 'Make room, then try again.' }
  const why = error instanceof Error ? error.message : String(error)
  return {
    kind: 'failed',
    what: `They did not arrive whole (${why}). Nothing was kept of them.`,
    whatToDo: 'Try again where there is a network. Where the app itself was renewed since, load this page anew first.',
  }
}
