import { useEffect, useRef, useState } from 'preact/hooks'
import type { Outline } from '../../../sheets/content/tree.ts'
import { BigKey } from '../../components/big-key.tsx'
import { fileName } from '../../state/hand-over.ts'
import type { Source, TextForm } from './forms.ts'
import { HandOverKeys } from './hand-over-keys.tsx'

/** What the sheet says, exactly as it is handed over, and its keys. */
export function SheetPreview(props: {
  outline: Outline
  source: Source
  form: TextForm
  name: string
  say(text: string): void
}) {
  const { outline, source, form, say } = props
  const frame = useRef<HTMLIFrameElement>(null)
  const [written, setWritten] = useState<{ form: string; text: string } | null>(null)

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
      <HandOverKeys file={file} say={say}>
        {form.id === 'html' && <BigKey press={() => frame.current?.contentWindow?.print()}>Print</BigKey>}
      </HandOverKeys>
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
