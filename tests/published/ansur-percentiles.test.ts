import { describe, expect, it } from 'vitest'
import { defaultTeamCard } from '../../src/record/team-card.ts'

// ANSUR II (2012 survey of US Army personnel), public data set; percentiles of 4082 men and 1986 women, metres.
// 'mix' weighs the sexes equally. Soldiers in minimal clothing: older and heavier people are likely under-represented.
const ansur = {
  bideltoidBreadthMix: { p5: 0.415, p50: 0.478, p95: 0.553 },
  statureMix: { p5: 1.547, p50: 1.689, p95: 1.844 },
  armToGripMix: { p5: 0.611, p50: 0.681, p95: 0.757 },
  gripHangingMix: { p5: 0.636, p50: 0.705, p95: 0.779 },
  acromialHeight: { womenP50: 1.332, menP50: 1.439 },
  chestDepth: { womenP95: 0.296, menP95: 0.298 },
} as const

const { handler } = defaultTeamCard

describe('the default handler stands on ANSUR II', () => {
  it('shoulder breadth and stature are the 95th percentile of the mix: what must fit is taken large', () => {
    expect(handler.shoulders).toBe(ansur.bideltoidBreadthMix.p95)
    expect(handler.stature).toBe(ansur.statureMix.p95)
  })

  it('clothing is at least the usual 20 to 40 mm (from memory)', () => {
    expect(handler.clothing).toBeGreaterThanOrEqual(0.04)
  })

  it('body depth covers the chest of both sexes at p95 with 40 mm of clothing', () => {
    expect(handler.depth).toBeGreaterThanOrEqual(Math.max(ansur.chestDepth.menP95, ansur.chestDepth.womenP95) + 0.04)
  })

  it('arm is the median to 10 mm, shoulder height lies between the medians of women and men', () => {
    expect(Math.abs(handler.arm - ansur.armToGripMix.p50)).toBeLessThanOrEqual(0.005)
    expect(handler.shoulderHeight).toBeGreaterThan(ansur.acromialHeight.womenP50)
    expect(handler.shoulderHeight).toBeLessThan(ansur.acromialHeight.menP50)
  })

  it('a hanging hand is where most hands hang, in shoes', () => {
    expect(handler.handHeight).toBeGreaterThan(ansur.gripHangingMix.p5 + handler.shoes)
    expect(handler.handHeight).toBeLessThan(ansur.gripHangingMix.p95 + handler.shoes)
  })
})
