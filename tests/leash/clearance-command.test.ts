import { describe, expect, it } from 'vitest'
import { clearanceFromArgs } from '../../src/cli/clearance.ts'
import { referenceBodies } from '../../src/leash/team.ts'
import { sceneOf, turn } from './cases.ts'

const noFile = (path: string): string => {
  throw new Error(`no ${path}`)
}
const words = (line: string) => line.split(' ')

function answer(line: string, read = noFile) {
  const outcome = clearanceFromArgs(words(line), read)
  if (!outcome.ok) throw new Error(outcome.message)
  return outcome
}

function refusal(line: string, read = noFile): string {
  const outcome = clearanceFromArgs(words(line), read)
  return outcome.ok ? 'answered' : outcome.message
}

const corner = '--scene turn --w1 1 --w2 1 --angle 90'

describe('the clearance command', () => {
  it('answers with exactly the published keys', () => {
    const { result } = answer(`${corner} --separation 1`)
    expect(Object.keys(result)).toEqual([
      'scene',
      'separation',
      'mTaut',
      'mTautHigh',
      'mSlack',
      'mSlackHigh',
      'pauses',
      'tightest',
      'swing',
      'milliseconds',
    ])
    expect(Object.keys(result.tightest ?? {})).toEqual(['body', 'wall', 'x', 'y', 'text'])
    expect(result.scene).toBe('turn')
    // 0.0632 by the slow solver; the handler's left shoulder meets the inner corner.
    expect(Math.abs((result.mTaut ?? 0) - 0.0632)).toBeLessThan(0.003)
    expect(result.pauses).toBe(0)
    expect(result.tightest?.body).toBe('handler')
  })

  it('none is null, and no pause is counted for it', () => {
    const { result } = answer(`${corner} --separation 1.8`)
    expect([result.mTaut, result.mTautHigh, result.mSlack, result.pauses, result.tightest]).toEqual([
      null,
      null,
      null,
      null,
      null,
    ])
  })

  it('takes the team and the clearance asked for from its flags', () => {
    const narrow = answer(`${corner} --separation 1 --r 0.24`).result
    const usual = answer(`${corner} --separation 1`).result
    expect(narrow.mTaut).toBeGreaterThan((usual.mTaut ?? 0) + 0.01)
    expect(answer(`${corner} --separation 1 --pauses-at 0.08`).result.pauses).toBeNull()
  })

  it('walks a corner the other way: its corridors change places', () => {
    const forward = answer('--scene turn --w1 1.2 --w2 0.9 --angle 90 --separation 1').result
    const reverse = answer('--scene turn --w1 0.9 --w2 1.2 --angle 90 --separation 1 --direction reverse').result
    expect(reverse.mTaut).toBe(forward.mTaut)
  })

  it('reads a scene of its own and gives the motion back as a file', () => {
    const { polygon, holes, start, goal } = sceneOf(turn(1.2, 1.2, 90), referenceBodies, 1)
    const read = () => JSON.stringify({ polygon, holes, start, goal })
    const outcome = answer('--scene place.json --separation 1 --motion out.json', read)
    expect(outcome.result.scene).toBe('place.json')
    // By closed form 0.178 at most.
    expect(outcome.result.mTaut).toBeGreaterThan(0.16)
    expect(outcome.motionFile?.path).toBe('out.json')
    const motion = JSON.parse(outcome.motionFile?.text ?? '')
    expect(motion.samples.length).toBeGreaterThan(100)
    expect(motion.samples[0]).toHaveLength(6)
  })

  it('refuses in one line that says what, where and what to do', () => {
    const lines = [
      refusal('--separation 1'),
      refusal('--scene turn --separation 1 --w1 1 --w2 1'),
      refusal(`${corner} --separation`),
      refusal(`${corner} --separation 1 --separation 1.2`),
      refusal(`${corner} --separation 1e0`),
      refusal(`${corner} --separation NaN`),
      refusal(`${corner} --separation 0.4`),
      refusal(`${corner} --separation 1 --p 0.9`),
      refusal(`${corner} --separation 1 --sideways perhaps`),
      refusal(`${corner} --separation 1 --direction back`),
      refusal(`${corner} --separation 1 --phi-max 0`),
      refusal('--scene turn --w1 1 --w2 1 --angle 170 --separation 1'),
      refusal('--scene indoor --w 1 --p 1.2 --t 0.1 --o 0 --separation 1'),
      refusal('--scene nowhere.json --separation 1'),
      refusal('--scene bad.json --separation 1', () => 'not json'),
      refusal('--scene bad.json --separation 1', () => '{"polygon": []}'),
      refusal('turn --separation 1'),
    ]
    for (const line of lines) {
      expect(line).not.toBe('answered')
      expect(line).not.toContain('\n')
      expect(line.length).toBeGreaterThan(20)
    }
    expect(refusal('--scene turn --separation 1 --w1 1 --w2 1')).toContain('--angle')
    expect(refusal('--scene nowhere.json --separation 1')).toContain('nowhere.json')
  })
})
