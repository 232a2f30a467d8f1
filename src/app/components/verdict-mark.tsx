import type { Verdict } from '../../judge/result.ts'
import { VerdictShape } from './strip/verdict-shape.tsx'
import { verdictWord } from './verdict-word.ts'

/**
 * A verdict: its word, its shape, its pattern and its colour, in that order of weight. `detail` follows the word: who
 * helps and where, or why it is not known.
 */
export function VerdictMark(props: { verdict: Verdict; detail?: string | null; line?: boolean }) {
  const { verdict, detail } = props
  return (
    <span class={`verdict verdict-${verdict}${props.line ? ' line' : ''}`}>
      <VerdictSwatch verdict={verdict} />
      <span>
        {verdictWord(verdict)}
        {detail && <span class="detail">: {detail}</span>}
      </span>
    </span>
  )
}

/** Pattern and shape alone: the word must stand beside it. */
export function VerdictSwatch({ verdict }: { verdict: Verdict }) {
  const dashed = verdict === 'not-known' ? '5 4' : undefined
  return (
    <svg class={`verdict-swatch verdict-${verdict}`} viewBox="0 0 46 24" aria-hidden="true">
      <rect
        x="1.5"
        y="1.5"
        width="19"
        height="21"
        rx="3"
        fill={verdict === 'usable' || verdict === 'not-known' ? 'var(--sheet)' : `url(#pattern-${verdict})`}
        stroke="currentColor"
        stroke-width="2.5"
        stroke-dasharray={dashed}
      />
      <VerdictShape verdict={verdict} x={27} y={3} size={18} />
    </svg>
  )
}

/** The patterns, once in the page: hatch, dots, cross-hatch. The same in black and white. */
export function VerdictPatterns() {
  return (
    <svg width="0" height="0" class="hidden" aria-hidden="true">
      <defs>
        <pattern
          id="pattern-with-cautions"
          width="7"
          height="7"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <rect width="7" height="7" fill="var(--sheet)" />
          <rect width="2.2" height="7" fill="var(--with-cautions)" />
        </pattern>
        <pattern id="pattern-with-help" width="7" height="7" patternUnits="userSpaceOnUse">
          <rect width="7" height="7" fill="var(--sheet)" />
          <circle cx="3.5" cy="3.5" r="1.7" fill="var(--with-help)" />
        </pattern>
        <pattern
          id="pattern-do-not-use"
          width="7"
          height="7"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <rect width="7" height="7" fill="var(--sheet)" />
          <path d="M0 1H7M1 0V7" stroke="var(--do-not-use)" stroke-width="2" />
        </pattern>
      </defs>
    </svg>
  )
}
