import { parentPort, Worker } from 'node:worker_threads'
import { judgeNow, makeSheetNow } from './core.ts'
import type { Judge, SheetMaker } from './office.ts'

type Question = { judge: Parameters<Judge> } | { sheet: Parameters<SheetMaker> }
type Reply = { id: number; answer: unknown } | { id: number; error: string }

export interface Core {
  judge: Judge
  makeSheet: SheetMaker
  close(): Promise<void>
}

/** The core in a thread of its own, so that a long judgement keeps no phone waiting. `file`: this program's one file. */
export function startCore(file: URL): Core {
  const waiting = new Map<number, { resolve(answer: unknown): void; reject(error: Error): void }>()
  let thread: Worker | null = null
  let last = 0
  let closed = false
  const start = () => {
    const fresh = new Worker(file)
    // It keeps nothing running by itself.
    fresh.unref()
    fresh.on('message', (reply: Reply) => {
      const asked = waiting.get(reply.id)
      waiting.delete(reply.id)
      if ('error' in reply) asked?.reject(new Error(reply.error))
      else asked?.resolve(reply.answer)
    })
    const fail = (error: Error) => {
      thread = null
      for (const asked of waiting.values()) asked.reject(error)
      waiting.clear()
    }
    fresh.on('error', fail)
    fresh.on('exit', () => fail(new Error('office/core-ended: the judging thread ended')))
    return fresh
  }
  const ask = (question: Question) =>
    new Promise<unknown>((resolve, reject) => {
      if (closed) return reject(new Error('office/core-ended: the office is stopping'))
      thread ??= start()
      const id = ++last
      waiting.set(id, { resolve, reject })
      thread.postMessage({ id, question })
    })
  return {
    judge: (...given) => ask({ judge: given }) as ReturnType<Judge>,
    makeSheet: (...given) => ask({ sheet: given }) as ReturnType<SheetMaker>,
    close: async () => {
      closed = true
      await thread?.terminate()
    },
  }
}

/** The thread's side: answers one question after the other. */
export function answerAsCore(): void {
  parentPort?.on('message', ({ id, question }: { id: number; question: Question }) => {
    try {
      const answer = 'judge' in question ? judgeNow(...question.judge) : makeSheetNow(...question.sheet)
      parentPort?.postMessage({ id, answer } satisfies Reply)
    } catch (error) {
      parentPort?.postMessage({ id, error: error instanceof Error ? error.message : String(error) } satisfies Reply)
    }
  })
}
