import type { Scene, SceneForm } from '../../src/geometry/scene.ts'
import type { Bodies } from '../../src/leash/answer.ts'
import { buildScene } from '../../src/plan/scenes.ts'

/** Random numbers that can be had again from their seed. */
export function randomFrom(seed: number): (low: number, high: number) => number {
  let state = seed >>> 0
  return (low, high) => {
    state = (state + 0x6d2b79f5) >>> 0
    let t = state
    t = Math.imul(t ^ (t >>> 15), t | 1)
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61)
    return low + (((t ^ (t >>> 14)) >>> 0) / 4294967296) * (high - low)
  }
}

export function sceneOf(form: SceneForm, bodies: Bodies, separation: number): Scene {
  const built = buildScene(form, bodies, separation)
  if (!built.ok) throw new Error(JSON.stringify(built.problem))
  return built.scene
}

export function turn(w1: number, w2: number, degrees: number, lead = 0.5): SceneForm {
  return { kind: 'turn', w1, w2, angle: (degrees * Math.PI) / 180, lead }
}

export function sidedoor(w: number, p: number, t: number, reverse = false): SceneForm {
  return { kind: 'sidedoor', w, p, t, lead: 0.5, reverse }
}

export function indoor(w: number, p: number, t: number, o: number): SceneForm {
  return { kind: 'indoor', w, p, t, o, lead: 0.5, reverse: false }
}

export function uturn(w1: number, k: number, w2: number, e: number): SceneForm {
  return { kind: 'uturn', w1, k, w2, e, lead: 0.5 }
}

export function chicane(w: number, j: number, s: number): SceneForm {
  return { kind: 'chicane', w, j, s, lead: 0.5, reverse: false }
}
