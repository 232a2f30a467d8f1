import { distanceToBoundary } from '../geometry/boundary.ts'
import type { Metres } from '../units/quantity.ts'
import type { Field } from './field.ts'
import { directionOf, directions } from './tables.ts'

/**
 * The backward value function: state by state the greatest clearance with which the goal can be reached, in metres,
 * nothing below the field's least clearance told apart. Begins with the goal alone.
 */
export function goalValues(field: Field): Float32Array {
  const { pose, place, goal } = field
  const value = new Float32Array(pose.length).fill(pose[0] as number)
  for (let s = 1; s < value.length; s++) if (goal[place[s] as number]) value[s] = pose[s] as number
  return value
}

/**
 * Raises the values to the fixed point of: clearance of the pose, and the best of a straight pull, a swing to either
 * side. Directions are taken in turn, down and up; one whose neighbours have not changed rests. Returns the number of
 * passes; `most` caps them (then the values are still low, never high).
 */
export function raise(field: Field, value: Float32Array, most: number): number {
  const changed = new Int32Array(directions).fill(1)
  const visited = new Int32Array(directions)
  let clock = 1
  for (let pass = 1; pass <= most; pass++) {
    let raised = 0
    for (let i = 0; i < 2 * directions; i++) {
      const k = i < directions ? directions - 1 - i : i - directions
      const seen = visited[k] as number
      const news = Math.max(
        changed[k] as number,
        changed[(k + 1) % directions] as number,
        changed[(k + directions - 1) % directions] as number,
      )
      if (news <= seen) continue
      visited[k] = ++clock
      const gain = raiseDirection(field, value, k)
      if (gain > 1e-5) changed[k] = ++clock
      if (gain > raised) raised = gain
    }
    if (raised < 2e-4) return pass
  }
  return most + 1
}

function raiseDirection(field: Field, value: Float32Array, k: number): number {
  const { pose, links, begin } = field
  const weight = field.weight[k] as number
  const keep = 1 - weight
  const from = begin[k] as number
  const end = begin[k + 1] as number
  // Far end of the pull first: one visit then carries a value along the whole straight.
  const down = field.downwards[k] === 1
  let raised = 0
  for (let n = from; n < end; n++) {
    const s = down ? from + end - 1 - n : n
    const limit = pose[s] as number
    const old = value[s] as number
    if (limit <= old) continue
    const at = s << 3
    let best = value[links[at] as number] as number
    let other = value[links[at + 1] as number] as number
    if (other > best) best = other
    other = value[links[at + 2] as number] as number
    if (other > best) best = other
    other = value[links[at + 3] as number] as number
    if (other > best) best = other
    if (best < limit) {
      const one = Math.max(value[links[at + 4] as number] as number, value[links[at + 5] as number] as number)
      const two = Math.max(value[links[at + 6] as number] as number, value[links[at + 7] as number] as number)
      const straight = keep * one + weight * two
      if (straight > best) best = straight
    }
    const next = Math.min(best, limit)
    if (next > old) {
      value[s] = next
      if (next - old > raised) raised = next - old
    }
  }
  return raised
}

/** Best of `values` over the runs of a direction's node that overlap [from, to] (steps from that direction). */
export function linked(field: Field, values: Float32Array, cell: number, from: number, to: number): number {
  const { slot, first, last } = field
  let best = values[0] as number
  for (let run = 0; run < 2; run++) {
    const s = slot[cell * 2 + run] as number
    if (s === 0 || (first[s] as number) > to || (last[s] as number) < from) continue
    if ((values[s] as number) > best) best = values[s] as number
  }
  return best
}

/** Value between the nodes in place, over the runs that overlap [from, to]; the least off the field. */
export function sample(
  field: Field,
  value: Float32Array,
  x: Metres,
  y: Metres,
  k: number,
  from: number,
  to: number,
): number {
  const { grid } = field.tables
  const fx = (x - field.x0) / grid.dx
  const fy = (y - field.y0) / grid.dy
  const i = Math.floor(fx + 1e-9)
  const j = Math.floor(fy + 1e-9)
  if (i < 0 || j < 0 || i + 1 >= field.columns || j + 1 >= field.rows) return value[0] as number
  const wx = Math.max(0, fx - i)
  const wy = Math.max(0, fy - j)
  const at = (((k % directions) + directions) % directions) * field.count + j * field.columns + i
  return (
    (linked(field, value, at, from, to) * (1 - wx) + linked(field, value, at + 1, from, to) * wx) * (1 - wy) +
    (linked(field, value, at + field.columns, from, to) * (1 - wx) +
      linked(field, value, at + field.columns + 1, from, to) * wx) *
      wy
  )
}

/** Handler's clearance at a node when drawn `drift` along direction k, metres. */
function drawn(field: Field, at: number, k: number, drift: Metres): Metres {
  const { grid, walls, bodies } = field.tables
  const x = field.x0 + (at % field.columns) * grid.dx + drift * Math.cos(directionOf(k))
  const y = field.y0 + Math.floor(at / field.columns) * grid.dy + drift * Math.sin(directionOf(k))
  return distanceToBoundary(walls, x, y) - bodies.r
}

/**
 * Values with one pause more than those given: where the handler stands the leash may go slack and be taken up again
 * in whatever direction is best, as if the robot could always walk there. Too good where it cannot: such places are
 * banned once they are found.
 */
export function withPause(field: Field, below: Float32Array, banned: Uint8Array, drift: Metres): Float32Array {
  const { pose, count, goal, place, begin } = field
  const value = Float32Array.from(below)
  const best = new Float32Array(count).fill(below[0] as number)
  const limitOf = (s: number, k: number, level: number) =>
    drift === 0 ? level : Math.min(level, drawn(field, place[s] as number, k, drift))
  for (let k = 0; k < directions; k++)
    for (let s = begin[k] as number, end = begin[k + 1] as number; s < end; s++) {
      const at = place[s] as number
      if (goal[at] || banned[at] || (below[s] as number) <= (best[at] as number)) continue
      const level = limitOf(s, k, below[s] as number)
      if (level > (best[at] as number)) best[at] = level
    }
  for (let k = 0; k < directions; k++)
    for (let s = begin[k] as number, end = begin[k + 1] as number; s < end; s++) {
      const level = Math.min(pose[s] as number, best[place[s] as number] as number)
      if (level <= (value[s] as number)) continue
      const limited = limitOf(s, k, level)
      if (limited > (value[s] as number)) value[s] = limited
    }
  return value
}
