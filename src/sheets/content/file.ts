import { kind } from '../../catalogue/kinds.ts'
import type { Check, WalkResult } from '../../judge/result.ts'
import { instrument } from '../../record/instruments.ts'
import type { Answer, Reading, Segment } from '../../record/survey.ts'
import { packIds } from '../../standards/pack.ts'
import { pack } from '../../standards/packs.ts'
import { basis, standingCautions } from './basis.ts'
import { figure, siValue } from './figures.ts'
import { featureName, featuresOf, helpsOf, verdictLine } from './help.ts'
import { own, ownWhole } from './own.ts'
import type { Scope } from './scope.ts'
import { type Block, list, type Outline, paragraph, type Section, section } from './tree.ts'
import { capital, dayWords, leadWords, stopped, verdictWords } from './words.ts'

/** The handler's file: every reading, both versions of a dispute, every check, who decided what, the card and the pack. */
export function fileOutline(scope: Scope, goodUntil: string | null): Outline {
  const { result, view, walk } = scope
  return {
    kind: 'outline',
    lang: 'en',
    reader: 'file',
    draft: false,
    title: `Handler's file: ${own(result.name)}, ${own(view.name)}`,
    heading: `Handler's file: ${own(result.name)}`,
    blocks: [{ kind: 'verdict', verdict: result.verdict, text: verdictLine(scope) }],
    sections: [
      basis(scope, goodUntil),
      section('The walk as a whole', [
        ...checkTable('Checks of the whole walk', result.checks),
        ...sentenceList(ownWhys(scope).map(({ kind: why, text }) => `${capital(why.replace('-', ' '))}: ${text}`)),
        ...answerTable('Answers of the walk', walk.words),
        ...(walk.note ? [paragraph(`Note: ${stopped(ownWhole(walk.note))}`)] : []),
      ]),
      ...scope.stretches.map((stretch) => segmentSection(stretch)),
      zoneSection(scope),
      helpSection(scope),
      section('States', [statesTable(scope)]),
      overrideSection(scope),
      section('Team card', [cardTable(scope)]),
      section('Code pack', [packTable(scope)]),
      standingCautions(scope),
    ],
  }
}

function segmentSection({ segment, result }: Scope['stretches'][number]): Section {
  const features = new Map(featuresOf(segment).map((feature) => [feature.id, featureName(feature)]))
  return section(`Segment: ${own(segment.name)}`, [
    paragraph(
      `Led by ${leadWords[segment.ledBy]}. ${verdictWords[result.verdict]}. ${stopped(ownWhole(result.sentence))}${result.score === null ? '' : ` Room left: ${result.score} of 100, for surveyor and office only.`}`,
    ),
    ...(segment.note ? [paragraph(`Note: ${stopped(ownWhole(segment.note))}`)] : []),
    ...sentenceList(result.why.map(({ kind: why, text }) => `${capital(why.replace('-', ' '))}: ${text}`)),
    ...sentenceList(result.conditions.map((condition) => `Holds: ${condition}`)),
    ...sentenceList(result.cautions.map(({ text }) => `Caution: ${text}`)),
    ...readingTable(segment),
    ...answerTable('Answers of the segment', segment.words),
    ...featuresOf(segment).flatMap((feature) =>
      answerTable(`Answers at ${features.get(feature.id) ?? feature.id}`, feature.words),
    ),
    ...checkTable('Checks', result.checks, features),
    ...retakeTable(result.retakes),
  ])
}

/** A walk lists its segments' reasons too; they stand with their segments. */
function ownWhys({ result }: Scope): WalkResult['why'] {
  const told = new Set(result.segments.flatMap((segment) => segment.why.map(({ text }) => text)))
  return result.why.filter(({ text }) => !told.has(text))
}

function sentenceList(texts: readonly string[]): Block[] {
  return texts.length > 0 ? [list(texts.map((text) => stopped(ownWhole(text))))] : []
}

function readingTable(segment: Segment): Block[] {
  const rows = [
    ...Object.entries(segment.readings).flatMap(([quantity, readings]) =>
      readings.map((reading) => readingRow(own(quantity), reading, siValue(reading))),
    ),
    ...featuresOf(segment).flatMap((feature) =>
      Object.entries(feature.readings).flatMap(([attribute, readings]) =>
        readings.map((reading) =>
          readingRow(
            `${featureName(feature)}: ${attributeName(feature.kind, attribute)}`,
            reading,
            siValue(reading, { kind: feature.kind, attribute }),
          ),
        ),
      ),
    ),
  ]
  if (rows.length === 0) return []
  const head = ['What', 'As written', 'SI value', 'Instrument', 'Person', 'Time', 'Remarks']
  return [{ kind: 'table', caption: 'Readings', head, rows }]
}

