import { TextField } from '../../components/strip/text-field.tsx'
import { draftOf, keepDraft, textDraft } from './drafts.ts'
import type { Recorder } from './recorder.ts'

/** Free text of a holder: drafted while it is typed, the draft dropped when it is saved. */
export function RecordedText(props: {
  recorder: Recorder
  holder: string
  what: string
  label: string
  value: string
  save(text: string): Promise<boolean>
}) {
  const { recorder, holder, what } = props
  return (
    <TextField
      key={`${holder} ${what}`}
      label={props.label}
      value={props.value}
      draft={draftOf(recorder, holder, textDraft(what))?.text ?? null}
      keep={(text) => void keepDraft(recorder, holder, textDraft(what), text, '')}
      save={async (text) => {
        const saved = await props.save(text)
        if (saved && draftOf(recorder, holder, textDraft(what))) await recorder.session.keepDraft(null)
        return saved
      }}
    />
  )
}
