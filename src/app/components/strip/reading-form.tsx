import { useEffect, useRef, useState } from 'preact/hooks'
import { type InstrumentId, instruments } from '../../../record/instruments.ts'
import { type Bound, type FieldQuantity, parseQuantity } from '../../../units/parse.ts'
import { Chips } from './chips.tsx'
import { Keypad } from './keypad.tsx'
import { remember, remembered } from './remembered.ts'
import { type Units, unitsOffered } from './units-offered.ts'

/** What the form hands over when it is understood. SI value; `raw` as typed, its unit with it. */
export interface TypedReading {
  raw: string
  value: number
  bound: Bound
  /** Null where no tool is asked for. */
  instrument: InstrumentId | null
  found?: 'empty' | 'in-use'
  place?: 'same' | 'another'
  at?: string
  note?: string
}

export interface ReadingFormProps {
  /** What is read, for the field's name. */
  title: string
  /** Under which the instrument and the unit are remembered: "width". */
  quantity: string
  field: { quantity: FieldQuantity; unit: string; signed?: boolean }
  units: Units
  /** In the order offered; empty: no tool is asked for. */
  instruments: readonly InstrumentId[]
  /** A reading stands already: is this one at the same place? Asked, never guessed. */
  asksPlace: boolean
  asksFound: boolean
  initial: { text: string; instrument: string } | null
  keep(text: string, instrument: string): void
  /** False: not saved; the form keeps everything typed. */
  save(reading: TypedReading): Promise<boolean>
}

type Trouble = { text: string; choices: readonly { label: string; text: string }[] }

/** The keypad sheet's inside: value, unit, tool, then Save. */
export function ReadingForm(props: ReadingFormProps) {
  const [text, setText] = useState(props.initial?.text ?? '')
  const [unit, setUnit] = useState(() =>
    firstKnown(unitsOffered(props.field, props.units), remembered(`unit ${props.quantity}`)),
  )
  const [instrument, setInstrument] = useState<InstrumentId | null>(() =>
    firstInstrument(props.instruments, props.initial?.instrument || remembered(`tool ${props.quantity}`)),
  )
  const [place, setPlace] = useState<string | null>(null)
  const [found, setFound] = useState<string | null>(null)
  const [at, setAt] = useState('')
  const [note, setNote] = useState('')
  const [trouble, setTrouble] = useState<Trouble | null>(null)
  const [saving, setSaving] = useState(false)
  const alert = useRef<HTMLDivElement>(null)
  useEffect(() => alert.current?.scrollIntoView({ block: 'nearest' }), [trouble])

  const { keep } = props
  useEffect(() => {
    if (text === '') return
    const later = setTimeout(() => keep(text, instrument ?? ''), 300)
    return () => clearTimeout(later)
  }, [text, instrument])

  const change = (next: string) => {
    setText(next)
    setTrouble(null)
  }
  const read = text.trim() === '' ? null : parseQuantity(text, { ...props.field, unit })

  const save = async (typed: string) => {
    const reading = parseQuantity(typed, { ...props.field, unit })
    if (!reading.ok)
      return setTrouble(
        reading.kind === 'ambiguous'
          ? { text: `It can be read in more than one way: ${reading.question}`, choices: reading.choices }
          : { text: `Not understood: ${reading.reason}.`, choices: [] },
      )
    if (!instrument && props.instruments.length > 0)
      return setTrouble({ text: 'Choose the tool it was read with.', choices: [] })
    if (instrument === 'stick' && reading.bound === 'exact')
      return setTrouble({
        text: 'A stick tells only whether it passed. Did it?',
        choices: [
          { label: 'It passed', text: `>${typed}` },
          { label: 'It did not pass', text: `<${typed}` },
        ],
      })
    if (props.asksPlace && !place)
      return setTrouble({
        text: 'Is this the same place as the reading before, or another place along the stretch?',
        choices: [],
      })
    remember(`unit ${props.quantity}`, unit)
    if (instrument) remember(`tool ${props.quantity}`, instrument)
    setSaving(true)
    await props.save({
      raw: withUnit(typed, unit),
      value: reading.value,
      bound: reading.bound,
      instrument,
      ...(found === 'empty' || found === 'in-use' ? { found } : {}),
      ...(place === 'same' || place === 'another' ? { place } : {}),
      ...(at.trim() ? { at: at.trim() } : {}),
      ...(note.trim() ? { note: note.trim() } : {}),
    })
    setSaving(false)
  }

  return (
    <form
      class="reading-form"
      onSubmit={(event) => {
        event.preventDefault()
        void save(text)
      }}
    >
      <div class="reading-scroll">
        <div class="reading-value">
          <label for="reading-value">
            <span class="hidden">{props.title}: </span>Value
          </label>
          <input
            id="reading-value"
            class="value"
            data-first
            inputMode="none"
            autocomplete="off"
            autocapitalize="off"
            spellcheck={false}
            value={text}
            aria-describedby="reading-read"
            aria-invalid={trouble !== null}
            onInput={(event) => change(event.currentTarget.value)}
          />
          <output class="reading-unit">{unit}</output>
        </div>
        <p id="reading-read" class="soft">
          {read?.ok
            ? `Reads as ${boundWords[read.bound]}${withUnit(text.replace(/^\s*[<>≤≥]\s*/, ''), unit)}`
            : 'For example 1.24, >2.1 or <20'}
        </p>
        {trouble && (
          <div role="alert" class="trouble" ref={alert}>
            <p>{trouble.text}</p>
            <div class="chips-row">
              {trouble.choices.map((choice) => (
                <button
                  key={choice.text}
                  type="button"
                  class="key"
                  onClick={() => {
                    change(choice.text)
                    void save(choice.text)
                  }}
                >
                  {choice.label}
                </button>
              ))}
            </div>
          </div>
        )}
        <Keypad type={(mark) => change(text + mark)} rubOut={() => change(text.slice(0, -1))} />
        {unitsOffered(props.field, props.units).length > 1 && (
          <Chips
            legend="Unit"
            choices={unitsOffered(props.field, props.units).map((one) => ({ value: one, label: one }))}
            chosen={unit}
            choose={setUnit}
          />
        )}
        {props.asksPlace && (
          <Chips
            legend="Where along the stretch"
            choices={[
              { value: 'same', label: 'Same place again' },
              { value: 'another', label: 'Another place' },
            ]}
            chosen={place}
            choose={setPlace}
          />
        )}
        {props.instruments.length > 0 && (
          <ToolChips offered={props.instruments} chosen={instrument} choose={setInstrument} />
        )}
        {props.instruments.length > 0 && (
          <details class="reading-more">
            <summary>Found, spot, note</summary>
            {props.asksFound && (
              <Chips
                legend="As found"
                choices={[
                  { value: 'empty', label: 'Empty' },
                  { value: 'in-use', label: 'In use' },
                ]}
                chosen={found}
                choose={setFound}
              />
            )}
            <label class="plain-field">
              At what, in a word or two
              <input value={at} maxLength={200} onInput={(event) => setAt(event.currentTarget.value)} />
            </label>
            <label class="plain-field">
              Note
              <input value={note} maxLength={2000} onInput={(event) => setNote(event.currentTarget.value)} />
            </label>
          </details>
        )}
      </div>
      <div class="save-row">
        <button type="submit" class="key primary" disabled={saving}>
          {saving ? 'Saving' : 'Save'}
        </button>
      </div>
    </form>
  )
}

