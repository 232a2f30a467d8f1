import { describe, expect, it } from 'vitest'
import { boundaryOf } from '../../src/geometry/boundary.ts'
import { certify } from '../../src/leash/certify.ts'
import { clearance } from '../../src/leash/clearance.ts'
import { referenceBodies } from '../../src/leash/team.ts'
import { sceneOf, sidedoor, turn } from './cases.ts'

const S = 1
const scene = sceneOf(turn(1, 1, 90), referenceBodies, S)
const walls = boundaryOf(scene)
const sound = clearance(scene, referenceBodies, S).motion
if (!sound) throw new Error('the corner of the reference rows has no motion')

/** The certificate of the sound motion with its samples changed. */
function judge(change: (samples: Float64Array) => Float64Array, bodies = referenceBodies, separation = S) {
  return certify(scene, walls, bodies, separation, { samples: change(Float64Array.from(sound?.samples ?? [])) })
}

/** Changes one number of one sample half way. */
function nudged(field: number, by: number) {
  return judge((samples) => {
    const at = 6 * Math.floor(samples.length / 12) + field
    samples[at] = (samples[at] as number) + by
    return samples
  }).broken
}

describe('a motion that breaks a promise is worth nothing', () => {
  it('sound as it is', () => expect(judge((samples) => samples).broken).toBeNull())

  it('no samples', () => expect(judge(() => new Float64Array(0)).broken).toBe('a motion without samples'))

  it('a sample that is no number', () => expect(nudged(3, Number.NaN)).toBe('a sample that is no number'))

  it('starts elsewhere', () =>
    expect(judge((samples) => samples.slice(600)).broken).toBe('it does not start where it should'))

  it('stops before the goal', () =>
    expect(judge((samples) => samples.slice(0, 6 * 50)).broken).toBe('it does not end in the goal'))

  it('a stretched leash', () => expect(nudged(0, 0.01)).toMatch(/stretched|hangs|follow/))

  it('a handler off the line of the pull', () =>
    expect(
      judge((samples) => {
        // Both ends of the leash are shifted: taut, but not where it was pulled to.
        const at = 6 * Math.floor(samples.length / 12)
        for (const field of [1, 4]) samples[at + field] = (samples[at + field] as number) + 0.003
        return samples
      }).broken,
    ).toBe('the handler does not follow the pull'))

  it('a handler pushed: the motion walked backwards', () => {
    const half = (samples: Float64Array) => {
      const n = 100
      const back = new Float64Array((2 * n + 1) * 6)
      back.set(samples.subarray(0, 6 * (n + 1)))
      for (let i = 1; i <= n; i++) back.set(samples.subarray(6 * (n - i), 6 * (n - i + 1)), 6 * (n + i))
      return Float64Array.from([...back, ...samples])
    }
    expect(judge(half).broken).toBe('the handler is pushed')
  })

  it('a leash that pulls further from the side than the team allows', () =>
    expect(judge((samples) => samples, { ...referenceBodies, phiMax: Math.PI / 6 }).broken).toBe(
      'the leash pulls from the side',
    ))

  it('a slack leash that never was announced', () => expect(nudged(5, 1)).toBe('the handler walks on a slack leash'))

  it('a robot that cannot walk sideways', () =>
    expect(judge((samples) => samples, { ...referenceBodies, sideways: false }).broken).toBe(
      'the wheels slip sideways',
    ))

  it('bodies closer than they may be', () =>
    expect(judge((samples) => samples, { ...referenceBodies, g: 0.7 }).broken).toBe('the bodies are too close'))
})

describe('the certified value', () => {
  it('is below the clearance of a wall put in the way, and above it less 1 mm', () => {
    // A thin post beside the entry, 20 mm from where the handler passes at his least.
    const at = 6 * 40
    const x = sound.samples[at + 3] as number
    const y = (sound.samples[at + 4] as number) + referenceBodies.r + 0.02
    const post = [
      { x: x - 0.005, y },
      { x, y: y + 0.005 },
      { x: x + 0.005, y },
    ]
    const posted = { ...scene, holes: [post] }
    const certificate = certify(posted, boundaryOf(posted), referenceBodies, S, sound)
    // The robot passed there first and may be nearer still: then the bound from above is all that counts.
    expect(certificate.clearance).toBeLessThanOrEqual(0.02)
  })

  it('counts the pauses and turns of a motion at a side door', () => {
    const separation = 1.6
    const door = sceneOf(sidedoor(1, 0.9, 0.15), referenceBodies, separation)
    const answer = clearance(door, referenceBodies, separation)
    expect(answer.motion).not.toBeNull()
    if (!answer.motion) return
    const certificate = certify(door, boundaryOf(door), referenceBodies, separation, answer.motion)
    expect(certificate.pauses).toBe(1)
    expect(certificate.clearance).toBe(answer.mSlack)
    expect(certificate.swing).toBeGreaterThan(Math.PI / 2 - 0.3)
  })

  it('is lower when the standing handler may be drawn towards the robot', () => {
    const separation = 1.6
    const door = sceneOf(sidedoor(1, 0.9, 0.15), referenceBodies, separation)
    const { motion } = clearance(door, referenceBodies, separation)
    if (!motion) throw new Error('the side door has no motion')
    const still = certify(door, boundaryOf(door), referenceBodies, separation, motion)
    const drawn = certify(door, boundaryOf(door), referenceBodies, separation, motion, 0.1)
    expect(drawn.broken !== null || drawn.clearance <= still.clearance).toBe(true)
    expect(drawn.clearance).not.toBe(still.clearance)
  })
})
