import { kind } from '../catalogue/kinds.ts'
import { loopNote } from '../plan/loop-note.ts'
import { instrument } from '../record/instruments.ts'
import type { Reading, Segment, Survey, Walk } from '../record/survey.ts'
import { aspectHarm } from './answered.ts'
import { type Assessment, type Harm, harms, type SegmentResult } from './result.ts'
import { nameOf } from './site.ts'

export type LeavingKind =
  | 'missing'
  | 'estimated'
  | 'told'
  | 'disputed'
  | 'too-quick'
  | 'too-close'
  | 'no-end-sign'
  | 'measured-once'
  | 'misclosure'
  | 'return-walk'

/** Something to look at before leaving, with all that is needed to jump to its entry. */
export interface LeavingFinding {
  harm: Harm
  kind: LeavingKind
  text: string
  walk: string
  segment: string | null
  /** The segment or feature that holds it. */
  holder: string | null
  /** The quantity or item; null: the whole of it. */
  quantity: string | null
}

/** Ratios above this are measured twice, by two people. */
const twiceFrom = 0.85

/**
 * What is missing, estimated, told, disputed, too quick or too close to call, parts without end sign, critical readings
 * taken once, a loop that does not close and a walk whose way back nobody recorded: by harm, worst first. Notes, no
 * blockers.
 */
export function beforeYouLeave(survey: Survey, assessment: Assessment): LeavingFinding[] {
  const found: LeavingFinding[] = []
  for (const walk of survey.view.walks) {
    const result = assessment.walks.find((one) => one.id === walk.id)
    for (const segment of walk.segments) {
      const judged = result?.segments.find((one) => one.id === segment.id)
      if (judged) found.push(...ofResult(walk, segment, judged))
      found.push(...ofReadings(walk, segment, judged))
      found.push(...ofWords(walk, segment))
    }
    for (const why of result?.why ?? [])
      if (why.kind === 'unanswered' && !result?.segments.some((one) => one.why.includes(why)))
        found.push(note('missing', why.harm ?? 'trap', why.text, walk, null, null, null))
    found.push(...ofLoop(walk, survey), ...ofReturn(walk, survey))
  }
  const unique = found.filter((one, i) => found.findIndex((other) => same(one, other)) === i)
  return unique.sort((a, b) => harms.indexOf(a.harm) - harms.indexOf(b.harm))
}

function same(a: LeavingFinding, b: LeavingFinding): boolean {
  return (
    a.kind === b.kind && a.text === b.text && a.holder === b.holder && a.quantity === b.quantity && a.walk === b.walk
  )
}

function note(
  of: LeavingKind,
  harm: Harm,
  text: string,
  walk: Walk,
  segment: string | null,
  holder: string | null,
  quantity: string | null,
): LeavingFinding {
  return { kind: of, harm, text, walk: walk.id, segment, holder, quantity }
}

/** Gaps that the judgement named: unanswered, told, differing and too close. */
function ofResult(walk: Walk, segment: Segment, result: SegmentResult): LeavingFinding[] {
  const kinds = { unanswered: 'missing', told: 'told', differs: 'disputed', 'too-close': 'too-close' } as const
  return result.why.flatMap((why) => {
    const of = kinds[why.kind as keyof typeof kinds]
    if (!of) return []
    const at = why.readings.map((id) => placeOf(segment, id)).find((one) => one !== null)
    const item = why.aspect ?? null
    const sign = why.aspect === 'end-sign' && why.kind === 'unanswered'
    return [
      note(
        sign ? 'no-end-sign' : of,
        why.harm ?? 'fall',
        why.text,
        walk,
        segment.id,
        at?.holder ?? segment.id,
        at?.quantity ?? item,
      ),
    ]
  })
}

/** Where a reading stands on a segment. */
function placeOf(segment: Segment, id: string): { holder: string; quantity: string } | null {
  for (const holder of holders(segment))
    for (const [quantity, readings] of Object.entries(holder.readings))
      if (readings.some((one) => one.id === id)) return { holder: holder.id, quantity }
  return null
}

function holders(segment: Segment): { id: string; readings: Segment['readings']; kind?: string; name: string }[] {
  const features = segment.turn ? [...segment.features, segment.turn] : segment.features
  return [
    { id: segment.id, readings: segment.readings, name: segment.name },
    ...features.map((one) => ({ id: one.id, readings: one.readings, kind: one.kind, name: nameOf(one) })),
  ]
}

