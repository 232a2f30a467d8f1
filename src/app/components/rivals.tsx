import type { Answer } from '../../record/survey.ts'
import { BigKey } from './big-key.tsx'

/** What two people answered differently, both shown, and a key for each to settle on. Nothing where they agree. */
export function Rivals(props: { answer: Answer; wordOf(says: string): string; settle(says: string): unknown }) {
  const { answer, wordOf, settle } = props
  if (!answer.rivals) return null
  const all = [answer, ...answer.rivals]
  return (
    <div class="trouble stack tight">
      <p>
        Not agreed: {all.map((one) => `${one.person || 'somebody'} says “${wordOf(one.says)}”`).join(', ')}. Both are
        kept until one is settled on.
      </p>
      <div class="keys">
        {[...new Set(all.map((one) => one.says))].map((says) => (
          <BigKey key={says} press={() => void settle(says)}>
            Settle on “{wordOf(says)}”
          </BigKey>
        ))}
      </div>
    </div>
  )
}
