import { kind } from '../../../catalogue/kinds.ts'
import { type Item, items } from '../../../record/answers.ts'
import type { FactDraft } from '../../../record/facts.ts'
import type { FactLog } from '../../../record/log.ts'
import { clearWord } from '../../../record/operations/answer.ts'
import { setTurn } from '../../../record/operations/feature.ts'
import { remove } from '../../../record/operations/removal.ts'
import type { Segment } from '../../../record/survey.ts'
import type { StripPart } from '../../components/strip/layout-part.ts'
import { answerWords, featureWords, lengthOf, readingWords, turnWords } from '../../components/strip/strip-words.ts'
import type { Units } from '../../components/strip/units-offered.ts'
import { removeListed } from './listed.ts'
import type { Recorder } from './recorder.ts'
import { type SheetRoute, sheetOfAspect } from './sheet-route.ts'

interface Entry {
  key: string
  text: string
  /** Opens it; null: it cannot be changed, only removed and entered again. */
  route: SheetRoute | null
  /** What the key does: a reading is never overwritten, so another is added. */
  verb: 'Change' | 'Read again'
  remove(log: FactLog): FactDraft[]
}

/** The strip as an ordered list: every part, and of the part you stand at each entry with its keys. */
export function PartList(props: {
  recorder: Recorder
  parts: readonly StripPart[]
  /** What is said of a part in a few words. */
  words(part: Segment): string
  pick(index: number): void
  openNext(): void
  go(route: SheetRoute): void
}) {
  const { recorder } = props
  const last = recorder.walk.segments.at(-1)
  return (
    <section class="part-list" aria-labelledby="part-list-title">
      <h2 id="part-list-title">Parts of this walk</h2>
      <ol>
        {recorder.walk.segments.map((segment, index) => {
          const here = index === recorder.index
          return (
            <li key={segment.id} aria-current={here ? 'step' : undefined}>
              <button type="button" class="key wide part-key" onClick={() => props.pick(index)} aria-pressed={here}>
                <b>
                  Part {index + 1}
                  {segment.name ? `, ${segment.name}` : ''}
                  {here ? ' (you stand at its start)' : ''}
                </b>
                <span>{props.words(segment)}</span>
              </button>
              {here ? (
                <Entries recorder={recorder} entries={entriesOf(segment, recorder.units)} go={props.go} />
              ) : (
                <p class="soft">
                  {entriesOf(segment, recorder.units)
                    .map((one) => one.text)
                    .join('; ') || 'Nothing entered yet.'}
                </p>
              )}
            </li>
          )
        })}
      </ol>
      {last && lengthOf(last) !== null && (
        <button type="button" class="key wide" onClick={props.openNext}>
          Open part {recorder.walk.segments.length + 1}
        </button>
      )}
    </section>
  )
}

function Entries(props: { recorder: Recorder; entries: readonly Entry[]; go(route: SheetRoute): void }) {
  if (props.entries.length === 0) return <p class="soft">Nothing entered yet. Begin with Plain stretch or Width.</p>
  return (
    <ul class="entries">
      {props.entries.map(({ key, text, route, verb, remove: drafts }) => (
        <li key={key}>
          <span>{text}</span>
          {route && (
            <button type="button" class="key" onClick={() => props.go(route)}>
              {verb}
              <span class="hidden"> {text}</span>
            </button>
          )}
          <button type="button" class="key" onClick={() => void props.recorder.write(drafts, `removed ${text}`)}>
            Remove<span class="hidden"> {text}</span>
          </button>
        </li>
      ))}
    </ul>
  )
}

function entriesOf(segment: Segment, units: Units): Entry[] {
  const readings = Object.entries(segment.readings).flatMap(([quantity, list]) =>
    list.map(
      (one): Entry => ({
        key: one.id,
        text: readingWords(quantity, one),
        route: { at: 'reading', holder: segment.id, quantity },
        verb: 'Read again',
        remove: (log) => remove(log, one.id),
      }),
    ),
  )
  const words = Object.entries(segment.words)
    .filter(([, answer]) => answer.says !== 'listed')
    .map(
      ([item, answer]): Entry => ({
        key: item,
        text: answerWords(item, answer),
        route: item in items ? sheetOfAspect(items[item as Item].aspect, segment.id) : null,
        verb: 'Change',
        remove: (log) => clearWord(log, segment.id, item),
      }),
    )
  const features = segment.features.map(
    (one): Entry => ({
      key: one.id,
      text: [
        featureWords(one, units),
        ...Object.entries(one.readings).flatMap(([id, list]) =>
          list.map((reading) => readingWords(attributeName(one.kind, id), reading)),
        ),
        ...Object.entries(one.words).map(([id, answer]) => answerWords(attributeName(one.kind, id), answer)),
      ].join(', '),
      route: { at: 'feature', feature: one.id },
      verb: 'Change',
      remove: (log) => removeListed(log, segment, one),
    }),
  )
  const turn = segment.turn
    ? [
        {
          key: segment.turn.id,
          text: `at the end: ${turnWords(segment.turn)}`,
          route: { at: 'feature', feature: segment.turn.id },
          verb: 'Change',
          remove: (log) => setTurn(log, segment.id, null),
        } satisfies Entry,
      ]
    : []
  return [...readings, ...words, ...features, ...turn]
}

function attributeName(kindId: string, attribute: string): string {
  return kind(kindId)?.attributes.find((one) => one.id === attribute)?.name ?? attribute
}
