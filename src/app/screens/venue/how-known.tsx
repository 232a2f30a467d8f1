import type { Answer } from '../../../record/survey.ts'
import { Chips } from '../../components/strip/chips.tsx'

export type HowKnown = Extract<Answer['how'], 'swept' | 'told'>

/** Asked before the first answer of a form, never guessed: a told answer counts for less. */
export function HowKnownChips(props: { chosen: HowKnown | null; choose(how: HowKnown): void }) {
  return (
    <Chips
      legend="How do you know?"
      choices={[
        { value: 'swept', label: 'Looked myself' },
        { value: 'told', label: 'Somebody told me' },
      ]}
      chosen={props.chosen}
      choose={(how) => props.choose(how as HowKnown)}
    />
  )
}
