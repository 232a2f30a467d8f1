import type { Metres } from '../units/quantity.ts'
import { type Finding, high } from './finding.ts'
import type { LadderCell } from './result.ts'
import { type Judged, lengthsHere, ownPair, restrict, verdictAt } from './segment.ts'

/** The cell of one length: the best verdict it allows and the worst check at it. */
export function ladderCell(judged: Judged, leash: Metres): LadderCell {
  const { site, floor, pairs } = judged
  if (!site.led) return { leash, verdict: floor, room: null, check: null, pace: null }
  // A length that is not on offer here (a crowd) holds nothing.
  if (!lengthsHere(site).includes(leash))
    return { leash, verdict: 'do-not-use', room: null, check: 'crowd', pace: null }
  const alone = restrict(judged, leash)
  const pair = ownPair(alone)
  let check: string | null = null
  let worst = Number.NEGATIVE_INFINITY
  const take = (id: string, end: number) => {
    if (end <= worst) return
    worst = end
    check = id
  }
  for (const one of judged.plain) if (counts(one)) take(one.id, high(one.ratio))
  for (const one of pair ? pairs : []) {
    const cell = one.cell(leash, pair?.pace ?? 0)
    if (cell.state !== 'helped') take(one.id, high(cell.ratio()))
  }
  return {
    leash,
    verdict: verdictAt(alone, pair),
    room: Number.isFinite(worst) ? 1 - worst : null,
    check,
    pace: alone.choice?.pace ?? null,
  }
}

function counts(one: Finding): boolean {
  return one.ratio !== null && one.state !== 'helped'
}
