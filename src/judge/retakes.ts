import { kind } from '../catalogue/kinds.ts'
import { type InstrumentId, instrument, instrumentIds } from '../record/instruments.ts'
import { uncertainty } from '../record/interval.ts'
import type { Reading, Walk } from '../record/survey.ts'
import { limit } from '../standards/packs.ts'
import { aspectHarm } from './answered.ts'
import { type At, decideAt } from './decide-at.ts'
import { judgeSegment, type Standing } from './double.ts'
import { type Harm, harms, type Retake } from './result.ts'
import type { RoomSolver } from './rooms.ts'
import { ownPair } from './segment.ts'
import type { Setting } from './setting.ts'
import { featuresOf, nameOf } from './site.ts'

/** A reading that a segment's judgement looks at. */
interface Used {
  reading: Reading
  quantity: string
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
 * that the reading does not enter is already solved. A reading whose checks all pass and do not govern is skipped: a
 * narrower reading leaves each of them no less room (see `cannotMatter`). Estimated, told and disputed ones are named
 * whatever they decide.
 */
export function retakesOf(
  setting: Setting,
  walk: Walk,
  index: number,
  standing: Standing,
  rooms: RoomSolver,
): Retake[] {
  const at = decideAt(standing.judged, ownPair(standing.judged))
  const now = outcome(standing, at)
  const found: Retake[] = []
  for (const one of usedBy(standing, index, walk, at)) {
    const why = [...known(one), ...(cannotMatter(one, standing, at, setting) ? [] : changes(one, now))]
    if (why.length === 0) continue
    found.push({
      reading: one.reading.id,
      why: `${one.what}: ${why.join('; ')}.`,
      instrument: finer(one.reading, one.tools),
      harm: one.harm,
    })
  }
  return found.sort((a, b) => harms.indexOf(a.harm ?? 'comfort') - harms.indexOf(b.harm ?? 'comfort'))

  function changes({ reading }: Used, nominal: Outcome): Set<string> {
    const found = new Set<string>()
    const u = spread(reading, setting)
    // On a slope a narrower gradient changes the separations: nothing carries over.
    const carried = standing.judged.site.slope.from.length > 0 ? undefined : standing.judged.pairs
    for (const end of u === 0 ? [] : [reading.value - u, reading.value + u]) {
      const pins = new Map([...(setting.pins ?? []), [reading.id, end]])
      const then = outcome(judgeSegment({ ...setting, pins }, walk, index, rooms, carried))
      if (then.verdict !== nominal.verdict)
        found.add(`${then.verdict.replaceAll('-', ' ')} at one end of what it may be`)
      else if (then.governing !== nominal.governing) found.add('another check governs at one end of what it may be')
      else if (then.leash !== nominal.leash) found.add('another leash length at one end of what it may be')
    }
    return found
  }
}

/** What is known of a reading whatever it decides. */
function known({ reading, disputed }: Used): string[] {
  const why: string[] = []
  if (disputed) why.push('readings differ')
  if (reading.instrument === 'told') why.push('told')
  if (['by-eye', 'paces', 'plan'].includes(reading.instrument)) why.push('estimated')
  return why
}

function spread(reading: Reading, setting: Setting): number {
  return reading.safeSide ? 0 : uncertainty(reading, setting.view.instruments)
}

/** Checks that go by the unsafe end of their readings alone: no limit of a code pack, compared at the reading itself. */
const byTheirEnds = new Set([
  'straight-width',
  'turn',
  'stop',
  'stop-at-edge',
  'door-time',
  'lift-time',
  'lift-fit',
  'slip',
  'traction',
  'noise',
])

/**
 * True where the reading enters only checks that pass, at every length and pace, and none of which governs: then every
 * r_high can only fall and no state can change. Overhead counts too while the whole reading clears the pack's headroom.
 */
function cannotMatter({ reading, quantity }: Used, { judged }: Standing, at: At, setting: Setting): boolean {
  const entered = at.findings.filter(
    (one) => one.readings.includes(reading.id) || (quantity === 'length' && one.id === 'turn'),
  )
  const clearOfPack = (id: string) =>
    id === 'overhead' && reading.value - spread(reading, setting) >= limit(setting.pack, 'headroom').value
  return entered.every(
    (one) =>
      one.state === 'passes' &&
      one !== at.governing &&
      !one.differs &&
      (byTheirEnds.has(one.id) || clearOfPack(one.id)) &&
      judged.pairs.every(
        (pair) =>
          pair.id !== one.id ||
          pair.feature !== one.feature ||
          judged.grid.pairs.every(({ leash, pace }) => pair.cell(leash, pace).state === 'passes'),
      ),
  )
}

interface Outcome {
  verdict: string
  governing: string | null
  leash: number | null
}

/** By itself, at its own best length and pace. */
function outcome({ judged, dryOnly }: Standing, at: At = decideAt(judged, ownPair(judged))): Outcome {
  const { decided, governing } = at
  return {
    verdict: dryOnly ? `${decided.verdict}, dry floor only` : decided.verdict,
    governing: governing ? `${governing.id} ${governing.feature}` : null,
    leash: judged.choice?.recommended ?? null,
  }
}

function usedBy({ judged }: Standing, index: number, walk: Walk, at: At): Used[] {
  const { site } = judged
  const found: Used[] = []
  const differing = new Set(at.findings.filter((one) => one.differs).flatMap((one) => [...one.readings]))
  const add = (
    readings: readonly Reading[] | undefined,
    quantity: string,
    what: string,
    harm: Harm,
    tools: readonly string[],
  ) => {
    const settled = new Set((readings ?? []).flatMap((one) => one.settles?.readings ?? []))
    for (const reading of readings ?? [])
      if (!settled.has(reading.id))
        found.push({ reading, quantity, what, harm, tools, disputed: differing.has(reading.id) })
  }
  for (const [quantity, readings] of Object.entries(site.segment.readings)) {
    const harm = quantity === 'pendulum' ? 'fall' : (aspectHarm[quantity as 'width'] ?? 'comfort')
    add(readings, quantity, `${site.segment.name}, ${quantity}`, harm, quantity === 'overhead' ? ['rod', 'laser'] : [])
  }
  for (const feature of featuresOf(site)) {
    const row = kind(feature.kind)
    for (const [quantity, readings] of Object.entries(feature.readings)) {
      const attribute = row?.attributes.find((one) => one.id === quantity)
      const tools = attribute?.type === 'quantity' ? attribute.instruments : []
      add(readings, quantity, `${nameOf(feature)}, ${attribute?.name ?? quantity}`, row?.harm ?? 'comfort', tools)
    }
  }
  if (site.segment.turn && site.segment.turn.readings.widthAfter === undefined)
    add(walk.segments[index + 1]?.readings.width, 'width', `${walk.segments[index + 1]?.name}, width`, 'trap', [])
  for (const one of site.zone?.observations ?? [])
    add(one.readings.noise, 'noise', `${site.zone?.name}, noise`, 'comfort', ['sound-meter'])
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
