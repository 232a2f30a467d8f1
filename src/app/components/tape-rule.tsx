import { useId } from 'preact/hooks'

/** The one motif: a piece of yellow tape with ink ticks. It says nothing, and no words stand on it. */
export function TapeRule() {
  return <Tape share={1} />
}

/** The tape drawn out as far as long work has come. `share` 0 to 1; the words beside it say the same. */
export function TapeProgress(props: { share: number; label: string }) {
  const share = Math.min(1, Math.max(0, props.share))
  return (
    <div
      role="progressbar"
      aria-label={props.label}
      aria-valuemin={0}
      aria-valuemax={100}
      aria-valuenow={Math.round(100 * share)}
    >
      <Tape share={share} />
    </div>
  )
}

function Tape({ share }: { share: number }) {
  const id = useId()
  return (
    <svg class="tape" aria-hidden="true">
      <defs>
        <pattern id={id} width="40" height="14" patternUnits="userSpaceOnUse">
          <rect width="40" height="14" fill="var(--tape)" />
          <path stroke="var(--tape-ink)" stroke-width="1.2" d="M.6 0V10M8 0V5M16 0V5M24 0V5M32 0V5" />
        </pattern>
      </defs>
      <rect width={`${100 * share}%`} height="14" fill={`url(#${id})`} />
    </svg>
  )
}
