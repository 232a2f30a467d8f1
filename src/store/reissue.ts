import { type Fact, factId } from '../record/facts.ts'
import { type Database, openWriting } from './database.ts'
import { type Trouble, troubleOf } from './trouble.ts'

/**
 * A copied phone's way out: what `from` wrote in a survey from number `first` on gets the next numbers of `to` instead, with
 * its words, person and time as they were, so that the other copy's entries under the old numbers can stand beside it. One
 * transaction: all of it or nothing. Logs held in memory are out of date afterwards: load the page again.
 */
export async function reissue(
  database: Database,
  survey: string,
  { from, first, to }: { from: string; first: number; to: string },
): Promise<{ saved: true; facts: number } | Trouble> {
  if (from === to) throw new Error('store/same-device: entries are given to another device')
  try {
    const tx = openWriting(database, ['facts', 'marks', 'snapshots'])
    const [facts, marks] = [tx.objectStore('facts'), tx.objectStore('marks')]
    const range = IDBKeyRange.bound([survey, from, first], [survey, from, []])
    const old = await facts.getAll(range)
    const held = (await marks.get([survey, to]))?.n ?? 0
    const fresh = new Map(old.map((fact, i) => [factId(fact), { ...fact, device: to, n: held + 1 + i } satisfies Fact]))
    await facts.delete(range)
    for (const fact of fresh.values()) {
      const replaces = fact.replaces.map((id) => {
        const moved = fresh.get(id)
        return moved ? factId(moved) : id
      })
      await facts.add({ ...fact, replaces })
    }
    if (old.length > 0) await marks.put({ survey, device: to, n: held + old.length })
    if (first > 1) await marks.put({ survey, device: from, n: first - 1 })
    else await marks.delete([survey, from])
    await tx.objectStore('snapshots').delete(survey)
    await tx.done
    return { saved: true, facts: old.length }
  } catch (error) {
    return troubleOf(error)
  }
}
