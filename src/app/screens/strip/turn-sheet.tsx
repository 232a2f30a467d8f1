import { useState } from 'preact/hooks'
import { setTurn } from '../../../record/operations/feature.ts'
import { addReading } from '../../../record/operations/reading.ts'
import type { Segment } from '../../../record/survey.ts'
import { Chips } from '../../components/strip/chips.tsx'
import { lengthOf, turnWords } from '../../components/strip/strip-words.ts'
import { type Recorder, stamp } from './recorder.ts'
import type { SheetRoute } from './sheet-route.ts'

/** The change of direction at a part's end. With nothing recorded on the open part, it is the turn where you stand. */
export function TurnSheet(props: { recorder: Recorder; go(route: SheetRoute): void; done(): void }) {
  const { recorder } = props
  const { segment, before, index, session } = recorder
  const [at, setAt] = useState(before && isUntouched(segment) ? 'here' : 'end')
  const target = at === 'here' && before ? before : segment
  const number = target === segment ? index + 1 : index

  const turn = async (side: 'left' | 'right', square: boolean) => {
    const id = session.newId('turn')
    const sign = side === 'left' ? 1 : -1
    const reading = {
      id: session.newId('reading'),
      raw: `${sign * 90} deg`,
      value: (sign * Math.PI) / 2,
      bound: 'exact' as const,
      instrument: 'square' as const,
      ...stamp(session),
    }
    const saved = await recorder.write(
      (log) => [
        ...setTurn(log, target.id, { id, kind: 'turn', side }),
        ...(square ? addReading(log, id, 'angle', reading) : []),
      ],
      `turn ${side}${square ? ', square' : ''} at the end of part ${number}`,
    )
    if (saved) props.go(square ? { at: 'feature', feature: id } : { at: 'reading', holder: id, quantity: 'angle' })
  }
  const other = async (kind: 'u-turn' | null) => {
    const id = session.newId('turn')
    const saved = await recorder.write(
      (log) => setTurn(log, target.id, kind ? { id, kind } : null),
      `${kind ? 'turn round' : 'straight on'} at the end of part ${number}`,
    )
    if (!saved) return
    if (kind) props.go({ at: 'feature', feature: id })
    else props.done()
  }

  return (
    <div class="sheet-keys">
      {before && (
        <Chips
          legend="Which turn"
          choices={[
            { value: 'here', label: `Where part ${index + 1} starts` },
            { value: 'end', label: `Where part ${index + 1} ends` },
          ]}
          chosen={at}
          choose={setAt}
        />
      )}
      <p class="soft">Now: {turnWords(target.turn) ?? 'straight on, or not said'}</p>
      <div class="turn-keys">
        <button type="button" class="key" onClick={() => void turn('left', true)}>
          Left, square <small>90° by 3-4-5 or plan</small>
        </button>
        <button type="button" class="key" onClick={() => void turn('right', true)}>
          Right, square <small>90° by 3-4-5 or plan</small>
        </button>
        <button type="button" class="key" onClick={() => void turn('left', false)}>
          Left, another angle
        </button>
        <button type="button" class="key" onClick={() => void turn('right', false)}>
          Right, another angle
        </button>
        <button type="button" class="key" onClick={() => void other(null)}>
          Straight on
        </button>
        <button type="button" class="key" onClick={() => void other('u-turn')}>
          Turn round
        </button>
      </div>
      {target.turn && (
        <button
          type="button"
          class="key wide"
          onClick={() => target.turn && props.go({ at: 'feature', feature: target.turn.id })}
        >
          Change {turnWords(target.turn)}
        </button>
      )}
    </div>
  )
}

function isUntouched(segment: Segment): boolean {
  return (
    lengthOf(segment) === null &&
    Object.keys(segment.words).length === 0 &&
    Object.keys(segment.readings).length === 0 &&
    segment.features.length === 0
  )
}
