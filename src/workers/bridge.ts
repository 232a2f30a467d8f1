import type { Assessment, JudgeProgress } from '../judge/result.ts'
import type { Survey } from '../record/survey.ts'
import type { FromJudge, Memo, ToJudge } from './messages.ts'

export type { SheetAnswer, SheetOrder } from './sheet-messages.ts'
export { writeSheet } from './sheet-writer.ts'

/**
 * The only door to the workers: sheets are written through the one above, judged is here. One worker, one question at a
 * time, the newest first: what a person looks at now is judged before what they left. A question that is interrupted is taken up again; the planner remembers what it had solved.
 */
export type Answer = { ok: true; assessment: Assessment } | { ok: false; problem: string }

export interface Running {
  /** Null: cancelled. */
  answer: Promise<Answer | null>
  cancel(): void
}

/** Where the planner's memory is kept between one page and the next. */
export interface MemoKeeper {
  read(): Promise<Memo>
  keep(memo: Memo): void
  forget(): Promise<void>
}

interface Question {
  survey: Survey
  on: string
  tell(progress: JudgeProgress): void
  settle(answer: Answer | null): void
  /** Its asker wants it no more. */
  dropped: boolean
}

let worker: Worker | null = null
let keeper: MemoKeeper | null = null
/** The question in the worker, under a number of its own for each time it is asked. */
let current: { question: Question; number: number } | null = null
let numbered = 0
/** The last is the next. */
const waiting: Question[] = []

/** Gives the judge a memory; to be called once, before the first question. */
export function keepMemoWith(one: MemoKeeper): void {
  keeper = one
}

/** Judges every walk of a survey as on a day. */
export function judge(survey: Survey, on: string, tell: (progress: JudgeProgress) => void): Running {
  let settle: Question['settle'] = () => {}
  const answer = new Promise<Answer | null>((resolve) => {
    settle = resolve
  })
  const question: Question = { survey, on, tell, settle, dropped: false }
  if (current) {
    if (!current.question.dropped) waiting.push(current.question)
    stop(current.number)
  }
  waiting.push(question)
  next()
  return { answer, cancel: () => cancel(question) }
}

function cancel(question: Question) {
  question.dropped = true
  const place = waiting.indexOf(question)
  if (place >= 0) waiting.splice(place, 1)
  if (current?.question === question) stop(current.number)
  question.settle(null)
}

function stop(number: number) {
  worker?.postMessage({ kind: 'cancel', question: number } satisfies ToJudge)
}

function next() {
  if (current) return
  const question = waiting.pop()
  if (!question) return
  current = { question, number: ++numbered }
  void post({ kind: 'judge', question: current.number, survey: question.survey, on: question.on })
}

/** A new worker is first told what was worked out before. */
async function post(ask: ToJudge) {
  const asked = worker ?? start()
  if (!worker) {
    worker = asked
    const memo = await keeper?.read().catch(() => null)
    if (memo) asked.postMessage({ kind: 'remember', memo } satisfies ToJudge)
  }
  asked.postMessage(ask)
}

/** Null: stopped, because its asker wants it no more or because a newer one came; then it waits in the queue. */
function finish(answer: Answer | null) {
  if (current && answer) {
    const place = waiting.indexOf(current.question)
    if (place >= 0) waiting.splice(place, 1)
    current.question.settle(answer)
  }
  current = null
  next()
}

function start(): Worker {
  const started = new Worker(new URL('./judge.worker.ts', import.meta.url), { type: 'module', name: 'judge' })
  started.addEventListener('message', ({ data }: MessageEvent<FromJudge>) => {
    if (data.kind === 'learned') return keeper?.keep(data.memo)
    if (data.kind === 'outdated') return void keeper?.forget()
    if (data.question !== current?.number) return
    if (data.kind === 'progress') current.question.tell(data.progress)
    else if (data.kind === 'done') finish({ ok: true, assessment: data.assessment })
    else if (data.kind === 'cancelled') finish(null)
    else finish({ ok: false, problem: data.problem })
  })
  // A worker that died is thrown away: the next question starts another one.
  started.addEventListener('error', (event) => {
    started.terminate()
    if (worker === started) worker = null
    finish({ ok: false, problem: `The judgement stopped: ${event.message || 'its file could not be loaded'}.` })
  })
  return started
}
