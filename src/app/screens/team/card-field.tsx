import { Field, SelectField } from '../../components/field.tsx'
import { choiceWord, nameOf } from './field-names.ts'
import type { CardField } from './schema-fields.ts'

/** One field of the card, as its kind asks for it. */
export function CardFieldInput(props: {
  field: CardField
  text: string
  change(text: string): void
  trouble: string | null
}) {
  const { field, text, change, trouble } = props
  const { label, unit, hint } = nameOf(field.path)
  const shared = { label, trouble, needed: !field.optional, ...(hint ? { hint } : {}) }
  if (field.kind === 'shown') return <ShownField label={label} text={text} change={change} trouble={trouble} />
  if (field.kind === 'flag' || field.kind === 'choice') {
    const choices = field.kind === 'flag' ? ['yes', 'no'] : field.choices
    return (
      <SelectField
        {...shared}
        value={text}
        change={change}
        choices={choices.map((one) => ({ value: one, label: choiceWord(one) }))}
        {...(field.nullable || field.optional ? { open: 'Not answered' } : {})}
      />
    )
  }
  return (
    <Field
      {...shared}
      value={text}
      change={change}
      inputMode={field.kind === 'text' ? 'text' : 'decimal'}
      {...(unit && unit !== '1:n' ? { unit } : {})}
    />
  )
}

/** Shown or not, to whom, when: kept in one text, "2026-11-16 Marit Osei". */
function ShownField(props: { label: string; text: string; change(text: string): void; trouble: string | null }) {
  const { text, change } = props
  const shown = text !== 'no'
  const [, date = '', name = ''] = /^(\d{4}-\d{2}-\d{2})? ?(.*)$/.exec(shown ? text : '') ?? []
  return (
    <fieldset class="stack">
      <SelectField
        label={props.label}
        value={shown ? 'yes' : 'no'}
        change={(value) => change(value === 'no' ? 'no' : '')}
        choices={[
          { value: 'no', label: 'no' },
          { value: 'yes', label: 'yes' },
        ]}
        trouble={props.trouble}
      />
      {shown && (
        <div class="pair">
          <Field label="Shown to" value={name} change={(value) => change(`${date} ${value}`)} needed />
          <Field label="On" type="date" value={date} change={(value) => change(`${value} ${name}`)} needed />
        </div>
      )}
    </fieldset>
  )
}
