import { setAlarm } from '../../../record/operations/walk.ts'
import type { Help, Walk } from '../../../record/survey.ts'
import { SavedText } from '../../components/saved-text.tsx'
import { AnswerItems } from './answer-items.tsx'
import type { Writer } from './writer.ts'

const items = [
  {
    item: 'wayOut',
    label: 'Way out in an alarm',
    words: [
      { value: 'yes', label: 'yes, without robot and without lift' },
      { value: 'robot', label: 'only with the robot' },
      { value: 'lift', label: 'only by lift' },
      { value: 'none', label: 'none' },
    ],
  },
  { item: 'helpCall', label: 'How to call for help', words: null },
  { item: 'rest', label: 'Places to rest', words: null },
  { item: 'deadEnd', label: 'How the team turns round at a dead end, and where the robot waits', words: null },
  {
    item: 'signal',
    label: 'Phone signal',
    words: [
      { value: 'yes', label: 'yes, all along' },
      { value: 'none', label: 'none on a part of it' },
    ],
  },
] as const

const alarm: readonly { field: keyof Help & string; label: string; type?: 'date' }[] = [
  { field: 'role', label: 'Who comes when the alarm sounds (a role)' },
  { field: 'call', label: 'How they know to come' },
  { field: 'act', label: 'What they do' },
  { field: 'ifNobody', label: 'What the handler does if nobody comes' },
  { field: 'confirmedBy', label: 'Who at the venue confirmed it' },
  { field: 'confirmedOn', label: 'Confirmed on', type: 'date' },
]

/** What a walk answers for itself: way out, help, rest, dead end, alarm. */
export function WalkAnswers({ writer, walk }: { writer: Writer; walk: Walk }) {
  return (
    <div class="stack">
      <AnswerItems writer={writer} holder={walk} items={items} />
      <fieldset class="stack">
        <legend>When the alarm sounds</legend>
        {alarm.map(({ field, label, type }) => (
          <SavedText
            key={field}
            label={label}
            type={type ?? 'text'}
            value={String(walk.alarm?.[field] ?? '')}
            save={(text) =>
              writer.write((log) => setAlarm(log, walk.id, withField(walk.alarm, field, text)), `${label}: ${text}`)
            }
          />
        ))}
      </fieldset>
    </div>
  )
}

/** The help with one field changed; an emptied field is unanswered. */
function withField(help: Help | undefined, field: string, text: string): Help | undefined {
  const { [field]: _, ...rest } = help ?? {}
  const changed = text.trim() === '' ? rest : { ...rest, [field]: text.trim() }
  return Object.keys(changed).length === 0 ? undefined : (changed as Help)
}
