import { useEffect, useState } from 'preact/hooks'
import { PageHead } from '../../components/page-head.tsx'
import { SavedText } from '../../components/saved-text.tsx'
import { StatusLine } from '../../components/status-line.tsx'
import { Chips } from '../../components/strip/chips.tsx'
import { type Choices, choices, choose, readChoices } from '../../state/settings.ts'
import { BackUpPart } from './back-up-part.tsx'
import { StoragePart } from './storage-part.tsx'

/** What the person chooses on this phone, how it keeps what is on it, and back-up. */
export function SettingsScreen() {
  const [said, setSaid] = useState<{ text: string; failed: boolean }>({ text: '', failed: false })
  const { person, units, theme, hand } = choices.value
  useEffect(() => {
    readChoices().catch((error: unknown) => setSaid({ text: String(error), failed: true }))
  }, [])
  const set = async (change: Partial<Choices>) => {
    const kept = await choose(change)
    setSaid(kept.saved ? { text: 'Saved', failed: false } : { text: `${kept.what} ${kept.whatToDo}`, failed: true })
    return kept.saved
  }
  return (
    <main class="page">
      <PageHead title="Settings" back={{ href: '/', label: 'Venues' }} />
      <StatusLine text={said.text} failed={said.failed} />
      <div class="columns">
        <section class="stack" aria-labelledby="you">
          <h2 id="you">You</h2>
          <SavedText
            label="Your name"
            hint="Stands with every reading you take from now on."
            value={person}
            save={(name) => set({ person: name.trim() })}
            autocomplete="name"
          />
          <Chips
            legend="Units shown"
            choices={[
              { value: 'metric', label: 'Metres' },
              { value: 'imperial', label: 'Feet and inches' },
            ]}
            chosen={units}
            choose={(value) => void set({ units: value as Choices['units'] })}
          />
          <Chips
            legend="Colours"
            choices={[
              { value: 'system', label: 'As the phone' },
              { value: 'light', label: 'Light' },
              { value: 'dark', label: 'Dark' },
            ]}
            chosen={theme}
            choose={(value) => void set({ theme: value as Choices['theme'] })}
          />
          <Chips
            legend="Keys for the"
            choices={[
              { value: 'right', label: 'Right hand' },
              { value: 'left', label: 'Left hand' },
            ]}
            chosen={hand}
            choose={(value) => void set({ hand: value as Choices['hand'] })}
          />
          <p>
            <a class="row-link" href="/sync">
              Office: enrol this phone, send, sign out
            </a>
          </p>
          <p class="soft">Published limits are chosen for each venue, on its page.</p>
        </section>
        <div class="stack">
          <StoragePart />
          <BackUpPart />
        </div>
      </div>
    </main>
  )
}
