import { useState } from 'preact/hooks'
import type { FactDraft } from '../../../record/facts.ts'
import type { FactLog } from '../../../record/log.ts'
import { addPlace } from '../../../record/operations/venue.ts'
import { addWalk } from '../../../record/operations/walk.ts'
import type { SurveyView } from '../../../record/survey.ts'
import { SubmitKey } from '../../components/big-key.tsx'
import { Field, SelectField } from '../../components/field.tsx'
import type { Writer } from './writer.ts'

const another = 'another'

/** A walk from place to place. A place that is not on the list is named here and added with it. */
export function NewWalk({ writer, view, made }: { writer: Writer; view: SurveyView; made(walk: string): void }) {
  const [from, setFrom] = useState('')
  const [to, setTo] = useState('')
  const [newFrom, setNewFrom] = useState('')
  const [newTo, setNewTo] = useState('')
  const [startSign, setStartSign] = useState('')
  const [trouble, setTrouble] = useState<string | null>(null)
  const floor = view.floors[0]?.id
  const name = (id: string, typed: string) =>
    id === another ? typed.trim() : (view.places.find((one) => one.id === id)?.name ?? '')

  const submit = async () => {
    const [start, end] = [name(from, newFrom), name(to, newTo)]
    if (start === '' || end === '') return setTrouble('Say where the walk starts and where it ends.')
    setTrouble(null)
    const { session } = writer
    const walk = session.newId('walk')
    const places: { id: string; name: string }[] = []
    const idOf = (chosen: string, typed: string) => {
      if (chosen !== another) return chosen
      const same = places.find((one) => one.name === typed.trim())
      if (same) return same.id
      const place = { id: session.newId('place'), name: typed.trim() }
      places.push(place)
      return place.id
    }
    const ends = { from: idOf(from, newFrom), to: idOf(to, newTo) }
    const make = (log: FactLog): FactDraft[] => [
      ...places.flatMap((place) => addPlace(log, { ...place, ...(floor ? { floor } : {}) })),
      ...addWalk(log, {
        id: walk,
        name: `${start} to ${end}`,
        ...ends,
        ...(ends.from === ends.to ? { loop: true } : {}),
        ...(startSign.trim() ? { startSign: startSign.trim() } : {}),
      }),
    ]
    if (await writer.write(make, `walk ${start} to ${end}`)) made(walk)
  }

  const choices = [
    ...view.places.map((place) => ({ value: place.id, label: place.name })),
    { value: another, label: 'Another place' },
  ]
  return (
    <form
      class="stack"
      noValidate
      onSubmit={(event) => {
        event.preventDefault()
        void submit()
      }}
    >
      <SelectField
        label="From"
        value={from}
        change={setFrom}
        choices={choices}
        open="Choose"
        trouble={trouble}
        needed
      />
      {from === another && <Field label="Name of the place it starts at" value={newFrom} change={setNewFrom} needed />}
      <SelectField label="To" value={to} change={setTo} choices={choices} open="Choose" needed />
      {to === another && <Field label="Name of the place it ends at" value={newTo} change={setNewTo} needed />}
      <Field
        label="What hand, foot or ear meets at the start"
        hint="For example: mat underfoot, desk edge at the left hand."
        value={startSign}
        change={setStartSign}
      />
      <SubmitKey wide>New walk</SubmitKey>
    </form>
  )
}
