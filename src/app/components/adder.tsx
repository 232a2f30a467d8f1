import { useState } from 'preact/hooks'
import { SubmitKey } from './big-key.tsx'
import { Field } from './field.tsx'

/** One line and a key that adds it. */
export function Adder(props: { label: string; keyWord: string; add(name: string): Promise<boolean> }) {
  const [name, setName] = useState('')
  const [trouble, setTrouble] = useState<string | null>(null)
  const submit = async () => {
    if (name.trim() === '') return setTrouble('Give it a name.')
    setTrouble(null)
    if (await props.add(name.trim())) setName('')
  }
  return (
    <form
      class="adder"
      noValidate
      onSubmit={(event) => {
        event.preventDefault()
        void submit()
      }}
    >
      <Field label={props.label} value={name} change={setName} trouble={trouble} />
      <SubmitKey>{props.keyWord}</SubmitKey>
    </form>
  )
}
