import { type Database, openWriting } from './database.ts'
import { type Trouble, troubleOf } from './trouble.ts'

/**
 * What this phone knows of its office: its enrolment, and how far each survey has come. Never part of a back-up: a token is
 * one phone's own, and what the office holds is asked anew.
 */
export async function recall(database: Database, key: string): Promise<unknown> {
  return (await database.get('office', key)) ?? null
}

/** Keeps a note; null forgets it. */
export async function remember(database: Database, key: string, value: unknown): Promise<{ saved: true } | Trouble> {
  try {
    const tx = openWriting(database, ['office'])
    const office = tx.objectStore('office')
    await (value === null ? office.delete(key) : office.put(value, key))
    await tx.done
    return { saved: true }
  } catch (error) {
    return troubleOf(error)
  }
}

/** Forgets the office: the next one is told everything anew. */
export async function forgetOffice(database: Database): Promise<void> {
  await database.clear('office')
}
