import type { Finding } from './finding.ts'
import { high } from './finding.ts'
import type { Gap } from './gap.ts'
import { harms, type Verdict } from './result.ts'

/** How a part stands: the first of the five words that applies, and the findings that decide it. */
export interface Decided {
  verdict: Verdict
  deciding: Finding[]
}

export interface Ground {
  findings: readonly Finding[]
  gaps: readonly Gap[]
  /** Led by somebody else than the robot, with complete help: with help at best. */
  ledOtherwise: boolean
  /** Every length at every pace has a failing check. */
  closed: boolean
  /** Features whose catalogue row is a caution. */
  cautioned: ReadonlySet<string>
  /** Cautions that are no check's: creeping. */
  creeping: boolean
}

export function decide(ground: Ground): Decided {
  const { findings, gaps, closed } = ground
  const against = findings.filter((one) => one.state === 'fails' || one.state === 'stop-item')
  if (against.length > 0 || closed) return { verdict: 'do-not-use', deciding: against }
  if (gaps.some((one) => one.blocks))
    return {
      verdict: 'not-known',
      deciding: findings.filter((one) => one.state === 'unsure' || one.state === 'needs-help' || one.told),
    }
  const helped = findings.filter((one) => one.state === 'helped')
  if (helped.length > 0 || ground.ledOtherwise) return { verdict: 'with-help', deciding: helped }
  const tight = findings.filter((one) => one.state === 'tight')
  if (tight.length > 0 || ground.cautioned.size > 0 || ground.creeping)
    return { verdict: 'with-cautions', deciding: [...tight, ...findings.filter((one) => isCautioned(one, ground))] }
  return { verdict: 'usable', deciding: [...findings] }
}

function isCautioned(one: Finding, { cautioned, creeping }: Ground): boolean {
  return one.state !== 'tight' && (cautioned.has(one.feature) || (creeping && one.id === 'stop'))
}

/**
 * The finding that governs: a stop item, then one that fails without a ratio, then the greatest r_high; for not-known
 * by harm first. Null where no check decides it: nobody looked, or somebody else leads.
 */
export function governing({ verdict, deciding }: Decided): Finding | null {
  const rank = (one: Finding) =>
    verdict === 'not-known' ? harms.indexOf(one.harm) : isStop(one) ? 0 : failsBare(one) ? 1 : 2
  let best: Finding | null = null
  for (const one of deciding) {
    if (best === null || rank(one) < rank(best) || (rank(one) === rank(best) && high(one.ratio) > high(best.ratio)))
      best = one
  }
  return best
}

function isStop(one: Finding): boolean {
  return one.state === 'stop-item' || (one.state === 'helped' && one.id === 'stop-item')
}

function failsBare(one: Finding): boolean {
  return one.ratio === null && (one.state === 'fails' || one.state === 'helped')
}
