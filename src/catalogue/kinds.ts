import { crossings } from './crossings.ts'
import { doors } from './doors.ts'
import { edges } from './edges.ts'
import type { Kind } from './kind.ts'
import { levels } from './levels.ts'
import { overheads } from './overheads.ts'
import { people } from './people.ts'
import { pinches } from './pinches.ts'
import { places } from './places.ts'
import { sensing } from './sensing.ts'
import { surfaces } from './surfaces.ts'
import { surroundings } from './surroundings.ts'
import { turns } from './turns.ts'

/** The feature catalogue, in the order in which kinds are offered. */
export const kinds: readonly Kind[] = [
  ...turns,
  ...pinches,
  ...doors,
  ...levels,
  ...edges,
  ...overheads,
  ...surfaces,
  ...sensing,
  ...crossings,
  ...people,
  ...surroundings,
  ...places,
]

const byId: ReadonlyMap<string, Kind> = new Map(kinds.map((row) => [row.id, row]))

/** The row of a kind, or undefined for one that this catalogue does not know (its feature is then not known). */
export function kind(id: string): Kind | undefined {
  return byId.get(id)
}
