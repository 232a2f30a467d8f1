import type { Override } from '../record/survey.ts'
import type { SegmentResult } from './result.ts'
import type { Setting } from './setting.ts'
import { verdictRank } from './worst.ts'

/** Missing answers that no practitioner can speak for beyond "with help". */
const fatal = new Set(['overhead', 'edge', 'step'])

/**
 * The practitioner's last word, in the open: whole (reason, name, role, end date), not past its end, for this team and
 * this leash. Of a stop item or a missing overhead, edge or step answer it reaches with help at best.
 */
export function overridden(
  result: SegmentResult,
  overrides: readonly Override[],
  { on, team }: Pick<Setting, 'on' | 'team'>,
  leash: number | null,
): SegmentResult {
  const spoken = overrides.findLast(
    (one) =>
      one.segment === result.id &&
      [one.reason, one.name, one.role].every((text) => text.trim() !== '') &&
      one.until >= on &&
      (one.team === undefined || one.team === team.card.revision) &&
      (one.leash === undefined || one.leash === leash),
  )
  if (!spoken) return result
  const capped =
    result.checks.some((one) => one.id === 'stop-item') || result.missing.some((aspect) => fatal.has(aspect))
  const verdict = capped && verdictRank(spoken.verdict) < verdictRank('with-help') ? 'with-help' : spoken.verdict
  const { reason, name, role, until } = spoken
  return {
    ...result,
    verdict,
    score: verdict === 'do-not-use' ? 0 : verdict === 'not-known' ? null : result.score,
    override: { verdict, machine: result.verdict, reason, name, role, until },
  }
}
