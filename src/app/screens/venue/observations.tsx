import { useState } from 'preact/hooks'
import { observeZone } from '../../../record/operations/venue.ts'
import type { Observation, Reading, Zone } from '../../../record/survey.ts'
import { parseQuantity } from '../../../units/parse.ts'
import { SubmitKey } from '../../components/big-key.tsx'
import { Field, SelectField } from '../../components/field.tsx'
import { answerNow, type Writer } from './writer.ts'

/** Four words each; the judge knows those of crowd, noise and flow. */
const asked = [
  { item: 'crowd', label: 'Crowd', says: ['empty', 'few', 'busy', 'packed'] },
  { item: 'noise', label: 'Noise', says: ['quiet', 'lively', 'loud', 'very loud'] },
  { item: 'light', label: 'Light', says: ['even', 'dim', 'patchy', 'glare'] },
  { item: 'flow', label: 'People walk', says: ['one-way', 'two-way'] },
] as const

/** What was found between two hours, and a form for another time of day. */
export function Observations({ writer, zone }: { writer: Writer; zone: Zone }) {
  const [from, setFrom] = useState('')
  const [to, setTo] = useState('')
  const [words, setWords] = useState<Record<string, string>>({})
  const [meter, setMeter] = useState('')
  const [trouble, setTrouble] = useState<string | null>(null)

  const submit = async () => {
    if (from === '' || to === '' || from >= to) return setTrouble('Give the hours it holds for, the earlier one first.')
    const answered = asked.filter(({ item }) => words[item])
    if (answered.length === 0) return setTrouble('Answer at least one of them.')
    const level = meter.trim() === '' ? null : parseQuantity(meter, { quantity: 'sound', unit: 'dB(A)' })
    if (level && !level.ok) return setTrouble('Give the sound level in dB(A), for example 62, or leave it empty.')
    setTrouble(null)
    const { session } = writer
    const reading: Reading | null = level && {
      id: session.newId('reading'),
      raw: meter.includes('d') ? meter.trim() : `${meter.trim()} dB(A)`,
      value: level.value,
      bound: level.bound,
      instrument: 'sound-meter',
      person: session.person.value,
      time: new Date().toISOString(),
    }
    const observation: Observation = {
      id: session.newId('observation'),
      from,
      to,
      words: Object.fromEntries(answered.map(({ item }) => [item, answerNow(writer, words[item] ?? '', 'swept')])),
      readings: reading ? { noise: [reading] } : {},
    }
    if (!(await writer.write((log) => observeZone(log, zone.id, observation), `${zone.name}, ${from} to ${to}`))) return
    setWords({})
    setMeter('')
  }

  return (
    <section class="stack" aria-label={`Surroundings of ${zone.name}`}>
      <h3>Surroundings by the hour</h3>
      {zone.observations.length === 0 && <p>Nobody has observed this zone yet.</p>}
      <ul class="plain-list">
        {zone.observations.map((one) => (
          <li key={one.id}>
            {one.from} to {one.to}: {sayWords(one)}
          </li>
        ))}
      </ul>
      <form
        class="stack"
        noValidate
        onSubmit={(event) => {
          event.preventDefault()
          void submit()
        }}
      >
        <div class="pair">
          <Field label="From" type="time" value={from} change={setFrom} trouble={trouble} needed />
          <Field label="To" type="time" value={to} change={setTo} needed />
        </div>
        <div class="pair">
          {asked.map(({ item, label, says }) => (
            <SelectField
              key={item}
              label={label}
              value={words[item] ?? ''}
              change={(value) => setWords({ ...words, [item]: value })}
              choices={says.map((one) => ({ value: one, label: one }))}
              open="Not looked at"
            />
          ))}
        </div>
        <Field label="Sound meter, if you have one" unit="dB(A)" value={meter} change={setMeter} inputMode="decimal" />
        <SubmitKey>Save what I found</SubmitKey>
      </form>
    </section>
  )
}

function sayWords(one: Observation): string {
  const words = Object.entries(one.words).map(([item, answer]) => `${item} ${answer.says}`)
  const meters = Object.values(one.readings).flatMap((taken) => taken.map((reading) => reading.raw))
  return [...words, ...meters].join(', ')
}