const boundWords = { exact: '', above: 'more than ', below: 'less than ' } as const

/** The first few tools; the rest behind one key. */
function ToolChips(props: {
  offered: readonly InstrumentId[]
  chosen: InstrumentId | null
  choose(id: InstrumentId): void
}) {
  const [all, setAll] = useState(false)
  const first = props.offered.slice(0, 3)
  const shown = all
    ? props.offered
    : [...first, ...props.offered.filter((id) => id === props.chosen && !first.includes(id))]
  return (
    <div class="tools">
      <Chips
        legend="Tool"
        choices={shown.map((id) => ({ value: id, label: instruments[id].name }))}
        chosen={props.chosen}
        choose={(id) => props.choose(id as InstrumentId)}
      />
      {!all && props.offered.length > shown.length && (
        <button type="button" class="key" onClick={() => setAll(true)}>
          Other tool
        </button>
      )}
    </div>
  )
}

function firstKnown(offered: readonly string[], wanted: string | null): string {
  return wanted !== null && offered.includes(wanted) ? wanted : (offered[0] ?? '')
}

function firstInstrument(offered: readonly InstrumentId[], wanted: string | null): InstrumentId | null {
  return offered.find((id) => id === wanted) ?? (offered.length === 1 ? (offered[0] ?? null) : null)
}

/** The text with its unit, so that it is read the same way wherever the file goes. */
function withUnit(text: string, unit: string): string {
  const typed = text.trim()
  if (unit === '' || /[a-z'"°%:]/i.test(typed)) return typed
  if (unit === '1:n') return typed.replace(/^([<>≤≥]?\s*)/, '$11:')
  return `${typed} ${unit}`
}
