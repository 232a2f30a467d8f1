/** A key of the plain stretch card: what it answers, whether it is answered, why it is off. */
export function PlainKey(props: {
  label: string
  given: boolean
  /** Why it is off. */
  why: string | null
  press(): void
  /** Pressed sooner than anyone can look. */
  hasty?: boolean | undefined
  /** Where the answer is given while this key is off. */
  instead?: { label: string; press(): void } | undefined
}) {
  return (
    <>
      <button
        type="button"
        class="key wide"
        aria-pressed={props.given}
        aria-label={props.label}
        disabled={props.why !== null}
        onClick={props.press}
      >
        <span class="tick" aria-hidden="true">
          {props.given ? '✓' : ''}
        </span>
        {props.label}
      </button>
      {props.why && <p class="soft">{props.why}</p>}
      {props.hasty && <p class="soft">Too quick: walk it, look, and press again.</p>}
      {props.why && props.instead && (
        <button type="button" class="key wide" onClick={props.instead.press}>
          {props.instead.label}
        </button>
      )}
    </>
  )
}
