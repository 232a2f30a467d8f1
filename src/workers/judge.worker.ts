import { judgeSurvey } from '../judge/judge.ts'
import type { Assessment } from '../judge/result.ts'
import { clearance } from '../leash/clearance.ts'
import type { FromJudge, ToJudge } from './messages.ts'
import { remembering } from './remembering.ts'

// The worker's own name carries a hash of the planner's code: a changed planner starts with an empty memory.
const memory = remembering(clearance, location.pathname)

/** Longest stretch of work before a word from the page is heard, milliseconds. */
const deaf = 40

let stopped = 0

addEventListener('message', ({ data }: MessageEvent<ToJudge>) => {
  if (data.kind === 'cancel') stopped = data.question
  else if (data.kind === 'remember') {
    if (!memory.remember(data.memo)) tell({ kind: 'outdated' })
  } else void answer(data)
})

async function answer({ question, survey, on }: Extract<ToJudge, { kind: 'judge' }>) {
  try {
    const assessment = await drain(question, survey, on)
    const learned = memory.learned()
    if (learned.size > 0) tell({ kind: 'learned', memo: learned })
    tell(assessment ? { kind: 'done', question, assessment } : { kind: 'cancelled', question })
  } catch (error) {
    tell({
      kind: 'problem',
      question,
      problem: `This cannot be judged: ${error instanceof Error ? error.message : error}`,
    })
  }
}

/** Works the judgement off, listening now and then. Null: cancelled. */
async function drain(
  question: number,
  survey: Parameters<typeof judgeSurvey>[0],
  on: string,
): Promise<Assessment | null> {
  const judgement = judgeSurvey(survey, { planner: memory.planner, on })
  let heard = performance.now()
  for (;;) {
    const step = judgement.next()
    if (step.done) return step.value
    if (performance.now() - heard < deaf) continue
    tell({ kind: 'progress', question, progress: { ...step.value } })
    await listen()
    heard = performance.now()
    if (stopped === question) return null
  }
}

/** Lets the messages in that have come meanwhile. */
function listen(): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve))
}

function tell(message: FromJudge) {
  postMessage(message)
}
