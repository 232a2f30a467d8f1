import type { Verdict } from './result.ts'

/** Best first; a walk is as good as its worst. */
const order: readonly Verdict[] = ['usable', 'with-cautions', 'with-help', 'not-known', 'do-not-use']

export function verdictRank(verdict: Verdict): number {
  return order.indexOf(verdict)
}

export function worstVerdict(verdicts: readonly Verdict[]): Verdict {
  return verdicts.reduce<Verdict>((worst, next) => (verdictRank(next) > verdictRank(worst) ? next : worst), 'usable')
}