function readingRow(what: string, reading: Reading, si: string): string[] {
  const { settles } = reading
  const remarks = [
    reading.at ? `at ${reading.at}` : '',
    reading.place === 'another' ? 'another place along the stretch' : '',
    reading.found ? `found ${reading.found.replace('-', ' ')}` : '',
    reading.safeSide ? 'counts at its unsafe end alone' : '',
    reading.tooQuick ? 'marked too quick' : '',
    settles
      ? `settles ${settles.readings.join(', ')}: ${settles.reason}, by ${settles.by}, ${dayWords(settles.on)}`
      : '',
    reading.note ?? '',
  ].filter((remark) => remark !== '')
  return [
    what,
    ownWhole(reading.raw),
    si,
    instrument(reading.instrument)?.name ?? reading.instrument,
    own(reading.person ?? 'not said'),
    timeWords(reading.time),
    ownWhole(remarks.join('; ')),
  ]
}

function attributeName(of: string, attribute: string): string {
  return own(kind(of)?.attributes.find((one) => one.id === attribute)?.name ?? attribute)
}

function answerTable(caption: string, words: Readonly<Record<string, Answer>>): Block[] {
  const rows = Object.entries(words).flatMap(([item, answer]) => [
    answerRow(item, answer, answer.note ?? ''),
    ...(answer.rivals ?? []).map((rival) => answerRow(item, rival, 'says otherwise, not settled')),
  ])
  if (rows.length === 0) return []
  return [{ kind: 'table', caption, head: ['Item', 'Says', 'How', 'Person', 'Time', 'Remarks'], rows }]
}

function answerRow(
  item: string,
  answer: Pick<Answer, 'says' | 'how' | 'person' | 'time' | 'role' | 'tooQuick'>,
  remark: string,
): string[] {
  const remarks = [answer.role ? `role: ${answer.role}` : '', answer.tooQuick ? 'marked too quick' : '', remark]
  return [
    own(item),
    ownWhole(answer.says),
    answer.how,
    own(answer.person ?? 'not said'),
    timeWords(answer.time),
    ownWhole(remarks.filter((one) => one !== '').join('; ')),
  ]
}

function timeWords(time: string | undefined): string {
  return time ? `${dayWords(time)}, ${time.slice(11, 16)}` : 'not said'
}

function checkTable(
  caption: string,
  checks: readonly Check[],
  names: ReadonlyMap<string, string> = new Map(),
): Block[] {
  if (checks.length === 0) return []
  return [
    {
      kind: 'table',
      caption,
      head: ['Check', 'At', 'State', 'Demand', 'Capacity', 'Ratio', 'Leash and pace', 'Source', 'Sentence'],
      rows: checks.map((check) => [
        check.id,
        names.get(check.feature) ?? own(check.feature),
        check.state.replace('-', ' '),
        figure(check.demand),
        figure(check.capacity),
        check.ratio ? `${figure(check.ratio[0])} to ${figure(check.ratio[1])}` : 'none',
        check.at ? `${figure(check.at.leash)} m, ${figure(check.at.pace)} m/s` : 'any',
        ownWhole(check.source),
        ownWhole(check.sentence),
      ]),
    },
  ]
}

function retakeTable(retakes: readonly { reading: string; why: string; instrument: string }[]): Block[] {
  if (retakes.length === 0) return []
  const rows = retakes.map((one) => [own(one.reading), ownWhole(one.why), own(one.instrument)])
  return [{ kind: 'table', caption: 'Measure again', head: ['Reading', 'Why', 'With'], rows }]
}

function zoneSection(scope: Scope): Section {
  const zones = new Set(scope.walk.segments.map((segment) => segment.zone))
  return section(
    'Surroundings',
    [],
    scope.view.zones
      .filter((zone) => zones.has(zone.id))
      .map((zone) =>
        section(own(zone.name), [
          ...answerTable('Answers of the zone', zone.words),
          ...zone.observations.flatMap((seen) => [
            ...answerTable(`Seen ${seen.from} to ${seen.to}`, seen.words),
            ...observedReadings(seen.readings),
          ]),
        ]),
      ),
  )
}