/** Readings estimated, told, swept too quickly, or taken once where two people should. */
function ofReadings(walk: Walk, segment: Segment, result: SegmentResult | undefined): LeavingFinding[] {
  const found: LeavingFinding[] = []
  for (const holder of holders(segment)) {
    const row = holder.kind ? kind(holder.kind) : undefined
    for (const [quantity, readings] of Object.entries(holder.readings)) {
      const harm = row?.harm ?? aspectHarm[quantity as 'width'] ?? 'comfort'
      const say = (of: LeavingKind, text: string) =>
        found.push(note(of, harm, `${holder.name}, ${quantity}: ${text}.`, walk, segment.id, holder.id, quantity))
      const settled = new Set(readings.flatMap((one) => one.settles?.readings ?? []))
      const open = readings.filter((one) => !settled.has(one.id))
      for (const one of open) {
        if (one.instrument === 'told') say('told', 'told by someone')
        else if (isEstimate(one)) say('estimated', 'estimated, not measured')
        if (one.tooQuick) say('too-quick', 'swept too quickly')
      }
      if (isCritical(row?.aspect ?? quantity, open, result) && people(open) < 2)
        say('measured-once', 'read by one person only')
    }
  }
  return found
}

function isEstimate({ instrument: id }: Reading): boolean {
  return instrument(id)?.hearsay === true || id === 'paces' || id === 'plan'
}

/** Overhead, edge, step, and anything with a ratio above 0.85, ask for a second person. */
function isCritical(aspect: string | null, readings: readonly Reading[], result: SegmentResult | undefined): boolean {
  if (readings.length === 0) return false
  if (aspect === 'overhead' || aspect === 'edge' || aspect === 'step') return true
  return (result?.checks ?? []).some(
    (one) =>
      one.ratio !== null &&
      (one.ratio[1] ?? Number.POSITIVE_INFINITY) > twiceFrom &&
      readings.some((reading) => one.readings.includes(reading.id)),
  )
}

function people(readings: readonly Reading[]): number {
  return new Set(readings.map((one) => one.person ?? '')).size
}

/** Answers in words that were told, judged by eye, or given too quickly. */
function ofWords(walk: Walk, segment: Segment): LeavingFinding[] {
  const features = segment.turn ? [...segment.features, segment.turn] : segment.features
  const all = [
    { id: segment.id, name: segment.name, words: segment.words, harm: null },
    ...features.map((one) => ({ id: one.id, name: nameOf(one), words: one.words, harm: kind(one.kind)?.harm ?? null })),
  ]
  return all.flatMap(({ id, name, words, harm }) =>
    Object.entries(words).flatMap(([item, answer]) => {
      const how = answer.how === 'told' ? 'told' : answer.how === 'by-eye' ? 'estimated' : null
      const found: LeavingFinding[] = []
      const say = (of: LeavingKind, text: string) =>
        found.push(
          note(
            of,
            harm ?? aspectHarm[item as 'step'] ?? 'fall',
            `${name}, ${item}: ${text}.`,
            walk,
            segment.id,
            id,
            item,
          ),
        )
      if (how === 'told') say('told', 'told by someone')
      if (how === 'estimated') say('estimated', 'judged by eye')
      if (answer.tooQuick) say('too-quick', 'swept too quickly')
      return found
    }),
  )
}

/** A loop that does not close: a note, and the readings to look at again. */
function ofLoop(walk: Walk, { view }: Survey): LeavingFinding[] {
  const told = loopNote(walk, view.instruments)
  if (!told?.known || told.misclosure.linear <= told.allowed) return []
  const off = told.misclosure.linear.toFixed(2)
  const general = note('misclosure', 'comfort', `${walk.name} does not close by ${off} m.`, walk, null, null, null)
  return [
    general,
    ...told.suspects.map((one) => {
      const segment = walk.segments.find((other) => other.id === one.segment)
      const holder = one.reading === 'turn' ? (segment?.turn?.id ?? one.segment) : one.segment
      const text = `${segment?.name ?? one.segment}: this ${one.reading} would explain it.`
      return note('misclosure', 'comfort', text, walk, one.segment, holder, one.reading === 'turn' ? 'angle' : 'length')
    }),
  ]
}

/** The way back is a walk of its own: what flips is asked again. */
function ofReturn(walk: Walk, { view }: Survey): LeavingFinding[] {
  if (walk.loop || walk.from === undefined || walk.to === undefined) return []
  if (view.walks.some((one) => one.from === walk.to && one.to === walk.from)) return []
  return [note('return-walk', 'comfort', `${walk.name}: nobody recorded the way back.`, walk, null, null, null)]
}
