import { expect, it } from 'vitest'
import type { SceneForm } from '../../src/geometry/scene.ts'
import type { Bodies } from '../../src/leash/answer.ts'
import { clearance } from '../../src/leash/clearance.ts'
import { checkQuestion, referenceBodies } from '../../src/leash/team.ts'
import { buildScene, reverseForm } from '../../src/plan/scenes.ts'
import { randomFrom } from './cases.ts'
import { giveOpinion } from './checker.ts'

const long = process.env.TAUTLINE_LONG === '1'

function randomTeam(random: (low: number, high: number) => number): Bodies {
  return {
    a: random(0.4, 0.8),
    b: random(0.25, 0.45),
    d: random(0.05, 0.2),
    r: random(0.22, 0.36),
    g: 0.1,
    phiMax: (random(0, 1) < 0.3 ? random(40, 85) : 90) * (Math.PI / 180),
    sideways: true,
  }
}

function randomForm(random: (low: number, high: number) => number, kind: number): SceneForm {
  const lead = random(0.2, 1.2)
  switch (kind) {
    case 0:
      return { kind: 'turn', w1: random(0.9, 1.8), w2: random(0.9, 1.8), angle: random(15, 90) * (Math.PI / 180), lead }
    case 1:
      return { kind: 'turn', w1: random(1, 1.8), w2: random(1, 1.8), angle: random(91, 150) * (Math.PI / 180), lead }
    case 2: {
      const p = random(0.75, 1.1)
      const w = p + random(0.3, 0.8)
      return { kind: 'indoor', w, p, t: random(0.08, 0.25), o: ((w - p) / 2) * random(-1, 1), lead, reverse: false }
    }
    case 3:
      return { kind: 'sidedoor', w: random(1, 1.6), p: random(0.8, 1), t: random(0.08, 0.2), lead, reverse: false }
    case 4:
      return { kind: 'uturn', w1: random(1, 1.5), k: random(0.1, 0.6), w2: random(1, 1.5), e: random(1, 1.6), lead }
    default:
      return { kind: 'chicane', w: random(1.5, 2), j: random(0.3, 0.7), s: random(0.8, 1.4), lead, reverse: false }
  }
}

/** Solves one random question and has every promise of both motions looked at by the checker. */
function examine(seed: number, kind: number): boolean {
  const random = randomFrom(seed)
  const bodies = random(0, 1) < 0.3 ? referenceBodies : randomTeam(random)
  const forward = randomForm(random, kind)
  const form = random(0, 1) < 0.3 ? reverseForm(forward) : forward
  const separation = random(0.75, 1.6)
  const drift = random(0, 1) < 0.5 ? 0.1 : 0
  const built = buildScene(form, bodies, separation)
  if (!built.ok) throw new Error(`seed ${seed}: ${JSON.stringify(built.problem)}`)
  if (checkQuestion(built.scene, bodies, separation)) return false
  const answer = clearance(built.scene, bodies, separation, { drift })
  const told = `seed ${seed}: ${JSON.stringify({ form, bodies, separation, drift })}`
  if (answer.mTaut !== null) {
    expect(answer.mSlack, told).toBeGreaterThanOrEqual(answer.mTaut)
    expect(answer.mTautHigh, told).toBeGreaterThanOrEqual(answer.mTaut)
  }
  if (answer.mSlack !== null) expect(answer.mSlackHigh, told).toBeGreaterThanOrEqual(answer.mSlack)
  let looked = false
  for (const [motion, clear, most] of [
    [answer.tautMotion, answer.mTaut, 0],
    [answer.motion, answer.mSlack, 3],
  ] as const) {
    expect(motion === null, told).toBe(clear === null)
    if (!motion || clear === null) continue
    const opinion = giveOpinion(built.scene, bodies, separation, motion, drift)
    expect(opinion.problems, told).toEqual([])
    expect(opinion.clearance, told).toBeGreaterThanOrEqual(clear - 1e-9)
    // Nor is it far below: a certificate is no excuse for a worse answer.
    expect(opinion.clearance, told).toBeLessThanOrEqual(clear + 0.0025)
    expect(opinion.pauses, told).toBeLessThanOrEqual(most)
    looked = true
  }
  return looked
}

const plans = [
  { name: 'turns up to a right angle', kind: 0, count: 90, longCount: 100 },
  { name: 'sharper turns', kind: 1, count: 6, longCount: 25 },
  { name: 'openings in line', kind: 2, count: 8, longCount: 30 },
  { name: 'side doors', kind: 3, count: 3, longCount: 15 },
  { name: 'U-turns', kind: 4, count: 4, longCount: 15 },
  { name: 'chicanes', kind: 5, count: 3, longCount: 15 },
]

for (const plan of plans)
  it(`every motion of random ${plan.name} holds before the checker`, () => {
    const count = long ? plan.longCount : plan.count
    let looked = 0
    for (let i = 0; i < count; i++) if (examine(1000 * (plan.kind + 1) + i, plan.kind)) looked++
    // The sizes are such that many pass: a checker that saw nothing would prove nothing.
    expect(looked).toBeGreaterThan(count / 4)
  })
