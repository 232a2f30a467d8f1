import type { Fact } from '../record/facts.ts'
import { ask, type Line } from './line.ts'
import type { PhoneStore } from './phone-store.ts'
import { keepNote, readNote } from './whereabouts.ts'

const hash = /^[0-9a-f]{64}$/

/** The photos that a survey's entries name, in the order they are first named. */
export function photosNamed(facts: readonly Fact[]): string[] {
  const named = facts.flatMap(({ field, value }) => {
    if (field.startsWith('photo/')) return [field.slice(6)]
    const { photos } = (typeof value === 'object' && value !== null ? value : {}) as { photos?: unknown }
    return Array.isArray(photos) ? photos : []
  })
  return [...new Set(named)].filter((name): name is string => typeof name === 'string' && hash.test(name))
}

export interface PhotosSent {
  sent: number
  /** Still on this phone only. */
  left: number
  /** The office will not take these: their bytes do not answer to their name, or carry a position. */
  refused: { photo: string; what: string }[]
}

/** Sends the photos of a survey that the office has not taken yet, one after the other; stops at the first without answer. */
export async function sendPhotos(
  line: Line,
  store: PhoneStore,
  survey: string,
  tell: (done: number, total: number) => void = () => undefined,
): Promise<PhotosSent> {
  const kept = new Set((await readNote(store, survey)).photos)
  const waiting = photosNamed(await store.factsAfter(survey, new Map())).filter((photo) => !kept.has(photo))
  const result: PhotosSent = { sent: 0, left: 0, refused: [] }
  for (const [i, photo] of waiting.entries()) {
    tell(i, waiting.length)
    // One that another phone took and has not handed on.
    const bytes = (await store.readPhoto(photo))?.bytes
    if (!bytes) continue
    const answer = await ask(line, 'PUT', `/api/surveys/${encodeURIComponent(survey)}/photos/${photo}`, bytes)
    if (answer.ok) {
      result.sent++
      const note = await readNote(store, survey)
      await keepNote(store, survey, { ...note, photos: [...note.photos, photo] })
    } else if (answer.again || answer.status === 401) return { ...result, left: waiting.length - i }
    else result.refused.push({ photo, what: answer.refusal.what })
  }
  tell(waiting.length, waiting.length)
  return result
}
