import { useId } from 'preact/hooks'
import { sentence } from './sentence.ts'

export interface Choice {
  value: string
  label: string
}

/** One of a few, as large radio buttons. `chosen` null: nothing chosen yet. */
export function Chips(props: {
  legend: string
  choices: readonly Choice[]
  chosen: string | null
  choose(value: string): void
}) {
  const name = useId()
  return (
    <fieldset class="chips">
      <legend>{sentence(props.legend)}</legend>
      <div class="chips-row">
        {props.choices.map((choice) => (
          <label key={choice.value} class="chip">
            <input
              type="radio"
              name={name}
              value={choice.value}
              checked={props.chosen === choice.value}
              onChange={() => props.choose(choice.value)}
            />
            <span>{choice.label}</span>
          </label>
        ))}
      </div>
    </fieldset>
  )
}
