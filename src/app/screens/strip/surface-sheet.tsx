import { useState } from 'preact/hooks'
import { kinds } from '../../../catalogue/kinds.ts'
import { items } from '../../../record/answers.ts'
import { setWord } from '../../../record/operations/answer.ts'
import { Chips } from '../../components/strip/chips.tsx'
import { featureWords } from '../../components/strip/strip-words.ts'
import { AddKind } from './aspect-sheet.tsx'
import { type How, HowChips } from './how-chips.tsx'
import { featuresOf } from './listed.ts'
import type { Recorder } from './recorder.ts'
import type { SheetRoute } from './sheet-route.ts'

/** Finish, wetness and slots: three questions, each saved as it is answered. */
export function SurfaceSheet(props: { recorder: Recorder; go(route: SheetRoute): void; done(): void }) {
  const { recorder } = props
  const { segment } = recorder
  const [how, setHow] = useState<How>('swept')
  const there = featuresOf(segment, 'surface')
  const say = (item: 'finish' | 'wetness' | 'slots', says: string) =>
    recorder.write((log) => setWord(log, segment.id, item, recorder.answer(says, how)), `${item}: ${says}`)
  const words = (item: 'finish' | 'wetness') => items[item].says.map((one) => ({ value: one, label: one }))

  return (
    <div class="sheet-keys">
      <Chips
        legend="Finish"
        choices={words('finish')}
        chosen={segment.words.finish?.says ?? null}
        choose={(says) => void say('finish', says)}
      />
      <Chips
        legend="Dry or wet today"
        choices={words('wetness')}
        chosen={segment.words.wetness?.says ?? null}
        choose={(says) => void say('wetness', says)}
      />
      <button
        type="button"
        class="key wide"
        disabled={segment.words.slots?.says === 'listed'}
        aria-pressed={segment.words.slots?.says === 'none'}
        onClick={() => void say('slots', 'none')}
      >
        No slots over 13 mm
      </button>
      <button
        type="button"
        class="key wide"
        onClick={() => props.go({ at: 'reading', holder: segment.id, quantity: 'pendulum' })}
      >
        Pendulum value
      </button>
      <HowChips how={how} choose={setHow} />
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
      <h3>Add what is there</h3>
      <div class="kind-keys">
        {kinds
          .filter((one) => one.aspect === 'surface')
          .map((one) => (
            <AddKind key={one.id} recorder={recorder} kind={one} go={props.go} />
          ))}
      </div>
      <button type="button" class="key primary" onClick={props.done}>
        Done
      </button>
    </div>
  )
}
