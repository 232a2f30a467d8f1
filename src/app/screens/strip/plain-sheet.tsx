import { useEffect, useState } from 'preact/hooks'
import { kind } from '../../../catalogue/kinds.ts'
import { items } from '../../../record/answers.ts'
import type { FactLog } from '../../../record/log.ts'
import { setWord } from '../../../record/operations/answer.ts'
import { addReading } from '../../../record/operations/reading.ts'
import { remove } from '../../../record/operations/removal.ts'
import { addSegment, setSegmentField } from '../../../record/operations/segment.ts'
import type { Answer, Reading } from '../../../record/survey.ts'
import { openedAt } from '../../components/strip/card-clock.ts'
import { Chips } from '../../components/strip/chips.tsx'
import { PlainKey } from '../../components/strip/plain-key.tsx'
import {
  asksSingly,
  finishAsBefore,
  isTooQuick,
  type PlainButton,
  plainButtons,
  shorelineAsBefore,
  zoneAsBefore,
} from '../../components/strip/plain-rules.ts'
import { remembered } from '../../components/strip/remembered.ts'
import { StickLength } from '../../components/strip/stick-length.tsx'
import { lengthOf, rodHeight, shown, widthOf } from '../../components/strip/strip-words.ts'
import { sweptReading } from './aspect-sheet.tsx'
import { featuresOf } from './listed.ts'
import { nextPart } from './reading-sheet.tsx'
import { type Recorder, stamp } from './recorder.ts'
import type { SheetRoute } from './sheet-route.ts'
import { commonSigns } from './sign-sheet.tsx'
import { sweptHeight } from './swept-height.ts'

