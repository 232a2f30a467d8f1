import type { Metres, MetresPerSecond } from '../units/quantity.ts'
import type { PairCheck } from './checks/pair-check.ts'
import { high } from './finding.ts'
import { creeping } from './team.ts'

/** How a length at a pace stands by the checks that depend on them. */
export interface Pair {
  leash: Metres
  pace: MetresPerSecond
  /** 0 clear, 1 with cautions, 2 with help; 3 not known (no check fails), 4 fails. */
  rank: 0 | 1 | 2 | 3 | 4
  failing: number
  /** Stop, door and lift times at 0.85 or less; a helped one counts. */
  timely: boolean
  /** Rooms clear of the caution band and without a pause. */
  roomy: boolean
  /** r_high of its checks, worst first; asked for only where lengths are ranked. */
  worst(): number[]
}

/** Every length on offer at every pace, fastest first. Shared by segments that nothing but their reaction and slope tells apart. */
export interface Grid {
  pairs: readonly Pair[]
  /** What was chosen of it already, by floor and length. */
  chosen: Map<string, Choice | null>
}

/** A window: what is kept at the pace chosen. */
export interface Choice {
  pace: MetresPerSecond
  least: Metres
  greatest: Metres
  recommended: Metres
}

export const noGrid: Grid = { pairs: [], chosen: new Map() }

export function gridOf(
  checks: readonly PairCheck[],
  lengths: readonly Metres[],
  paces: readonly MetresPerSecond[],
): Grid {
  const pairs: Pair[] = []
  for (const pace of paces) for (const leash of lengths) pairs.push(pairOf(checks, leash, pace))
  return { pairs, chosen: new Map() }
}

/** One pair judged, on a grid or off it. */
export function pairOf(checks: readonly PairCheck[], leash: Metres, pace: MetresPerSecond): Pair {
  let rank: Pair['rank'] = pace <= creeping + 1e-9 ? 1 : 0
  let failing = 0
  let timely = true
  let roomy = true
  for (const check of checks) {
    const cell = check.cell(leash, pace)
    const at = cell.told ? Math.max(3, stateRank(cell.state)) : stateRank(cell.state)
    if (at === 4) failing++
    if (at > rank) rank = at as Pair['rank']
    if (cell.state === 'passes' || cell.state === 'helped') continue
    if (check.timed) timely = false
    else roomy = false
  }
  const worst = () => {
    const all: number[] = []
    for (const check of checks) {
      const ratio = check.cell(leash, pace).ratio()
      if (ratio) all.push(high(ratio))
    }
    return all.sort((a, b) => b - a)
  }
  return { leash, pace, rank, failing, worst, timely, roomy }
}

function stateRank(state: string): number {
  if (state === 'fails' || state === 'stop-item') return 4
  if (state === 'unsure' || state === 'needs-help') return 3
  return state === 'helped' ? 2 : state === 'tight' ? 1 : 0
}

/** A pair holds if every check of it passes, is tight or helped. */
export function holds({ rank }: Pair): boolean {
  return rank <= 2
}

/**
 * The window of the pairs that hold: of those with the best verdict for the segment (no better than `floor`, what its
 * other checks leave: 0 usable, 1 with cautions, 2 with help) the highest pace at which some length is timely, else the
 * highest pace; there the least, the greatest, and the shortest that is timely and roomy, else the best worst-first.
 * @param only the one length on offer, where only one is.
 */
export function choose(grid: Grid, floor: number, only?: Metres): Choice | null {
  const key = `${floor} ${only ?? ''}`
  const before = grid.chosen.get(key)
  if (before !== undefined) return before
  const choice = chosenOf(only === undefined ? grid.pairs : grid.pairs.filter((one) => one.leash === only), floor)
  grid.chosen.set(key, choice)
  return choice
}

function chosenOf(pairs: readonly Pair[], floor: number): Choice | null {
  const holding = pairs.filter(holds)
  const best = Math.min(...holding.map((one) => Math.max(floor, one.rank)))
  const kept = holding.filter((one) => Math.max(floor, one.rank) === best)
  const first = kept.find((one) => one.timely) ?? kept[0]
  if (!first) return null
  const there = kept.filter((one) => one.pace === first.pace).sort((a, b) => a.leash - b.leash)
  const shortest = there.find((one) => one.timely && one.roomy) ?? [...there].sort(worstFirst)[0]
  const lengths = there.map((one) => one.leash)
  return {
    pace: first.pace,
    least: Math.min(...lengths),
    greatest: Math.max(...lengths),
    recommended: (shortest ?? first).leash,
  }
}

/** Lexicographic by r_high, worst first; equal ones by the shorter leash. */
function worstFirst(a: Pair, b: Pair): number {
  return lexicographic(a.worst(), b.worst()) || a.leash - b.leash
}

/** Ratios are ranked in steps of this: a certificate may lose half a millimetre, and that noise must not pick a leash. */
const told = 0.002

/** Negative where `a` is the better of two lists sorted worst first. */
export function lexicographic(a: readonly number[], b: readonly number[]): number {
  for (let i = 0; i < Math.max(a.length, b.length); i++) {
    const left = Math.round((a[i] ?? Number.NEGATIVE_INFINITY) / told)
    const right = Math.round((b[i] ?? Number.NEGATIVE_INFINITY) / told)
    if (left !== right) return left - right
  }
  return 0
}

/** Where no pair holds: the one with the fewest failing checks, then the least r_high; at last the faster and shorter. */
export function leastBad(pairs: readonly Pair[]): Pair | null {
  return [...pairs].sort((a, b) => a.failing - b.failing || lexicographic(a.worst(), b.worst()))[0] ?? null
}
