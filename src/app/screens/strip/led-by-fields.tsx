import { setHelp } from '../../../record/operations/feature.ts'
import { type Help, type LedBy, leads } from '../../../record/survey.ts'
import { Chips } from '../../components/strip/chips.tsx'
import { leaderWords } from '../../components/strip/strip-words.ts'
import { RecordedText } from './recorded-text.tsx'
import type { Recorder } from './recorder.ts'

const helpFields: readonly { id: keyof Help & string; label: string }[] = [
  { id: 'role', label: 'Role on duty who helps' },
  { id: 'call', label: 'How they are called' },
  { id: 'act', label: 'What they do' },
  { id: 'confirmedBy', label: 'Who at the venue confirmed it' },
  { id: 'confirmedOn', label: 'Confirmed on, like 2026-11-30' },
  { id: 'ifNobody', label: 'If nobody comes in 3 minutes' },
]

/** Who leads, and the helper's act with every field that makes it complete. */
export function LedByFields(props: {
  recorder: Recorder
  holder: string
  /** Of what: for reading back. */
  name: string
  ledBy: LedBy | null
  help: Help | undefined
  choose(ledBy: LedBy): Promise<boolean>
}) {
  const { recorder, holder } = props
  const given = helpFields.filter(({ id }) => props.help?.[id] !== undefined).length
  return (
    <>
      <Chips
        legend="Led by"
        choices={leads.map((one) => ({ value: one, label: leaderWords[one] }))}
        chosen={props.ledBy}
        choose={(ledBy) => void props.choose(ledBy as LedBy)}
      />
      <details open={given > 0 && given < helpFields.length}>
        <summary>Help: {given === 0 ? 'none named' : `${given} of ${helpFields.length} answers`}</summary>
        {helpFields.map(({ id, label }) => (
          <RecordedText
            key={id}
            recorder={recorder}
            holder={holder}
            what={`help ${id}`}
            label={label}
            value={String(props.help?.[id] ?? '')}
            save={(text) => {
              if (id === 'confirmedOn' && !/^\d{4}-\d{2}-\d{2}$/.test(text)) {
                recorder.say('Not saved: give the date like 2026-11-30')
                return Promise.resolve(false)
              }
              return recorder.write(
                (log) => setHelp(log, holder, { ...props.help, [id]: text }),
                `${props.name}, ${label.toLowerCase()}: ${text}`,
              )
            }}
          />
        ))}
      </details>
    </>
  )
}
