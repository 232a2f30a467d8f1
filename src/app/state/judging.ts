import { effect, type ReadonlySignal, signal } from '@preact/signals'
import type { Survey } from '../../record/survey.ts'
import { judge, keepMemoWith } from '../../workers/bridge.ts'
import { phoneStore } from './phone.ts'
import type { Judgement } from './session.ts'
import { dayOf } from './today.ts'

/** Idle time after an entry before the judge starts anew, milliseconds. */
const idle = 300

// What the planner worked out is kept on the phone: a corner is solved once.
keepMemoWith({
  read: async () => (await phoneStore()).readWholeMemo(),
  keep: (memo) => void phoneStore().then((store) => store.keepMemo(memo)),
  forget: async () => (await phoneStore()).clearMemo(),
})

const none: Judgement = { walks: [], assessment: null, stale: true, progress: null, problem: null }

/**
 * The judgement of a survey, worked out anew in the worker after each change. `stale` from the first change until the
 * answer to the last one is here; a question that is overtaken is cancelled.
 */
export function judgeOf(survey: ReadonlySignal<Survey>): ReadonlySignal<Judgement> {
  const judgement = signal<Judgement>(none)
  let cancel = () => {}
  let first = true
  effect(() => {
    const asked = survey.value
    cancel()
    judgement.value = { ...judgement.peek(), stale: true, progress: null }
    const later = setTimeout(
      () => {
        const running = judge(asked, dayOf(asked), (progress) => {
          if (survey.peek() === asked) judgement.value = { ...judgement.peek(), progress }
        })
        cancel = running.cancel
        void running.answer.then((answer) => {
          // An answer to a question that has been overtaken says nothing of the survey as it is now.
          if (answer === null || survey.peek() !== asked) return
          judgement.value = answer.ok
            ? { ...none, walks: answer.assessment.walks, assessment: answer.assessment, stale: false }
            : { ...none, stale: false, problem: answer.problem }
        })
      },
      first ? 0 : idle,
    )
    first = false
    cancel = () => clearTimeout(later)
  })
  return judgement
}
