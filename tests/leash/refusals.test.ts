import { describe, expect, it } from 'vitest'
import type { Scene, SceneForm } from '../../src/geometry/scene.ts'
import { clearance } from '../../src/leash/clearance.ts'
import { checkQuestion, referenceBodies } from '../../src/leash/team.ts'
import { buildScene } from '../../src/plan/scenes.ts'
import { sceneOf, turn } from './cases.ts'

const S = 1

function refusedPath(form: SceneForm, separation = S): string {
  const built = buildScene(form, referenceBodies, separation)
  return built.ok ? 'built' : built.problem.path
}

describe('measures that no scene has are values, not crashes', () => {
  it('numbers that are none, or not above zero', () => {
    expect(refusedPath(turn(Number.NaN, 1, 90))).toBe('w1')
    expect(refusedPath(turn(1, 0, 90))).toBe('w2')
    expect(refusedPath(turn(1, -1, 90))).toBe('w2')
    expect(refusedPath(turn(1, Number.POSITIVE_INFINITY, 90))).toBe('w2')
    expect(refusedPath(turn(1, 1, 90, Number.NaN))).toBe('lead')
    expect(refusedPath(turn(1, 1, 90), Number.NaN)).toBe('separation')
    expect(refusedPath(turn(1, 1, 90), 0)).toBe('separation')
  })

  it('turns outside 15 to 150 degrees; both ends are taken', () => {
    expect(refusedPath(turn(1, 1, 14))).toBe('angle')
    expect(refusedPath(turn(1, 1, 151))).toBe('angle')
    expect(refusedPath(turn(1, 1, 15))).toBe('built')
    expect(refusedPath(turn(1, 1, 150))).toBe('built')
  })

  it('a door wider than its wall, an obstruction as deep as its corridor', () => {
    const door = { kind: 'indoor', w: 1, p: 1.1, t: 0.1, o: 0, lead: 0.5, reverse: false } as const
    expect(refusedPath(door)).toBe('p')
    expect(refusedPath({ ...door, p: 0.8, o: 0.2 })).toBe('p')
    expect(refusedPath({ ...door, p: 0.8, o: 0.1 })).toBe('built')
    expect(refusedPath({ kind: 'sidedoor', w: 1, p: 3.1, t: 0.1, lead: 0.5, reverse: false })).toBe('p')
    expect(refusedPath({ kind: 'chicane', w: 1, j: 1, s: 1, lead: 0.5, reverse: false })).toBe('j')
  })
})

describe('questions that cannot be asked', () => {
  const scene = sceneOf(turn(1, 1, 90), referenceBodies, S)
  const path = (change: Partial<Scene>, bodies = referenceBodies, separation = S) =>
    checkQuestion({ ...scene, ...change }, bodies, separation)?.path ?? 'asked'

  it('the scene as built may be asked', () => expect(path({})).toBe('asked'))

  it('a polygon that crosses itself, runs back over itself, or has too few or too many corners', () => {
    const bow = [
      { x: -5, y: -5 },
      { x: 5, y: 5 },
      { x: 5, y: -5 },
      { x: -5, y: 6 },
    ]
    expect(path({ polygon: bow })).toBe('polygon')
    expect(path({ polygon: scene.polygon.slice(0, 2) })).toBe('polygon')
    const many = Array.from({ length: 300 }, (_, i) => ({
      x: -2 + 5 * Math.cos((i * Math.PI) / 150),
      y: 5 * Math.sin((i * Math.PI) / 150),
    }))
    expect(path({ polygon: many })).toBe('polygon')
    const spike = [...scene.polygon.slice(0, 2), { x: 0, y: -1 }, ...scene.polygon.slice(2)]
    expect(path({ polygon: spike })).toBe('polygon')
    expect(path({ polygon: [...scene.polygon, { x: Number.NaN, y: 0 }] })).toBe('polygon/6')
  })

  it('a start outside, or none', () => {
    expect(path({ start: { x: -2, y: 0.5, heading: 0 } })).toBe('start')
    expect(path({ start: { x: -2, y: -0.5, heading: Number.NaN } })).toBe('start')
  })

  it('an obstruction outside the walls, or across them', () => {
    const block = (x: number, y: number) => [
      { x, y },
      { x, y: y + 0.2 },
      { x: x + 0.2, y: y + 0.2 },
      { x: x + 0.2, y },
    ]
    expect(path({ holes: [block(-1, 2)] })).toBe('holes/0')
    expect(path({ holes: [block(-1, -0.1)] })).toBe('polygon')
    expect(path({ holes: [block(-1, -0.3)] })).toBe('asked')
  })

  it('bodies without size, and a leash shorter than the bodies', () => {
    expect(path({}, { ...referenceBodies, r: 0 })).toBe('r')
    expect(path({}, { ...referenceBodies, a: Number.NaN })).toBe('a')
    expect(path({}, { ...referenceBodies, d: -0.1 })).toBe('d')
    expect(path({}, { ...referenceBodies, phiMax: 0 })).toBe('phiMax')
    expect(path({}, referenceBodies, 0.5)).toBe('separation')
    expect(path({}, referenceBodies, 0.55)).toBe('asked')
  })

  it('asked all the same, the planner breaks off', () =>
    expect(() => clearance(scene, referenceBodies, Number.NaN)).toThrow(/^bad-question: separation/))
})
