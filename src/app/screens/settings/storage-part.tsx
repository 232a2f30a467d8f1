import { useEffect, useState } from 'preact/hooks'
import type { StorageState } from '../../../store/storage-state.ts'
import { BigKey } from '../../components/big-key.tsx'
import { ExtrasPart } from '../../components/extras-part.tsx'
import { phoneStore } from '../../state/phone.ts'

/** How this browser keeps what is on the phone, in words. */
export function StoragePart() {
  const [state, setState] = useState<StorageState | null>(null)
  const [offline, setOffline] = useState(false)
  const [said, setSaid] = useState('')
  const look = async () => {
    setState(await (await phoneStore()).state())
    setOffline(Boolean(navigator.serviceWorker?.controller))
  }
  useEffect(() => {
    look().catch((error: unknown) => setSaid(String(error)))
  }, [])

  const ask = async () => {
    const granted = await (await phoneStore()).askToPersist()
    setSaid(
      granted === true
        ? 'The browser will keep it.'
        : 'The browser did not promise it. Put the app on the home screen, and make back-ups.',
    )
    await look()
  }
  return (
    <section class="stack" aria-labelledby="kept">
      <h2 id="kept">What this phone keeps</h2>
      <dl class="facts">
        <dt>Without a network</dt>
        <dd>
          {offline
            ? 'The app works: all of it is on this phone.'
            : 'Not yet: load this page once more, with a network.'}
        </dd>
        <dt>Deleted by the browser</dt>
        <dd>
          {state === null
            ? 'Looking'
            : state.persisted === true
              ? 'No: it has promised to keep it.'
              : state.persisted === false
                ? 'It may, when room is short or the app is not used for long.'
                : 'The browser does not say.'}
        </dd>
        <dt>Room used</dt>
        <dd>{state === null ? 'Looking' : roomWords(state)}</dd>
      </dl>
      {state !== null && state.persisted !== true && (
        <BigKey press={() => void ask()}>Ask the browser to keep it</BigKey>
      )}
      <p role="status">{said}</p>
      <ExtrasPart />
    </section>
  )
}

function roomWords({ usedBytes, roomBytes }: StorageState): string {
  if (usedBytes === null || roomBytes === null) return 'The browser does not say.'
  const megabytes = (bytes: number) => (bytes / 1e6).toFixed(bytes < 10e6 ? 1 : 0)
  return `${megabytes(usedBytes)} MB of ${megabytes(roomBytes)} MB`
}
