import type { ComponentChildren } from 'preact'
import { useMemo } from 'preact/hooks'
import { lint } from '../../../sheets/content/lint.ts'
import type { Outline, Refusal } from '../../../sheets/content/tree.ts'
import { ExtrasPart } from '../../components/extras-part.tsx'
import type { SheetForm, Source } from './forms.ts'
import { lacksExtras } from './lacks-extras.ts'
import { Findings, NoSheet } from './no-sheet.tsx'
import { SheetFile } from './sheet-file.tsx'
import { SheetPreview } from './sheet-preview.tsx'

/** One sheet in one form, or what is in its way; the offline extras under it, or above all where they are what is missing. */
export function SheetBody(props: {
  written: Outline | Refusal
  source: Source
  form: SheetForm
  name: string
  say(text: string): void
}) {
  const { written, source, form, name, say } = props
  const findings = useMemo(() => (written.kind === 'outline' ? lint(written) : []), [written])
  if (written.kind === 'refusal')
    return (
      <div class="stack">
        <NoSheet refusal={written} title="No sheet yet" />
        <ToVenue survey={source.survey.survey}>Marks of this walk are made on the venue’s page.</ToVenue>
        <ExtrasPart />
      </div>
    )
  if (written.reader === 'client' && !written.draft && findings.length > 0)
    return (
      <div class="stack">
        <section class="stack" aria-labelledby="unfit">
          <h2 id="unfit">Not fit for the client yet</h2>
          <p>A person who does not look cannot use these words. Change each where it was entered.</p>
          <Findings findings={findings} />
        </section>
        <ToVenue survey={source.survey.survey}>Words of this walk are changed on the venue’s page.</ToVenue>
        <ExtrasPart />
      </div>
    )
  if (lacksExtras(form))
    return (
      <div class="stack">
        <p>{form.label} needs the offline extras.</p>
        <ExtrasPart />
      </div>
    )
  return (
    <div class="stack">
      {'write' in form ? (
        <SheetPreview outline={written} source={source} form={form} name={name} say={say} />
      ) : (
        <SheetFile outline={written} form={form} name={name} say={say} />
      )}
      {findings.length > 0 && (
        <details>
          <summary>Words to look at: {findings.length}</summary>
          <Findings findings={findings} />
        </details>
      )}
      <ExtrasPart />
    </div>
  )
}

function ToVenue(props: { survey: string; children: ComponentChildren }) {
  return (
    <p>
      <a href={`/venue/${props.survey}`}>{props.children}</a>
    </p>
  )
}
