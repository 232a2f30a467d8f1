import { parseJson } from '../record/file/parse-json.ts'
import { largestBody } from '../sync/messages.ts'
import { Refusal } from './refusal.ts'

/** A request's JSON with depth and keys bounded before anything is built from it. */
export function readBody(text: string): unknown {
  if (text === '') return undefined
  const parsed = parseJson(text, largestBody)
  if (parsed.ok) return parsed.value
  const [problem] = parsed.problems
  throw new Refusal(
    400,
    'json',
    `${problem?.path ? `At ${problem.path.slice(0, 200)}: expected` : 'Expected'} ${problem?.expected}; found ${problem?.found}.`,
    'Nothing was stored. Send it again from the app; if that fails, share the survey as a file.',
  )
}
