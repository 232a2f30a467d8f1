import { type Answer, ask, type Line } from './line.ts'

/** A venue that the office holds. */
export interface OfficeVenue {
  survey: string
  name: string
  /** When an entry last came to the office, ISO. */
  changed_at: string
}

/** The first hundred of the office's venues by name, or of those whose name has `name` in it. */
export async function officeVenues(line: Line, name: string): Promise<Answer<OfficeVenue[]>> {
  const filter = name.trim() === '' ? '' : `?name=${encodeURIComponent(name.trim())}`
  const answer = await ask<{ surveys: OfficeVenue[] }>(line, 'GET', `/api/surveys${filter}`)
  return answer.ok ? { ok: true, body: answer.body.surveys } : answer
}
