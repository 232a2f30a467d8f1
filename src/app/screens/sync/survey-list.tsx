import { useState } from 'preact/hooks'
import { saysWhere } from '../../../sync/client.ts'
import { BigKey } from '../../components/big-key.tsx'
import { dayAndHour } from '../../components/day-words.ts'
import { renewIdentity } from '../../state/office.ts'
import type { OfficeWork, Stuck } from '../../state/office-work.ts'
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
            <HeldUp stuck={work.stuck.value.get(survey)} />
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

function HeldUp({ stuck }: { stuck: Stuck | undefined }) {
  const [asked, setAsked] = useState(false)
  if (!stuck) return null
  return (
    <>
      <p class="trouble">
        {stuck.what} {stuck.whatToDo}
      </p>
      {stuck.copied && !asked && <BigKey press={() => setAsked(true)}>Give this phone a new identity</BigKey>}
      {stuck.copied && asked && (
        <>
          <p>
            Save the venue as a file first. From then on this phone writes under an id of its own, in every venue. What
            it wrote before stays as it is.
          </p>
          <div class="keys">
            <BigKey press={() => void renewIdentity()}>New identity now</BigKey>
            <BigKey press={() => setAsked(false)}>Not now</BigKey>
          </div>
        </>
      )}
    </>
  )
}
