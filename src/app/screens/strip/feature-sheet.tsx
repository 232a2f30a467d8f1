import { useState } from 'preact/hooks'
import type { Attribute } from '../../../catalogue/kind.ts'
import { kind } from '../../../catalogue/kinds.ts'
import { setWord } from '../../../record/operations/answer.ts'
import { setFeatureField } from '../../../record/operations/feature.ts'
import type { Feature } from '../../../record/survey.ts'
import { Chips } from '../../components/strip/chips.tsx'
import { sentence } from '../../components/strip/sentence.ts'
import { featureName, readingWords, shown } from '../../components/strip/strip-words.ts'
import { type How, HowChips } from './how-chips.tsx'
import { LedByFields } from './led-by-fields.tsx'
import { removeListed } from './listed.ts'
import { placeNames } from './reading-sheet.tsx'
import { RecordedText } from './recorded-text.tsx'
import type { Recorder } from './recorder.ts'
import type { SheetRoute } from './sheet-route.ts'

/** The entry form of one thing, made from its catalogue row. Every answer is saved as it is given. */
export function FeatureSheet(props: {
  recorder: Recorder
  feature: Feature
  go(route: SheetRoute): void
  done(): void
}) {
  const { recorder, feature } = props
  const [how, setHow] = useState<How>('swept')
  const name = featureName(feature)
  const asked = (kind(feature.kind)?.attributes ?? []).filter((one) => isAsked(one, feature))
  const needed = asked.filter((one) => one.required !== 'optional')
  const further = asked.filter((one) => one.required === 'optional')
  const isTurn = recorder.walk.segments.some((one) => one.turn?.id === feature.id)
  const set = (field: 'side' | 'note' | 'name' | 'ledBy', value: string | undefined, label: string) =>
    recorder.write((log) => setFeatureField(log, feature.id, field, value), `${name}, ${label}`)

  const field = (attribute: Attribute) => (
    <AttributeField
      key={attribute.id}
      recorder={recorder}
      feature={feature}
      attribute={attribute}
      how={how}
      go={props.go}
    />
  )

  return (
    <div class="sheet-keys">
      {needed.map(field)}
      {!isTurn && (
        <>
          <Chips
            legend="Side"
            choices={[
              { value: 'left', label: 'Left' },
              { value: 'right', label: 'Right' },
              { value: 'centre', label: 'In the middle' },
              { value: 'across', label: 'Right across' },
            ]}
            chosen={feature.side ?? null}
            choose={(side) => void set('side', side, sideWords[side] ?? side)}
          />
          {(['along', 'offset'] as const).map((one) => (
            <button
              key={one}
              type="button"
              class="key wide"
              onClick={() => props.go({ at: 'place', feature: feature.id, field: one })}
            >
              {sentence(placeNames[one])}:{' '}
              {feature[one] === undefined ? 'not said' : shown(feature[one], recorder.units)}
            </button>
          ))}
        </>
      )}
      <LedByFields
        recorder={recorder}
        holder={feature.id}
        name={name}
        ledBy={feature.ledBy ?? null}
        help={feature.help}
        choose={(ledBy) => set('ledBy', ledBy, `led by ${ledBy.replace('-', ' ')}`)}
      />
      <HowChips how={how} choose={setHow} />
      <details>
        <summary>More about it ({further.length + 2})</summary>
        {further.map(field)}
        {(['name', 'note'] as const).map((one) => (
          <RecordedText
            key={one}
            recorder={recorder}
            holder={feature.id}
            what={one}
            label={one === 'name' ? 'Own name' : 'Note'}
            value={feature[one] ?? ''}
            save={(text) => set(one, text, `${one}: ${text}`)}
          />
        ))}
      </details>
      <button
        type="button"
        class="key wide"
        onClick={async () => {
          const holder = recorder.walk.segments.find((one) => one.features.includes(feature)) ?? recorder.segment
          if (await recorder.write((log) => removeListed(log, holder, feature), `${name} removed`)) props.done()
        }}
      >
        Remove {name}
      </button>
      <button type="button" class="key primary" onClick={props.done}>
        Done
      </button>
    </div>
  )
}

const sideWords: Record<string, string> = {
  left: 'on the left',
  right: 'on the right',
  centre: 'in the middle',
  across: 'right across',
}

/** An attribute on a condition is asked only where its item says one of the words. */
function isAsked(attribute: Attribute, feature: Feature): boolean {
  if (typeof attribute.required === 'string') return true
  const says = feature.words[attribute.required.item]?.says
  return says !== undefined && attribute.required.says.includes(says)
}

function AttributeField(props: {
  recorder: Recorder
  feature: Feature
  attribute: Attribute
  how: How
  go(route: SheetRoute): void
}) {
  const { recorder, feature, attribute } = props
  if (attribute.type === 'quantity') {
    const readings = feature.readings[attribute.id] ?? []
    const needed = attribute.required === 'optional' ? 'not measured' : 'not measured yet, needed'
    return (
      <button
        type="button"
        class="key wide"
        onClick={() => props.go({ at: 'reading', holder: feature.id, quantity: attribute.id })}
      >
        {readings.length === 0
          ? sentence(`${attribute.name}: ${needed}`)
          : sentence(readings.map((one) => readingWords(attribute.name, one)).join('; '))}
      </button>
    )
  }
  const says = feature.words[attribute.id]?.says ?? null
  const save = (text: string) =>
    recorder.write(
      (log) => setWord(log, feature.id, attribute.id, recorder.answer(text, props.how)),
      `${featureName(feature)}, ${attribute.name}: ${text}`,
    )
  if (attribute.says)
    return (
      <Chips
        legend={attribute.name}
        choices={attribute.says.map((one) => ({ value: one, label: one.replaceAll('-', ' ') }))}
        chosen={says}
        choose={(one) => void save(one)}
      />
    )
  return (
    <RecordedText
      recorder={recorder}
      holder={feature.id}
      what={attribute.id}
      label={attribute.name}
      value={says ?? ''}
      save={save}
    />
  )
}
