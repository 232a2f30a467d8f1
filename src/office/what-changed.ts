import { allFacts, currentValue, type FactLog } from '../record/log.ts'
import { type Have, numberIn } from '../sync/messages.ts'

/** What came in since `have`, in a few words: how many entries, and on which named parts. */
export function whatChanged(log: FactLog, have: Have): string {
  const added = allFacts(log).filter((fact) => fact.n > numberIn(have, fact.device) && !fact.field.startsWith('state/'))
  const names = new Set(added.map((fact) => nameOf(log, fact.entity)).filter((name) => name !== ''))
  const shown = [...names].sort().slice(0, 12)
  const rest = names.size - shown.length
  const where = shown.length > 0 ? `: ${shown.join(', ')}${rest > 0 ? ` and ${rest} more` : ''}` : ''
  return `${added.length} ${added.length === 1 ? 'entry' : 'entries'} since${where}`
}

/** The name of the entity, or of the nearest named thing it stands in. */
function nameOf(log: FactLog, entity: string): string {
  let at: string | undefined = entity
  for (let depth = 0; at !== undefined && depth < 20; depth++) {
    const name = currentValue(log, at, 'name')
    if (typeof name === 'string' && name !== '') return name
    at = log.places.of.get(at)?.parent
  }
  return ''
}
