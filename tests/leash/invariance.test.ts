import { describe, expect, it } from 'vitest'
import type { Point, Scene, SceneForm } from '../../src/geometry/scene.ts'
import { clearance } from '../../src/leash/clearance.ts'
import { referenceBodies } from '../../src/leash/team.ts'
import { chicane, indoor, randomFrom, sceneOf, sidedoor, turn, uturn } from './cases.ts'

/** What the search may lose on a grid that lies otherwise, metres: it is bounded, not nothing. */
const gridded = 0.012

function solve(scene: Scene, separation: number, slack = false) {
  return clearance(scene, referenceBodies, separation, { slack })
}

function moved(scene: Scene, map: (p: Point) => Point, turnBy: (heading: number) => number): Scene {
  // Without its form a scene is only a polygon: the same place must get the same answer by search.
  return {
    polygon: scene.polygon.map(map),
    holes: scene.holes.map((hole) => hole.map(map)),
    start: { ...map(scene.start), heading: turnBy(scene.start.heading) },
    goal: { polygon: scene.goal.polygon.map(map) },
  }
}

describe('closed forms', () => {
  it('no width made greater makes a clearance smaller, over 60 random corners', () => {
    const random = randomFrom(77)
    for (let i = 0; i < 60; i++) {
      const [w1, w2, degrees, S] = [random(0.9, 1.6), random(0.9, 1.6), random(60, 90), random(0.8, 1.5)]
      const base = solve(sceneOf(turn(w1, w2, degrees), referenceBodies, S), S)
      for (const wider of [turn(w1 + 0.03, w2, degrees), turn(w1, w2 + 0.03, degrees)]) {
        const more = solve(sceneOf(wider, referenceBodies, S), S)
        const told = `seed 77, case ${i}: ${w1} ${w2} ${degrees} S ${S}`
        expect(more.mTautHigh ?? -1, told).toBeGreaterThanOrEqual((base.mTautHigh ?? -1) - 1e-6)
        expect(more.mTaut ?? -0.011, told).toBeGreaterThanOrEqual((base.mTaut ?? -1) - 0.01)
      }
    }
  })
})

const searched: [string, SceneForm, number][] = [
  ['a corner as a mere polygon', turn(1.2, 1.2, 90), 1],
  ['a sharper turn', turn(1.2, 1.2, 120), 0.9],
  ['an opening in line', indoor(1.5, 0.8, 0.15, 0.2), 1],
]

describe('searched scenes', () => {
  for (const [name, form, S] of searched)
    it(`${name}: mirrored and turned it has the same clearance within 12 mm`, () => {
      const scene = sceneOf(form, referenceBodies, S)
      const base = solve(scene, S).mTaut
      expect(base).not.toBeNull()
      const mirrored = moved(
        scene,
        ({ x, y }) => ({ x, y: -y }),
        (heading) => -heading,
      )
      const turned = moved(
        scene,
        ({ x, y }) => ({ x: -y + 3, y: x - 2 }),
        (heading) => heading + Math.PI / 2,
      )
      for (const other of [mirrored, turned])
        expect(Math.abs((solve(other, S).mTaut ?? -1) - (base as number))).toBeLessThan(gridded)
    })

  it('more width, no less clearance (within the grid): U-turn, chicane', () => {
    const pairs: [SceneForm, SceneForm, number][] = [
      [uturn(1, 0.15, 1, 1.2), uturn(1.06, 0.15, 1.06, 1.26), 0.8],
      [chicane(1.7, 0.7, 1), chicane(1.78, 0.7, 1.05), 0.8],
    ]
    for (const [narrow, wide, S] of pairs) {
      const less = solve(sceneOf(narrow, referenceBodies, S), S).mTaut
      expect(less).not.toBeNull()
      expect(solve(sceneOf(wide, referenceBodies, S), S).mTaut).toBeGreaterThanOrEqual(less as number)
    }
  })

  it('a pause never costs clearance, and helps at a side door on a long leash', () => {
    const S = 1.4
    const scene = sceneOf(sidedoor(1, 0.9, 0.15), referenceBodies, S)
    const answer = solve(scene, S, true)
    expect(answer.mSlack).toBeGreaterThanOrEqual(answer.mTaut ?? 0)
    expect(answer.mSlack).toBeGreaterThan(0.15)
    expect(answer.pauses).toBe(1)
  })

  it('the same question gets the same answer, whatever was asked between', () => {
    const S = 0.9
    const scene = sceneOf(turn(1.2, 1.2, 135), referenceBodies, S)
    const first = clearance(scene, referenceBodies, S)
    clearance(sceneOf(chicane(1.8, 0.5, 1.2), referenceBodies, 1.1), referenceBodies, 1.1, { slack: false })
    clearance(sceneOf(turn(1.2, 1.2, 135), referenceBodies, 1.1), referenceBodies, 1.1, { slack: false })
    const again = clearance(scene, referenceBodies, S)
    expect(again.mTaut).toBe(first.mTaut)
    expect(again.mSlack).toBe(first.mSlack)
  })

  it('a leash angle of 30 degrees leaves less than 60, and 60 less than 90, at a right angle', () => {
    const S = 1
    const scene = sceneOf(turn(1, 1, 90), referenceBodies, S)
    const at = (degrees: number) =>
      clearance(scene, { ...referenceBodies, phiMax: (degrees * Math.PI) / 180 }, S, { slack: false }).mTaut ?? 0
    const [narrow, middle, wide] = [at(30), at(60), at(90)]
    expect(narrow).toBeLessThan(middle)
    expect(middle).toBeLessThan(wide)
    // The slow solver's three figures for this corner: 0.002, 0.047, 0.062.
    expect(narrow).toBeLessThan(0.012)
    expect(Math.abs(middle - 0.047)).toBeLessThan(0.01)
    expect(Math.abs(wide - 0.062)).toBeLessThan(0.01)
  })

  it('a robot on wheels: straight on is proved, round a corner nothing is claimed', () => {
    const wheels = { ...referenceBodies, sideways: false }
    const inLine = clearance(sceneOf(indoor(1.5, 0.8, 0.15, 0), wheels, 1), wheels, 1)
    expect(inLine.decided).toBe(true)
    expect(Math.abs((inLine.mTaut ?? 0) - 0.13)).toBeLessThan(0.002)
    const corner = clearance(sceneOf(turn(1.3, 1.3, 90), wheels, 1), wheels, 1)
    expect(corner.decided).toBe(false)
    expect(corner.mTaut).toBeNull()
  })

  it('work that is capped is undecided, with the free bounds at the high ends', () => {
    const S = 1
    const scene = sceneOf(turn(1, 1, 120), referenceBodies, S)
    const answer = clearance(scene, referenceBodies, S, { workCap: 1 })
    expect(answer.decided).toBe(false)
    expect(answer.mTautHigh).toBeCloseTo((1 - 0.54) / 2, 9)
    expect(answer.mSlackHigh).toBeCloseTo((1 - 0.54) / 2, 9)
  })
})
