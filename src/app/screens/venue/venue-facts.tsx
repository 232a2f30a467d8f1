import { nameVenue, setCode } from '../../../record/operations/venue.ts'
import type { SurveyView } from '../../../record/survey.ts'
import { packIds } from '../../../standards/pack.ts'
import { pack } from '../../../standards/packs.ts'
import { SelectField } from '../../components/field.tsx'
import { SavedText } from '../../components/saved-text.tsx'
import type { Writer } from './writer.ts'

/** The venue's own facts: name, contact, hours wanted, code pack. */
export function VenueFacts({ writer, view }: { writer: Writer; view: SurveyView }) {
  const hours = (change: { from?: string; to?: string }) => {
    const next = { from: '09:00', to: '17:00', ...view.hours, ...change }
    return writer.write((log) => nameVenue(log, { hours: next }), `hours ${next.from} to ${next.to}`)
  }
  return (
    <div class="stack">
      <SavedText
        label="Name of the venue"
        value={view.name}
        save={(name) =>
          name.trim() !== '' && writer.write((log) => nameVenue(log, { name: name.trim() }), `name ${name}`)
        }
      />
      <SavedText
        label="Whom to ask at the venue"
        hint="A role and how to reach them. It stands on every sheet."
        value={view.contact ?? ''}
        save={(contact) => writer.write((log) => nameVenue(log, { contact: contact.trim() }), `contact ${contact}`)}
      />
      <div class="pair">
        <SavedText
          label="Judged from"
          type="time"
          value={view.hours?.from ?? ''}
          save={(from) => from !== '' && hours({ from })}
        />
        <SavedText label="until" type="time" value={view.hours?.to ?? ''} save={(to) => to !== '' && hours({ to })} />
      </div>
      <SelectField
        label="Published limits"
        hint="They give cautions. Local codes and licensed practice take precedence."
        value={view.code ?? 'us-ada-2010'}
        change={(code) =>
          void writer.write(
            (log) => setCode(log, code as SurveyView['code']),
            `published limits ${pack(code as SurveyView['code']).name}`,
          )
        }
        choices={packIds.map((id) => ({ value: id, label: pack(id).name }))}
      />
    </div>
  )
}
