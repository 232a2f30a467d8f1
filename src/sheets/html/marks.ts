import type { Block } from '../content/tree.ts'

type Verdict = Extract<Block, { kind: 'verdict' }>['verdict']

const shapes: Record<Verdict, string> = {
  usable: 'M8 1a7 7 0 1 0 0 14a7 7 0 1 0 0-14z',
  'with-cautions': 'M8 1L15.5 14.5H.5z',
  'with-help': 'M8 .5L15.5 8L8 15.5L.5 8z',
  'do-not-use': 'M2 4.5L4.5 2L8 5.5L11.5 2L14 4.5L10.5 8L14 11.5L11.5 14L8 10.5L4.5 14L2 11.5L5.5 8z',
  'not-known': 'M8 1.5a6.5 6.5 0 1 0 0 13a6.5 6.5 0 1 0 0-13zM8 4.5a3.5 3.5 0 1 1 0 7a3.5 3.5 0 1 1 0-7z',
}

const patterns: Record<Verdict, string> = {
  usable: '',
  'with-cautions': '<path d="M-2 2L2-2M0 8L8 0M6 10L10 6" stroke="currentColor" stroke-width="2"/>',
  'with-help': '<circle cx="4" cy="4" r="1.7" fill="currentColor"/>',
  'do-not-use': '<path d="M0 8L8 0M0 0L8 8" stroke="currentColor" stroke-width="1.4"/>',
  'not-known': '',
}

/** A verdict's pattern and shape beside its word, which says the same: both are left out for a reader who listens. */
export function verdictMark(verdict: Verdict): string {
  const fill = patterns[verdict] === '' ? 'none' : 'url(#pattern)'
  const dash = verdict === 'not-known' ? ' stroke-dasharray="4 3"' : ''
  return (
    '<svg class="mark" width="60" height="28" viewBox="0 0 60 28" aria-hidden="true" focusable="false">' +
    `<defs><pattern id="pattern" width="8" height="8" patternUnits="userSpaceOnUse">${patterns[verdict]}</pattern></defs>` +
    `<rect x="1" y="1" width="26" height="26" rx="4" fill="${fill}" stroke="currentColor" stroke-width="2"${dash}/>` +
    `<path fill="currentColor" fill-rule="evenodd" transform="translate(34 2) scale(1.5)" d="${shapes[verdict]}"/></svg>`
  )
}

/** The tape at the head of the page: a rule that says nothing. */
export const tapeRule =
  '<svg class="tape" width="100%" height="14" aria-hidden="true" focusable="false"><defs>' +
  '<pattern id="tape" width="40" height="14" patternUnits="userSpaceOnUse"><rect class="tape-ground" width="40" height="14"/>' +
  '<path class="tape-ticks" stroke-width="1.2" d="M.6 0V10M8 0V5M16 0V5M24 0V5M32 0V5"/></pattern></defs>' +
  '<rect width="100%" height="14" fill="url(#tape)"/></svg>'
