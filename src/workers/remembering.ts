import type { ClearanceAnswer, Planner } from '../leash/answer.ts'

export interface Remembering {
  planner: Planner
  /** Takes in what was kept; false: some of it is of another planner, and was left. */
  remember(kept: ReadonlyMap<string, unknown>): boolean
  /** What was learned since the last call. */
  learned(): Map<string, ClearanceAnswer>
}

/**
 * A planner that solves no scene twice. `version` stands in every key, so that an answer of an older planner is never
 * taken for one of this. Of a motion only the samples with a slack leash are kept, from the first answer on: the
 * judgement reads no others, and a phone keeps thousands.
 */
export function remembering(planner: Planner, version: string): Remembering {
  const known = new Map<string, ClearanceAnswer>()
  let fresh = new Map<string, ClearanceAnswer>()
  return {
    planner(scene, bodies, separation, options) {
      const key = `${version} ${JSON.stringify([scene, bodies, separation, options ?? {}])}`
      const before = known.get(key)
      if (before) return before
      const answer = slim(planner(scene, bodies, separation, options))
      known.set(key, answer)
      fresh.set(key, answer)
      return answer
    },
    remember(kept) {
      let all = true
      for (const [key, value] of kept) {
        if (key.startsWith(`${version} `)) known.set(key, value as ClearanceAnswer)
        else all = false
      }
      return all
    },
    learned() {
      const learned = fresh
      fresh = new Map()
      return learned
    },
  }
}

/** Numbers a sample, the last of them 1 while the leash hangs slack. */
const fields = 6

function slim(answer: ClearanceAnswer): ClearanceAnswer {
  const samples = answer.motion?.samples
  if (!samples) return { ...answer, tautMotion: null }
  const slack: number[] = []
  for (let at = 0; at + fields <= samples.length; at += fields)
    if (samples[at + fields - 1] === 1) slack.push(...samples.subarray(at, at + fields))
  return { ...answer, motion: { samples: Float64Array.from(slack) }, tautMotion: null }
}
