import { beforeYouLeave, type LeavingFinding } from '../../../judge/leaving.ts'
import { type Assessment, type Harm, harms } from '../../../judge/result.ts'
import { soFar } from '../../../judge/so-far.ts'
import { type Aspect, items } from '../../../record/answers.ts'
import type { Survey, Walk } from '../../../record/survey.ts'
import { pack } from '../../../standards/packs.ts'

/** What is left to do on one walk, worst harm first. Without a judgement: what nobody answered, from the record alone. */
export function unfinished(survey: Survey, walk: Walk, assessment: Assessment | null): LeavingFinding[] {
  if (walk.segments.length === 0)
    return [{ ...nowhere(walk), harm: 'fall', text: 'No part of this walk is recorded: nothing of it is known.' }]
  if (assessment) return beforeYouLeave(survey, assessment).filter((one) => one.walk === walk.id)
  const { view } = survey
  return walk.segments
    .flatMap((segment, index) =>
      soFar(segment, view, view.team, pack(view.code)).missing.map(
        (one): LeavingFinding => ({
          ...nowhere(walk),
          harm: harmOf(one.item),
          text: `Part ${index + 1}: nobody answered ${one.name}.`,
          segment: segment.id,
          holder: one.holder,
          quantity: one.item,
        }),
      ),
    )
    .sort((a, b) => harms.indexOf(a.harm) - harms.indexOf(b.harm))
}

function nowhere(walk: Walk): Omit<LeavingFinding, 'harm' | 'text'> {
  return { kind: 'missing', walk: walk.id, segment: null, holder: null, quantity: null }
}

const harmOfAspect: Record<Aspect, Harm> = {
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

/** Of a thing on the way, until it is judged: the worst. */
function harmOf(item: string): Harm {
  if (item in items) return harmOfAspect[items[item as keyof typeof items].aspect]
  return harmOfAspect[item as Aspect] ?? 'fall'
}
