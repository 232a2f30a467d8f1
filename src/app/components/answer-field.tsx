import type { Answer } from '../../record/survey.ts'
import { dayWords } from './day-words.ts'
import { SelectField } from './field.tsx'
import { Rivals } from './rivals.tsx'
import { SavedText } from './saved-text.tsx'

export interface AnswerWord {
  value: string
  label: string
}

/** One item answered in words: a choice of `words`, or free text where there are none. Says who answered, how and when. */
export function AnswerField(props: {
  label: string
  words: readonly AnswerWord[] | null
  answer: Answer | undefined
  /** False: not saved. */
  save(says: string): boolean | Promise<boolean>
  /** This answer takes the place of everybody's. */
  settle(says: string): boolean | Promise<boolean>
}) {
  const { answer, words } = props
  const hint = answer ? [howWords[answer.how], answer.role, answer.person, answer.time && dayWords(answer.time)] : []
  const told = hint.filter((one) => one).join(', ')
  return (
    <div>
      {words ? (
        <SelectField
          label={props.label}
          {...(told ? { hint: told } : {})}
          value={answer?.says ?? ''}
          change={(says) => says !== '' && void props.save(says)}
          choices={withOwn(words, answer)}
          open="Not answered"
        />
      ) : (
        <SavedText
          label={props.label}
          {...(told ? { hint: told } : {})}
          value={answer?.says ?? ''}
          save={(says) => says.trim() !== '' && props.save(says.trim())}
        />
      )}
      {answer && <Rivals answer={answer} wordOf={(says) => wordOf(says, words)} settle={props.settle} />}
    </div>
  )
}

function wordOf(says: string, words: readonly AnswerWord[] | null): string {
  return words?.find((one) => one.value === says)?.label ?? says
}

/** What stands is always among the choices, known or not. */
function withOwn(words: readonly AnswerWord[], answer: Answer | undefined): readonly AnswerWord[] {
  return !answer || words.some((one) => one.value === answer.says)
    ? words
    : [...words, { value: answer.says, label: answer.says }]
}

export const howWords: Record<Answer['how'], string> = {
  measured: 'measured',
  swept: 'looked at',
  told: 'told',
  'by-eye': 'by eye',
  inherited: 'as before',
}
