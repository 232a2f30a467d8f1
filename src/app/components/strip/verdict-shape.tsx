import type { Verdict } from '../../../judge/result.ts'

const outlines: Record<Verdict, string> = {
  usable: 'M8 1a7 7 0 1 0 0 14a7 7 0 1 0 0-14z',
  'with-cautions': 'M8 1L15.5 14.5H.5z',
  'with-help': 'M8 .5L15.5 8L8 15.5L.5 8z',
  'do-not-use': 'M2 4.5L4.5 2L8 5.5L11.5 2L14 4.5L10.5 8L14 11.5L11.5 14L8 10.5L4.5 14L2 11.5L5.5 8z',
  'not-known': 'M8 1.5a6.5 6.5 0 1 0 0 13a6.5 6.5 0 1 0 0-13zM8 4.5a3.5 3.5 0 1 1 0 7a3.5 3.5 0 1 1 0-7z',
}

/** The verdict's shape inside a drawing: disc, triangle, diamond, cross, ring. `size` px; its word stands beside it. */
export function VerdictShape(props: { verdict: Verdict; x: number; y: number; size: number }) {
  return (
    <path
      class={`verdict-${props.verdict}`}
      fill="currentColor"
      fill-rule="evenodd"
      transform={`translate(${props.x} ${props.y}) scale(${props.size / 16})`}
      d={outlines[props.verdict]}
    />
  )
}
