import type { Check, SegmentResult, Verdict } from '../../../judge/result.ts'
import { type Missing, soFar } from '../../../judge/so-far.ts'
import { type Item, items, neverInherited } from '../../../record/answers.ts'
import type { Segment, SurveyView } from '../../../record/survey.ts'
import { pack } from '../../../standards/packs.ts'
import { verdictWord } from '../../components/verdict-word.ts'

/** What the top line says of a part. */
export interface PartLine {
  text: string
  /** Names of what is left, or the governing sentence of a complete part. */
  detail: string
  complete: boolean
  /** Of a complete part, when the judge has spoken. */
  verdict: Verdict | null
}

/** While answers are missing there is no verdict word; while a newer judgement is made the old one says so. */
export function partLine(
  segment: Segment,
  view: SurveyView,
  result: SegmentResult | undefined,
  stale: boolean,
): PartLine {
  const now = soFar(segment, view, view.team, pack(view.code))
  const left = [...now.missing, ...again(segment)]
  if (left.length > 0) {
    const answers = `${left.length} ${left.length === 1 ? 'answer' : 'answers'} left`
    return {
      text:
        now.against && isSeen(now.against)
          ? `So far against it: ${now.against.sentence} ${answers}`
          : `So far: nothing against it; ${answers}`,
      detail: someOf(left.map((one) => one.name)),
      complete: false,
      verdict: null,
    }
  }
  if (!result || stale)
    return {
      text: stale ? 'Complete, being judged' : 'Complete, not judged',
      detail: '',
      complete: true,
      verdict: null,
    }
  return { text: verdictWord(result.verdict), detail: result.sentence, complete: true, verdict: result.verdict }
}

/** Help that is wanted only because an answer is still missing is nothing against the part yet. */
function isSeen(against: Check): boolean {
  return against.state !== 'needs-help' || against.readings.length > 0
}

/** How many answers a part lacks. */
export function answersLeft(segment: Segment, view: SurveyView): number {
  const known = counted.get(segment)
  if (known !== undefined) return known
  const left = soFar(segment, view, view.team, pack(view.code)).missing.length + again(segment).length
  counted.set(segment, left)
  return left
}

/** A view is never changed in place: the same segment lacks the same answers. */
const counted = new WeakMap<Segment, number>()

/** A sweep that was too quick is none; overhead, edge, step and door are never taken over from the part before. */
function again(segment: Segment): Missing[] {
  return (Object.keys(items) as Item[])
    .filter((item) => {
      const answer = segment.words[item]
      return answer?.tooQuick || (answer?.how === 'inherited' && neverInherited.includes(item))
    })
    .map((item) => ({ holder: segment.id, item, name: `${item.replace('-', ' ')} again` }))
}

const mostNamed = 3

function someOf(names: readonly string[]): string {
  const shown = names.slice(0, mostNamed).join(', ')
  return names.length > mostNamed ? `${shown} and ${names.length - mostNamed} more` : shown
}
