import type { Walk } from '../../record/survey.ts'
import { type Finding, finding } from '../finding.ts'
import { helpState } from '../help.ts'

/**
 * A way out that needs neither robot nor lift. Without one the walk is with help at best, by whoever comes when the
 * alarm sounds; nobody named: do not use. Null where nobody answered. Common practice.
 */
export function emergency(walk: Walk): Finding | null {
  const says = walk.words.wayOut?.says
  if (says === undefined) return null
  const help = helpState(walk.alarm)
  const needs = says === 'lift' ? 'needs the lift' : says === 'robot' ? 'needs the robot' : 'is not there'
  return finding({
    id: 'emergency',
    feature: walk.id,
    subject: `Way out of ${walk.name}`,
    detail: () => (says === 'yes' ? 'needs neither robot nor lift' : needs),
    harm: 'trap',
    source: 'common practice',
    raw: says === 'yes' ? 'passes' : 'fails',
    help,
  })
}
