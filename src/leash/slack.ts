import type { Metres } from '../units/quantity.ts'
import { costToGo, type Layer } from './cost-to-go.ts'
import type { Field } from './field.ts'
import type { Node } from './nodes.ts'
import { pauseWay } from './pause.ts'
import { rollOut, type Target, takenUp } from './roll-out.ts'
import {
  better,
  depth,
  type Found,
  headed,
  type Passes,
  polishAndProve,
  type Quest,
  settle,
  settledField,
  shortfall,
  startValue,
  type TautResult,
} from './search.ts'
import { withPause } from './value.ts'

/** At most so many pauses; more is no guiding. */
export const mostPauses = 3
/** How often a place for a pause is tried, found impossible and banned, before the level is given up. */
const mostBans = 6

export interface SlackResult {
  /** Best proved motion with at most n pauses, by n; index 0 is the taut one. */
  found: (Found | null)[]
  /** Optimistic value of the start with three pauses, metres; the truth is below it plus the shortfall. */
  value: Metres
  settled: boolean
}

/**
 * Motions with one, two and three pauses. `enough` is what none can exceed: once it is reached nothing is left to
 * search for.
 */
export function searchSlack(quest: Quest, taut: TautResult, enough: Metres, passes: Passes): SlackResult {
  const found: (Found | null)[] = [taut.found]
  const worth = (n: number) => found[n]?.certificate.clearance ?? Number.NEGATIVE_INFINITY
  // A first look with headings cut at zero says how much each pause may gain at most.
  const { base } = taut
  const none = new Uint8Array(base.field.count)
  const first = layersOf(quest, base.field, base.taut, mostPauses, none, passes)
  let settled = base.settled && first.settled
  const values = first.layers.map((layer) => startValue(quest, base.field, layer))
  let cut: Cut | null = null
  for (let n = 1; n <= mostPauses; n++) {
    const before = found[n - 1] ?? null
    found.push(before)
    const value = values[n] as number
    if (worth(n) >= enough - 0.003 || value + shortfall(quest.separation) < 0) continue
    // What a pause gains on the grid it gains in truth, near enough: without gain there is nothing to look for.
    if (value < (values[n - 1] as number) + (n === 1 ? 0.003 : 0.01) && worth(n) >= (values[n - 1] as number)) continue
    if (!cut || Math.abs(cut.tau - value) > 0.01) {
      const tau = Math.max(0, value - 0.006)
      const again = tau > 0.02 ? settledField(quest, tau, value - depth, passes) : base
      settled = settled && again.settled
      cut = { field: again.field, taut: again.taut, tau: value, banned: new Uint8Array(again.field.count) }
    }
    const layered = searchWith(quest, n, cut, enough, passes)
    settled = settled && layered.settled
    found[n] = better(before, layered.found)
  }
  return { found, value: Math.max(...values), settled }
}

/** A field whose headings were cut at a level, and where pauses were found impossible at it. */
interface Cut {
  field: Field
  taut: Float32Array
  tau: Metres
  banned: Uint8Array
}

function searchWith(
  quest: Quest,
  n: number,
  cut: Cut,
  enough: Metres,
  passes: Passes,
): { found: Found | null; settled: boolean } {
  const { field, banned } = cut
  let settled = true
  let found: Found | null = null
  let proofs = 0
  for (let ban = 0; ban <= mostBans; ban++) {
    const values = layersOf(quest, field, cut.taut, n, banned, passes)
    settled = settled && values.settled
    const value = startValue(quest, field, values.layers[n] as Float32Array)
    if (value + shortfall(quest.separation) < 0 || (found && found.certificate.clearance >= value)) break
    const level = value - 0.01
    const layers: Layer[] = []
    for (const [i, layer] of values.layers.entries())
      layers.push({ value: layer, cost: costToGo(field, layer, level, 60, layers[i - 1], banned) })
    const { x, y, heading } = quest.scene.start
    const joiner = new Joiner(quest, level)
    const start = { x, y, psi: heading }
    const rolled = rollOut(quest.scene, field, layers, level, start, banned, (stretch, to) => joiner.pause(stretch, to))
    if (!rolled) break
    const joined = rolled.through ? joiner.end(rolled.stretches.at(-1) as Node[]) : null
    if (joined) {
      found = better(found, polishAndProve(quest, joined))
      proofs++
      if (rolled.pausedAt.length === 0) break
      // Another place to pause is tried once where there may be much more to gain.
      if (found && found.certificate.clearance >= Math.min(enough, value + shortfall(quest.separation)) - 0.012) break
      if (found && found.certificate.clearance >= level && proofs >= 2) break
    }
    const last = rolled.pausedAt.at(-1)
    if (last === undefined) break
    if (joined) for (const at of rolled.pausedAt) banAround(field, banned, at)
    else banAround(field, banned, last)
  }
  return { found, settled }
}

function layersOf(
  quest: Quest,
  field: Field,
  taut: Float32Array,
  n: number,
  banned: Uint8Array,
  passes: Passes,
): { layers: Float32Array[]; settled: boolean } {
  const layers: Float32Array[] = [taut]
  let settled = true
  for (let i = 1; i <= n; i++) {
    const value = withPause(field, layers[i - 1] as Float32Array, banned, quest.drift)
    settled = settle(field, value, passes) && settled
    layers.push(value)
  }
  return { layers, settled }
}

/** Joins stretches by the robot's ways on the slack leash, as they are rolled out. */
class Joiner {
  private nodes: Node[] = []
  /** What the next stretch's leash directions are short of the unwound ones, and the heading it begins with. */
  private unwind = 0
  private readonly quest: Quest
  private readonly level: Metres

  constructor(quest: Quest, level: Metres) {
    this.quest = quest
    this.level = level
  }

  /** A stretch has come to a pause: the target the robot can reach, null where it can reach none. */
  pause(stretch: Node[], targets: Target[]): Target | null {
    if (!this.end(stretch)) return null
    const last = this.nodes.at(-1) as Node
    const poses = targets.map((target) => takenUp(last, target))
    // The grid is coarse: a way a little tighter is still worth polishing.
    for (const below of [0, 0.015, 0.03]) {
      const way = pauseWay(this.quest, last, poses, this.level - below)
      if (!way) continue
      this.nodes.push(...way.nodes)
      this.unwind = way.psi - (poses[way.target] as Node).psi
      return targets[way.target] as Target
    }
    return null
  }

  /** The motion so far with the stretch at its end; null where the robot finds no headings for it. */
  end(stretch: Node[]): Node[] | null {
    const before = this.nodes.at(-1)
    const heading = before?.heading ?? (stretch[0] as Node).heading
    const begun = stretch.map((node) => ({ ...node, psi: node.psi + this.unwind, heading }))
    const turned = headed(this.quest, begun, this.level)
    if (!turned) return null
    this.nodes.push(...turned)
    return this.nodes
  }
}

function banAround(field: Field, banned: Uint8Array, at: number): void {
  const i = at % field.columns
  const j = Math.floor(at / field.columns)
  for (let dj = -2; dj <= 2; dj++)
    for (let di = -2; di <= 2; di++) {
      if (i + di < 0 || j + dj < 0 || i + di >= field.columns || j + dj >= field.rows) continue
      banned[(j + dj) * field.columns + i + di] = 1
    }
}
