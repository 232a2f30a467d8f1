import type { ReadonlySignal } from '@preact/signals'
import { BigKey } from './big-key.tsx'

/** Stays at the foot of the page until it is taken, and takes nothing by itself: an entry is never interrupted. */
export function UpdateReady(props: { ready: ReadonlySignal<boolean>; take(): void }) {
  if (!props.ready.value) return null
  return (
    <aside class="update-ready" aria-label="Newer app">
      <p role="status">A newer app is on this phone. Finish what you are typing first.</p>
      <BigKey press={props.take}>Take it now</BigKey>
    </aside>
  )
}
