import { TapeProgress } from '../../components/tape-rule.tsx'
import type { Judgement } from '../../state/session.ts'

/** How far the judge is: words, and the tape drawn out. Nothing while there is nothing to say. */
export function JudgingLine({ judgement }: { judgement: Judgement }) {
  if (judgement.problem)
    return (
      <p class="trouble" role="alert">
        {judgement.problem}
      </p>
    )
  if (!judgement.stale || !judgement.progress) return null
  const { done, total } = judgement.progress
  return (
    <div>
      <TapeProgress share={total > 0 ? done / total : 0} label="Judging" />
      <p class="soft">
        Judging: {done} of {total} steps
      </p>
    </div>
  )
}
