import { type ReadonlySignal, signal } from '@preact/signals'
import type { Workbox } from 'workbox-window'

const ready = signal(false)
/** True: a newer app lies on this phone and waits to be taken. */
export const updateReady: ReadonlySignal<boolean> = ready

let worker: Workbox | null = null

/** Registers the service worker; the app works from the network alone where there is none. */
export async function watchForUpdate(): Promise<void> {
  if (!import.meta.env.PROD || !('serviceWorker' in navigator)) return
  // Not needed for the first picture.
  const { Workbox } = await import('workbox-window')
  worker = new Workbox('/sw.js')
  worker.addEventListener('waiting', () => {
    ready.value = true
  })
  // Kept on this phone or not: said on the Settings screen, asked anew there.
  await worker.register().catch(() => undefined)
}

/** Takes the newer app and loads the page again. Only ever called by the person's own key. */
export function takeUpdate(): void {
  worker?.addEventListener('controlling', () => location.reload())
  worker?.messageSkipWaiting()
}
