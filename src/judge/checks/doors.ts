import { kind } from '../../catalogue/kinds.ts'
import type { Feature } from '../../record/survey.ts'

/** How a door is judged. */
export interface DoorWays {
  /** Somebody has to open it by hand. */
  manual: boolean
  /** Found held open and of fire rating: judged shut as well. */
  judgedShut: boolean
  /** Nothing moves it while a team passes. */
  noLimit: boolean
  /** A person holds it, or both pairs of a lobby, lest they close on a team between them: that person is help. */
  person: boolean
}

export function doorWays(feature: Feature): DoorWays {
  const kept = feature.words.keptOpen?.says
  const fire = feature.words.fire?.says === 'yes'
  const row = kind(feature.kind)
  const stop = kept === 'stop'
  const noLimit = (stop && !fire) || kept === 'stays' || feature.words.staysOpen?.says === 'yes'
  return {
    manual: row?.feeds.includes('door-force') === true && !(stop && !fire),
    judgedShut: stop && fire,
    noLimit,
    person: kept === 'person' || (isLobby(feature) && !noLimit),
  }
}

function isLobby({ readings: { pairs = [], lobbyLength = [] } }: Feature): boolean {
  return lobbyLength.length > 0 || pairs.some((one) => one.value > 1 || one.bound === 'above')
}

/** Doors and gates of the catalogue that close in time, lifts apart. */
export function isTimed(feature: Feature): boolean {
  return kind(feature.kind)?.feeds.includes('door-time') === true
}
