import type { Metres } from '../units/quantity.ts'
import type { Field } from './field.ts'
import { directionOf, directions } from './tables.ts'

/** A motion may dip this far under the level where the grid, not the place, makes it; each metre of dip is dear. */
export const dip = 0.05

export const dipCost = 20

/** What a metre walked costs beside a radian swung: of equal motions the one that saws the person least is wanted. */
export const metre = 0.3

export const unreachable = 1e6

/** Walking and swinging are preferred to a pause until they cost this much more. */
export const pauseCost = 3

/** A layer of the search: values and costs with at most so many pauses to come. */
export interface Layer {
  value: Float32Array
  cost: Float32Array
}

/**
 * Cost to go at a level: swings, way and pauses, through states from which the goal is reached at `level` or better.
 * `below` is the layer with one pause less.
 */
export function costToGo(
  field: Field,
  value: Float32Array,
  level: Metres,
  most: number,
  below?: Layer,
  banned?: Uint8Array,
): Float32Array {
  const { goal, place } = field
  const cost = new Float32Array(value.length).fill(unreachable)
  const paused = below ? pausesFrom(field, below) : null
  for (let s = 1; s < cost.length; s++) {
    if ((value[s] as number) < level - dip) continue
    const at = place[s] as number
    if (goal[at]) cost[s] = 0
    else if (paused && !banned?.[at]) cost[s] = Math.min(unreachable, (paused[at] as number) + pauseCost)
  }
  const changed = new Int32Array(directions).fill(1)
  const visited = new Int32Array(directions)
  let clock = 1
  for (let pass = 0; pass < most; pass++) {
    let lowered = false
    for (let i = 0; i < 2 * directions; i++) {
      const k = i < directions ? directions - 1 - i : i - directions
      const news = Math.max(
        changed[k] as number,
        changed[(k + 1) % directions] as number,
        changed[(k + directions - 1) % directions] as number,
      )
      if (news <= (visited[k] as number)) continue
      visited[k] = ++clock
      if (!lowerDirection(field, value, cost, level, k)) continue
      changed[k] = ++clock
      lowered = true
    }
    if (!lowered) break
  }
  return cost
}

/** Least cost of the layer below over all directions of each node. */
function pausesFrom(field: Field, below: Layer): Float32Array {
  const least = new Float32Array(field.count).fill(unreachable)
  for (let s = 1; s < below.cost.length; s++) {
    const at = field.place[s] as number
    if ((below.cost[s] as number) < (least[at] as number)) least[at] = below.cost[s] as number
  }
  return least
}

/** Least cost over the runs of a direction's node that overlap [from, to]. */
export function cheapest(field: Field, cost: Float32Array, cell: number, from: number, to: number): number {
  const { slot, first, last } = field
  let best = unreachable
  for (let run = 0; run < 2; run++) {
    const s = slot[cell * 2 + run] as number
    if (s === 0 || (first[s] as number) > to || (last[s] as number) < from) continue
    if ((cost[s] as number) < best) best = cost[s] as number
  }
  return best
}

function lowerDirection(field: Field, value: Float32Array, cost: Float32Array, level: Metres, k: number): boolean {
  const { links, begin, place, goal } = field
  const swing = directionOf(1)
  const weight = field.weight[k] as number
  const step = (field.way[k] as number) * metre
  const from = begin[k] as number
  const end = begin[k + 1] as number
  const down = field.downwards[k] === 1
  let lowered = false
  for (let n = from; n < end; n++) {
    const s = down ? from + end - 1 - n : n
    const held = value[s] as number
    if (held < level - dip || goal[place[s] as number]) continue
    const at = s << 3
    let best =
      Math.min(
        cost[links[at] as number] as number,
        cost[links[at + 1] as number] as number,
        cost[links[at + 2] as number] as number,
        cost[links[at + 3] as number] as number,
      ) + swing
    const a0 = links[at + 4] as number
    const a1 = links[at + 5] as number
    const b0 = links[at + 6] as number
    const b1 = links[at + 7] as number
    const reached =
      Math.max(value[a0] as number, value[a1] as number) * (1 - weight) +
      Math.max(value[b0] as number, value[b1] as number) * weight
    if (reached >= level - dip) {
      const one = Math.min(cost[a0] as number, cost[a1] as number)
      const other = Math.min(cost[b0] as number, cost[b1] as number)
      best = Math.min(best, mix(one, other, weight) + step)
    }
    if (held < level) best += dipCost * (level - held)
    if (best < (cost[s] as number) - 1e-3) {
      cost[s] = best
      lowered = true
    }
  }
  return lowered
}

/** Half of a way may end off the level: the mean of both is on it, as the value itself has it. */
function mix(one: number, other: number, weight: number): number {
  if (weight === 0) return one
  if (one >= unreachable) return other + 0.1 * (1 - weight)
  if (other >= unreachable) return one + 0.1 * weight
  return one * (1 - weight) + other * weight
}
