import { useEffect, useState } from 'preact/hooks'
import type { Outline } from '../../../sheets/content/tree.ts'
import { type SheetAnswer, writeSheet } from '../../../workers/bridge.ts'
import { BigKey } from '../../components/big-key.tsx'
import { extrasFolder } from '../../state/extras.ts'
import { fileName } from '../../state/hand-over.ts'
import type { FileForm } from './forms.ts'
import { HandOverKeys } from './hand-over-keys.tsx'
import { NoSheet } from './no-sheet.tsx'

interface Shown {
  outline: Outline
  form: FileForm
  /** Null: its writer is at work, and `stage` says at what. */
  answer: SheetAnswer | null
  stage: string
}

/** A form that another app opens: written off the page, then saved or shared. What is in the way is said. */
export function SheetFile(props: { outline: Outline; form: FileForm; name: string; say(text: string): void }) {
  const { outline, form, say } = props
  const [shown, setShown] = useState<Shown | null>(null)
  const [attempt, setAttempt] = useState(0)

  useEffect(() => {
    let wanted = true
    const show = (answer: SheetAnswer | null, stage: string) => wanted && setShown({ outline, form, answer, stage })
    show(null, 'Waiting')
    const writing = writeSheet({ outline, as: form.order, extras: extrasFolder }, (stage) =>
      show(null, stage === 'loading' ? 'Loading what writes this form' : 'Writing'),
    )
    void writing.answer.then((answer) => answer && show(answer, ''))
    return () => {
      wanted = false
      writing.cancel()
    }
  }, [outline, form, attempt])

  const now = shown?.outline === outline && shown.form === form ? shown : null
  if (!now?.answer) return <p role="status">{now?.stage ?? 'Waiting'}</p>
  const { answer } = now
  if (answer.kind === 'refusal') return <NoSheet refusal={answer} title={`Not as ${form.label}`} />
  if (answer.kind === 'problem')
    return (
      <div class="stack">
        <p class="trouble" role="alert">
          {answer.problem} {answer.whatToDo}
        </p>
        <div class="keys">
          <BigKey press={() => setAttempt(attempt + 1)}>Try again</BigKey>
        </div>
      </div>
    )
  const name = fileName([props.name, form.suffix].filter(Boolean).join(' '), form.ending)
  return (
    <div class="stack">
      <HandOverKeys file={{ name, type: form.type, bytes: answer.bytes }} say={say} />
      <p role="status">
        Written: {name}, {Math.ceil(answer.bytes.length / 1000)} kB. Another app opens it.
      </p>
    </div>
  )
}
