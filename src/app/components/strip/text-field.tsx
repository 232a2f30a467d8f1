import { useEffect, useState } from 'preact/hooks'
import { sentence } from './sentence.ts'

/**
 * Free text. Kept as a draft while it is typed, saved with its own key or on Enter; it is never cleared by a save that
 * failed.
 */
export function TextField(props: {
  label: string
  value: string
  /** Half typed before an interruption. */
  draft?: string | null
  keep(text: string): void
  save(text: string): Promise<boolean>
}) {
  const [text, setText] = useState(props.draft ?? props.value)
  const { keep } = props
  useEffect(() => {
    if (text === props.value) return
    const later = setTimeout(() => keep(text), 300)
    return () => clearTimeout(later)
  }, [text, props.value])

  return (
    <form
      class="text-field"
      onSubmit={(event) => {
        event.preventDefault()
        void props.save(text.trim())
      }}
    >
      <label>
        {sentence(props.label)}
        <input value={text} maxLength={400} onInput={(event) => setText(event.currentTarget.value)} />
      </label>
      <button type="submit" class="key" disabled={text.trim() === props.value || text.trim() === ''}>
        Save<span class="hidden"> {props.label}</span>
      </button>
    </form>
  )
}
