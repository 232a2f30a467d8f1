import { type Verdict, verdicts } from '../../judge/result.ts'

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

/** The worst of several; null for none. The order of the list of verdicts is from best to worst, not known last. */
export function worstVerdict(all: readonly Verdict[]): Verdict | null {
  return all.reduce<Verdict | null>(
    (worst, one) => (worst === null || verdicts.indexOf(one) > verdicts.indexOf(worst) ? one : worst),
    null,
  )
}
