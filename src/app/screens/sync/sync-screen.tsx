import { useEffect, useState } from 'preact/hooks'
import { PageHead } from '../../components/page-head.tsx'
import { StatusLine } from '../../components/status-line.tsx'
import { office } from '../../state/office.ts'
import type { OfficeWork } from '../../state/office-work.ts'
import { readChoices } from '../../state/settings.ts'
import { listSurveys } from '../../state/surveys.ts'
import { BringVenue } from './bring-venue.tsx'
import { EnrolForm } from './enrol-form.tsx'
import { SendPart } from './send-part.tsx'
import { SignOut } from './sign-out.tsx'
import { SurveyList } from './survey-list.tsx'

/** Where each survey is, what waits, and this phone's place at its office. */
export function SyncScreen() {
  const [work, setWork] = useState<OfficeWork | null>(null)
  const [trouble, setTrouble] = useState('')
  useEffect(() => {
    const open = async () => {
      await readChoices()
      await listSurveys()
      const opened = await office()
      await opened.look()
      setWork(opened)
    }
    open().catch((error: unknown) => setTrouble(String(error)))
  }, [])
  return (
    <main class="page">
      <PageHead
        title="Office"
        back={{ href: '/', label: 'Venues' }}
        about={<p class="soft">Recording never waits for the office: everything is kept on this phone first.</p>}
      />
      <StatusLine text={trouble} failed={trouble !== ''} />
      {work && <Parts work={work} />}
    </main>
  )
}

function Parts({ work }: { work: OfficeWork }) {
  const enrolment = work.enrolment.value
  const said = work.said.value
  if (!enrolment)
    return (
      <div class="columns">
        <section class="part" aria-labelledby="enrol">
          <h2 id="enrol">Enrol this phone</h2>
          {said && (
            <p class="trouble" role="alert">
              {said.what} {said.whatToDo}
            </p>
          )}
          <EnrolForm work={work} />
        </section>
        <SurveyList work={work} />
      </div>
    )
  return (
    <div class="columns">
      <div class="stack">
        {enrolment.ended ? (
          <section class="part" aria-labelledby="ended">
            <h2 id="ended">Signed out by the office</h2>
            <p class="trouble">
              {enrolment.ended.what} {enrolment.ended.whatToDo}
            </p>
            <details>
              <summary>Enrol again with a new code</summary>
              <EnrolForm work={work} />
            </details>
          </section>
        ) : (
          <SendPart work={work} enrolment={enrolment} />
        )}
        <SurveyList work={work} />
      </div>
      <div class="stack">
        {!enrolment.ended && <BringVenue work={work} />}
        <SignOut work={work} />
      </div>
    </div>
  )
}
