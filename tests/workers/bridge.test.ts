import { afterEach, beforeEach, expect, test, vi } from 'vitest'
import type { Assessment } from '../../src/judge/result.ts'
import type { Survey } from '../../src/record/survey.ts'
import type { FromJudge, ToJudge } from '../../src/workers/messages.ts'

/** Stands where the browser's Worker does: keeps what it was told, says what the test lets it say. */
class ScriptedWorker extends EventTarget {
  static last: ScriptedWorker
  readonly told: ToJudge[] = []
  ended = false

  constructor() {
    super()
    ScriptedWorker.last = this
  }

  postMessage(message: ToJudge) {
    this.told.push(message)
  }

  terminate() {
    this.ended = true
  }

  say(data: FromJudge) {
    this.dispatchEvent(new MessageEvent('message', { data }))
  }

  /** The venue asked about last, and under which number. */
  asked(): { venue: string; question: number } {
    const ask = this.told.findLast((one) => one.kind === 'judge')
    if (ask?.kind !== 'judge') throw new Error('nothing was asked')
    return { venue: ask.survey.survey, question: ask.question }
  }
}

const survey = (id: string): Survey => ({
  survey: id,
  view: { name: id, floors: [], zones: [], places: [], walks: [] },
})
const assessment = (venue: string): Assessment => ({
  venue,
  team: { name: 't', version: '1' },
  code: 'own',
  cautions: [],
  on: '2026-12-01',
  walks: [],
})
const settle = () => new Promise((resolve) => setTimeout(resolve))

let bridge: typeof import('../../src/workers/bridge.ts')

beforeEach(async () => {
  vi.stubGlobal('Worker', ScriptedWorker)
  vi.resetModules()
  bridge = await import('../../src/workers/bridge.ts')
})
afterEach(() => vi.unstubAllGlobals())

const ask = (id: string) => bridge.judge(survey(id), '2026-12-01', () => {})

test('the newest question is judged first; the one it interrupted is asked again and answered', async () => {
  const old = ask('old')
  await settle()
  const worker = ScriptedWorker.last
  const { question } = worker.asked()
  const fresh = ask('fresh')
  expect(worker.told.at(-1)).toEqual({ kind: 'cancel', question })
  worker.say({ kind: 'cancelled', question })
  await settle()
  expect(worker.asked().venue).toBe('fresh')
  worker.say({ kind: 'done', question: worker.asked().question, assessment: assessment('fresh') })
  await settle()
  expect(worker.asked().venue).toBe('old')
  expect(worker.asked().question).not.toBe(question)
  worker.say({ kind: 'done', question: worker.asked().question, assessment: assessment('old') })
  expect(await fresh.answer).toEqual({ ok: true, assessment: assessment('fresh') })
  expect(await old.answer).toEqual({ ok: true, assessment: assessment('old') })
})

test('a question that ends before its interruption is heard is answered, and not asked again', async () => {
  const old = ask('old')
  await settle()
  const worker = ScriptedWorker.last
  const { question } = worker.asked()
  ask('fresh')
  worker.say({ kind: 'done', question, assessment: assessment('old') })
  expect(await old.answer).toEqual({ ok: true, assessment: assessment('old') })
  await settle()
  worker.say({ kind: 'done', question: worker.asked().question, assessment: assessment('fresh') })
  await settle()
  expect(worker.told.filter((one) => one.kind === 'judge' && one.survey.survey === 'old')).toHaveLength(1)
})

test('a cancelled question has no answer: stopped in the worker, or never begun', async () => {
  const running = ask('running')
  await settle()
  const worker = ScriptedWorker.last
  const { question } = worker.asked()
  running.cancel()
  expect(worker.told.at(-1)).toEqual({ kind: 'cancel', question })
  expect(await running.answer).toBeNull()
  const waiting = ask('waiting')
  waiting.cancel()
  worker.say({ kind: 'cancelled', question })
  await settle()
  await settle()
  expect(await waiting.answer).toBeNull()
  expect(worker.told.filter(({ kind }) => kind === 'judge')).toHaveLength(1)
})

test('a worker that dies tells its question so, and the next question has a new one', async () => {
  const lost = ask('lost')
  await settle()
  const dead = ScriptedWorker.last
  dead.dispatchEvent(Object.assign(new Event('error'), { message: 'out of memory' }))
  expect(await lost.answer).toEqual({ ok: false, problem: 'The judgement stopped: out of memory.' })
  expect(dead.ended).toBe(true)
  ask('next')
  await settle()
  expect(ScriptedWorker.last).not.toBe(dead)
  expect(ScriptedWorker.last.asked().venue).toBe('next')
})

test('a new worker is told what was worked out before, ahead of its question; what it learns is kept', async () => {
  const kept: unknown[] = []
  bridge.keepMemoWith({
    read: async () => new Map([['a', 1]]),
    keep: (memo) => kept.push(memo),
    forget: async () => {},
  })
  ask('any')
  await settle()
  const worker = ScriptedWorker.last
  expect(worker.told.map(({ kind }) => kind)).toEqual(['remember', 'judge'])
  worker.say({ kind: 'learned', memo: new Map([['b', 2]]) })
  expect(kept).toEqual([new Map([['b', 2]])])
})
