import { useState } from 'preact/hooks'
import { kinds } from '../../../catalogue/kinds.ts'
import { AddKind } from './aspect-sheet.tsx'
import type { Recorder } from './recorder.ts'
import { aspectTitles, type SheetRoute } from './sheet-route.ts'

/** These have their own key: Turn. */
const atPartEnd = ['turn', 'u-turn']

/** Every kind of the catalogue, found by a word; and what belongs to the part as a whole. */
export function MoreSheet(props: { recorder: Recorder; go(route: SheetRoute): void }) {
  const [sought, setSought] = useState('')
  const words = sought
    .toLowerCase()
    .split(/\s+/)
    .filter((one) => one !== '')
  const found = kinds.filter((one) => {
    const text =
      `${one.name} ${one.id} ${one.aspect ?? ''} ${one.attributes.map((a) => a.name).join(' ')}`.toLowerCase()
    return !atPartEnd.includes(one.id) && words.every((word) => text.includes(word))
  })
  return (
    <div class="sheet-keys">
      <button type="button" class="key wide" onClick={() => props.go({ at: 'part' })}>
        This part: name, who leads, zone, note
      </button>
      <button type="button" class="key wide" onClick={() => props.go({ at: 'aspect', aspect: 'sensing' })}>
        {aspectTitles.sensing.title}
      </button>
      <label class="plain-field">
        Find a thing
        <input
          type="search"
          value={sought}
          placeholder="lift, mat, bollard"
          onInput={(event) => setSought(event.currentTarget.value)}
        />
      </label>
      <p role="status" class="soft">
        {found.length === 0
          ? 'Nothing by that word: try another.'
          : found.length === 1
            ? '1 kind'
            : `${found.length} kinds`}
      </p>
      <div class="kind-keys">
        {found.map((one) => (
          <AddKind key={one.id} recorder={props.recorder} kind={one} go={props.go} />
        ))}
      </div>
    </div>
  )
}
