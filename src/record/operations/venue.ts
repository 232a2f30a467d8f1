import type * as v from 'valibot'
import type { FactDraft } from '../facts.ts'
import type { FactLog } from '../log.ts'
import { root } from '../placement.ts'
import type { Answer, anchor, Floor, Observation, Place, Reading, SurveyView, Zone } from '../survey.ts'
import type { TeamCard } from '../team-card.ts'
import { setWord } from './answer.ts'
import { create, setKey, setKeys } from './draft.ts'
import { addReading } from './reading.ts'

type VenueFields = Partial<Pick<SurveyView, 'name' | 'contact' | 'hours' | 'note' | 'demo' | 'asOn' | 'instruments'>>

/** The venue's own fields; those not given stay as they are. */
export function nameVenue(log: FactLog, fields: VenueFields): FactDraft[] {
  return setKeys(log, root, fields)
}

/** The whole team card. The caller gives it a new revision. */
export function setTeam(log: FactLog, card: TeamCard): FactDraft[] {
  return [setKey(log, root, 'team', card)]
}

export function setCode(log: FactLog, code: SurveyView['code']): FactDraft[] {
  return [setKey(log, root, 'code', code)]
}

export function setAnchor(log: FactLog, place: v.InferOutput<typeof anchor> | undefined): FactDraft[] {
  return [setKey(log, root, 'anchor', place)]
}

export function addFloor(log: FactLog, { id, ...fields }: Floor): FactDraft[] {
  return create(log, id, root, 'floors', fields)
}

export function addZone(
  log: FactLog,
  { id, ...fields }: Pick<Zone, 'id' | 'name' | 'outdoors' | 'nearOutsideDoor'>,
): FactDraft[] {
  return create(log, id, root, 'zones', fields)
}

export function setZoneField(log: FactLog, zone: string, field: string, value: unknown): FactDraft[] {
  return [setKey(log, zone, field, value)]
}

export function setZoneWord(log: FactLog, zone: string, item: string, answer: Answer): FactDraft[] {
  return setWord(log, zone, item, answer)
}

/** What was found in a zone between two hours: words, and meter values where taken. */
export function observeZone(log: FactLog, zone: string, observation: Observation): FactDraft[] {
  const { id, words, readings, ...fields } = observation
  return [
    ...create(log, id, zone, 'observations', fields),
    ...Object.entries(words).flatMap(([item, answer]) => setWord(log, id, item, answer)),
    ...Object.entries(readings).flatMap(([quantity, taken]) =>
      taken.flatMap((reading: Reading) => addReading(log, id, quantity, reading)),
    ),
  ]
}

export function addPlace(log: FactLog, { id, ...fields }: Place): FactDraft[] {
  return create(log, id, root, 'places', fields)
}

export function setPlaceField(log: FactLog, place: string, field: string, value: unknown): FactDraft[] {
  return [setKey(log, place, field, value)]
}

/** Moves a place on its floor's plan, metres. */
export function movePlace(log: FactLog, place: string, to: { x: number; y: number; floor?: string }): FactDraft[] {
  return setKeys(log, place, to)
}
