import { useState } from 'preact/hooks'
import type { OfficeVenue } from '../../../sync/client.ts'
import { BigKey, SubmitKey } from '../../components/big-key.tsx'
import { dayAndHour } from '../../components/day-words.ts'
import { Field } from '../../components/field.tsx'
import { StatusLine } from '../../components/status-line.tsx'
import type { OfficeWork } from '../../state/office-work.ts'

/** A venue that the office holds and this phone does not: found by name, brought here, and from then on kept in step. */
export function BringVenue({ work }: { work: OfficeWork }) {
  const [name, setName] = useState('')
  const [found, setFound] = useState<readonly OfficeVenue[] | null>(null)
  const [busy, setBusy] = useState(false)
  const [said, setSaid] = useState({ text: '', failed: false })

  const seek = async () => {
    setBusy(true)
    const answer = await work.venues(name)
    setBusy(false)
    setFound(answer.ok ? answer.venues : null)
    setSaid(
      answer.ok
        ? { text: answer.venues.length === 0 ? 'None that is not on this phone already.' : '', failed: false }
        : { text: `${answer.what} ${answer.whatToDo}`, failed: true },
    )
  }
  const bring = async ({ survey, name: what }: OfficeVenue) => {
    setBusy(true)
    const brought = await work.bring(survey)
    setBusy(false)
    if (!brought.ok) return setSaid({ text: `${brought.what} ${brought.whatToDo}`, failed: true })
    setFound((before) => before?.filter((one) => one.survey !== survey) ?? null)
    setSaid({ text: `On this phone now: ${what}.`, failed: false })
  }

  return (
    <section class="part" aria-labelledby="bring">
      <h2 id="bring">Bring a venue from the office</h2>
      <form
        class="stack"
        noValidate
        onSubmit={(event) => {
          event.preventDefault()
          void seek()
        }}
      >
        <Field
          label="Part of its name"
          hint="Empty: the first hundred."
          value={name}
          change={setName}
          maxLength={100}
        />
        <SubmitKey disabled={busy}>Look at the office</SubmitKey>
      </form>
      <StatusLine text={said.text} failed={said.failed} />
      {found && found.length > 0 && (
        <ul class="rows">
          {found.map((venue) => (
            <li key={venue.survey}>
              <p>{venue.name || 'Venue without a name'}</p>
              <p class="soft">Last entry at the office {dayAndHour(venue.changed_at)}</p>
              <BigKey disabled={busy} press={() => void bring(venue)}>
                Bring {venue.name || 'it'} here
              </BigKey>
            </li>
          ))}
        </ul>
      )}
    </section>
  )
}
