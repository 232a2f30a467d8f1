import { describe, expect, it } from 'vitest'
import { clearance } from '../../src/leash/clearance.ts'
import { referenceBodies } from '../../src/leash/team.ts'
import { indoor, sceneOf } from './cases.ts'
import { giveOpinion } from './checker.ts'

describe('an opening on the centre line is walked straight through', () => {
  for (const sideways of [true, false])
    for (const separation of [0.8, 1.2, 1.8])
      it(`leaves (p - 2r)/2 at ${separation} m, ${sideways ? 'walking' : 'wheeled'}`, () => {
        const bodies = { ...referenceBodies, sideways }
        const scene = sceneOf(indoor(1.8, 0.9, 0.15, 0), bodies, separation)
        const answer = clearance(scene, bodies, separation)
        const bound = (0.9 - 2 * bodies.r) / 2
        expect(answer.mTautHigh).toBeCloseTo(bound, 9)
        expect(answer.mTaut).toBeGreaterThan(bound - 0.001)
        expect(answer.mTaut).toBeLessThanOrEqual(bound + 1e-12)
        expect(answer.pauses).toBe(0)
        expect(answer.tautMotion).not.toBeNull()
        if (!answer.tautMotion) return
        const opinion = giveOpinion(scene, bodies, separation, answer.tautMotion)
        expect(opinion.clearance).toBeGreaterThanOrEqual((answer.mTaut ?? 0) - 1e-6)
      })
})
