import { useState } from 'preact/hooks'
import { saysWhere } from '../../../sync/client.ts'
import { BigKey } from '../../components/big-key.tsx'
import { dayAndHour } from '../../components/day-words.ts'
import { StatusLine } from '../../components/status-line.tsx'
import { keepBoth, removeHere } from '../../state/office.ts'
import type { Stuck } from '../../state/office-outcome.ts'
import type { OfficeWork } from '../../state/office-work.ts'
import { surveysOnPhone } from '../../state/surveys.ts'

/** Each survey, where it is, and what holds it up. */
export function SurveyList({ work }: { work: OfficeWork }) {
  const where = work.where.value
  const rows = (surveysOnPhone.value ?? []).flatMap((row) => {
    const at = where.get(row.survey)
    return at ? [{ ...row, at }] : []
  })
  return (
    <section class="part" aria-labelledby="where">
      <h2 id="where">Where your venues are</h2>
      {rows.length === 0 && <p>No venue of yours on this phone yet. Invented venues never leave it.</p>}
      <ul class="rows">
        {rows.map(({ survey, name, at }) => (
          <li key={survey}>
            <a class="row-link" href={`/venue/${survey}`}>
              {name || 'Venue without a name'}
            </a>
            <p>{saysWhere(at, dayAndHour)}</p>
            <HeldUp survey={survey} stuck={work.stuck.value.get(survey)} />
          </li>
        ))}
      </ul>
      <p class="soft">
        Without any office: open a venue and save or share it as a file; the other phone reads it on its page of venues.
        What both wrote stays.
      </p>
    </section>
  )
}

/** What holds a survey up; the key that keeps what two copies of a phone wrote, or that erases what the office has erased. */
function HeldUp({ survey, stuck }: { survey: string; stuck: Stuck | undefined }) {
  const [refused, setRefused] = useState('')
  const [asked, setAsked] = useState(false)
  if (!stuck) return null
  const { copied } = stuck
  return (
    <>
      <p class="trouble">
        {stuck.what} {stuck.whatToDo}
      </p>
      {copied && (
        <BigKey
          press={async () => {
            const told = await keepBoth(survey, copied)
            if (told) setRefused(`${told.what} ${told.whatToDo}`)
          }}
        >
          Keep both
        </BigKey>
      )}
      {stuck.erased && !asked && <BigKey press={() => setAsked(true)}>Remove it from this phone</BigKey>}
      {stuck.erased && asked && (
        <>
          <p>Every entry, draft and photo of it on this phone is deleted. This cannot be undone.</p>
          <div class="keys">
            <BigKey
              press={async () => {
                const told = await removeHere(survey)
                if (told) setRefused(`${told.what} ${told.whatToDo}`)
              }}
            >
              Remove for good
            </BigKey>
            <BigKey press={() => setAsked(false)}>Not now</BigKey>
          </div>
        </>
      )}
      <StatusLine text={refused} failed={refused !== ''} />
    </>
  )
}
