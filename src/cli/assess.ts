import { readArgs } from './args.ts'
import { assessmentShape } from './assessment-shape.ts'
import { done, type Ended, type Machine } from './ended.ts'
import { judgedFile, judgingOptions } from './judged.ts'

/** `assess FILE`: the judgement of a survey as one JSON object. */
export function assess(args: readonly string[], machine: Machine): Ended {
  const read = readArgs(args, { values: judgingOptions, places: 1, place: 'FILE' })
  if (!read.ok) return read
  const judged = judgedFile(read.args, machine)
  if (!judged.ok) return judged
  return done(`${JSON.stringify(assessmentShape(judged.assessment), null, 2)}\n`, judged.files, judged.notes)
}
