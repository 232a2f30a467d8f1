import type { Fact } from '../../src/record/facts.ts'
import { allFacts, type FactLog, mergeFacts, seenBy } from '../../src/record/log.ts'
import type { Fetch } from '../../src/sync/line.ts'
import type { PhoneStore } from '../../src/sync/phone-store.ts'

/** A phone's store in memory, over the record's own log. */
export function storeOf(log: FactLog): PhoneStore {
  const notes = new Map<string, string>()
  return {
    seen: async () => seenBy(log),
    factsAfter: async (_survey, have) => allFacts(log).filter((one: Fact) => one.n > (have.get(one.device) ?? 0)),
    async takeIn(facts) {
      const { refused } = mergeFacts(log, facts)
      const first = refused[0]
      return first ? { saved: false, what: JSON.stringify(first), whatToDo: first.whatToDo } : { saved: true }
    },
    readPhoto: async () => null,
    recall: async (key) => JSON.parse(notes.get(key) ?? 'null') as unknown,
    remember: async (key, value) => void notes.set(key, JSON.stringify(value)),
  }
}

/** What a bad network does to one request. */
export type Mishap = 'none' | 'lost' | 'answer-lost' | 'answer-cut' | 'twice' | 'late'

/**
 * The line through a bad network. A late request is given up by the phone and arrives at the office later, when `late` is
 * worked off: out of order, after newer ones.
 */
export function badLine(mishap: () => Mishap, late: (() => Promise<void>)[]): Fetch {
  return async (address, init) => {
    const send = () => fetch(address, init as RequestInit)
    const now = mishap()
    if (now === 'lost') throw new Error('lost on the way')
    if (now === 'late') {
      late.push(async () => {
        await (await send()).text()
      })
      throw new Error('given up')
    }
    if (now === 'twice') await (await send()).text()
    const reply = await send()
    if (now === 'answer-lost') {
      await reply.text()
      throw new Error('cut before the answer')
    }
    const text = await reply.text()
    return { status: reply.status, text: async () => (now === 'answer-cut' ? text.slice(0, text.length / 2) : text) }
  }
}
