import { useState } from 'preact/hooks'
import { BigKey } from '../../components/big-key.tsx'
import { FileKey } from '../../components/file-key.tsx'
import { StatusLine } from '../../components/status-line.tsx'
import { textOf } from '../../state/file-choice.ts'
import { fileName, saveFile } from '../../state/hand-over.ts'
import { catchUpSessions } from '../../state/open-session.ts'
import { phoneStore } from '../../state/phone.ts'
import { today } from '../../state/today.ts'

/** Longest back-up read: photos make it large, bytes. */
const longest = 400_000_000

/** Everything on this phone as one file, and back again. */
export function BackUpPart() {
  const [said, setSaid] = useState<{ text: string; failed: boolean }>({ text: '', failed: false })

  const save = async () => {
    const text = await (await phoneStore()).backUp()
    const name = fileName('tautline back-up', 'json', today())
    saveFile({ name, type: 'application/json', text })
    setSaid({ text: `Given to the browser to save: ${name}, ${(text.length / 1e6).toFixed(1)} MB.`, failed: false })
  }
  const restore = async (file: File) => {
    const chosen = await textOf(file, longest)
    if (!chosen.ok) return setSaid({ text: chosen.what, failed: true })
    const restored = await (await phoneStore()).restore(chosen.text)
    if (restored.saved) await catchUpSessions()
    setSaid(
      restored.saved
        ? {
            text: `Brought back: ${restored.facts} entries of ${restored.surveys} venues that were not here.`,
            failed: false,
          }
        : { text: `${restored.what} ${restored.whatToDo}`, failed: true },
    )
  }
  return (
    <section class="stack" aria-labelledby="back-up">
      <h2 id="back-up">Back-up</h2>
      <p class="soft">
        Everything on this phone in one file: readings, names, clients’ measurements, photos. Keep it as you keep a
        client’s file. Bringing one back changes and deletes nothing that is here.
      </p>
      <div class="keys">
        <BigKey press={() => void save()}>Save a back-up</BigKey>
        <FileKey label="Bring one back" accept=".json,application/json" chosen={(file) => void restore(file)} />
      </div>
      <StatusLine text={said.text} failed={said.failed} />
    </section>
  )
}
