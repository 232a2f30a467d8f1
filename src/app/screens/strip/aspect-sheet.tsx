import { useState } from 'preact/hooks'
import { kinds } from '../../../catalogue/kinds.ts'
import { setWord } from '../../../record/operations/answer.ts'
import { addReading } from '../../../record/operations/reading.ts'
import { sentence } from '../../components/strip/sentence.ts'
import { featureWords, rodHeight } from '../../components/strip/strip-words.ts'
import { type How, HowChips } from './how-chips.tsx'
import { addListed, featuresOf, listedItem } from './listed.ts'
import { type Recorder, stamp } from './recorder.ts'
import { type AspectWithKinds, aspectTitles, type SheetRoute } from './sheet-route.ts'
import { sweptHeight } from './swept-height.ts'

/** Nothing here, or what there is: one key for each kind of the catalogue that answers this aspect. */
export function AspectSheet(props: {
  recorder: Recorder
  aspect: AspectWithKinds
  go(route: SheetRoute): void
  done(): void
}) {
  const { recorder, aspect } = props
  const { segment, session } = recorder
  const [how, setHow] = useState<How>('swept')
  const there = featuresOf(segment, aspect)
  const item = listedItem(aspect)
  const height = sweptHeight(session.survey.value.view)
  const title = aspectTitles[aspect].title.toLowerCase()

  const none = async () => {
    if (!item) return
    const sweptOverhead = aspect === 'overhead' && how === 'swept'
    const saved = await recorder.write(
      (log) => [
        ...setWord(log, segment.id, item, recorder.answer('none', how)),
        ...(sweptOverhead ? addReading(log, segment.id, 'overhead', sweptReading(recorder, height)) : []),
      ],
      sweptOverhead ? `overhead swept to ${rodHeight(height, recorder.units)}, nothing` : `${title}: none`,
    )
    if (saved) props.done()
  }

  return (
    <div class="sheet-keys">
      <button type="button" class="key primary" disabled={there.length > 0} onClick={() => void none()}>
        {aspectTitles[aspect].none}
        {aspect === 'overhead' && <small>rod at {rodHeight(height, recorder.units)}, both shoulders</small>}
      </button>
      <HowChips how={how} choose={setHow} />
      {there.length > 0 && <p class="soft">Off: a thing of this kind is listed on this part.</p>}
      {there.map((feature) => (
        <button
          key={feature.id}
          type="button"
          class="key wide"
          onClick={() => props.go({ at: 'feature', feature: feature.id })}
        >
          Change {featureWords(feature, recorder.units)}
        </button>
      ))}
      {aspect === 'overhead' && (
        <button
          type="button"
          class="key wide"
          onClick={() => props.go({ at: 'reading', holder: segment.id, quantity: 'overhead' })}
        >
          Swept to another height
        </button>
      )}
      <h3>Add what is there</h3>
      <div class="kind-keys">
        {kinds
          .filter((one) => one.aspect === aspect)
          .map((one) => (
            <AddKind key={one.id} recorder={recorder} kind={one} go={props.go} />
          ))}
      </div>
    </div>
  )
}

/** Adds a thing of one kind at once, then asks for what belongs to it. */
export function AddKind(props: {
  recorder: Recorder
  kind: { id: string; name: string }
  go(route: SheetRoute): void
}) {
  const { recorder, kind } = props
  return (
    <button
      type="button"
      class="key"
      onClick={async () => {
        const id = recorder.session.newId('feature')
        const label = `${kind.name} on part ${recorder.index + 1}`
        if (await recorder.write((log) => addListed(recorder, log, id, kind.id), label))
          props.go({ at: 'feature', feature: id })
      }}
    >
      {sentence(kind.name)}
    </button>
  )
}

/** "Swept" is a bound: the rod at this height met nothing. */
export function sweptReading(recorder: Recorder, height: number) {
  return {
    id: recorder.session.newId('reading'),
    raw: `>${height.toFixed(3)} m`,
    value: height,
    bound: 'above' as const,
    instrument: 'rod' as const,
    ...stamp(recorder.session),
  }
}
