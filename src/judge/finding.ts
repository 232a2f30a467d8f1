import type { Interval } from '../record/interval.ts'
import type { HelpState } from './help.ts'
import type { Check, CheckState, Harm } from './result.ts'

/** At or under this a ratio passes; to 1 it is tight. */
export const passesTo = 0.85
/** Equal to the eye of arithmetic: a value within a billionth of its limit meets it. */
export const epsilon = 1e-9

export type Ratio = [low: number | null, high: number | null]

/** A check before it is shown: the sentence is made only when somebody reads it. */
export interface Finding extends Omit<Check, 'sentence' | 'readings'> {
  readings: readonly string[]
  /** What is judged, and where: "Width at the lockers". */
  subject: string
  /** "820 mm for 913 mm with clearance". */
  detail: () => string
  /** A reading of it was told or by eye, in an aspect where that never lifts a verdict. */
  told: boolean
  /** Readings of it differ and nobody has settled them. */
  differs: boolean
  /** Help for it was begun but is not complete. */
  begun: boolean
  /** Planned slack pauses. */
  pauses: number
}

/** What a check file hands in; what it leaves out has the plain value. */
export interface Draft {
  id: string
  feature: string
  subject: string
  detail: () => string
  harm: Harm
  source: string
  /** Its state before help is counted. */
  raw: Exclude<CheckState, 'helped'>
  demand?: number | null
  capacity?: number | null
  ratio?: Ratio | null
  caution?: string | null
  at?: Check['at']
  from?: readonly (Interval | null | undefined)[]
  /** The help that may settle it; absent: no help does. */
  help?: HelpState
  /** Told or by-eye readings of it never lift a verdict. */
  strict?: boolean
  /** Told in words. */
  told?: boolean
  pauses?: number
}

/** A draft with help and differing readings counted in. */
export function finding(draft: Draft): Finding {
  const from = (draft.from ?? []).filter((one) => one !== null && one !== undefined)
  const differs = from.some((one) => one.differs)
  const state = settled(draft, differs)
  return {
    id: draft.id,
    feature: draft.feature,
    state,
    caution: draft.caution ?? null,
    demand: finite(draft.demand),
    capacity: finite(draft.capacity),
    ratio: draft.ratio ?? null,
    at: draft.at ?? null,
    source: draft.source,
    readings: from.flatMap((one) => one.ids),
    harm: draft.harm,
    subject: draft.subject,
    detail: draft.detail,
    told: draft.told === true || (draft.strict === true && from.some((one) => one.told || one.tooQuick)),
    differs,
    begun: draft.help === 'begun' && state === 'needs-help',
    pauses: draft.pauses ?? 0,
  }
}

function settled({ raw, help }: Draft, differs: boolean): CheckState {
  if (raw === 'passes' || raw === 'tight') return raw
  if (help === 'complete') return 'helped'
  if (help === 'begun') return 'needs-help'
  // Readings that differ decide nothing against a place either, until they are settled.
  return raw === 'fails' && differs ? 'unsure' : raw
}

function finite(value: number | null | undefined): number | null {
  return value !== null && value !== undefined && Number.isFinite(value) ? value : null
}

/** A check as it is shown. */
export function toCheck({ subject, detail, told, differs, begun, pauses, ...check }: Finding): Check {
  return { ...check, readings: [...check.readings], sentence: `${subject}: ${detail()}.` }
}

/** Demand over capacity at both ends; an end without capacity is null. Infinite capacity leaves 0. */
export function ratioOf(demand: { low: number; high: number }, capacity: { low: number; high: number }): Ratio {
  return [endOf(demand.low, capacity.high), endOf(demand.high, capacity.low)]
}

function endOf(needed: number, there: number): number | null {
  if (there <= 0 || needed === Number.POSITIVE_INFINITY) return null
  return there === Number.POSITIVE_INFINITY ? 0 : Math.max(0, needed / there)
}

/** The state of a ratio: null ends count as above 1. Asked so that no number never passes. */
export function stateOf([low, high]: Ratio): 'passes' | 'tight' | 'unsure' | 'fails' {
  if (low === null || !(low <= 1 + epsilon)) return 'fails'
  if (high === null || !(high <= 1 + epsilon)) return 'unsure'
  return high > passesTo + epsilon ? 'tight' : 'passes'
}

/** The state of a room: metres left a side, null where there is none, against what is needed and the band above it. */
export function roomState(
  room: { low: number | null; high: number | null },
  need: number,
  band: number,
): 'passes' | 'tight' | 'unsure' | 'fails' {
  if (room.high === null || !(room.high >= need - epsilon)) return 'fails'
  if (room.low === null || !(room.low >= need - epsilon)) return 'unsure'
  return room.low < need + band - epsilon ? 'tight' : 'passes'
}

/** r_high for ordering: no capacity is worse than any ratio, no ratio at all is below every one. */
export function high(ratio: Ratio | null): number {
  if (ratio === null) return Number.NEGATIVE_INFINITY
  return ratio[1] ?? Number.POSITIVE_INFINITY
}
