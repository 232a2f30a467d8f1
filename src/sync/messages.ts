import type { Fact } from '../record/facts.ts'

/** What phone and office say to one another. Both sides keep and pass on what they do not know. */

/** The versions of this exchange that this program speaks. */
export const spoken = { least: 1, greatest: 1 } as const

/** Most facts, and most characters of them as JSON, in one message either way: a cut costs one page at most. */
export const page = { facts: 1000, characters: 1_000_000 } as const

/** Largest body the office takes, in bytes, as sent and after unpacking. */
export const largestBody = 4 * 1024 * 1024
export const largestPhoto = 8 * 1024 * 1024

/** Device to the highest of its numbers up to which nothing is missing. */
export type Have = Record<string, number>

export interface SyncRequest {
  protocol: number
  have: Have
  facts: readonly Fact[]
}

export interface SyncReply {
  /** What the office holds now, durable. */
  ack: Have
  /** More waits at the office beyond `facts`. */
  more: boolean
  facts: Fact[]
  /** When the office stored it, by its clock, ISO. */
  at: string
}

/** What the office says before anybody signs in. */
export interface Hello {
  office: 'tautline'
  version: string
  protocol: { least: number; greatest: number }
}

export interface EnrolRequest {
  code: string
  /** What the list of devices calls it: "Ana's phone". */
  label: string
  /** The phone's id in facts. */
  record: string
}

export interface EnrolReply {
  token: string
  account: { id: string; name: string; role: Role }
  branch: string
}

export const roles = ['surveyor', 'reviewer', 'administrator'] as const
export type Role = (typeof roles)[number]

/** A refusal, in words for the screen. `error` is stable. */
export interface OfficeRefusal {
  error: string
  what: string
  whatToDo: string
  /** For `gap`: the device, and the number that the office waits for. For `fork`: the number that two phones wrote. */
  device?: string
  next?: number
}

/** The version both speak; null with who has to be renewed. */
export function agree(
  own: { least: number; greatest: number },
  theirs: { least: number; greatest: number },
): { protocol: number } | { protocol: null; older: 'own' | 'theirs' } {
  const protocol = Math.min(own.greatest, theirs.greatest)
  if (protocol >= own.least && protocol >= theirs.least) return { protocol }
  return { protocol: null, older: own.greatest < theirs.least ? 'own' : 'theirs' }
}

/** The first of the facts that fit one message; always one at least. They must stand by device and number. */
export function firstPage(facts: readonly Fact[], most: { facts: number; characters: number } = page): Fact[] {
  let characters = 0
  const taken: Fact[] = []
  for (const fact of facts) {
    characters += JSON.stringify(fact).length
    if (taken.length > 0 && (taken.length >= most.facts || characters > most.characters)) break
    taken.push(fact)
  }
  return taken
}

/** Devices under which the office itself writes (settlements, signatures). Their facts only ever come from the office. */
export function isOfficeDevice(device: string): boolean {
  return device.startsWith('@office-')
}

/** How far `have` goes for a device; 0: not at all. */
export function numberIn(have: Have, device: string): number {
  return Object.hasOwn(have, device) ? (have[device] as number) : 0
}

/** What remains of `facts` once `held` holds them: those the office still needs, by device and number. */
export function missingFrom(held: Have, facts: readonly Fact[]): Fact[] {
  return facts
    .filter((fact) => !isOfficeDevice(fact.device) && fact.n > numberIn(held, fact.device))
    .sort((a, b) => (a.device === b.device ? a.n - b.n : a.device < b.device ? -1 : 1))
}
