import { iso21542 } from './iso-21542.ts'
import { own } from './own.ts'
import type { CodePack, Limit, LimitId, PackId } from './pack.ts'
import { ukAdmK } from './uk-adm-k.ts'
import { usAda2010 } from './us-ada-2010.ts'

const byId: Readonly<Record<PackId, CodePack>> = {
  'us-ada-2010': usAda2010,
  'uk-adm-k': ukAdmK,
  'iso-21542': iso21542,
  own,
}

/** The code pack of that id; the default is the 2010 ADA Standards. */
export function pack(id: PackId = 'us-ada-2010'): CodePack {
  return byId[id]
}

/** One limit of a pack. A pack without it breaks a promise: throws. */
export function limit(of: CodePack, id: LimitId): Limit {
  const found = of.limits.find((one) => one.id === id)
  if (!found) throw new Error(`standards/no-limit: ${of.id} has no ${id}`)
  return found
}
