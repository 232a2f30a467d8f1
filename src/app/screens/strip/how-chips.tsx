import type { Answer } from '../../../record/survey.ts'
import { Chips } from '../../components/strip/chips.tsx'

export type How = Extract<Answer['how'], 'swept' | 'told' | 'by-eye'>

/** Told and by eye may lower a verdict, never lift it. */
export function HowChips(props: { how: How; choose(how: How): void }) {
  return (
    <Chips
      legend="How do you know"
      choices={[
        { value: 'swept', label: 'I went and looked' },
        { value: 'told', label: 'Told by someone' },
        { value: 'by-eye', label: 'By eye from afar' },
      ]}
      chosen={props.how}
      choose={(how) => props.choose(how as How)}
    />
  )
}
