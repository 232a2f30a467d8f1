import { items } from '../answers.ts'
import type { SurveyView } from '../survey.ts'
import type { Problem } from './problem.ts'

/** Answers to a segment's known items in words that the item does not take: nobody can tell what was meant. */
export function wordsOutside(view: SurveyView): Problem[] {
  const problems: Problem[] = []
  for (const walk of view.walks)
    for (const segment of walk.segments)
      for (const [item, { says }] of Object.entries(segment.words)) {
        const known: readonly string[] | null = Object.hasOwn(items, item)
          ? items[item as keyof typeof items].says
          : null
        if (known === null || known.includes(says)) continue
        const path = `view/walks/${walk.id}/segments/${segment.id}/words/${item}/says`
        const expected = known.join(' | ')
        problems.push({
          path,
          expected,
          found: says.slice(0, 80),
          whatToDo: `Answer with one of: ${known.join(', ')}.`,
        })
      }
  return problems
}
