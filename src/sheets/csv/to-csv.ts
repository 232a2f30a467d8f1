import { kind } from '../../catalogue/kinds.ts'
import type { Assessment, Verdict } from '../../judge/result.ts'
import { instrument } from '../../record/instruments.ts'
import type { Feature, Reading, Survey, SurveyView, Walk } from '../../record/survey.ts'
import { ownWhole } from '../content/own.ts'
import { dayWords } from '../content/words.ts'
import { rowOf } from './cell.ts'

/** One walk alone, and whether every row says DRAFT. */
export interface CsvOptions {
  walk?: string
  draft?: boolean
}

/** The columns, in order. SI value and U are in the unit named beside them; U is expanded, k = 2. */
export const columns = [
  'walk',
  'segment',
  'holder',
  'feature kind',
  'quantity',
  'raw',
  'SI value',
  'unit',
  'bound',
  'instrument',
  'U',
  'person',
  'time',
  'found',
  'note',
  'reading',
  'segment verdict',
  'holds for',
] as const
type Column = (typeof columns)[number]

/** SI units by what a quantity is; a gradient is rise over run. */
const units: Readonly<Record<string, string>> = {
  length: 'm',
  angle: 'rad',
  gradient: 'rise/run',
  force: 'N',
  time: 's',
  sound: 'dB(A)',
  count: 'count',
  number: '1',
}
const ownUnits: Readonly<Record<string, string>> = {
  length: 'm',
  width: 'm',
  overhead: 'm',
  pendulum: '1',
  noise: 'dB(A)',
  light: 'lx',
  crowd: '1',
}

/**
 * Every reading of a survey as a table, one row each: RFC 4180, comma, CRLF after every row, a header row, UTF-8 without
 * a mark at its head. Nothing is averaged or left out: repeats and disputed readings are rows of their own. A quantity that
 * the catalogue does not know has the unit "not known". The readings of surroundings have an hour as their holder and no walk.
 */
export function toCsv(survey: Survey, assessment: Assessment, options: CsvOptions = {}): string {
  const { view } = survey
  const walks = view.walks.filter(({ id }) => options.walk === undefined || id === options.walk)
  const holdsFor = [
    options.draft ? 'DRAFT' : '',
    `${ownWhole(assessment.team.name)} ${ownWhole(assessment.team.version)}, ${dayWords(assessment.on)}`,
    'local codes and licensed O&M practice take precedence',
  ]
  const constant = { 'holds for': holdsFor.filter((text) => text !== '').join('; ') }
  const rows = [
    ...walks.flatMap((walk) => walkRows(walk, assessment, view)),
    ...zoneRows(view, options.walk === undefined ? null : walks),
  ].map((cells) => rowOf(columns.map((column) => ({ ...cells, ...constant })[column] ?? '')))
  return [rowOf(columns), ...rows].join('')
}

type Cells = Partial<Record<Column, string>>

function walkRows(walk: Walk, assessment: Assessment, view: SurveyView): Cells[] {
  const judged = assessment.walks.find(({ id }) => id === walk.id)
  return walk.segments.flatMap((segment) => {
    const verdict: Verdict = judged?.segments.find(({ id }) => id === segment.id)?.verdict ?? 'not-known'
    const shared: Cells = {
      walk: ownWhole(walk.name),
      segment: ownWhole(segment.name),
      'segment verdict': verdict,
    }
    const things = segment.turn ? [...segment.features, segment.turn] : segment.features
    return [
      ...readingRows(segment.readings, ownUnits, view).map((cells) => ({ ...shared, holder: 'segment', ...cells })),
      ...things.flatMap((thing) => featureRows(thing, view).map((cells) => ({ ...shared, ...cells }))),
    ]
  })
}

function featureRows(feature: Feature, view: SurveyView): Cells[] {
  const row = kind(feature.kind)
  const known = Object.fromEntries(
    (row?.attributes ?? []).flatMap((one) => (one.type === 'quantity' ? [[one.id, units[one.quantity] ?? '']] : [])),
  )
  const holder = ownWhole(feature.name ?? row?.name ?? feature.kind)
  return readingRows(feature.readings, known, view).map((cells) => ({
    holder,
    'feature kind': ownWhole(feature.kind),
    ...cells,
  }))
}

/** `walks`: only the surroundings that these lead through; null: all. */
function zoneRows(view: SurveyView, walks: readonly Walk[] | null): Cells[] {
  const through = walks && new Set(walks.flatMap((walk) => walk.segments.map(({ zone }) => zone)))
  return view.zones
    .filter(({ id }) => through === null || through.has(id))
    .flatMap((zone) =>
      zone.observations.flatMap((hour) =>
        readingRows(hour.readings, ownUnits, view).map((cells) => ({
          segment: ownWhole(zone.name),
          holder: `surroundings ${hour.from} to ${hour.to}`,
          ...cells,
        })),
      ),
    )
}

function readingRows(
  readings: Readonly<Record<string, readonly Reading[]>>,
  known: Readonly<Record<string, string>>,
  view: SurveyView,
): Cells[] {
  return Object.entries(readings).flatMap(([quantity, taken]) =>
    taken.map((reading) => ({
      quantity: ownWhole(quantity),
      raw: ownWhole(reading.raw),
      'SI value': String(reading.value),
      unit: (Object.hasOwn(known, quantity) ? known[quantity] : undefined) ?? 'not known',
      bound: reading.bound,
      instrument: reading.instrument,
      U: uncertainty(reading, view),
      person: ownWhole(reading.person ?? ''),
      time: ownWhole(reading.time ?? ''),
      found: reading.found ?? '',
      note: ownWhole(reading.note ?? ''),
      reading: ownWhole(reading.id),
    })),
  )
}

/** Expanded uncertainty, k = 2, rounded up to three figures: a shown U is never smaller than the one judged with. */
function uncertainty({ instrument: id, value }: Reading, { instruments }: SurveyView): string {
  const row = instruments?.[id] ?? instrument(id)
  if (!row) return ''
  const exact = row.absolute + row.relative * Math.abs(value)
  if (!(exact > 0)) return '0'
  const step = 10 ** (Math.floor(Math.log10(exact)) - 2)
  return String(Number((Math.ceil(exact / step - 1e-9) * step).toPrecision(12)))
}
