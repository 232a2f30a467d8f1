import type { EntryDraft } from '../../state/session.ts'

/** After an interruption: where you were and what was half typed. */
export function ResumeCard(props: { draft: EntryDraft; part: number; name: string; goOn(): void; drop(): void }) {
  return (
    <section class="resume" aria-label="Half typed">
      <p>
        <b>
          Part {props.part}, {props.name}, half typed {props.draft.text}.
        </b>{' '}
        Same place? Same conditions?
      </p>
      <div class="chips-row">
        <button type="button" class="key" onClick={props.goOn}>
          Go on with it
        </button>
        <button type="button" class="key" onClick={props.drop}>
          Drop it
        </button>
      </div>
    </section>
  )
}
