import { useState } from 'preact/hooks'
import { SubmitKey } from '../../components/big-key.tsx'
import { Field } from '../../components/field.tsx'
import { codeInAddress, officeAddress } from '../../state/office-address.ts'
import type { OfficeWork } from '../../state/office-work.ts'
import { choices, choose } from '../../state/settings.ts'

/** Address, one-time code and a name for this phone. A code that came with the address is filled in and taken off it. */
export function EnrolForm({ work }: { work: OfficeWork }) {
  const { person } = choices.value
  const [address, setAddress] = useState(location.origin)
  const [code, setCode] = useState(takeCode)
  const [label, setLabel] = useState(person === '' ? 'Phone' : `${person}’s phone`)
  const [busy, setBusy] = useState(false)
  const [trouble, setTrouble] = useState<{ address?: string; code?: string; label?: string }>({})
  const [said, setSaid] = useState('')

  const submit = async () => {
    setSaid('')
    const read = officeAddress(address, location.origin)
    const wrong = {
      ...(read.ok ? {} : { address: `${read.what} ${read.whatToDo}` }),
      ...(code.trim() === '' ? { code: 'Type the code that the administrator gave you.' } : {}),
      ...(label.trim() === '' ? { label: 'Give this phone a name, for the office’s list of devices.' } : {}),
    }
    setTrouble(wrong)
    if (!read.ok || wrong.code || wrong.label) return
    setBusy(true)
    const enrolled = await work.enrol({ address: read.address, code, label })
    setBusy(false)
    if (!enrolled.ok) return setSaid(`${enrolled.what} ${enrolled.whatToDo}`)
    const name = work.enrolment.value?.person ?? ''
    if (person === '' && name !== '') await choose({ person: name })
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
      <p>
        An administrator of the office gives you a code. It works once, for ten minutes. Then surveys on this phone,
        with the names and clients’ measurements in them, go to the office by themselves whenever there is a network.
      </p>
      <Field label="Office address" value={address} change={setAddress} trouble={trouble.address ?? null} needed />
      <Field label="One-time code" value={code} change={setCode} trouble={trouble.code ?? null} maxLength={40} needed />
      <Field
        label="Name of this phone"
        hint="Stands in the office’s list of devices."
        value={label}
        change={setLabel}
        trouble={trouble.label ?? null}
        maxLength={100}
        needed
      />
      {said !== '' && (
        <p class="trouble" role="alert">
          {said}
        </p>
      )}
      <SubmitKey wide disabled={busy}>
        Enrol
      </SubmitKey>
    </form>
  )
}

function takeCode(): string {
  const code = codeInAddress(location.hash)
  if (code !== '') history.replaceState(history.state, '', location.pathname)
  return code
}
