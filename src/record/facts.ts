/**
 * The survey record is an append-only log of facts. A fact is never rewritten: a field's heads are the facts that
 * nobody has replaced; one head is the value, several are rivals, both kept until a fact replaces both.
 */
export interface Fact {
  survey: string
  device: string
  /** 1, 2, 3 ... without a gap for each device. */
  n: number
  /** ISO time by the device's clock: breaks ties and sorts, never decides a conflict. */
  clock: string
  /** Who entered it. */
  person?: string
  entity: string
  field: string
  /** Any JSON value. */
  value: unknown
  /** Ids of the facts whose value this one takes the place of. */
  replaces: FactId[]
}

/** `device:n` */
export type FactId = string

/** A fact before the store has given it its device, number and clock. */
export interface FactDraft {
  entity: string
  field: string
  value: unknown
  replaces: FactId[]
}

export function factId(fact: Pick<Fact, 'device' | 'n'>): FactId {
  return `${fact.device}:${fact.n}`
}

/** The clock of facts made from a file that names no time: nothing is dated by it. */
export const undated = '1970-01-01T00:00:00.000Z'
