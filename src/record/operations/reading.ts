import * as v from 'valibot'
import type { FactDraft } from '../facts.ts'
import type { FactLog } from '../log.ts'
import { type Reading, reading as readingSchema } from '../survey.ts'
import { create, set } from './draft.ts'

/**
 * Adds a reading of one quantity to a segment, feature, turn or observation. Its id is the caller's and must be new: a
 * reading is never overwritten. A value that is no number breaks a promise: throws.
 */
export function addReading(log: FactLog, holder: string, quantity: string, reading: Reading): FactDraft[] {
  const read = v.safeParse(readingSchema, reading)
  if (!read.success) throw new Error(`record/no-reading: ${read.issues.map((issue) => issue.message).join('; ')}`)
  return [
    ...create(log, reading.id, holder, `readings/${quantity}`, {}),
    { entity: reading.id, field: 'reading', value: reading, replaces: [] },
  ]
}

/** Why and by whom a reading takes the place of others. */
export type Settles = NonNullable<Reading['settles']>

/** A new reading in place of older ones, by a named person's act with a reason. The older ones stay in the file. */
export function amendReading(
  log: FactLog,
  holder: string,
  quantity: string,
  reading: Reading,
  settles: Settles,
): FactDraft[] {
  return addReading(log, holder, quantity, { ...reading, settles })
}

/** "Take the safe side": the reading counts at its unsafe end alone. */
export function takeSafeSide(log: FactLog, reading: string): FactDraft[] {
  return [set(log, reading, 'safeSide', true)]
}
