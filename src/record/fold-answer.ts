import * as v from 'valibot'
import { type Fact, undated } from './facts.ts'
import { type Answer, answer as answerSchema } from './survey.ts'

/** Who said or read it and when: the fact's, where the value does not name them. */
export function signed<T extends { person?: string; time?: string }>(value: T, fact: Fact): T {
  const { person, clock } = fact
  const named = value.person !== undefined || person === undefined
  const dated = value.time !== undefined || clock === undated || clock[10] !== 'T'
  if (named && dated) return value
  const full = { ...value }
  if (!named) full.person = person
  if (!dated) full.time = clock
  return full
}

export interface FoldedAnswer {
  /** Null: nobody answers, or the answer was taken back. */
  answer: Answer | null
  refused: { expected: string; found: string } | null
}

/**
 * One item's answer from its heads: the first stands, the others are its rivals; which is worse is for the judge to say.
 * An answer that says the same, got the same way, agrees and is no rival. Who said it and when are the fact's where the
 * answer does not name them.
 */
export function foldAnswer(heads: readonly Fact[]): FoldedAnswer {
  const said: Answer[] = []
  let refused: FoldedAnswer['refused'] = null
  for (const head of heads) {
    if (head.value === null) continue
    const read = v.safeParse(answerSchema, head.value)
    if (read.success) said.push(signed(head.value as Answer, head))
    else refused = { expected: read.issues[0].expected ?? 'an answer', found: read.issues[0].received }
  }
  const [first, ...others] = said
  if (!first) return { answer: null, refused }
  const rivals = others.filter((other) => other.says !== first.says || other.how !== first.how)
  return {
    answer: rivals.length === 0 ? first : { ...first, rivals: rivals.map(asRival) },
    refused,
  }
}

function asRival({ says, how, person }: Answer): { says: string; how: Answer['how']; person?: string } {
  return { says, how, ...(person === undefined ? {} : { person }) }
}
