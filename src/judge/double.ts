import type { Walk } from '../record/survey.ts'
import type { PairCheck } from './checks/pair-check.ts'
import type { RoomSolver } from './rooms.ts'
import { type Judged, judgeSite, ownPair, verdictAt } from './segment.ts'
import type { Setting } from './setting.ts'
import { siteOf } from './site.ts'
import { verdictRank } from './worst.ts'

/** A segment judged wet and dry where wet applies, and what it holds under. */
export interface Standing {
  judged: Judged
  /** "dry floor only", where only the dry judgement stands. */
  dryOnly: boolean
}

export const dryFloorOnly = 'dry floor only'

/** The wet judgement where it stands; else the dry one where that stands, with its condition; else the wet one. */
export function judgeSegment(
  setting: Setting,
  walk: Walk,
  index: number,
  rooms: RoomSolver,
  nominal?: readonly PairCheck[],
): Standing {
  const wet = judgeSite(siteOf(setting, walk, index, true), rooms, nominal)
  if (!wet.site.wetApplies || holdsUp(wet)) return { judged: wet, dryOnly: false }
  const dry = judgeSite(siteOf(setting, walk, index, false), rooms, nominal)
  if (holdsUp(dry)) return { judged: dry, dryOnly: true }
  // Against a place counts only a wet floor that somebody spoke of.
  return { judged: wet.site.wetSaid ? wet : dry, dryOnly: false }
}

function holdsUp(judged: Judged): boolean {
  return verdictRank(verdictAt(judged, ownPair(judged))) <= verdictRank('with-help')
}
