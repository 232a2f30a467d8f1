import type { ClearanceAnswer, Planner } from '../leash/answer.ts'

/** Set by the build to a hash of the planner's sources: an answer of another planner is never taken for one of this. */
declare const __PLANNER__: string
const planner = typeof __PLANNER__ === 'string' ? __PLANNER__ : 'unbuilt'

export interface Memo {
  planner: Planner
  /** The file as it should now be, or null where nothing was learned. */
  text(): string | null
  /** Why what was in the file is not used; null: it is used, or there was none. */
  note: string | null
}

type Kept = Omit<ClearanceAnswer, 'motion' | 'tautMotion'> & { motion: number[] | null }

/**
 * A planner that solves no scene twice, over runs. Keys are exact: nothing is rounded. Of a motion only the samples with a
 * slack leash are kept: the judgement reads no others.
 * @param text the memo file's text; null: there is none yet.
 */
export function memoOver(solve: Planner, text: string | null): Memo {
  const read = text === null ? null : entriesOf(text)
  const known = new Map<string, Kept>(read ?? [])
  let learned = false
  return {
    planner(scene, bodies, separation, options) {
      const key = JSON.stringify([scene, bodies, separation, options ?? {}])
      const before = known.get(key)
      if (before) return answerOf(before)
      const answer = solve(scene, bodies, separation, options)
      known.set(key, keptOf(answer))
      learned = true
      return answer
    },
    text: () =>
      learned || (text !== null && read === null)
        ? `${JSON.stringify({ kind: 'tautline-memo', version: 1, planner, entries: [...known] })}\n`
        : null,
    note: text !== null && read === null ? 'the memo is not of this version and is written anew' : null,
  }
}

function keptOf({ tautMotion: _, motion, ...answer }: ClearanceAnswer): Kept {
  return { ...answer, motion: motion ? slackSamples(motion.samples) : null }
}

function answerOf({ motion, ...answer }: Kept): ClearanceAnswer {
  return { ...answer, motion: motion ? { samples: Float64Array.from(motion) } : null, tautMotion: null }
}

const fields = 6

function slackSamples(samples: Float64Array): number[] {
  const slack: number[] = []
  for (let at = 0; at + fields <= samples.length; at += fields)
    if (samples[at + fields - 1] === 1) slack.push(...samples.subarray(at, at + fields))
  return slack
}

/** null: no memo of this planner. */
function entriesOf(text: string): [string, Kept][] | null {
  try {
    const file: unknown = JSON.parse(text)
    if (typeof file !== 'object' || file === null) return null
    const { kind, version, planner: of, entries } = file as Record<string, unknown>
    if (kind !== 'tautline-memo' || version !== 1 || of !== planner || !Array.isArray(entries)) return null
    return entries.every(isEntry) ? entries : null
  } catch {
    return null
  }
}

function isEntry(entry: unknown): entry is [string, Kept] {
  if (!Array.isArray(entry) || entry.length !== 2 || typeof entry[0] !== 'string') return false
  const answer = entry[1] as Partial<Kept> | null
  const ends = [answer?.mTaut, answer?.mTautHigh, answer?.mSlack, answer?.mSlackHigh, answer?.pauses]
  return (
    ends.every((end) => end === null || Number.isFinite(end)) &&
    typeof answer?.decided === 'boolean' &&
    (answer.motion === null || (Array.isArray(answer.motion) && answer.motion.every(Number.isFinite)))
  )
}
