import type { Answer } from '../../../record/survey.ts'
import { Chips } from '../../components/strip/chips.tsx'

export type How = Extract<Answer['how'], 'swept' | 'told' | 'by-eye'>

const choices: readonly { value: How; label: string }[] = [
  { value: 'swept', label: 'I went and looked' },
  { value: 'told', label: 'Told by someone' },
  { value: 'by-eye', label: 'By eye from afar' },
]

/** How an answer in words was got; folded away. Told and by eye may lower a verdict, never lift it. */
export function HowChips(props: { how: How; choose(how: How): void }) {
  return (
    <details>
      <summary>How do you know? {choices.find((one) => one.value === props.how)?.label}</summary>
      <Chips legend="How do you know" choices={choices} chosen={props.how} choose={(how) => props.choose(how as How)} />
    </details>
  )
}
