import { remove } from '../../../record/operations/removal.ts'
import { setSegmentField } from '../../../record/operations/segment.ts'
import { Chips } from '../../components/strip/chips.tsx'
import { leaderWords } from '../../components/strip/strip-words.ts'
import { LedByFields } from './led-by-fields.tsx'
import { RecordedText } from './recorded-text.tsx'
import type { Recorder } from './recorder.ts'

/** What belongs to the whole part: its name, who leads, the zone, a note. */
export function PartSheet(props: { recorder: Recorder; done(): void }) {
  const { recorder } = props
  const { segment, index, session } = recorder
  const { zones } = session.survey.value.view
  const set = (field: 'name' | 'zone' | 'ledBy' | 'note', value: string, label: string) =>
    recorder.write((log) => setSegmentField(log, segment.id, field, value), `part ${index + 1}, ${label}`)
  return (
    <div class="sheet-keys">
      <RecordedText
        recorder={recorder}
        holder={segment.id}
        what="name"
        label="Name of this part"
        value={segment.name}
        save={(text) => set('name', text, `name: ${text}`)}
      />
      <LedByFields
        recorder={recorder}
        holder={segment.id}
        name={`part ${index + 1}`}
        ledBy={segment.ledBy}
        help={segment.help}
        choose={(ledBy) => set('ledBy', ledBy, `led by ${leaderWords[ledBy]}`)}
      />
      {zones.length > 0 && (
        <Chips
          legend="Zone"
          choices={zones.map((one) => ({ value: one.id, label: one.name }))}
          chosen={segment.zone ?? null}
          choose={(zone) => void set('zone', zone, `zone: ${zones.find((one) => one.id === zone)?.name ?? zone}`)}
        />
      )}
      <RecordedText
        recorder={recorder}
        holder={segment.id}
        what="note"
        label="Note"
        value={segment.note ?? ''}
        save={(text) => set('note', text, 'note')}
      />
      <button
        type="button"
        class="key wide"
        onClick={async () => {
          if (await recorder.write((log) => remove(log, segment.id), `part ${index + 1} removed with all on it`))
            props.done()
        }}
      >
        Remove this part
      </button>
      <button type="button" class="key primary" onClick={props.done}>
        Done
      </button>
    </div>
  )
}
