import { useState } from 'preact/hooks'
import { BigKey } from '../../components/big-key.tsx'
import { StatusLine } from '../../components/status-line.tsx'
import { wipePhone } from '../../state/office.ts'
import type { OfficeWork } from '../../state/office-work.ts'

/** Leaving the office, with what is on this phone kept or wiped: said plainly, asked once. */
export function SignOut({ work }: { work: OfficeWork }) {
  const [asked, setAsked] = useState(false)
  const [busy, setBusy] = useState(false)
  const [said, setSaid] = useState('')
  const waiting = [...work.where.value.values()].flatMap((one) => (one.where === 'office' ? [] : [one.waiting]))
  const entries = waiting.reduce((all, one) => all + one, 0)

  const leave = async (wipe: boolean) => {
    setBusy(true)
    setSaid('Telling the office')
    await work.signOut()
    if (wipe) await wipePhone()
  }
  return (
    <section class="part" aria-labelledby="sign-out">
      <h2 id="sign-out">Sign out</h2>
      {!asked && <BigKey press={() => setAsked(true)}>Sign this phone out</BigKey>}
      {asked && (
        <>
          <p>
            Signed out, this phone neither sends nor gets anything; a new code signs it in again. If the office cannot
            be told just now, ask the administrator to end this phone’s access.
          </p>
          <p class={entries > 0 ? 'trouble' : 'soft'}>
            {entries > 0
              ? `${entries === 1 ? '1 entry' : `${entries} entries`} of ${waiting.length === 1 ? 'one venue' : `${waiting.length} venues`} are not at the office: wiping this phone would lose them. Send them first, or save a back-up in Settings.`
              : 'Everything in your venues is at the office.'}{' '}
            Wiping deletes all venues, photos, drafts and settings on this phone, and cannot be undone.
          </p>
          <div class="keys">
            <BigKey disabled={busy} primary press={() => void leave(false)}>
              Sign out, keep what is on this phone
            </BigKey>
            <BigKey disabled={busy} press={() => void leave(true)}>
              Sign out and wipe this phone
            </BigKey>
            <BigKey disabled={busy} press={() => setAsked(false)}>
              Stay signed in
            </BigKey>
          </div>
        </>
      )}
      <StatusLine text={said} />
    </section>
  )
}
