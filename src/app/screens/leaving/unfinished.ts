import { type Harm, harms, type WalkResult } from '../../../judge/result.ts'
import { type Aspect, items } from '../../../record/answers.ts'
import type { Reading, Segment, Walk } from '../../../record/survey.ts'
import { openAspects } from '../strip/so-far-line.ts'

/** One thing that is not finished, and where it is entered. */
export interface Unfinished {
  key: string
  text: string
  /** What would settle it. */
  advice: string | null
  harm: Harm
  segment: string | null
  /** `aspect/<aspect>` or `reading/<id>` of the segment; null: the segment itself. */
  entry: string | null
  /** The safe side can be taken of this reading. */
  tooClose: string | null
}

/** What is left to do before leaving, worst harm first: from the record at once, from the judge as far as it has come. */
export function unfinished(walk: Walk, result: WalkResult | null): Unfinished[] {
  if (walk.segments.length === 0) return [noParts]
  const found = walk.segments.flatMap((segment, index) => [
    ...missing(segment, index),
    ...hasty(segment, index),
    ...judged(segment, result),
  ])
  const once = new Map(found.map((one) => [one.key, one]))
  return [...once.values()].sort((a, b) => harms.indexOf(a.harm) - harms.indexOf(b.harm))
}

const noParts: Unfinished = {
  key: 'no parts',
  text: 'No part of this walk is recorded: nothing of it is known.',
  advice: null,
  harm: 'fall',
  segment: null,
  entry: null,
  tooClose: null,
}

const harmOf: Record<Aspect, Harm> = {
  edge: 'fall',
  step: 'fall',
  surface: 'fall',
  overhead: 'head',
  width: 'trap',
  door: 'trap',
  sensing: 'trap',
  length: 'comfort',
  shoreline: 'comfort',
  'end-sign': 'comfort',
}

function missing(segment: Segment, index: number): Unfinished[] {
  return openAspects(segment).map((aspect) => ({
    key: `${segment.id} ${aspect}`,
    text: `Part ${index + 1}: nobody answered ${aspect.replace('-', ' ')}.`,
    advice: null,
    harm: harmOf[aspect],
    segment: segment.id,
    entry: `aspect/${aspect}`,
    tooClose: null,
  }))
}

/** Too quick, told, by eye. */
function hasty(segment: Segment, index: number): Unfinished[] {
  return Object.entries(segment.words).flatMap(([item, answer]) => {
    const aspect = item in items ? items[item as keyof typeof items].aspect : null
    const why = answer.rivals?.length
      ? 'two people said different things'
      : answer.how === 'told'
        ? 'told by someone, nobody looked'
        : answer.how === 'by-eye'
          ? 'judged by eye from afar'
          : null
    if (!aspect || !why) return []
    return [
      {
        key: `${segment.id} ${item} ${why}`,
        text: `Part ${index + 1}, ${item.replace('-', ' ')}: ${why}.`,
        advice: null,
        harm: harmOf[aspect],
        segment: segment.id,
        entry: `aspect/${aspect}`,
        tooClose: null,
      },
    ]
  })
}

function judged(segment: Segment, result: WalkResult | null): Unfinished[] {
  const own = result?.segments.find((one) => one.id === segment.id)
  if (!own) return []
  const retakes = own.retakes.map((one) => ({
    key: `retake ${one.reading}`,
    text: one.why,
    advice: `Measure again: ${one.instrument}`,
    harm: one.harm ?? 'comfort',
    segment: segment.id,
    entry: `reading/${one.reading}`,
    tooClose: readingsOf(segment).some((reading) => reading.id === one.reading && !reading.safeSide)
      ? one.reading
      : null,
  }))
  const why = own.why
    .filter((one) => one.aspect === undefined || !openAspects(segment).includes(one.aspect))
    .map((one) => ({
      key: `why ${segment.id} ${one.text}`,
      text: one.text,
      advice: null,
      harm: one.harm ?? 'comfort',
      segment: segment.id,
      entry: one.readings[0] ? `reading/${one.readings[0]}` : one.aspect ? `aspect/${one.aspect}` : null,
      tooClose: null,
    }))
  return [...retakes, ...why]
}

function readingsOf(segment: Segment): Reading[] {
  const holders = [segment, ...segment.features, ...(segment.turn ? [segment.turn] : [])]
  return holders.flatMap((one) => Object.values(one.readings).flat())
}
