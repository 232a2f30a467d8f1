import './sheet.css'
import { useMemo, useState } from 'preact/hooks'
import { outline } from '../../../sheets/content/outline.ts'
import type { Outline, Reader, Refusal } from '../../../sheets/content/tree.ts'
import { PageHead } from '../../components/page-head.tsx'
import { StatusLine } from '../../components/status-line.tsx'
import { Chips } from '../../components/strip/chips.tsx'
import type { Session } from '../../state/session.ts'
import { today } from '../../state/today.ts'
import { sheetForms } from './forms.ts'
import { lacksExtras } from './lacks-extras.ts'
import { SheetBody } from './sheet-body.tsx'

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
  const offered = sheetForms.filter(({ readers: only }) => !only || only.includes(reader))
  const chosen = offered.find((one) => one.id === form) ?? offered[0]

  return (
    <main class="page wide">
      <PageHead title={`Sheet: ${name}`} back={{ href: `/venue/${survey.survey}`, label: survey.view.name }} />
      <StatusLine text={said} />
      <div class="columns sheet-columns">
        <div class="stack">
          <Chips legend="For" choices={readers} chosen={reader} choose={(one) => setReader(one as Reader)} />
          <Chips
            legend="As"
            // A key says by itself that it cannot write yet.
            choices={offered.map((one) => ({
              value: one.id,
              label: lacksExtras(one) ? `${one.label}: needs the extras` : one.label,
            }))}
            chosen={chosen?.id ?? null}
            choose={setForm}
          />
          <p class="soft">
            A sheet names the client’s measurements or your readings. Hand it only to the person it is for.
          </p>
        </div>
        {judgement.problem ? (
          <p class="trouble" role="alert">
            {judgement.problem}
          </p>
        ) : written === null || !assessment || !chosen ? (
          <p role="status">Judging first</p>
        ) : (
          <SheetBody
            written={written}
            source={{ survey, assessment, walk: id }}
            form={chosen}
            name={`${name} ${reader}`}
            say={setSaid}
          />
        )}
      </div>
    </main>
  )
}
