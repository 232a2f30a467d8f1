import { useState } from 'preact/hooks'
import { remember } from './remembered.ts'

/** The surveyor's own go/no-go stick, remembered on this phone. */
export function StickLength(props: { stick: string; choose(stick: string): void }) {
  const [text, setText] = useState(props.stick)
  const value = Number(text.replace(',', '.'))
  const fits = Number.isFinite(value) && value >= 0.5 && value <= 3
  return (
    <details>
      <summary>Another stick</summary>
      <label class="plain-field">
        Length of your stick, m
        <input
          inputMode="decimal"
          value={text}
          aria-invalid={!fits}
          onInput={(event) => {
            setText(event.currentTarget.value)
            const typed = Number(event.currentTarget.value.replace(',', '.'))
            if (!(typed >= 0.5 && typed <= 3)) return
            remember('stick', String(typed))
            props.choose(String(typed))
          }}
        />
      </label>
      {!fits && <p class="soft">From 0.5 to 3 m, for example 1.05.</p>}
    </details>
  )
}
