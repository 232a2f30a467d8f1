import type { Assessment, JudgeProgress } from '../judge/result.ts'
import type { Survey } from '../record/survey.ts'
import type { FromJudge, Memo, ToJudge } from './messages.ts'

/**
 * The only door to the workers. One worker, one queue: questions are answered one after the other in the order asked,
 * and one that is cancelled before its turn is never begun.
 */
export type Answer = { ok: true; assessment: Assessment } | { ok: false; problem: string }

export interface Running {
  /** Null: cancelled. */
  answer: Promise<Answer | null>
  cancel(): void
}

interface Question {
  ask: Extract<ToJudge, { kind: 'judge' }>
  tell(progress: JudgeProgress): void
  settle(answer: Answer | null): void
}

let worker: Worker | null = null
let numbered = 0
const waiting: Question[] = []
let current: Question | null = null

/** Judges every walk of a survey as on a day. */
export function judge(survey: Survey, on: string, tell: (progress: JudgeProgress) => void): Running {
  const question = ++numbered
  const { promise, settle } = open()
  waiting.push({ ask: { kind: 'judge', question, survey, on }, tell, settle })
  next()
  return { answer: promise, cancel: () => cancel(question) }
}

/** Where the planner's memory is kept between one page and the next. */
export interface MemoKeeper {
  read(): Promise<Memo>
  keep(memo: Memo): void
  forget(): Promise<void>
}

let keeper: MemoKeeper | null = null

/** Gives the judge a memory; to be called once, before the first question. */
export function keepMemoWith(one: MemoKeeper): void {
  keeper = one
}

function open(): { promise: Promise<Answer | null>; settle: (answer: Answer | null) => void } {
  let settle: (answer: Answer | null) => void = () => {}
  const promise = new Promise<Answer | null>((resolve) => {
    settle = resolve
  })
  return { promise, settle }
}

function next() {
  if (current) return
  current = waiting.shift() ?? null
  if (current) void post(current.ask)
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

function cancel(question: number) {
  const place = waiting.findIndex(({ ask }) => ask.question === question)
  if (place >= 0) waiting.splice(place, 1)[0]?.settle(null)
  else if (current?.ask.question === question) worker?.postMessage({ kind: 'cancel', question } satisfies ToJudge)
}

function finish(answer: Answer | null) {
  current?.settle(answer)
  current = null
  next()
}

function start(): Worker {
  const started = new Worker(new URL('./judge.worker.ts', import.meta.url), { type: 'module', name: 'judge' })
  started.addEventListener('message', ({ data }: MessageEvent<FromJudge>) => {
    if (data.kind === 'learned') return keeper?.keep(data.memo)
    if (data.kind === 'outdated') return void keeper?.forget()
    if (!current || data.question !== current.ask.question) return
    if (data.kind === 'progress') current.tell(data.progress)
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
