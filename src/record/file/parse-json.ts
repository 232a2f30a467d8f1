import { deepest, jsonFault } from '../json.ts'
import type { Problem } from './problem.ts'

/** Longest file read, in characters. A day's survey of a large venue is under 5 million. */
export const longestFile = 20 * 1024 * 1024

export type ParsedJson = { ok: true; value: unknown } | { ok: false; problems: Problem[] }

/** JSON with its size and depth bounded before anything is built from it; no reserved key, no endless number. */
export function parseJson(text: string, longest = longestFile): ParsedJson {
  if (text.length > longest)
    return refused({
      path: '',
      expected: `${longest / 1024 / 1024} million characters at most`,
      found: `${Math.ceil(text.length / 1024 / 1024)} million`,
      whatToDo: 'Check that this is a survey file; split a survey of that size by walks.',
    })
  if (isTooDeep(text))
    return refused({
      path: '',
      expected: `nesting of ${deepest} levels at most`,
      found: 'deeper nesting',
      whatToDo: 'Take the file as it was exported: no survey nests so deep.',
    })
  let value: unknown
  try {
    value = JSON.parse(text)
  } catch (error) {
    return refused({
      path: '',
      expected: 'JSON',
      found: error instanceof Error ? error.message.slice(0, 120) : 'something else',
      whatToDo: 'Take the file again from where it was exported, or mend the place named.',
    })
  }
  const fault = jsonFault(value)
  return fault
    ? refused({ ...fault, whatToDo: 'Rename the key or correct the number; nothing was read.' })
    : { ok: true, value }
}

function refused(problem: Problem): ParsedJson {
  return { ok: false, problems: [problem] }
}

/** Counts brackets outside strings, without building anything. */
function isTooDeep(text: string): boolean {
  let depth = 0
  let quoted = false
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i)
    if (quoted) {
      if (code === 92) i++
      else if (code === 34) quoted = false
    } else if (code === 34) quoted = true
    else if (code === 91 || code === 123) {
      if (++depth > deepest) return true
    } else if (code === 93 || code === 125) depth--
  }
  return false
}
