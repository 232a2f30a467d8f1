import { teamCard } from '../../../record/team-card.ts'

/** One field of the team card's form, read off the card's own schema: adding a field there adds it here. */
export interface CardField {
  /** "robot.friction.smooth.dry" */
  path: string
  kind: 'text' | 'number' | 'numbers' | 'flag' | 'choice' | 'shown'
  /** May be left empty. */
  optional: boolean
  /** Null means "not answered". */
  nullable: boolean
  choices: readonly string[]
}

/** What of a schema is looked at here. */
interface Shape {
  type: string
  entries?: Record<string, Shape>
  wrapped?: Shape
  item?: Shape
  options?: readonly string[]
}

/** The head of the card is set on saving, not typed. */
const own: readonly string[] = ['revision', 'date']

export const cardFields: readonly CardField[] = fieldsOf(teamCard as unknown as Shape, '').filter(
  (field) => !own.includes(field.path),
)

function fieldsOf(shape: Shape, path: string, optional = false, nullable = false): CardField[] {
  if (shape.wrapped && shape.type === 'nullable') return fieldsOf(shape.wrapped, path, optional, true)
  if (shape.wrapped) return fieldsOf(shape.wrapped, path, true, nullable)
  const field = (kind: CardField['kind']): CardField[] => [
    { path, kind, optional, nullable, choices: shape.options ?? [] },
  ]
  if (shape.entries) {
    if (nullable) return field('shown')
    return Object.entries(shape.entries).flatMap(([key, inner]) =>
      fieldsOf(inner, path === '' ? key : `${path}.${key}`),
    )
  }
  if (shape.type === 'number') return field('number')
  if (shape.type === 'boolean') return field('flag')
  if (shape.type === 'picklist') return field('choice')
  if (shape.type === 'array') return field('numbers')
  return field('text')
}
