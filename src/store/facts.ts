import type { Fact, FactDraft } from '../record/facts.ts'
import { sameJson } from '../record/json.ts'
import { assertDrafts, stampDraft } from '../record/log.ts'
import { root } from '../record/placement.ts'
import { type Database, keysUnder, openWriting, type Writing } from './database.ts'
import { type Trouble, troubleOf } from './trouble.ts'

export type Saved = { saved: true; facts: Fact[]; at: string } | Trouble

export type TakenIn =
  | { saved: true; added: Fact[] }
  /** A gap in a device's numbers or another content under a number already here: nothing was taken in. */
  | Trouble

/**
 * Keeps drafts as facts of this device. One strict transaction hands out the numbers and writes the facts, so that two tabs
 * never share a number; resolves after its complete event. Nothing of a draft set is kept unless all of it is.
 */
export async function appendFacts(
  database: Database,
  survey: string,
  drafts: readonly FactDraft[],
  stamp: { device: string; person: string },
): Promise<Saved> {
  assertDrafts(drafts)
  const clock = new Date().toISOString()
  return writing(database, async (tx) => {
    const mark = await tx.objectStore('marks').get([survey, stamp.device])
    const first = (mark?.n ?? 0) + 1
    const facts = drafts.map((draft, i) => stampDraft(survey, draft, { ...stamp, clock }, first + i))
    await writeFacts(tx, facts, clock)
    return { saved: true as const, facts, at: clock }
  })
}

/**
 * Keeps facts made elsewhere (a file, another phone, a back-up) in one transaction: all of them or none. Those that are
 * here already are passed over.
 */
export async function takeInFacts(database: Database, facts: readonly Fact[]): Promise<TakenIn> {
  return writing(database, async (tx) => {
    const added = await newFacts(tx, facts)
    if ('saved' in added) return added
    await writeFacts(tx, added, new Date().toISOString())
    return { saved: true as const, added }
  })
}

/** The facts of a survey that `have` (device to its highest number) does not cover, by device and number. */
export async function factsAfter(
  database: Database,
  survey: string,
  have: ReadonlyMap<string, number>,
): Promise<Fact[]> {
  const tx = database.transaction(['marks', 'facts'])
  const marks = await tx.objectStore('marks').getAll(keysUnder(survey))
  const parts = await Promise.all(
    marks
      .filter(({ device, n }) => n > (have.get(device) ?? 0))
      .map(({ device }) =>
        tx
          .objectStore('facts')
          .getAll(IDBKeyRange.bound([survey, device, (have.get(device) ?? 0) + 1], [survey, device, []])),
      ),
  )
  return parts.flat()
}

/** How far each device of a survey is held. */
export async function seenOf(database: Database, survey: string): Promise<[device: string, n: number][]> {
  const marks = await database.getAll('marks', keysUnder(survey))
  return marks.map(({ device, n }) => [device, n])
}

/** Those of the facts that are not here yet, by device and number; trouble where one does not follow on. */
export async function newFacts(tx: Writing, facts: readonly Fact[]): Promise<Fact[] | Trouble> {
  const sorted = [...facts].sort((a, b) => a.n - b.n)
  const next = new Map<string, number>()
  const added = new Map<string, Fact>()
  for (const fact of sorted) {
    const line = JSON.stringify([fact.survey, fact.device])
    const n = next.get(line) ?? ((await tx.objectStore('marks').get([fact.survey, fact.device]))?.n ?? 0) + 1
    next.set(line, n)
    if (fact.n > n) return doesNotFollow(fact, `number ${n} is missing before it`)
    if (fact.n === n) {
      next.set(line, n + 1)
      added.set(`${line}${fact.n}`, fact)
      continue
    }
    const same =
      added.get(`${line}${fact.n}`) ?? (await tx.objectStore('facts').get([fact.survey, fact.device, fact.n]))
    if (!sameJson(same, fact)) return doesNotFollow(fact, 'this phone holds another entry under that number')
  }
  return [...added.values()]
}

export async function writeFacts(tx: Writing, facts: readonly Fact[], changed: string): Promise<void> {
  const marks = new Map<string, { survey: string; device: string; n: number }>()
  const names = new Map<string, string>()
  const puts: Promise<unknown>[] = []
  for (const fact of facts) {
    // `add`, not `put`: a number that is taken fails the transaction instead of overwriting.
    puts.push(tx.objectStore('facts').add(fact))
    marks.set(JSON.stringify([fact.survey, fact.device]), { survey: fact.survey, device: fact.device, n: fact.n })
    const isName = fact.entity === root && fact.field === 'name' && typeof fact.value === 'string'
    names.set(fact.survey, isName ? (fact.value as string) : (names.get(fact.survey) ?? ''))
  }
  for (const mark of marks.values()) puts.push(tx.objectStore('marks').put(mark))
  await Promise.all(puts)
  for (const [survey, name] of names) {
    const row = await tx.objectStore('surveys').get(survey)
    await tx.objectStore('surveys').put({ survey, name: name === '' ? (row?.name ?? '') : name, changed })
  }
}

async function writing<T>(database: Database, work: (tx: Writing) => Promise<T | Trouble>): Promise<T | Trouble> {
  let tx: Writing | undefined
  try {
    tx = openWriting(database, ['facts', 'marks', 'surveys'])
    const result = await work(tx)
    await tx.done
    return result
  } catch (error) {
    // The transaction's own error tells why its requests failed.
    return troubleOf(tx?.error ?? error)
  }
}

function doesNotFollow(fact: Fact, why: string): Trouble {
  return {
    saved: false,
    what: `Not taken in: entry ${fact.n} of ${fact.device} does not follow on; ${why}.`,
    whatToDo: 'Ask for the whole survey again from the phone that wrote it.',
  }
}
