import type { Metres } from '../units/quantity.ts'
import type { PairCheck } from './checks/pair-check.ts'
import type { ClosedWindow } from './result.ts'
import type { Judged } from './segment.ts'
import type { Grid, Pair } from './window.ts'

/** What would open the window: makes the checks anew with a venue changed by that much. */
export type Widened = (change: { feature: string; by: Metres }) => PairCheck[]

/** A corner that must grow by more is another corner. */
const mostWiden: Metres = 1.5
const step: Metres = 0.01

/**
 * The two checks that close a window, and the least change that opens it: seconds of a door, else millimetres of a
 * pinch (both its widths), found by trying. Null where no single change does.
 */
export function closedWindow({ grid, pairs: checks }: Judged, widened: Widened): ClosedWindow | null {
  const closers = closersOf(grid, checks)
  const [first, second] = closers
  if (!first) return null
  return { closedBy: [first.id, (second ?? first).id], opens: opening(grid, checks, closers, widened) }
}

/** Checks that hold no pair open, those that close the short end first, then by how many pairs they close. */
function closersOf({ pairs }: Grid, checks: readonly PairCheck[]): PairCheck[] {
  const closing = checks
    .map((check) => {
      const shut = pairs.filter((pair) => isShut(check, pair))
      return { check, shut: shut.length, least: Math.min(...shut.map((pair) => pair.leash)) }
    })
    .filter((one) => one.shut > 0)
  const most = [...closing].sort((a, b) => b.shut - a.shut)
  const chosen: typeof most = []
  for (const one of most)
    if (chosen.length < 2 && !chosen.some((other) => other.check.id === one.check.id)) chosen.push(one)
  return chosen.sort((a, b) => a.least - b.least).map((one) => one.check)
}

function isShut(check: PairCheck, { leash, pace }: Pair): boolean {
  const { state } = check.cell(leash, pace)
  return state === 'fails' || state === 'unsure' || state === 'needs-help'
}

function opening(
  grid: Grid,
  checks: readonly PairCheck[],
  closers: readonly PairCheck[],
  widened: Widened,
): ClosedWindow['opens'] {
  const door = closers.find((one) => one.id === 'door-time' || one.id === 'lift-time')
  if (door) {
    const seconds = leastSeconds(grid, checks, door)
    if (seconds !== null) return { change: `a longer hold at ${door.feature}`, amount: seconds, unit: 's' }
  }
  const pinch = closers.find((one) => one.id === 'turn')
  if (!pinch) return null
  const opens = (by: Metres) => {
    const anew = widened({ feature: pinch.feature, by })
    return grid.pairs.some((pair) => anew.every((check) => !isShut(check, pair)))
  }
  if (!opens(mostWiden)) return null
  let below = 0
  let above = Math.round(mostWiden / step)
  while (above - below > 1) {
    const middle = (below + above) >> 1
    if (opens(middle * step)) above = middle
    else below = middle
  }
  return { change: `more clear width at ${pinch.feature}`, amount: Math.round(above * step * 1000), unit: 'mm' }
}

/** Seconds missing at the pair where the door alone closes and misses least; rounded up to a tenth. */
function leastSeconds({ pairs }: Grid, checks: readonly PairCheck[], door: PairCheck): number | null {
  let least: number | null = null
  for (const pair of pairs) {
    if (checks.some((one) => one !== door && isShut(one, pair))) continue
    const { demand, capacity } = door.finding(pair.leash, pair.pace)
    if (demand === null || capacity === null) continue
    const missing = demand - capacity
    if (least === null || missing < least) least = missing
  }
  return least === null || least <= 0 ? null : Math.ceil(least * 10 - 1e-9) / 10
}
