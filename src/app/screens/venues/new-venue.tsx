import { useState } from 'preact/hooks'
import { SubmitKey } from '../../components/big-key.tsx'
import { Field } from '../../components/field.tsx'
import { choose } from '../../state/settings.ts'

/** Name of the venue, and of the person where this phone does not know it yet: every reading says who took it. */
export function NewVenue(props: { person: string; begin(name: string): Promise<void> }) {
  const [name, setName] = useState('')
  const [person, setPerson] = useState('')
  const [trouble, setTrouble] = useState<{ name?: string; person?: string }>({})
  const [asksPerson] = useState(props.person === '')
  const unknown = props.person === ''

  const submit = async () => {
    const wrong = {
      ...(name.trim() === '' ? { name: 'Give the venue a name.' } : {}),
      ...(unknown && person.trim() === '' ? { person: 'Give your name: it stands with every reading.' } : {}),
    }
    setTrouble(wrong)
    if (wrong.name || wrong.person) return
    if (unknown) await choose({ person: person.trim() })
    await props.begin(name.trim())
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
      <Field label="Name of the venue" value={name} change={setName} trouble={trouble.name ?? null} needed />
      {asksPerson && unknown && (
        <Field
          label="Your name"
          hint="Stands with every reading you take. Change it in Settings."
          value={person}
          change={setPerson}
          trouble={trouble.person ?? null}
          autocomplete="name"
          needed
        />
      )}
      <SubmitKey wide>New venue</SubmitKey>
    </form>
  )
}
