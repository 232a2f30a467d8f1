import { setFeatureField } from '../../../record/operations/feature.ts'
import { addReading } from '../../../record/operations/reading.ts'
import { addSegment } from '../../../record/operations/segment.ts'
import type { Feature, Reading } from '../../../record/survey.ts'
import { ReadingForm, type TypedReading } from '../../components/strip/reading-form.tsx'
import { readingWords } from '../../components/strip/strip-words.ts'
import { draftOf, keepDraft } from './drafts.ts'
import { quantityEntry } from './quantity-entry.ts'
import { type Recorder, stamp } from './recorder.ts'

/**
 * The keypad sheet for one quantity. A length of the walk's last part closes it and opens the next in the same commit:
 * `opened` gets the new part's id.
 */
export function ReadingSheet(props: {
  recorder: Recorder
  holder: string
  quantity: string
  /** False on the plain stretch card: it goes on with the same part. */
  opensNext: boolean
  done(opened: string | null): void
}) {
  const { recorder, holder, quantity } = props
  const { session, walk } = recorder
  const entry = quantityEntry(walk, holder, quantity)
  if (!entry) return <p>This is no longer on the walk: somebody removed it. Close, and choose again.</p>
  const { segment, feature } = entry
  const isLast = walk.segments.at(-1)?.id === segment.id

  const save = async (typed: TypedReading) => {
    const { instrument, ...values } = typed
    if (!instrument) return false
    const reading: Reading = {
      id: session.newId('reading'),
      ...values,
      ...signed(feature, quantity, values),
      instrument,
      ...stamp(session),
    }
    const next =
      props.opensNext && quantity === 'length' && isLast && entry.readings.length === 0
        ? session.newId('segment')
        : null
    const long = !feature && quantity === 'length' && reading.value > longestPart
    const words = `${readingWords(entry.name, reading)}${long ? '. Over 25 m: end the part sooner, at a sign' : ''}`
    const saved = await recorder.write(
      (log) => [
        ...addReading(log, holder, quantity, reading),
        ...(next ? addSegment(log, walk.id, nextPart(next)) : []),
      ],
      next ? `${words}. Part ${walk.segments.length + 1} is open` : words,
    )
    if (saved) {
      await session.keepDraft(null)
      props.done(next)
    }
    return saved
  }

  return (
    <ReadingForm
      key={`${holder} ${quantity}`}
      title={`${entry.name} of part ${entry.index + 1}`}
      quantity={feature ? `${feature.kind} ${quantity}` : quantity}
      field={entry.field}
      units={recorder.units}
      instruments={entry.instruments}
      asksPlace={quantity === 'width' && !feature && entry.readings.length > 0}
      asksFound={entry.field.quantity === 'length' && quantity !== 'length'}
      initial={draftOf(recorder, holder, quantity)}
      keep={(text, instrument) => void keepDraft(recorder, holder, quantity, text, instrument)}
      save={save}
    />
  )
}

/** A part is a stretch between two decisions, 25 m at most. */
const longestPart = 25

/** Nothing is inherited: a new part asks what a robot-led one must answer until it is said that another leads. */
export function nextPart(id: string) {
  return { id, name: '', ledBy: 'robot' as const }
}

/** A right turn is typed without its sign: the side was chosen before. */
function signed(feature: Feature | null, quantity: string, typed: { value: number; raw: string }): Partial<Reading> {
  if (feature?.kind !== 'turn' || quantity !== 'angle' || feature.side !== 'right' || typed.value <= 0) return {}
  return { value: -typed.value, raw: `-${typed.raw}` }
}

/** A thing's distance along the part or from the walking line: a plain number, no tool asked. */
export function PlaceSheet(props: { recorder: Recorder; feature: Feature; field: 'along' | 'offset'; done(): void }) {
  const { recorder, feature, field } = props
  const name = placeNames[field]
  return (
    <ReadingForm
      key={`${feature.id} ${field}`}
      title={name}
      quantity={field}
      field={{ quantity: 'length', unit: 'm' }}
      units={recorder.units}
      instruments={[]}
      asksPlace={false}
      asksFound={false}
      initial={draftOf(recorder, feature.id, field)}
      keep={(text) => void keepDraft(recorder, feature.id, field, text, '')}
      save={async ({ value, raw }) => {
        const saved = await recorder.write((log) => setFeatureField(log, feature.id, field, value), `${name} ${raw}`)
        if (saved) {
          await recorder.session.keepDraft(null)
          props.done()
        }
        return saved
      }}
    />
  )
}

export const placeNames = { along: 'distance along', offset: 'distance from the walking line' } as const
