import type { SegmentResult } from '../../../judge/result.ts'
import { type Aspect, aspects, aspectsLedOtherwise, type Item, items, neverInherited } from '../../../record/answers.ts'
import type { Segment } from '../../../record/survey.ts'
import { verdictWord } from '../../components/verdict-word.ts'

/** Aspects of a part that nobody has answered yet. */
export function openAspects(segment: Segment): Aspect[] {
  const asked = segment.ledBy === 'robot' ? aspects : aspectsLedOtherwise
  return asked.filter((aspect) => {
    if (aspect === 'length' || aspect === 'width') return (segment.readings[aspect] ?? []).length === 0
    return (Object.keys(items) as Item[]).some((item) => items[item].aspect === aspect && !isAnswered(segment, item))
  })
}

/** A sweep that was too quick is none; overhead, edge, step and door are never taken over from the part before. */
function isAnswered(segment: Segment, item: Item): boolean {
  const answer = segment.words[item]
  if (!answer || answer.tooQuick) return false
  if (item === 'overhead' && answer.says === 'none' && (segment.readings.overhead ?? []).length === 0) return false
  return !(answer.how === 'inherited' && neverInherited.includes(item))
}

/** The top line. While answers are missing there is no verdict word; while a newer judgement is made neither. */
export function soFarLine(segment: Segment, result: SegmentResult | undefined, stale: boolean): string {
  const open = openAspects(segment)
  if (open.length > 0)
    return `So far: nothing against it; ${open.length} ${open.length === 1 ? 'answer' : 'answers'} left`
  if (!result) return stale ? 'Judging' : 'Not judged yet'
  return `${verdictWord(result.verdict)}${stale ? ', being judged again' : ''}`
}
