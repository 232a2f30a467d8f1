import { expect, test } from 'vitest'
import type { Scene } from '../../src/geometry/scene.ts'
import type { ClearanceAnswer, Planner } from '../../src/leash/answer.ts'
import { referenceBodies } from '../../src/leash/team.ts'
import { remembering } from '../../src/workers/remembering.ts'

const scene = { name: 'a scene' } as unknown as Scene

/** Counts how often it is asked; its motion has one taut and two slack samples. */
function counting(): { planner: Planner; asked: () => number } {
  let asked = 0
  const answer: ClearanceAnswer = {
    mTaut: 0.1,
    mTautHigh: 0.2,
    mSlack: 0.1,
    mSlackHigh: 0.2,
    pauses: 0,
    tightest: null,
    swing: 0,
    motion: { samples: Float64Array.of(1, 1, 0, 2, 2, 0, 3, 3, 0, 4, 4, 1, 5, 5, 0, 6, 6, 1) },
    tautMotion: null,
    decided: true,
  }
  return {
    planner: () => {
      asked += 1
      return answer
    },
    asked: () => asked,
  }
}

test('a scene is solved once; another separation, body or option is another question', () => {
  const { planner, asked } = counting()
  const memory = remembering(planner, 'v1')
  memory.planner(scene, referenceBodies, 1)
  memory.planner(scene, referenceBodies, 1)
  expect(asked()).toBe(1)
  memory.planner(scene, referenceBodies, 1.2)
  memory.planner(scene, { ...referenceBodies, r: referenceBodies.r + 0.01 }, 1)
  memory.planner(scene, referenceBodies, 1, { drift: 0.1 })
  expect(asked()).toBe(4)
})

test('what was learned is told once, and remembered by the next of the same version', () => {
  const first = remembering(counting().planner, 'v1')
  const answer = first.planner(scene, referenceBodies, 1)
  const kept = first.learned()
  expect(kept.size).toBe(1)
  expect(first.learned().size).toBe(0)
  const { planner, asked } = counting()
  const second = remembering(planner, 'v1')
  expect(second.remember(kept)).toBe(true)
  expect(second.planner(scene, referenceBodies, 1)).toEqual(answer)
  expect(asked()).toBe(0)
})

test('an answer of another planner is never taken for one of this', () => {
  const first = remembering(counting().planner, 'v1')
  first.planner(scene, referenceBodies, 1)
  const { planner, asked } = counting()
  const second = remembering(planner, 'v10')
  expect(second.remember(first.learned())).toBe(false)
  second.planner(scene, referenceBodies, 1)
  expect(asked()).toBe(1)
})

test('of a motion the slack samples are kept, the first time as the second', () => {
  const memory = remembering(counting().planner, 'v1')
  const samples = [3, 3, 0, 4, 4, 1, 5, 5, 0, 6, 6, 1]
  expect([...(memory.planner(scene, referenceBodies, 1).motion?.samples ?? [])]).toEqual(samples)
  expect([...(memory.planner(scene, referenceBodies, 1).motion?.samples ?? [])]).toEqual(samples)
})
