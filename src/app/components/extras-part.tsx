import { useEffect } from 'preact/hooks'
import {
  type ExtrasState,
  extras,
  extrasBytes,
  extrasFolder,
  lookForExtras,
  removeExtras,
  stopExtras,
  takeExtras,
} from '../state/extras.ts'
import { BigKey } from './big-key.tsx'
import { TapeProgress } from './tape-rule.tsx'

/** The one download that PDF and braille need, whether it is on this phone, and away with it. */
export function ExtrasPart() {
  useEffect(() => void lookForExtras(), [])
  const state = extras.value
  return (
    <section class="stack" aria-labelledby="extras">
      <h2 id="extras">Offline extras</h2>
      <p role="status" class={state.kind === 'failed' ? 'trouble' : undefined}>
        {words(state)}
      </p>
      {state.kind === 'coming' && <TapeProgress share={state.share} label="Getting the offline extras" />}
      {state.kind !== 'looking' && (
        <div class="keys">
          <BigKey press={() => void keys[state.kind].press()}>{keys[state.kind].label}</BigKey>
        </div>
      )}
      <p class="soft">
        The letters for PDF files and the tables for braille. Kept on this phone, they need no network afterwards.
        {state.kind === 'here' && (
          <>
            {' Licences: '}
            <Licence path="fonts/licence.txt">letters</Licence>
            {', '}
            <Licence path="braille/licence.txt">braille</Licence>
            {', '}
            <Licence path="braille/lgpl-2.1.txt">its terms in full</Licence>.
          </>
        )}
      </p>
    </section>
  )
}

const megabytes = `${(extrasBytes / 1e6).toFixed(1)} MB`

/** One key in one place: whoever stands on it keeps their place when its work changes. */
const take = { label: `Offline extras: ${megabytes}`, press: takeExtras }
const keys = {
  absent: take,
  failed: take,
  coming: { label: 'Stop', press: stopExtras },
  here: { label: 'Remove the extras', press: removeExtras },
}

function Licence(props: { path: string; children: string }) {
  // A page of its own: it is not one of the app's.
  return (
    <a href={extrasFolder + props.path} target="_blank" rel="noreferrer">
      {props.children}
    </a>
  )
}

function words(state: ExtrasState): string {
  switch (state.kind) {
    case 'looking':
      return 'Looking'
    case 'absent':
      return `Not here. PDF and braille need them, once: ${megabytes}, with a network.`
    case 'coming':
      return `Getting them: ${((state.share * extrasBytes) / 1e6).toFixed(1)} of ${megabytes}`
    case 'here':
      return `Here, ${megabytes}. PDF and braille are made without a network.`
    case 'failed':
      return `Failed. ${state.what} ${state.whatToDo}`
  }
}
