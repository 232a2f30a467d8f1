import { clearanceFromArgs } from './clearance.ts'
import { done, type Ended, type Machine } from './ended.ts'

/** `clearance --scene ...`: the planner's answer to one scene as one JSON object; the motion in a file where asked for. */
export function clearance(args: readonly string[], machine: Machine): Ended {
  const outcome = clearanceFromArgs(args, (path) => {
    const text = machine.read(path)
    if (!text.ok) throw new Error(text.why)
    return text.text
  })
  if (!outcome.ok) return { ok: false, line: outcome.message }
  const { result, motionFile } = outcome
  const files = motionFile ? [{ path: motionFile.path, content: motionFile.text }] : []
  return done(`${JSON.stringify(result, null, 2)}\n`, files)
}
