import { type Finding, high } from './finding.ts'
import type { Verdict } from './result.ts'

/**
 * Room left at the worst unhelped check, 0 to 100: round(100 (1 - clamp((r_high - 0.5) / 0.5, 0, 1))). At least 1 unless
 * do-not-use; 0 for that; null for not-known and for a part that the robot does not lead. For surveyor and office only.
 */
export function score(verdict: Verdict, findings: readonly Finding[], led: boolean): number | null {
  if (verdict === 'do-not-use') return 0
  if (verdict === 'not-known' || !led) return null
  const worst = Math.max(
    0,
    ...findings.filter((one) => one.ratio && one.state !== 'helped').map((one) => high(one.ratio)),
  )
  const used = Math.min(1, Math.max(0, (worst - 0.5) / 0.5))
  return Math.max(1, Math.round(100 * (1 - used)))
}
