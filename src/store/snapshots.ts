import type { Fact } from '../record/facts.ts'
import { allFacts, emptyLog, type FactLog, loadFacts, seenBy } from '../record/log.ts'
import type { Database } from './database.ts'
import { factsAfter } from './facts.ts'

/** A snapshot is made anew once this many facts stand outside it. */
const worthwhile = 400

/** The whole log of a survey: its snapshot, and the facts since. Its facts were checked on their way in. */
export async function openLog(database: Database, survey: string, device: string): Promise<FactLog> {
  const log = emptyLog(survey, device)
  const snapshot = await database.get('snapshots', survey)
  if (snapshot) loadFacts(log, JSON.parse(snapshot.facts) as Fact[])
  const newer = await catchUp(database, log)
  if (newer.length > worthwhile) await keepSnapshot(database, log)
  return log
}

/** Takes into the log what the store holds beyond it (another tab's, another phone's); returns that. */
export async function catchUp(database: Database, log: FactLog): Promise<Fact[]> {
  const { added } = loadFacts(log, await factsAfter(database, log.survey, new Map(seenBy(log))))
  return added
}

async function keepSnapshot(database: Database, log: FactLog): Promise<void> {
  const snapshot = { survey: log.survey, upTo: seenBy(log), facts: JSON.stringify(allFacts(log)) }
  // Only a copy: where there is no room for it, the next opening is slower and nothing else.
  await database.put('snapshots', snapshot).catch(() => undefined)
}
