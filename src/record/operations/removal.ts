import type { FactDraft } from '../facts.ts'
import type { FactLog } from '../log.ts'
import { headsOf } from '../log.ts'
import { removalNow } from '../presence.ts'
import { set } from './draft.ts'

/** Takes an entity, and with it all that stands in it, out of view. Nothing is erased: `restore` brings it back. */
export function remove(log: FactLog, entity: string): FactDraft[] {
  return [set(log, entity, 'gone', removalNow(log))]
}

/** Brings a removed entity back; also settles a removal against an edit in the edit's favour. */
export function restore(log: FactLog, entity: string): FactDraft[] {
  return headsOf(log, entity, 'gone').length > 0 ? [set(log, entity, 'gone', false)] : []
}
