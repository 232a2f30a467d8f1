import type { WalkResult } from '../../../judge/result.ts'
import type { Walk } from '../../../record/survey.ts'

/** What follows the verdict's word: who helps and where; null: nothing, or nothing is known. */
export function verdictDetail(walk: Walk, result: WalkResult): string | null {
  if (result.verdict !== 'with-help') return null
  const helped = walk.segments.flatMap((segment) =>
    [segment, ...segment.features, ...(segment.turn ? [segment.turn] : [])].flatMap((holder) =>
      holder.help?.role ? [`${holder.help.role} at ${holder.name ?? segment.name}`] : [],
    ),
  )
  const all = [...new Set(helped)]
  if (all.length === 0) return null
  return all.length > 2 ? `${all.slice(0, 2).join('; ')}; and ${all.length - 2} more` : all.join('; ')
}
