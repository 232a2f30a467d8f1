import type { FactDraft } from '../../../record/facts.ts'
import type { FactLog } from '../../../record/log.ts'
import type { Answer } from '../../../record/survey.ts'
import type { Session } from '../../state/session.ts'

/** What the parts of the venue page write with. */
export interface Writer {
  session: Session
  /** Says "Saved: <label>" once the facts are durable; false: not saved, and it is said what to do. */
  write(make: (log: FactLog) => FactDraft[], label: string): Promise<boolean>
  /** Says something that saved nothing. */
  say(text: string): void
}

/** An answer by this person, now. */
export function answerNow({ session }: Writer, says: string, how: Answer['how'], more: Partial<Answer> = {}): Answer {
  return { says, how, person: session.person.value, time: new Date().toISOString(), ...more }
}
