import { useState } from 'preact/hooks'
import { settleAnswer } from '../../../record/operations/answer.ts'
import { setZoneWord } from '../../../record/operations/venue.ts'
import type { Zone } from '../../../record/survey.ts'
import { SubmitKey } from '../../components/big-key.tsx'
import { dayWords } from '../../components/day-words.ts'
import { Field } from '../../components/field.tsx'
import { Rivals } from '../../components/rivals.tsx'
import { Chips } from '../../components/strip/chips.tsx'
import { answerNow, type Writer } from './writer.ts'

/** Who allows the robot in a zone: a word and the role that gave it belong together. */
export function AllowedForm({ writer, zone }: { writer: Writer; zone: Zone }) {
  const now = zone.words.allowed
  const [says, setSays] = useState<string | null>(null)
  const [role, setRole] = useState('')
  const [trouble, setTrouble] = useState<string | null>(null)
  const submit = async () => {
    if (!says) return setTrouble('Choose what was said.')
    if (says !== 'not-asked' && role.trim() === '')
      return setTrouble('Name the role that said so, for example duty manager.')
    setTrouble(null)
    const answer = answerNow(writer, says, 'told', role.trim() ? { role: role.trim() } : {})
    if (await writer.write((log) => setZoneWord(log, zone.id, 'allowed', answer), `${zone.name}: robot ${says}`))
      setRole('')
  }
  /** A permission without the role that gave it is none: asked for where the record does not say it. */
  const settle = (said: string) => {
    const by = now?.says === said && now.role ? now.role : role.trim()
    if (said !== 'not-asked' && by === '') {
      setSays(said)
      return setTrouble('Name the role that said so, then settle again.')
    }
    setTrouble(null)
    const answer = answerNow(writer, said, 'told', by ? { role: by } : {})
    void writer.write((log) => settleAnswer(log, zone.id, 'allowed', answer), `${zone.name}: settled, robot ${said}`)
  }
  return (
    <form
      class="stack"
      noValidate
      onSubmit={(event) => {
        event.preventDefault()
        void submit()
      }}
    >
      <Chips
        legend="May the robot be used here?"
        choices={[
          { value: 'allowed', label: 'Allowed' },
          { value: 'forbidden', label: 'Forbidden' },
          { value: 'not-asked', label: 'Not asked' },
        ]}
        chosen={says ?? now?.says ?? null}
        choose={setSays}
      />
      {now && (
        <p class="soft">
          Now: {now.says === 'not-asked' ? 'not asked' : now.says}
          {now.role ? `, said by the ${now.role}` : ''}
          {now.time ? `, ${dayWords(now.time)}` : ''}
        </p>
      )}
      {now && <Rivals answer={now} wordOf={(said) => (said === 'not-asked' ? 'not asked' : said)} settle={settle} />}
      {says !== null && (
        <>
          <Field label="Role that said so" value={role} change={setRole} trouble={trouble} needed />
          <SubmitKey>Save the permission</SubmitKey>
        </>
      )}
    </form>
  )
}
