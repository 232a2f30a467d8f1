import { useEffect, useState } from 'preact/hooks'
import { useLocation } from 'preact-iso'
import { FileKey } from '../../components/file-key.tsx'
import { PageHead } from '../../components/page-head.tsx'
import { Problems } from '../../components/problems.tsx'
import { StatusLine } from '../../components/status-line.tsx'
import { textOf } from '../../state/file-choice.ts'
import { officeTrouble } from '../../state/office-said.ts'
import { PhoneKeepsNothing } from '../../state/phone.ts'
import { choices, readChoices } from '../../state/settings.ts'
import { type Begun, beginVenue, listSurveys, type Refused, surveysOnPhone, takeInFile } from '../../state/surveys.ts'
import { DemoList } from './demo-list.tsx'
import { NewVenue } from './new-venue.tsx'
import { VenueRow } from './venue-row.tsx'

/** What is on this phone, and how to begin: a new venue, a demo, a file. */
export function VenuesScreen() {
  const { route } = useLocation()
  const [refusal, setRefusal] = useState<Refused | null>(null)
  const [said, setSaid] = useState<{ text: string; failed: boolean }>({ text: '', failed: false })
  const rows = surveysOnPhone.value

  useEffect(() => {
    readChoices()
      .then(listSurveys)
      .catch((error: unknown) => setSaid({ text: wordsOf(error), failed: true }))
    // Looks again what waits, after whatever was recorded. The list stands without it.
    import('../../state/office.ts')
      .then(({ office }) => office())
      .then((work) => (work.enrolment.value ? work.look() : undefined))
      .catch(() => undefined)
  }, [])

  const go = (begun: Begun) => {
    if (begun.ok) route(`/venue/${begun.survey}`)
    else refuse(begun)
  }
  const refuse = (begun: Begun & { ok: false }) => {
    if ('problems' in begun) setRefusal(begun)
    else setSaid({ text: `${begun.what} ${begun.whatToDo}`, failed: true })
  }
  const read = async (file: File) => {
    setRefusal(null)
    setSaid({ text: '', failed: false })
    const chosen = await textOf(file)
    if (!chosen.ok) return setSaid({ text: chosen.what, failed: true })
    const begun = await takeInFile(chosen.text)
    if (!begun.ok) return refuse(begun)
    if (begun.before === 0) return go(begun)
    await listSurveys()
    setSaid({ text: mergedWords(begun), failed: false })
  }

  return (
    <main class="page">
      <PageHead
        title="Venues on this phone"
        about={
          <nav aria-label="App">
            <a href="/settings">Settings and back-up</a> <a href="/sync">Office</a>
          </nav>
        }
      />
      <StatusLine text={said.text} failed={said.failed} />
      {officeTrouble.value && (
        <p class="trouble">
          {officeTrouble.value} <a href="/sync">Office</a>
        </p>
      )}
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

/** Of a file whose survey was here already: what it brought, and that what is here stays. */
function mergedWords({ name, added, before }: Begun & { ok: true }): string {
  if (added === 0) return `Read: ${name}. All of the file was on this phone already.`
  const entries = added === 1 ? '1 new entry' : `${added} new entries`
  return `Read: ${name}. ${entries} beside the ${before} that were here; none of those was changed.`
}

function wordsOf(error: unknown): string {
  return error instanceof PhoneKeepsNothing ? `${error.message} ${error.whatToDo}` : String(error)
}
