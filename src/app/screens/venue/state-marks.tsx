import { useState } from 'preact/hooks'
import { markState } from '../../../record/operations/walk.ts'
import { states, type Walk, type WalkState } from '../../../record/survey.ts'
import { SubmitKey } from '../../components/big-key.tsx'
import { dayWords } from '../../components/day-words.ts'
import { Field, SelectField } from '../../components/field.tsx'
import { today } from '../../state/today.ts'
import type { Writer } from './writer.ts'

const words: Record<WalkState, string> = {
  surveyed: 'surveyed with the tape',
  judged: 'judged by a practitioner',
  tried: 'tried by staff with this robot',
  walked: 'walked with the client',
  reviewed: 'reviewed by a second person',
  issued: 'issued',
}

/** The history of a walk's states, and a form for the next: each with name, role and date, none ever overwritten. */
export function StateMarks({ writer, walk }: { writer: Writer; walk: Walk }) {
  const { session } = writer
  const next = states.find((state) => !walk.states.some((mark) => mark.state === state)) ?? 'issued'
  const [state, setState] = useState<WalkState>(next)
  const [name, setName] = useState(session.person.value)
  const [role, setRole] = useState('')
  const [date, setDate] = useState(today())
  const [trouble, setTrouble] = useState<string | null>(null)
  const team = session.survey.value.view.team

  const mark = async () => {
    if (name.trim() === '') return setTrouble('A mark needs a name.')
    if (!/^\d{4}-\d{2}-\d{2}$/.test(date) || date > today()) return setTrouble('A mark needs a day that has come.')
    setTrouble(null)
    await writer.write(
      (log) =>
        markState(log, walk.id, {
          state,
          name: name.trim(),
          ...(role.trim() ? { role: role.trim() } : {}),
          date,
          ...(team ? { team: team.revision } : {}),
        }),
      `${walk.name}: ${words[state]} by ${name.trim()}`,
    )
  }

  return (
    <div class="stack">
      {walk.states.length === 0 ? (
        <p>No mark yet. A client’s sheet exists only from “{words.tried}” on.</p>
      ) : (
        <ol class="rows">
          {walk.states.map((one) => (
            <li key={`${one.state} ${one.date} ${one.name}`}>
              <span>
                {words[one.state]}: {one.name}
                {one.role ? `, ${one.role}` : ''}, {dayWords(one.date)}
                {one.team ? `, team card ${one.team}` : ''}
              </span>
            </li>
          ))}
        </ol>
      )}
      <form
        class="stack"
        noValidate
        onSubmit={(event) => {
          event.preventDefault()
          void mark()
        }}
      >
        <SelectField
          label="Mark this walk as"
          value={state}
          change={(value) => setState(value as WalkState)}
          choices={states.map((one) => ({ value: one, label: words[one] }))}
        />
        <Field label="Name" value={name} change={setName} trouble={trouble} autocomplete="name" needed />
        <Field label="Role" value={role} change={setRole} />
        <Field label="Date" type="date" value={date} change={setDate} needed />
        <SubmitKey wide>Mark it</SubmitKey>
      </form>
    </div>
  )
}
