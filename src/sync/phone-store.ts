import type { Fact } from '../record/facts.ts'

/** What the exchange needs of the phone's store; the app hands it over. */
export interface PhoneStore {
  /** How far this phone holds each device of a survey. */
  seen(survey: string): Promise<readonly (readonly [device: string, n: number])[]>
  factsAfter(survey: string, have: ReadonlyMap<string, number>): Promise<Fact[]>
  /** All of them or none, durable when it resolves. */
  takeIn(facts: readonly Fact[]): Promise<{ saved: true } | { saved: false; what: string; whatToDo: string }>
  readPhoto(id: string): Promise<{ bytes: ArrayBuffer } | null>
  /** A small note kept across restarts; null where there is none. */
  recall(key: string): Promise<unknown>
  remember(key: string, value: unknown): Promise<void>
}
