import { kind } from '../catalogue/kinds.ts'
import { type InstrumentId, instrument, instrumentIds } from '../record/instruments.ts'
import { uncertainty } from '../record/interval.ts'
import type { Reading, Walk } from '../record/survey.ts'
import { aspectHarm } from './answered.ts'
import { judgeSegment, type Standing } from './double.ts'
import { type Harm, harms, type Retake } from './result.ts'
import type { RoomSolver } from './rooms.ts'
import { decideAt, ownPair } from './segment.ts'
import type { Setting } from './setting.ts'
import { featuresOf, nameOf } from './site.ts'

/** A reading that a segment's judgement looks at. */
interface Used {
  reading: Reading
  what: string
  harm: Harm
  /** Tools that read this quantity. */
  tools: readonly string[]
  /** Unsettled beside others of its place. */
  disputed: boolean
}

/**
 * Readings to take again. For each one that the segment uses, the segment alone is judged afresh with that reading
 * known exactly at each end of its own uncertainty: only this segment's verdict can depend on it here, and every scene
 * that the reading does not enter is already solved. Estimated, told and disputed ones are named whatever they decide.
 */
export function retakesOf(
  setting: Setting,
  walk: Walk,
  index: number,
  standing: Standing,
  rooms: RoomSolver,
): Retake[] {
  const now = outcome(standing)
  const found: Retake[] = []
  for (const one of usedBy(standing, index, walk)) {
    const why = reasons(one, now, setting, walk, index, rooms)
    if (why.length === 0) continue
    found.push({
      reading: one.reading.id,
      why: `${one.what}: ${why.join('; ')}.`,
      instrument: finer(one.reading, one.tools),
      harm: one.harm,
    })
  }
  return found.sort((a, b) => harms.indexOf(a.harm ?? 'comfort') - harms.indexOf(b.harm ?? 'comfort'))
}

function reasons(
  { reading, disputed }: Used,
  now: Outcome,
  setting: Setting,
  walk: Walk,
  index: number,
  rooms: RoomSolver,
): string[] {
  const why: string[] = []
  if (disputed) why.push('readings differ')
  if (instrument(reading.instrument)?.hearsay) why.push(reading.instrument === 'told' ? 'told' : 'estimated')
  if (reading.instrument === 'paces' || reading.instrument === 'plan') why.push('estimated')
  const u = reading.safeSide ? 0 : uncertainty(reading, setting.view.instruments)
  if (u === 0) return why
  const changes = new Set<string>()
  for (const end of [reading.value - u, reading.value + u]) {
    const pins = new Map([...(setting.pins ?? []), [reading.id, end]])
    const then = outcome(judgeSegment({ ...setting, pins }, walk, index, rooms))
    if (then.verdict !== now.verdict) changes.add(`${then.verdict.replaceAll('-', ' ')} at one end of what it may be`)
    else if (then.governing !== now.governing) changes.add('another check governs at one end of what it may be')
    else if (then.leash !== now.leash) changes.add('another leash length at one end of what it may be')
  }
  return [...why, ...changes]
}

interface Outcome {
  verdict: string
  governing: string | null
  leash: number | null
}

/** By itself, at its own best length and pace. */
function outcome({ judged, dryOnly }: Standing): Outcome {
  const { decided, governing } = decideAt(judged, ownPair(judged))
  return {
    verdict: dryOnly ? `${decided.verdict}, dry floor only` : decided.verdict,
    governing: governing ? `${governing.id} ${governing.feature}` : null,
    leash: judged.choice?.recommended ?? null,
  }
}

function usedBy({ judged }: Standing, index: number, walk: Walk): Used[] {
  const { site } = judged
  const found: Used[] = []
  const at = decideAt(judged, ownPair(judged))
  const differing = new Set(at.findings.filter((one) => one.differs).flatMap((one) => [...one.readings]))
  const add = (readings: readonly Reading[] | undefined, what: string, harm: Harm, tools: readonly string[]) => {
    const settled = new Set((readings ?? []).flatMap((one) => one.settles?.readings ?? []))
    for (const reading of readings ?? [])
      if (!settled.has(reading.id)) found.push({ reading, what, harm, tools, disputed: differing.has(reading.id) })
  }
  for (const [quantity, readings] of Object.entries(site.segment.readings)) {
    const harm = quantity === 'pendulum' ? 'fall' : (aspectHarm[quantity as 'width'] ?? 'comfort')
    add(readings, `${site.segment.name}, ${quantity}`, harm, quantity === 'overhead' ? ['rod', 'laser'] : [])
  }
  for (const feature of featuresOf(site)) {
    const row = kind(feature.kind)
    for (const [quantity, readings] of Object.entries(feature.readings)) {
      const attribute = row?.attributes.find((one) => one.id === quantity)
      const tools = attribute?.type === 'quantity' ? attribute.instruments : []
      add(readings, `${nameOf(feature)}, ${attribute?.name ?? quantity}`, row?.harm ?? 'comfort', tools)
    }
  }
  if (site.segment.turn && site.segment.turn.readings.widthAfter === undefined)
    add(walk.segments[index + 1]?.readings.width, `${walk.segments[index + 1]?.name}, width`, 'trap', [])
  for (const one of site.zone?.observations ?? [])
    add(one.readings.noise, `${site.zone?.name}, noise`, 'comfort', ['sound-meter'])
  return found
}

/** The finest tool that reads the quantity; the same again where none is finer. */
function finer(reading: Reading, tools: readonly string[]): InstrumentId {
  const now = instrument(reading.instrument)
  const offered =
    tools.length > 0 ? tools : now?.reads === 'length' || now?.hearsay ? ['steel-rule', 'laser', 'tape'] : []
  const size = (id: string) => uncertainty({ instrument: id as InstrumentId, value: reading.value })
  let best: InstrumentId = reading.instrument
  for (const id of instrumentIds) {
    if (!offered.includes(id)) continue
    // A steel rule spans no corridor.
    if (id === 'steel-rule' && Math.abs(reading.value) > 1) continue
    if (size(id) < size(best) - 1e-12) best = id
  }
  return best
}