/** The least that is still safe for a stretch with nothing on it: each key writes one answer for each aspect it names. */
export function PlainSheet(props: {
  recorder: Recorder
  go(route: SheetRoute): void
  done(opened: string | null): void
  /** The next part is open: its card follows. */
  next(opened: string): void
}) {
  const { recorder } = props
  const { segment, before, index, walk, session } = recorder
  const [opened] = useState(() => openedAt(segment.id, Date.now()))
  const refused = refusesCard(recorder)
  const length = lengthOf(segment)
  const now = Date.now()
  const finish = finishAsBefore(segment, before, now)
  const zone = zoneAsBefore(segment, before, now)
  const [single, setSingle] = useState(0)
  const [stick, setStick] = useState(() => remembered('stick') ?? '1.05')

  // The length is the card's first question: straight to its keypad.
  const { go } = props
  useEffect(() => {
    if (!refused && length === null) go({ at: 'reading', holder: segment.id, quantity: 'length' })
  }, [])

  if (refused) return <p>{refused}</p>
  const quick = () => length !== null && isTooQuick(length, opened, Date.now())
  const mark = (): Partial<Answer> => (quick() ? { tooQuick: true } : {})

  const press = (button: PlainButton) => {
    const answers = button.writes.map((one) => ({
      ...one,
      says: one.says ?? ('says' in finish ? finish.says : 'unknown'),
    }))
    return recorder.write(
      (log) => answers.flatMap((one) => setWord(log, segment.id, one.item, recorder.answer(one.says, one.how, mark()))),
      `${button.label.toLowerCase()}${quick() ? ', too quick: look again' : ''}`,
    )
  }
  const key = (button: PlainButton) => {
    const aspect = items[button.writes[0]?.item ?? 'step'].aspect
    const stands = featuresOf(segment, aspect)[0]
    const why = stands
      ? `Off: ${kind(stands.kind)?.name ?? stands.kind} is listed.`
      : button.id === 'surface' && 'refused' in finish
        ? finish.refused
        : null
    const given = button.writes.every((one) => segment.words[one.item] && !segment.words[one.item]?.tooQuick)
    const hasty = button.writes.some((one) => segment.words[one.item]?.tooQuick)
    return (
      <PlainKey
        key={button.id}
        label={button.label}
        given={given}
        why={why}
        hasty={hasty}
        press={() => void press(button)}
        instead={button.id === 'surface' ? { label: 'Say the surface', press: () => go({ at: 'surface' }) } : undefined}
      />
    )
  }
  const floor = plainButtons.filter((one) => one.group === 'floor')
  const asked = asksSingly(index) ? floor[single] : undefined
  const height = sweptHeight(session.survey.value.view)

  const swept = () =>
    recorder.write(
      (log) => [
        // A sweep that was too quick was none: the new one stands alone.
        ...(segment.readings.overhead ?? []).filter((one) => one.tooQuick).flatMap((one) => remove(log, one.id)),
        ...addReading(log, segment.id, 'overhead', {
          ...sweptReading(recorder, height),
          ...(quick() ? { tooQuick: true } : {}),
        }),
        ...setWord(log, segment.id, 'overhead', recorder.answer('none', 'swept', mark())),
      ],
      `overhead swept to ${rodHeight(height, recorder.units)}, nothing${quick() ? ', too quick: look again' : ''}`,
    )
  const passedStick = () => {
    const reading: Reading = {
      id: session.newId('reading'),
      raw: `>${stick} m`,
      value: Number(stick),
      bound: 'above',
      instrument: 'stick',
      ...stamp(session),
      ...((segment.readings.width ?? []).length > 0 ? { place: 'another' as const } : {}),
    }
    return recorder.write((log) => addReading(log, segment.id, 'width', reading), `width over ${stick} m, stick`)
  }
  const isLast = walk.segments.at(-1)?.id === segment.id
  const shoreline = shorelineAsBefore(before, now)
  // What the last key answers as before, in words and in facts; only what has no answer yet.
  const carried = [
    ...('says' in zone && segment.zone === undefined
      ? [
          {
            words: 'surroundings',
            draft: (log: FactLog) => [setSegmentField(log, segment.id, 'zone', zone.says)].flat(),
          },
        ]
      : []),
    ...('says' in shoreline && !segment.words.shoreline
      ? [
          {
            words: `shoreline ${shoreline.says}`,
            draft: (log: FactLog) =>
              setWord(log, segment.id, 'shoreline', recorder.answer(shoreline.says, 'inherited')),
          },
        ]
      : []),
  ]
  const asBefore = carried.length > 0 ? `As before: ${carried.map((one) => one.words).join(', ')}. ` : ''
  const next = async () => {
    const id = session.newId('segment')
    const saved = await recorder.write(
      (log) => [...carried.flatMap((one) => one.draft(log)), ...addSegment(log, walk.id, nextPart(id))],
      `${asBefore.toLowerCase()}part ${index + 1} closed, part ${walk.segments.length + 1} is open`,
    )
    if (saved) props.next(id)
  }

  return (
    <div class="sheet-keys plain-card">
      <h3>1 Length</h3>
      <button
        type="button"
        class="key wide"
        onClick={() => go({ at: 'reading', holder: segment.id, quantity: 'length' })}
      >
        {length === null ? 'Length' : `Length ${shown(length, recorder.units)}: measure again`}
      </button>
      <h3>2 Least clear width</h3>
      <div class="turn-keys">
        <PlainKey
          label={`Passed the ${stick} m stick`}
          given={(segment.readings.width ?? []).some((one) => one.instrument === 'stick')}
          why={null}
          press={() => void passedStick()}
        />
        <button type="button" class="key" onClick={() => go({ at: 'reading', holder: segment.id, quantity: 'width' })}>
          {widthOf(segment) === null
            ? 'A value'
            : `Least ${shown(widthOf(segment) ?? 0, recorder.units)}: another value`}
        </button>
      </div>
      <StickLength stick={stick} choose={setStick} />
      <h3>3 Swept</h3>
      <PlainKey
        label={`Rod at ${rodHeight(height, recorder.units)}, both shoulders, nothing`}
        given={segment.words.overhead?.says === 'none' && !segment.words.overhead.tooQuick}
        why={
          featuresOf(segment, 'overhead')[0]
            ? 'Off: an overhead thing is listed.'
            : length === null
              ? 'The length first.'
              : null
        }
        hasty={segment.words.overhead?.tooQuick}
        press={() => void swept()}
      />
      <h3>4 Floor</h3>
      {asked ? (
        <>
          <p class="soft">
            One by one this time: look again for each. {single + 1} of {floor.length}
          </p>
          {key(asked)}
          <button type="button" class="key wide" onClick={() => setSingle(single + 1)}>
            {segment.words[asked.writes[0]?.item ?? 'step']
              ? 'Next question'
              : 'There is one, or not sure: leave it open'}
          </button>
        </>
      ) : (
        floor.map(key)
      )}
      <h3>5 Robot</h3>
      {plainButtons.filter((one) => one.group === 'robot').map(key)}
      <h3>6 End of the part</h3>
      <Chips
        legend="End sign: felt, heard or smelt"
        choices={commonSigns.map((one) => ({ value: one, label: one }))}
        chosen={segment.words['end-sign']?.says ?? null}
        choose={(says) =>
          void recorder.write(
            (log) => setWord(log, segment.id, 'end-sign', recorder.answer(says, 'swept')),
            `end sign: ${says}`,
          )
        }
      />
      <button type="button" class="key wide" onClick={() => go({ at: 'sign' })}>
        Another end sign
      </button>
      <Chips
        legend="Shoreline"
        choices={[
          { value: 'left', label: 'Left' },
          { value: 'right', label: 'Right' },
          { value: 'none', label: 'None' },
        ]}
        chosen={segment.words.shoreline?.says ?? null}
        choose={(says) =>
          void recorder.write(
            (log) => setWord(log, segment.id, 'shoreline', recorder.answer(says, 'swept')),
            `shoreline: ${says}`,
          )
        }
      />
      <h3>Surroundings</h3>
      <PlainKey
        label="Surroundings as before"
        given={segment.zone !== undefined}
        why={'refused' in zone ? zone.refused : null}
        instead={{ label: 'Choose the zone', press: () => go({ at: 'part' }) }}
        press={() =>
          'says' in zone &&
          void recorder.write((log) => setSegmentField(log, segment.id, 'zone', zone.says), 'surroundings as before')
        }
      />
      <button type="button" class="key primary" onClick={() => (isLast ? void next() : props.done(null))}>
        {isLast ? `${asBefore}Next plain stretch` : 'Done'}
      </button>
    </div>
  )
}

/** Roads, stairs and lifts have no card; neither has a part that another than the robot leads. */
function refusesCard(recorder: Recorder): string | null {
  const { segment } = recorder
  if (segment.ledBy !== 'robot')
    return 'This part is not led by the robot: it has no plain stretch card. Answer overhead, edge and step with their own keys.'
  const bars = segment.features.find((one) => kind(one.kind)?.stopItem || /lift|stair|road|crossing/.test(one.kind))
  if (bars) return `With ${kind(bars.kind)?.name ?? bars.kind} on it this is no plain stretch: answer with the keys.`
  return null
}