function observedReadings(readings: Readonly<Record<string, Reading[]>>): Block[] {
  const rows = Object.entries(readings).flatMap(([quantity, all]) =>
    all.map((reading) => readingRow(own(quantity), reading, siValue(reading))),
  )
  const head = ['What', 'As written', 'SI value', 'Instrument', 'Person', 'Time', 'Remarks']
  return rows.length > 0 ? [{ kind: 'table', caption: 'Meter readings', head, rows }] : []
}

function helpSection(scope: Scope): Section {
  const alarm = scope.walk.alarm ? [{ place: 'alarm', help: scope.walk.alarm }] : []
  const helps = [...helpsOf(scope), ...alarm]
  if (helps.length === 0) return section('Help', [paragraph('No help is recorded.')])
  return section('Help', [
    {
      kind: 'table',
      caption: 'Help with who confirmed it',
      head: ['Place', 'Role', 'How called', 'Act', 'Confirmed by', 'Confirmed on', 'If nobody comes'],
      rows: helps.map(({ place, help }) => [
        place,
        ...[help.role, help.call, help.act, help.confirmedBy].map((one) => ownWhole(one ?? 'missing')),
        help.confirmedOn ? dayWords(help.confirmedOn) : 'missing',
        ownWhole(help.ifNobody ?? 'missing'),
      ]),
    },
  ])
}

function statesTable({ walk }: Scope): Block {
  if (walk.states.length === 0) return paragraph('Nobody has signed for this walk.')
  return {
    kind: 'table',
    caption: 'States with name and date',
    head: ['State', 'Name', 'Role', 'Date', 'Team card version', 'Note'],
    rows: walk.states.map((mark) => [
      mark.state,
      ownWhole(mark.name),
      ownWhole(mark.role ?? 'not said'),
      dayWords(mark.date),
      own(mark.team ?? 'not said'),
      ownWhole(mark.note ?? ''),
    ]),
  }
}

function overrideSection({ walk }: Scope): Section {
  const names = new Map(walk.segments.map((segment) => [segment.id, own(segment.name)]))
  const overrides = walk.overrides ?? []
  if (overrides.length === 0) return section('Overrides', [paragraph('None.')])
  return section('Overrides', [
    {
      kind: 'table',
      caption: "A practitioner's last word, with reason and end date",
      head: ['Segment', 'Decided', 'Reason', 'Name', 'Role', 'Until', 'Team card version', 'Leash'],
      rows: overrides.map((one) => [
        names.get(one.segment) ?? own(one.segment),
        verdictWords[one.verdict],
        ownWhole(one.reason),
        ownWhole(one.name),
        ownWhole(one.role),
        dayWords(one.until),
        own(one.team ?? 'not said'),
        one.leash === undefined ? 'not said' : `${figure(one.leash)} m`,
      ]),
    },
  ])
}

/** The card's rows as they are in its file: metres, kilograms, metres per second, newtons, minutes. */
function cardTable({ team }: Scope): Block {
  const rows: string[][] = []
  const walkThrough = (value: unknown, path: string): void => {
    if (typeof value === 'object' && value !== null && !Array.isArray(value))
      for (const [key, inner] of Object.entries(value)) walkThrough(inner, path === '' ? key : `${path}, ${key}`)
    else
      rows.push([
        ownWhole(path),
        ownWhole(Array.isArray(value) ? value.join(', ') : value === null ? 'not answered' : String(value)),
      ])
  }
  walkThrough(team, '')
  return { kind: 'table', caption: 'Team card, SI units', head: ['Entry', 'Value'], rows }
}

function packTable({ assessment }: Scope): Block {
  const id = packIds.find((one) => one === assessment.code)
  if (!id) return paragraph(`No pack of this program is called ${own(assessment.code)}.`)
  const { name, limits } = pack(id)
  return {
    kind: 'table',
    caption: own(name),
    head: ['Limit', 'Value', 'Clause', 'Edition', 'Source'],
    rows: limits.map((limit) => [
      own(limit.id),
      `${figure(limit.value)} ${limit.unit}`,
      ownWhole(limit.clause),
      ownWhole(limit.edition),
      ownWhole(limit.seen ? limit.source : `${limit.source}, from memory`),
    ]),
  }
}
