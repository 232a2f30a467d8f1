import { useEffect, useMemo, useRef, useState } from 'preact/hooks'
import { lint } from '../../../sheets/content/lint.ts'
import type { Outline } from '../../../sheets/content/tree.ts'
import { BigKey } from '../../components/big-key.tsx'
import { fileName, saveFile, shareFile, sharesFiles } from '../../state/hand-over.ts'
import type { SheetForm, Source } from './forms.ts'

/** What the sheet says, exactly as it is handed over; its keys; what its words still lack. */
export function SheetPreview(props: {
  outline: Outline
  source: Source
  form: SheetForm
  name: string
  say(text: string): void
}) {
  const { outline, source, form, say } = props
  const frame = useRef<HTMLIFrameElement>(null)
  const [written, setWritten] = useState<{ form: string; text: string } | null>(null)
  const findings = useMemo(() => lint(outline), [outline])

  useEffect(() => {
    let wanted = true
    form.write(outline, source).then(
      (text) => wanted && setWritten({ form: form.id, text }),
      (error: unknown) => wanted && say(`This form could not be written: ${String(error)}`),
    )
    return () => {
      wanted = false
    }
  }, [outline, form, source.survey, source.assessment, source.walk])

  if (written?.form !== form.id) return <p role="status">Writing</p>
  const { text } = written
  const file = { name: fileName(props.name, form.ending), type: form.type, text }
  return (
    <div class="stack">
      <div class="keys">
        <BigKey
          primary
          press={() => {
            saveFile(file)
            say(`Given to the browser to save: ${file.name}`)
          }}
        >
          Save
        </BigKey>
        {sharesFiles() && (
          <BigKey press={async () => say((await shareFile(file)) ? 'Handed over.' : 'Not handed over.')}>Share</BigKey>
        )}
        {form.id === 'html' && <BigKey press={() => frame.current?.contentWindow?.print()}>Print</BigKey>}
      </div>
      {findings.length > 0 && (
        <details>
          <summary>Words to look at: {findings.length}</summary>
          <ul class="plain-list">
            {findings.map((finding) => (
              <li key={`${finding.where} ${finding.text} ${finding.problem}`}>
                {finding.where}: “{finding.text}”: {finding.problem}. {finding.whatToDo}
              </li>
            ))}
          </ul>
        </details>
      )}
      {form.id === 'html' ? (
        // No script runs in it; the same origin only lets it be printed.
        <iframe
          ref={frame}
          class="sheet-frame"
          title={`Preview: ${outline.title}`}
          sandbox="allow-same-origin allow-modals"
          srcdoc={text}
        />
      ) : (
        <section aria-label={`Preview: ${outline.title}`}>
          <pre class="sheet-text">{text}</pre>
        </section>
      )}
    </div>
  )
}
