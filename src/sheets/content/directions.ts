import type { Feature } from '../../record/survey.ts'
import type { Metres, MetresPerSecond, Radians } from '../../units/quantity.ts'

const degree = Math.PI / 180
/** Turns sharper than this are named in the overview: handlers are taught to question them (common practice). */
const named = 45 * degree

export interface TurnWords {
  /** "turn left to 9 o'clock" */
  phrase: string
  /** Above 45 degrees. */
  named: boolean
}

/** Where a turn points on the clock face, 12 straight ahead. Left positive. */
export function clockOf(turn: Radians): number {
  const hours = Math.round((turn / degree / 30) * -1)
  return ((((hours - 1) % 12) + 12) % 12) + 1
}

/**
 * A turn's signed angle, left positive: its least-uncertain reading is not looked for, the first counts, because words
 * need no more. The side rules where it is given: people write "90" for a turn to either hand. null: not measured.
 */
export function turnAngle(turn: Feature): Radians | null {
  const read = turn.readings.angle?.[0]?.value
  const size = read !== undefined ? Math.abs(read) : turn.kind === 'u-turn' ? Math.PI : null
  if (size === null) return null
  const left = turn.side === 'left' || (turn.side !== 'right' && (read ?? 1) >= 0)
  return left ? size : -size
}

export function turnWords(angle: Radians): TurnWords {
  const side = angle >= 0 ? 'left' : 'right'
  const size = Math.abs(angle)
  const verb =
    size <= named ? 'bear' : size <= 110 * degree ? 'turn' : size < 160 * degree ? 'turn sharp' : 'turn back, by the'
  return { phrase: `${verb} ${side} to ${clockOf(angle)} o'clock`, named: size > named }
}

/** "12 metres", "1.5 metres", "half a metre": whole from 3 m, halves below. To the nearest: it is walked, not judged. */
export function metresWords(length: Metres): string {
  if (length >= 3) return `${Math.round(length)} metres`
  const halves = Math.max(1, Math.round(length * 2))
  if (halves === 1) return 'half a metre'
  return halves === 2 ? '1 metre' : `${halves / 2} metres`
}

/** The handler's own paces where their length is on the card, else seconds at the walk's pace. */
export function effortWords(length: Metres, step: Metres | undefined, pace: MetresPerSecond): string {
  if (step !== undefined && step > 0) {
    const paces = Math.max(1, Math.round(length / step))
    return `about ${paces} ${paces === 1 ? 'pace' : 'paces'}`
  }
  const seconds = Math.max(1, Math.round(length / pace))
  return `about ${seconds} ${seconds === 1 ? 'second' : 'seconds'}`
}

/** A leash mark: "0.8 metre mark". */
export function markWords(leash: Metres): string {
  return `${leash.toFixed(Math.abs(leash * 10 - Math.round(leash * 10)) < 1e-9 ? 1 : 2)} metre mark`
}
