import { expect, it } from 'vitest'
import { memoOver } from '../../src/cli/memo.ts'
import type { Scene } from '../../src/geometry/scene.ts'
import type { Bodies, ClearanceAnswer, Planner } from '../../src/leash/answer.ts'

const scene = (width: number): Scene => ({
  polygon: [
    { x: 0, y: 0 },
    { x: width, y: 0 },
    { x: width, y: 1 },
  ],
  holes: [],
  start: { x: 0.1, y: 0.1, heading: 0 },
  goal: { polygon: [] },
})
const bodies: Bodies = { a: 0.65, b: 0.35, d: 0.15, r: 0.27, g: 0.1, phiMax: 1.5, sideways: true }

/** Two samples, the second with a slack leash. */
const answer = (width: number): ClearanceAnswer => ({
  mTaut: null,
  mTautHigh: width / 3,
  mSlack: 0.1 + width / 7,
  mSlackHigh: 0.3,
  pauses: 1,
  tightest: { body: 'robot', part: 'front', wall: 'inner corner', x: 1 / 3, y: 0, text: 'robot at the inner corner' },
  swing: 1.25,
  motion: { samples: Float64Array.of(0, 1, 2, 3, 4, 0, 1 / 3, 1, 2, 3, 4, 1) },
  tautMotion: { samples: Float64Array.of(0, 1, 2, 3, 4, 0) },
  decided: true,
})

function counting(): { planner: Planner; asked: number[] } {
  const asked: number[] = []
  return {
    asked,
    planner: ({ polygon }) => {
      const width = polygon[1]?.x ?? 0
      asked.push(width)
      return answer(width)
    },
  }
}

it('asks the planner once for each scene, team, separation and option, over runs', () => {
  const first = counting()
  const memo = memoOver(first.planner, null)
  expect(memo.text()).toBeNull()
  const all = [
    () => memo.planner(scene(1), bodies, 1),
    () => memo.planner(scene(1.0001), bodies, 1),
    () => memo.planner(scene(1), { ...bodies, r: 0.2701 }, 1),
    () => memo.planner(scene(1), bodies, 1.0001),
    () => memo.planner(scene(1), bodies, 1, { slack: false }),
  ]
  for (const ask of [...all, ...all]) ask()
  expect(first.asked).toEqual([1, 1.0001, 1, 1, 1])

  const second = counting()
  const reread = memoOver(second.planner, memo.text())
  expect(reread.note).toBeNull()
  const kept = reread.planner(scene(1), bodies, 1)
  expect(second.asked).toEqual([])
  // Every figure to the last bit; of the motion what the judgement reads: the slack samples.
  const { motion, tautMotion, ...figures } = answer(1)
  expect(kept).toEqual({ ...figures, motion: { samples: motion?.samples.slice(6) }, tautMotion: null })
  expect(reread.text()).toBeNull()
})
