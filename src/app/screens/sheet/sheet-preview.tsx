import { useMemo, useRef } from 'preact/hooks'
import { lint } from '../../../sheets/content/lint.ts'
import type { Outline } from '../../../sheets/content/tree.ts'
import { toHtml } from '../../../sheets/html/to-html.ts'
import { toText } from '../../../sheets/text/to-text.ts'
import { BigKey } from '../../components/big-key.tsx'
import { fileName, saveFile, shareFile, sharesFiles } from '../../state/hand-over.ts'

export type SheetForm = 'html' | 'text'

/** What the sheet says, exactly as it is handed over; its keys; what its words still lack. */
export function SheetPreview(props: { outline: Outline; form: SheetForm; file: string; say(text: string): void }) {
  const { outline, form } = props
  const frame = useRef<HTMLIFrameElement>(null)
  const text = useMemo(() => (form === 'html' ? toHtml(outline) : toText(outline)), [outline, form])
  const file = {
    name: fileName(props.file, form === 'html' ? 'html' : 'txt'),
    type: form === 'html' ? 'text/html' : 'text/plain',
    text,
  }
  const findings = useMemo(() => lint(outline), [outline])
  return (
    <div class="stack">
      <div class="keys">
        <BigKey
          primary
          press={() => {
            saveFile(file)
            props.say(`Given to the browser to save: ${file.name}`)
          }}
        >
          Save
        </BigKey>
        {sharesFiles() && (
          <BigKey press={async () => props.say((await shareFile(file)) ? 'Handed over.' : 'Not handed over.')}>
            Share
          </BigKey>
        )}
        {form === 'html' && <BigKey press={() => frame.current?.contentWindow?.print()}>Print</BigKey>}
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
      {form === 'html' ? (
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
