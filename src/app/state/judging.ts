import { effect, type ReadonlySignal, signal } from '@preact/signals'
import type { Survey } from '../../record/survey.ts'
import { judge } from '../../workers/bridge.ts'
import type { Judgement } from './session.ts'
import { dayOf } from './today.ts'

/** Idle time after an entry before the judge starts anew, milliseconds. */
const idle = 300

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
          judgement.value = { ...judgement.peek(), progress }
        })
        cancel = running.cancel
        void running.answer.then((answer) => {
          if (answer === null) return
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
