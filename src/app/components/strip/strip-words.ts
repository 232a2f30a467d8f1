import { kind } from '../../../catalogue/kinds.ts'
import type { SegmentResult } from '../../../judge/result.ts'
import { instrument } from '../../../record/instruments.ts'
import type { Answer, Feature, Reading, Segment, Walk } from '../../../record/survey.ts'
import { formatAngle, formatLength } from '../../../units/format.ts'
import type { Metres } from '../../../units/quantity.ts'
import type { StripItem, StripPart } from './layout-part.ts'
import type { Units } from './units-offered.ts'

/** What the strip says of a record, in words: the drawing and the list say the same. */

/** Readings that no later one has taken the place of. */
function standing(readings: readonly Reading[] | undefined): Reading[] {
  const settled = new Set((readings ?? []).flatMap((one) => one.settles?.readings ?? []))
  return (readings ?? []).filter((one) => !settled.has(one.id))
}

/** The length to draw: the latest reading. Null: the part is still open. */
export function lengthOf(segment: Segment): Metres | null {
  return standing(segment.readings.length).at(-1)?.value ?? null
}

/** The least clear width measured, or null. */
export function widthOf(segment: Segment): Metres | null {
  const values = standing(segment.readings.width).map((one) => one.value)
  return values.length > 0 ? Math.min(...values) : null
}

/** "right 90°", "turn round". Null: straight on. */
export function turnWords(turn: Feature | undefined): string | null {
  if (!turn) return null
  if (turn.kind === 'u-turn') return 'turn round'
  const angle = turnAngle(turn)
  if (angle === null) return 'turn, angle not measured'
  return `${angle >= 0 ? 'left' : 'right'} ${formatAngle(Math.abs(angle), { towards: 'nearest' })}`
}

/** Radians, left positive; null: not measured. */
export function turnAngle(turn: Feature): number | null {
  if (turn.kind === 'u-turn') return Math.PI
  return standing(turn.readings.angle).at(-1)?.value ?? null
}

/** The parts of a walk as the map draws them. Verdicts are shown for complete parts only. */
export function stripParts(walk: Walk, results: readonly SegmentResult[], units: Units): StripPart[] {
  const byId = new Map(results.map((one) => [one.id, one]))
  return walk.segments.map((segment, index) => {
    const length = lengthOf(segment)
    const width = widthOf(segment)
    const sizes = [length === null ? null : shown(length, units), width === null ? null : `${shown(width, units)} wide`]
    const result = byId.get(segment.id)
    return {
      id: segment.id,
      number: index + 1,
      title: [
        segment.name ? `${index + 1} ${segment.name}` : `Part ${index + 1}`,
        ...sizes.filter((one) => one !== null),
      ].join(', '),
      length,
      width,
      turn: segment.turn ? turnAngle(segment.turn) : null,
      turnText: turnWords(segment.turn),
      verdict: result && result.missing.length === 0 ? result.verdict : null,
      items: segment.features.map(itemOf),
    }
  })
}

function itemOf(feature: Feature): StripItem {
  const row = kind(feature.kind)
  return {
    id: feature.id,
    text: featureName(feature),
    along: feature.along ?? null,
    side: feature.side ?? (feature.kind.includes('door') ? 'across' : 'centre'),
    offset: feature.offset ?? null,
    mark: row?.stopItem ? 'stop' : row?.weight === 'caution' ? 'caution' : 'note',
  }
}

export function featureName(feature: Feature): string {
  return feature.name ?? kind(feature.kind)?.name ?? feature.kind
}

/** A clear width or length there is: never shown larger than measured. */
export function shown(value: Metres, units: Units): string {
  return formatLength(value, { system: units, towards: 'down' })
}

/** A height that is needed: never shown lower. */
export function rodHeight(value: Metres, units: Units): string {
  return formatLength(value, { system: units, towards: 'up' })
}

/** "width 1.24 m, tape on the floor, at the lockers" */
export function readingWords(quantity: string, reading: Reading): string {
  return [
    `${quantity} ${reading.raw}`,
    instrument(reading.instrument)?.name ?? reading.instrument,
    reading.place === 'another' ? 'another place' : '',
    reading.at ? `at ${reading.at}` : '',
    reading.found === 'in-use' ? 'found in use' : reading.found === 'empty' ? 'found empty' : '',
    reading.safeSide ? 'safe side taken' : '',
    reading.tooQuick ? 'too quick: look again' : '',
    reading.note ?? '',
  ]
    .filter((one) => one !== '')
    .join(', ')
}

const howWords: Record<Answer['how'], string> = {
  measured: 'measured',
  swept: 'looked at',
  told: 'told by someone',
  'by-eye': 'by eye',
  inherited: 'as before',
}

/** "edge: none, looked at" */
export function answerWords(item: string, answer: Answer): string {
  return [
    `${item.replace('-', ' ')}: ${answer.says}`,
    howWords[answer.how],
    answer.tooQuick ? 'too quick: look again' : '',
    answer.rivals?.length ? `also said: ${answer.rivals.map((one) => one.says).join(', ')}` : '',
  ]
    .filter((one) => one !== '')
    .join(', ')
}

/** "hinged door, 3.00 m along, on the left" */
export function featureWords(feature: Feature, units: Units): string {
  const side = { left: 'on the left', right: 'on the right', centre: 'in the middle', across: 'right across' } as const
  return [
    featureName(feature),
    feature.along === undefined ? '' : `${shown(feature.along, units)} along`,
    feature.side ? side[feature.side] : '',
    feature.offset === undefined ? '' : `${shown(feature.offset, units)} from the walking line`,
    feature.ledBy ? `led by ${leaderWords[feature.ledBy]}` : '',
  ]
    .filter((one) => one !== '')
    .join(', ')
}

export const leaderWords = {
  robot: 'the robot',
  'human-guide': 'a human guide',
  'own-cane': 'own cane',
  staff: 'staff',
} as const
