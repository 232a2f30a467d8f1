import { useEffect, useState } from 'preact/hooks'
import { useLocation } from 'preact-iso'
import { FileKey } from '../../components/file-key.tsx'
import { PageHead } from '../../components/page-head.tsx'
import { Problems } from '../../components/problems.tsx'
import { StatusLine } from '../../components/status-line.tsx'
import { textOf } from '../../state/file-choice.ts'
import { PhoneKeepsNothing } from '../../state/phone.ts'
import { choices, readChoices } from '../../state/settings.ts'
import { type Begun, beginVenue, listSurveys, surveysOnPhone, takeInFile } from '../../state/surveys.ts'
import { DemoList } from './demo-list.tsx'
import { NewVenue } from './new-venue.tsx'
import { VenueRow } from './venue-row.tsx'

/** What is on this phone, and how to begin: a new venue, a demo, a file. */
export function VenuesScreen() {
  const { route } = useLocation()
  const [refusal, setRefusal] = useState<(Begun & { ok: false }) | null>(null)
  const [said, setSaid] = useState<{ text: string; failed: boolean }>({ text: '', failed: false })
  const rows = surveysOnPhone.value

  useEffect(() => {
    readChoices()
      .then(listSurveys)
      .catch((error: unknown) => setSaid({ text: wordsOf(error), failed: true }))
  }, [])

  const go = (begun: Begun) => {
    if (begun.ok) route(`/venue/${begun.survey}`)
    else setRefusal(begun)
  }
  const read = async (file: File) => {
    setRefusal(null)
    const chosen = await textOf(file)
    if (chosen.ok) go(await takeInFile(chosen.text))
    else setSaid({ text: chosen.what, failed: true })
  }

  return (
    <main class="page">
      <PageHead
        title="Venues on this phone"
        about={
          <nav aria-label="App">
            <a href="/settings">Settings and back-up</a>
          </nav>
        }
      />
      <StatusLine text={said.text} failed={said.failed} />
      {refusal && <Problems title="Nothing was read in." problems={refusal.problems} />}
      {rows === null && !said.failed && <p>Reading what is on this phone</p>}
      {rows?.length === 0 && <p>None yet. Begin one, open a demo, or read a file that somebody gave you.</p>}
      {rows !== null && rows.length > 0 && (
        <ul class="rows">
          {rows.map((row) => (
            <VenueRow key={row.survey} row={row} />
          ))}
        </ul>
      )}
      <div class="columns">
        <section class="part" aria-labelledby="begin">
          <h2 id="begin">Begin</h2>
          <NewVenue person={choices.value.person} begin={async (name) => go(await beginVenue(name))} />
          <FileKey label="Read a survey file" accept=".json,application/json" chosen={(file) => void read(file)} />
        </section>
        <DemoList open={async (text) => go(await takeInFile(text))} />
      </div>
    </main>
  )
}

function wordsOf(error: unknown): string {
  return error instanceof PhoneKeepsNothing ? `${error.message} ${error.whatToDo}` : String(error)
}
