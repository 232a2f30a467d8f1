import { afterEach, beforeEach, expect, test, vi } from 'vitest'
import { type Outline, paragraph } from '../../src/sheets/content/tree.ts'
import type { FromSheets, SheetAnswer, ToSheets } from '../../src/workers/sheet-messages.ts'

/** Stands where the browser's Worker does: keeps what it was told, says what the test lets it say. */
class ScriptedWorker extends EventTarget {
  static started: ScriptedWorker[] = []
  readonly told: ToSheets[] = []
  ended = false

  constructor() {
    super()
    ScriptedWorker.started.push(this)
  }

  postMessage(message: ToSheets) {
    this.told.push(message)
  }

  terminate() {
    this.ended = true
  }

  say(data: FromSheets) {
    this.dispatchEvent(new MessageEvent('message', { data }))
  }

  /** Answers what it was told last with one byte. */
  write(byte: number) {
    const answer: SheetAnswer = { kind: 'written', bytes: new Uint8Array([byte]) }
    this.say({ kind: 'answer', number: this.told.at(-1)?.number ?? Number.NaN, answer })
  }
}

const sheet = (title: string): Outline => ({
  kind: 'outline',
  lang: 'en',
  reader: 'venue',
  draft: false,
  title,
  heading: title,
  blocks: [paragraph('One line.')],
  sections: [],
})

let writer: typeof import('../../src/workers/sheet-writer.ts')
const worker = () => {
  const last = ScriptedWorker.started.at(-1)
  if (!last) throw new Error('no worker was started')
  return last
}
const ask = (title: string, tell: (stage: string) => void = () => {}) =>
  writer.writeSheet({ outline: sheet(title), as: 'word', extras: '/extras/0/' }, tell)

beforeEach(async () => {
  ScriptedWorker.started = []
  vi.stubGlobal('Worker', ScriptedWorker)
  vi.resetModules()
  writer = await import('../../src/workers/sheet-writer.ts')
})
afterEach(() => vi.unstubAllGlobals())

test('one sheet at a time, in the order asked, each with its own answer', async () => {
  const stages: string[] = []
  const first = ask('first', (stage) => stages.push(stage))
  const second = ask('second', () => stages.push('of the second'))
  expect(worker().told.map(({ outline }) => outline.title)).toEqual(['first'])
  worker().say({ kind: 'stage', number: worker().told[0]?.number ?? 0, stage: 'writing' })
  worker().write(1)
  expect(worker().told.map(({ outline }) => outline.title)).toEqual(['first', 'second'])
  worker().write(2)
  expect(await first.answer).toEqual({ kind: 'written', bytes: new Uint8Array([1]) })
  expect(await second.answer).toEqual({ kind: 'written', bytes: new Uint8Array([2]) })
  expect(stages).toEqual(['writing'])
  expect(ScriptedWorker.started).toHaveLength(1)
})

test('cancelled while it is written: its worker is stopped, the next goes to another; waiting: it is never begun', async () => {
  const [first, second, third] = [ask('first'), ask('second'), ask('third')]
  second.cancel()
  expect(await second.answer).toBeNull()
  const stopped = worker()
  first.cancel()
  expect(await first.answer).toBeNull()
  expect(stopped.ended).toBe(true)
  expect(ScriptedWorker.started).toHaveLength(2)
  expect(worker().told.map(({ outline }) => outline.title)).toEqual(['third'])
  // What the stopped one still had to say is of nobody's sheet.
  stopped.write(1)
  worker().write(3)
  expect(await third.answer).toEqual({ kind: 'written', bytes: new Uint8Array([3]) })
  third.cancel()
  expect(worker().ended).toBe(false)
})

test('a worker that dies is a problem with a way on, and the next sheet has another worker', async () => {
  const first = ask('first')
  const second = ask('second')
  const dead = worker()
  dead.dispatchEvent(Object.assign(new Event('error'), { message: '' }))
  expect(await first.answer).toMatchObject({ kind: 'problem', whatToDo: expect.stringContaining('plain text') })
  expect(worker()).not.toBe(dead)
  worker().write(2)
  expect(await second.answer).toEqual({ kind: 'written', bytes: new Uint8Array([2]) })
})
