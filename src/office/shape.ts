import { Type } from './fastify.ts'

// Pieces of the routes' schemas. Everything that comes in is bounded.

/** A text for a column: no NUL, which PostgreSQL cannot keep. */
export const text = (most: number, least = 1) =>
  Type.String({ minLength: least, maxLength: most, pattern: '^[^\\u0000]*$' })

/** The id of a survey, a walk, a fix: any printable text, never used as a path. */
export const idText = Type.String({ minLength: 1, maxLength: 400, pattern: '^[^\\u0000-\\u001f\\u007f]+$' })

export const dayText = Type.String({ pattern: '^\\d{4}-\\d{2}-\\d{2}$' })

/** What an address gives is text: a number in it is read here. */
export const digits = Type.String({ pattern: '^[0-9]{1,9}$' })

export const surveyParams = Type.Object({ survey: idText })
