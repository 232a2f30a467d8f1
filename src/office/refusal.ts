import type { OfficeRefusal } from '../sync/messages.ts'

/** What the office will not do, in words for the screen. Thrown, so that a transaction under way is rolled back. */
export class Refusal extends Error {
  readonly status: number
  readonly body: OfficeRefusal

  constructor(status: number, error: string, what: string, whatToDo: string, more: Partial<OfficeRefusal> = {}) {
    super(`${error}: ${what}`)
    this.status = status
    this.body = { error, what, whatToDo, ...more }
  }
}

export function notFound(what: string): Refusal {
  return new Refusal(404, 'not-found', `${what} is not at this office.`, 'Check the address, or ask an administrator.')
}
