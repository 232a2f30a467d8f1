import { type Exchanged, type ExchangeProgress, exchangeSurvey } from './exchange.ts'
import type { Line } from './line.ts'
import type { PhoneStore } from './phone-store.ts'
import { type PhotosSent, photosNamed, sendPhotos } from './photos.ts'

/** The phone's side of the exchange: what the app's Sync screen and its background work come in by. */
export { enrol, signOut } from './enrol.ts'
export { type Exchanged, exchangeSurvey } from './exchange.ts'
export type { Line } from './line.ts'
export type { Role } from './messages.ts'
export { type OfficeVenue, officeVenues } from './office-venues.ts'
export type { PhoneStore } from './phone-store.ts'
export { startRetrying } from './retry.ts'
export { saysWhere, type Whereabouts, whereabouts } from './whereabouts.ts'
export { photosNamed }

export interface SurveySynced {
  survey: string
  entries: Exchanged
  /** Null where the entries did not get through: photos follow their entries. */
  photos: PhotosSent | null
}

/** How far one survey has come: its entries, then its photos. */
export type Progress =
  | ({ doing: 'entries' } & ExchangeProgress)
  | { doing: 'photos'; survey: string; done: number; total: number }

/**
 * Exchanges every survey given, entries first, then photos. Stops early where the office does not answer or has signed this
 * phone out: the rest would fare the same.
 */
export async function syncAll(
  line: Line,
  store: PhoneStore,
  surveys: readonly string[],
  now: () => string,
  tell: (progress: Progress) => void = () => undefined,
): Promise<SurveySynced[]> {
  const results: SurveySynced[] = []
  for (const survey of surveys) {
    const entries = await exchangeSurvey(line, store, survey, now, (progress) =>
      tell({ doing: 'entries', ...progress }),
    )
    const photos = entries.ok
      ? await sendPhotos(line, store, survey, (done, total) => tell({ doing: 'photos', survey, done, total }))
      : null
    results.push({ survey, entries, photos })
    if (!entries.ok && (entries.kind === 'later' || entries.kind === 'signed-out')) break
  }
  return results
}
