import { type Fact, type FactDraft, factId } from '../facts.ts'
import { type FactLog, headsOf } from '../log.ts'
import type { Answer } from '../survey.ts'
import { set } from './draft.ts'

/**
 * Answers one item of a segment, feature, turn, zone, observation or walk. It takes the place of the same person's answer
 * to that item, never of another's: theirs stays beside it as a rival until somebody settles the two. An answer that
 * names nobody takes the place of the only one there is.
 */
export function setWord(log: FactLog, holder: string, item: string, answer: Answer): FactDraft[] {
  const heads = headsOf(log, holder, `word/${item}`)
  const mine = heads.filter((head) => answererOf(head) === answer.person)
  const replaced = answer.person === undefined && heads.length === 1 ? heads : mine
  return [{ entity: holder, field: `word/${item}`, value: bare(answer), replaces: replaced.map(factId) }]
}

/** Settles an item: this answer takes the place of every rival. */
export function settleAnswer(log: FactLog, holder: string, item: string, answer: Answer): FactDraft[] {
  return [set(log, holder, `word/${item}`, bare(answer))]
}

/** Takes an answer back, rivals too: the item is unanswered again. */
export function clearWord(log: FactLog, holder: string, item: string): FactDraft[] {
  return headsOf(log, holder, `word/${item}`).length > 0 ? [set(log, holder, `word/${item}`, null)] : []
}

function bare(answer: Answer): Omit<Answer, 'rivals'> {
  const { rivals: _, ...own } = answer
  return own
}

function answererOf(head: Fact): string | undefined {
  const said = head.value as Partial<Answer> | null
  return said?.person ?? head.person
}
