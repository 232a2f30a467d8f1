import type { Metres } from '../units/quantity.ts'
import { high } from './finding.ts'
import type { LadderCell } from './result.ts'
import { decideAt, type Judged, ownPair } from './segment.ts'
import { choose } from './window.ts'

/** A judged segment as if one length alone were on offer. */
export function restrict(judged: Judged, leash: Metres): Judged {
  const grid = { pairs: judged.grid.pairs.filter((one) => one.leash === leash) }
  const choice = choose(grid, judged.floor)
  return {
    ...judged,
    grid,
    choice,
    closed: judged.site.led && choice === null && grid.pairs.every((one) => one.failing > 0),
  }
}

/** The cell of one length: the best verdict it allows and the worst check at it. */
export function ladderCell(judged: Judged, leash: Metres): LadderCell {
  if (!judged.site.led)
    return { leash, verdict: decideAt(judged, null).decided.verdict, room: null, check: null, pace: null }
  const alone = restrict(judged, leash)
  // A length that is not on offer here (a crowd) holds nothing.
  if (alone.grid.pairs.length === 0) return { leash, verdict: 'do-not-use', room: null, check: 'crowd', pace: null }
  const at = ownPair(alone)
  const { findings, decided, governing } = decideAt(alone, at)
  const tightest = findings
    .filter((one) => one.ratio && one.state !== 'helped')
    .reduce<(typeof findings)[number] | null>((a, b) => (a && high(a.ratio) >= high(b.ratio) ? a : b), null)
  const worst = tightest?.ratio?.[1] ?? null
  return {
    leash,
    verdict: decided.verdict,
    room: worst === null ? null : 1 - worst,
    check: tightest?.id ?? governing?.id ?? null,
    pace: alone.choice?.pace ?? null,
  }
}
