import { useState } from 'preact/hooks'
import type { FactDraft } from '../../../record/facts.ts'
import type { FactLog } from '../../../record/log.ts'
import { settleAnswer, setWord } from '../../../record/operations/answer.ts'
import type { Answer } from '../../../record/survey.ts'
import { AnswerField, type AnswerWord } from '../../components/answer-field.tsx'
import { type HowKnown, HowKnownChips } from './how-known.tsx'
import { answerNow, type Writer } from './writer.ts'

export interface AskedItem {
  item: string
  label: string
  /** Null: free text. */
  words: readonly AnswerWord[] | null
}

type Operation = (log: FactLog, holder: string, item: string, answer: Answer) => FactDraft[]

/** Items that a walk or a zone answers in words; how they are known is asked once, before the first is saved. */
export function AnswerItems(props: {
  writer: Writer
  holder: { id: string; name: string; words: Readonly<Record<string, Answer>> }
  items: readonly AskedItem[]
}) {
  const { writer, holder, items } = props
  const [how, setHow] = useState<HowKnown | null>(null)
  const write = (operation: Operation, item: string, label: string, says: string) => {
    if (!how) {
      writer.say(`Not saved: first say how you know, then answer “${label}” again.`)
      return false
    }
    const answer = answerNow(writer, says, how)
    return writer.write((log) => operation(log, holder.id, item, answer), `${holder.name}, ${label}: ${says}`)
  }
  return (
    <>
      <HowKnownChips chosen={how} choose={setHow} />
      {items.map(({ item, label, words }) => (
        <AnswerField
          key={item}
          label={label}
          words={words}
          answer={holder.words[item]}
          save={(says) => write(setWord, item, label, says)}
          settle={(says) => write(settleAnswer, item, label, says)}
        />
      ))}
    </>
  )
}
