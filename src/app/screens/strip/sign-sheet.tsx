import { setWord } from '../../../record/operations/answer.ts'
import { Chips } from '../../components/strip/chips.tsx'
import { RecordedText } from './recorded-text.tsx'
import type { Recorder } from './recorder.ts'

/** Signs that a hand, foot, ear or nose finds again: one tap each. */
export const commonSigns = [
  'door frame under the hand',
  'wall ends',
  'corner of the wall',
  'mat underfoot',
  'carpet starts',
  'counter edge',
  'handrail starts',
  'ramp starts underfoot',
]

/** What ends the part, felt, heard or smelt, and the shoreline that leads there. */
export function SignSheet(props: { recorder: Recorder; done(): void }) {
  const { recorder } = props
  const { segment } = recorder
  const sign = segment.words['end-sign']?.says ?? ''
  const say = (item: 'end-sign' | 'shoreline', says: string) =>
    recorder.write(
      (log) => setWord(log, segment.id, item, recorder.answer(says, 'swept')),
      `${item.replace('-', ' ')}: ${says}`,
    )
  return (
    <div class="sheet-keys">
      <Chips
        legend="Shoreline"
        choices={[
          { value: 'left', label: 'Left' },
          { value: 'right', label: 'Right' },
          { value: 'none', label: 'None' },
        ]}
        chosen={segment.words.shoreline?.says ?? null}
        choose={(says) => void say('shoreline', says)}
      />
      <Chips
        legend="End sign: felt, heard or smelt"
        choices={commonSigns.map((one) => ({ value: one, label: one }))}
        chosen={sign}
        choose={(says) => void say('end-sign', says)}
      />
      <RecordedText
        recorder={recorder}
        holder={segment.id}
        what="end-sign"
        label="End sign in your words, and where to stand"
        value={sign}
        save={(text) => say('end-sign', text)}
      />
      <button type="button" class="key primary" onClick={props.done}>
        Done
      </button>
    </div>
  )
}
