import type { Metres } from '../units/quantity.ts'
import { type Judged, ownPair, restrict, verdictAt } from './segment.ts'
import { holds, lexicographic } from './window.ts'
import { verdictRank } from './worst.ts'

/** One length over a run of segments. */
export interface Stretch {
  /** Index of its first segment on the walk. */
  from: number
  leash: Metres
}

/**
 * The one length whose worst segment verdict is best, then worst first by r_high, then the shorter. Where none serves,
 * the fewest changes, each at the standing place where a segment begins; where the leash cannot be changed, the length
 * that serves the most segments. Segments that hold with no length ask for none. Null: nothing on the walk holds.
 */
export function lengthsOf(
  segments: readonly Judged[],
  lengths: readonly Metres[],
  changeable: boolean,
): Stretch[] | null {
  const asking = segments.map((one, index) => ({ one, index })).filter(({ one }) => one.choice !== null)
  const first = asking[0]
  if (!first) return null
  const serves = ({ one }: (typeof asking)[number], leash: Metres) =>
    one.grid.pairs.some((pair) => pair.leash === leash && holds(pair))
  const all = lengths.filter((leash) => asking.every((one) => serves(one, leash)))
  if (all.length > 0)
    return [
      {
        from: 0,
        leash: bestOf(
          asking.map(({ one }) => one),
          all,
        ),
      },
    ]
  if (!changeable) {
    const served = (leash: Metres) => asking.filter((one) => serves(one, leash)).length
    const most = Math.max(...lengths.map(served))
    const best = lengths.filter((leash) => served(leash) === most)
    return [
      {
        from: 0,
        leash: bestOf(
          asking.filter((one) => best.some((leash) => serves(one, leash))).map(({ one }) => one),
          best,
        ),
      },
    ]
  }
  const stretches: Stretch[] = []
  let run: typeof asking = []
  let possible = [...lengths]
  const close = () => {
    const begin = stretches.length === 0 ? 0 : (run[0]?.index ?? 0)
    stretches.push({
      from: begin,
      leash: bestOf(
        run.map(({ one }) => one),
        possible,
      ),
    })
  }
  for (const next of asking) {
    const still = possible.filter((leash) => serves(next, leash))
    if (still.length > 0) {
      run.push(next)
      possible = still
      continue
    }
    close()
    run = [next]
    possible = lengths.filter((leash) => serves(next, leash))
  }
  close()
  return stretches
}

function bestOf(segments: readonly Judged[], lengths: readonly Metres[]): Metres {
  const at = lengths.map((leash) => {
    const pairs = segments.map((one) => ({ alone: restrict(one, leash), pair: ownPair(restrict(one, leash)) }))
    return { leash, pairs, rank: Math.max(0, ...pairs.map(({ alone, pair }) => verdictRank(verdictAt(alone, pair)))) }
  })
  const least = Math.min(...at.map((one) => one.rank))
  const ranked = at
    .filter((one) => one.rank === least)
    .map(({ leash, pairs }) => ({
      leash,
      worst: pairs.flatMap(({ pair }) => pair?.worst() ?? []).sort((a, b) => b - a),
    }))
    .sort((a, b) => lexicographic(a.worst, b.worst) || a.leash - b.leash)
  const best = ranked[0]
  if (!best) throw new Error('judge/no-length: none was asked for')
  return best.leash
}
