import './sheet.css'
import { useMemo, useState } from 'preact/hooks'
import { lint } from '../../../sheets/content/lint.ts'
import { outline } from '../../../sheets/content/outline.ts'
import type { Outline, Reader, Refusal } from '../../../sheets/content/tree.ts'
import { ExtrasPart } from '../../components/extras-part.tsx'
import { PageHead } from '../../components/page-head.tsx'
import { StatusLine } from '../../components/status-line.tsx'
import { Chips } from '../../components/strip/chips.tsx'
import { extras } from '../../state/extras.ts'
import type { Session } from '../../state/session.ts'
import { today } from '../../state/today.ts'
import { type SheetForm, sheetForms } from './forms.ts'
import { Findings, NoSheet } from './no-sheet.tsx'
import { SheetFile } from './sheet-file.tsx'
import { SheetPreview } from './sheet-preview.tsx'

const readers: readonly { value: Reader; label: string }[] = [
  { value: 'client', label: 'Client' },
  { value: 'venue', label: 'Venue manager' },
  { value: 'file', label: 'Handler’s file' },
  { value: 'reception', label: 'Reception' },
]

/** The sheets of one walk: who reads it, in which form, what it says, and out of the app with it. */
export function SheetScreen({ session, walk: id }: { session: Session; walk: string }) {
  const [reader, setReader] = useState<Reader>('client')
  const [form, setForm] = useState('html')
  const [said, setSaid] = useState('')
  const survey = session.survey.value
  const judgement = session.judgement.value
  const name = survey.view.walks.find((one) => one.id === id)?.name ?? 'Walk'
  const result = judgement.walks.find((one) => one.id === id)
  const assessment = judgement.assessment
  const written = useMemo(
    (): Outline | Refusal | null =>
      judgement.stale || !assessment || !result ? null : outline(survey, result, assessment, reader, { on: today() }),
    [judgement.stale, survey, assessment, result, reader],
  )
  const findings = useMemo(() => (written?.kind === 'outline' ? lint(written) : []), [written])
  const offered = sheetForms.filter(({ readers: only }) => !only || only.includes(reader))
  const chosen = offered.find((one) => one.id === form) ?? offered[0]

  const toVenue = (
    <p>
      <a href={`/venue/${survey.survey}`}>Marks of this walk are made on the venue’s page.</a>
    </p>
  )

  return (
    <main class="page wide">
      <PageHead title={`Sheet: ${name}`} back={{ href: `/venue/${survey.survey}`, label: survey.view.name }} />
      <StatusLine text={said} />
      <div class="columns sheet-columns">
        <div class="stack">
          <Chips legend="For" choices={readers} chosen={reader} choose={(one) => setReader(one as Reader)} />
          <Chips
            legend="As"
            choices={offered.map((one) => ({ value: one.id, label: labelOf(one) }))}
            chosen={chosen?.id ?? null}
            choose={setForm}
          />
          <p class="soft">
            A sheet names the client’s measurements or your readings. Hand it only to the person it is for.
          </p>
          <ExtrasPart />
        </div>
        {judgement.problem ? (
          <p class="trouble" role="alert">
            {judgement.problem}
          </p>
        ) : written === null ? (
          <p role="status">Judging first</p>
        ) : written.kind === 'refusal' ? (
          <div class="stack">
            <NoSheet refusal={written} title="No sheet yet" />
            {toVenue}
          </div>
        ) : reader === 'client' && findings.length > 0 ? (
          <section class="stack" aria-labelledby="unfit">
            <h2 id="unfit">Not fit for the client yet</h2>
            <p>These words cannot be used by a person who does not look. Change them on the venue’s page.</p>
            <Findings findings={findings} />
            {toVenue}
          </section>
        ) : (
          chosen &&
          assessment && (
            <div class="stack">
              {'write' in chosen ? (
                <SheetPreview
                  outline={written}
                  source={{ survey, assessment, walk: id }}
                  form={chosen}
                  name={`${name} ${reader}`}
                  say={setSaid}
                />
              ) : (
                <SheetFile outline={written} form={chosen} name={`${name} ${reader}`} say={setSaid} />
              )}
              {findings.length > 0 && (
                <details>
                  <summary>Words to look at: {findings.length}</summary>
                  <Findings findings={findings} />
                </details>
              )}
            </div>
          )
        )}
      </div>
    </main>
  )
}

/** A key says by itself that it cannot write yet. */
function labelOf(form: SheetForm): string {
  return 'order' in form && form.needsExtras && extras.value.kind !== 'here'
    ? `${form.label}: needs the extras`
    : form.label
}
