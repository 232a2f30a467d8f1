import type { FromSheets, SheetAnswer, SheetOrder, SheetStage, ToSheets } from './sheet-messages.ts'

/** An order given to the worker that writes sheets. */
export interface SheetWriting {
  /** Null: cancelled. */
  answer: Promise<SheetAnswer | null>
  cancel(): void
}

interface Job {
  order: SheetOrder
  tell(stage: SheetStage): void
  settle(answer: SheetAnswer | null): void
}

let worker: Worker | null = null
/** The first is in the worker, under the number it was last given. */
const queue: Job[] = []
let numbered = 0

/** Writes a sheet as a file, off the page, one after the other in the order asked. */
export function writeSheet(order: SheetOrder, tell: (stage: SheetStage) => void): SheetWriting {
  let settle: Job['settle'] = () => {}
  const answer = new Promise<SheetAnswer | null>((resolve) => {
    settle = resolve
  })
  const job: Job = { order, tell, settle }
  queue.push(job)
  if (queue.length === 1) next()
  return { answer, cancel: () => cancel(job) }
}

/** A builder hears nothing while it works: what is wanted no more is stopped with its worker. */
function cancel(job: Job) {
  const place = queue.indexOf(job)
  if (place < 0) return
  if (place === 0) end()
  queue.splice(place, 1)
  job.settle(null)
  if (place === 0) next()
}

function next() {
  const [job] = queue
  if (!job) return
  worker ??= start()
  worker.postMessage({ number: ++numbered, ...job.order } satisfies ToSheets)
}

function end() {
  worker?.terminate()
  worker = null
}

function start(): Worker {
  // Not of type module: see the worker's own first lines.
  const started = new Worker(new URL('./sheets.worker.ts', import.meta.url), { name: 'sheets' })
  const finish = (answer: SheetAnswer) => {
    queue.shift()?.settle(answer)
    next()
  }
  started.addEventListener('message', ({ data }: MessageEvent<FromSheets>) => {
    if (worker !== started || data.number !== numbered) return
    if (data.kind === 'stage') queue[0]?.tell(data.stage)
    else finish(data.answer)
  })
  // A worker that died is thrown away: the next order starts another one.
  started.addEventListener('error', (event) => {
    if (worker !== started) return
    end()
    finish({
      kind: 'problem',
      problem: `The writing stopped: ${event.message || 'its file could not be loaded'}.`,
      whatToDo: 'Try once more; where it stops again, give the sheet as a page or as plain text.',
    })
  })
  return started
}
