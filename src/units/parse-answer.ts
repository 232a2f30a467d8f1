/** What a typed reading is read as, and what is said when it cannot be. */

export type FieldQuantity =
  | 'length'
  | 'angle'
  | 'gradient'
  | 'force'
  | 'time'
  | 'sound'
  | 'speed'
  | 'mass'
  | 'area'
  | 'count'
  | 'illuminance'
  | 'number'

/** The field that is filled in. */
export interface Field {
  quantity: FieldQuantity
  /** Unit of a bare number: 'm', 'mm', 'ft', 'in', 'deg', '1:n', '%', 'N', 's', 'dB(A)', 'm/s', 'kg', 'm2', 'lx', ''. */
  unit: string
  /** True: a minus sign is meant (a level difference). Angle, gradient and number take one without this. */
  signed?: boolean
}

/** 'above': the value was not reached (">2.1"); 'below': it is less than the value ("<20"). */
export type Bound = 'exact' | 'above' | 'below'

export interface Understood {
  ok: true
  /** SI: metres, radians, rise / run, newtons, seconds, dB(A), m/s, kg, m2, lux. */
  value: number
  bound: Bound
  /** The unit as understood: 'm', 'ft in', '1:n' ... */
  unit: string
}

export interface Choice {
  label: string
  /** Typed instead, it is understood without a question. */
  text: string
}

/** It can be read in more than one way: put the question, never guess. */
export interface Question {
  ok: false
  kind: 'ambiguous'
  question: string
  choices: Choice[]
}

export interface Refusal {
  ok: false
  kind: 'refused'
  /** What is wrong and what to type instead. */
  reason: string
}

export type Parsed = Understood | Question | Refusal

/** A body without bound and sign, read. */
export type Body = { ok: true; value: number; unit: string } | Question | Refusal

export function refuse(reason: string): Refusal {
  return { ok: false, kind: 'refused', reason }
}

/** A question whose choices are shown as they would be typed, unless a label says it better. */
export function ask(choices: readonly (string | Choice)[]): Question {
  const list = choices.map((choice) => (typeof choice === 'string' ? { label: choice, text: choice } : choice))
  return { ok: false, kind: 'ambiguous', question: questionOf(list), choices: list }
}

/** "1240 mm or 1240 m?" */
function questionOf(choices: readonly Choice[]): string {
  const labels = choices.map((choice) => choice.label)
  return `${labels.slice(0, -1).join(', ')} or ${labels.at(-1)}?`
}
