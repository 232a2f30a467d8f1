import { kind } from '../catalogue/kinds.ts'
import type { Override, Segment } from '../record/survey.ts'
import type { SegmentResult } from './result.ts'
import type { Setting } from './setting.ts'
import { featuresOf } from './site.ts'
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
  segment: Segment,
): SegmentResult {
  const leash = result.checks.find((one) => one.at !== null)?.at?.leash ?? null
  const spoken = overrides.findLast(
    (one) =>
      one.segment === result.id &&
      [one.reason, one.name, one.role].every((text) => text.trim() !== '') &&
      one.until >= on &&
      // One that names no team or leash was given for none that is known.
      one.team === team.card.revision &&
      (leash === null || one.leash === leash),
  )
  if (!spoken) return result
  // An edge too close to call may be a stop item; what no catalogue knows may be anything.
  const capped =
    result.checks.some((one) => one.id === 'stop-item' || (one.id === 'edge' && one.state === 'unsure')) ||
    result.missing.some((aspect) => fatal.has(aspect)) ||
    result.why.some((one) => one.kind === 'told' && (one.harm === 'fall' || one.harm === 'head')) ||
    featuresOf({ segment }).some((one) => kind(one.kind) === undefined)
  const verdict = capped && verdictRank(spoken.verdict) < verdictRank('with-help') ? 'with-help' : spoken.verdict
  const { reason, name, role, until } = spoken
  return {
    ...result,
    verdict,
    score: verdict === 'do-not-use' ? 0 : verdict === 'not-known' ? null : result.score,
    override: { verdict, machine: result.verdict, reason, name, role, until },
  }
}
