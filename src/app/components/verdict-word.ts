import type { Verdict } from '../../judge/result.ts'

const words: Record<Verdict, string> = {
  usable: 'usable',
  'with-cautions': 'with cautions',
  'with-help': 'only with help',
  'do-not-use': 'do not use',
  'not-known': 'not known',
}

/** The five words, the same everywhere. */
export function verdictWord(verdict: Verdict): string {
  return words[verdict]
}
