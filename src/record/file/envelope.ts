import { undated } from '../facts.ts'
import { isReservedKey, sameJson } from '../json.ts'
import { appendDrafts, currentValue, type FactLog } from '../log.ts'

/** The entity that keeps what a file said beside its facts: keys of a later version, passed on unread. */
export const envelope = '@file'

/** Keeps a file's unknown keys as facts, those that are new. */
export function keepEnvelope(log: FactLog, more: Record<string, unknown>): void {
  const drafts = Object.entries(more)
    .filter(([key, value]) => !sameJson(currentValue(log, envelope, key), value))
    .map(([key, value]) => ({ entity: envelope, field: key, value, replaces: [] }))
  if (drafts.length > 0) appendDrafts(log, drafts, { device: log.device, clock: undated })
}

/** The unknown keys of the files this log was read from. */
export function readEnvelope(log: FactLog): Record<string, unknown> {
  const fields = [...(log.entities.get(envelope)?.keys() ?? [])].filter((key) => !isReservedKey(key))
  return Object.fromEntries(fields.map((key) => [key, currentValue(log, envelope, key)]))
}
