import type { ComponentChildren } from 'preact'
import { useId } from 'preact/hooks'

interface Common {
  label: string
  hint?: string
  /** What is wrong with what stands in the field, and what to do; null: nothing. */
  trouble?: string | null
  unit?: string
  /** Says that an answer is wanted and none stands. */
  needed?: boolean
}

/** A labelled line of text or figures. */
export function Field(
  props: Common & {
    value: string
    change(value: string): void
    /** Called when the field is left: the moment to save. */
    leave?: () => unknown
    type?: 'text' | 'date' | 'time'
    inputMode?: 'text' | 'decimal'
    autocomplete?: string
    maxLength?: number
  },
) {
  return (
    <Labelled {...props}>
      {(described) => {
        const shared = {
          ...described,
          autocomplete: props.autocomplete ?? 'off',
          maxLength: props.maxLength ?? 400,
          value: props.value,
          onInput: (event: { currentTarget: HTMLInputElement }) => props.change(event.currentTarget.value),
          onBlur: () => void props.leave?.(),
        }
        return props.type === 'date' || props.type === 'time' ? (
          <input type={props.type} {...shared} />
        ) : (
          <input type="text" inputMode={props.inputMode ?? 'text'} {...shared} />
        )
      }}
    </Labelled>
  )
}

/** A labelled choice of one. `value` '' is "not answered" where `open` names it. */
export function SelectField(
  props: Common & {
    value: string
    change(value: string): void
    choices: readonly { value: string; label: string }[]
    /** Words for no answer yet. */
    open?: string
  },
) {
  return (
    <Labelled {...props}>
      {(described) => (
        <select
          {...described}
          value={props.value}
          onChange={(event) => {
            const chosen = event.currentTarget.value
            // It shows the choice once it is kept, not before: what was refused must not look answered.
            event.currentTarget.value = props.value
            props.change(chosen)
          }}
        >
          {props.open !== undefined && <option value="">{props.open}</option>}
          {props.choices.map((choice) => (
            <option key={choice.value} value={choice.value}>
              {choice.label}
            </option>
          ))}
        </select>
      )}
    </Labelled>
  )
}

interface Described {
  id: string
  'aria-describedby'?: string
  'aria-invalid': boolean
  'aria-required': boolean
}

function Labelled(props: Common & { children: (described: Described) => ComponentChildren }) {
  const id = useId()
  const said = [props.hint ? `${id}-hint` : '', props.trouble ? `${id}-trouble` : ''].filter((one) => one !== '')
  return (
    <div class="field">
      <label for={id}>
        {props.label}
        {props.unit ? ` (${props.unit})` : ''}
      </label>
      {props.hint && (
        <p id={`${id}-hint`} class="soft">
          {props.hint}
        </p>
      )}
      {props.children({
        id,
        ...(said.length > 0 ? { 'aria-describedby': said.join(' ') } : {}),
        'aria-invalid': Boolean(props.trouble),
        'aria-required': props.needed ?? false,
      })}
      {props.trouble && (
        <p id={`${id}-trouble`} class="trouble">
          {props.trouble}
        </p>
      )}
    </div>
  )
}
