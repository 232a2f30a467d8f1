import { describe, expect, test } from 'vitest'
import { stopDistance } from '../../src/judge/checks/stop.ts'
import { greatestSeparation, leastSeparation, pacesOf, teamLength, teamOf } from '../../src/judge/team.ts'
import { card } from './build.ts'

const team = teamOf(card())

describe('worked by hand with the default card', () => {
  test.each([
    [0.6, 0.737, 0.799],
    [0.8, 0.969, 1.091],
    [1.0, 1.187, 1.35],
    [1.2, 1.398, 1.592],
    [1.5, 1.709, 1.937],
    [1.8, 2.016, 2.269],
  ])('leash %d: separation from %d to %d', (length, least, greatest) => {
    expect(leastSeparation(team, length, 0)).toBeCloseTo(least, 3)
    expect(greatestSeparation(team, length, 0)).toBeCloseTo(greatest, 3)
  })

  test.each([
    [0.7, 0.8, 0.723],
    [0.7, 1.2, 1.003],
  ])('stop at %d m/s with %d s: %d', (pace, reaction, distance) => {
    expect(stopDistance(pace, reaction, 1.5, 0)).toBeCloseTo(distance, 3)
  })

  test.each([
    // pace, reaction, least S_min with the slack of 0.15 and the bodies 0.175 + 0.175
    [0.7, 0.8, 1.22],
    [0.7, 1.2, 1.5],
    [0.5, 0.8, 0.98],
    [0.5, 1.2, 1.18],
    [0.4, 0.8, 0.87],
  ])('at %d m/s with %d s the least separation is %d', (pace, reaction, least) => {
    const needed = stopDistance(pace, reaction, 1.5, 0) + 0.15 + (0.65 / 2 - 0.15) + team.front
    expect(needed).toBeCloseTo(least, 2)
  })

  test('envelope, strike height, front reach', () => {
    expect(team.envelope).toBeCloseTo(0.713, 9)
    expect(team.bodies.r).toBeCloseTo(0.3565, 9)
    expect(team.strike).toBeCloseTo(1.919, 9)
    expect(team.front).toBeCloseTo(0.175, 9)
  })

  test('the bag: beside adds 0.10 to the breadth, in front 0.15 to the reach, left behind nothing', () => {
    const front = teamOf(card({ handler: { bag: 'in-front' } }))
    expect(front.envelope).toBeCloseTo(0.613, 9)
    expect(front.front).toBeCloseTo(0.325, 9)
    expect(front.gathered).toBeCloseTo(0.35 + 0.15 + 0.1 + 0.65, 9)
    const left = teamOf(card({ handler: { bag: 'left-behind' } }))
    expect(left.envelope).toBeCloseTo(0.613, 9)
    expect(left.gathered).toBeCloseTo(1.1, 9)
  })

  test('team length is the stretched separation, the robot before the attachment and half a body', () => {
    expect(teamLength(team, 1.2, 0)).toBeCloseTo(1.592 + 0.325 + 0.15 + 0.175, 3)
  })
})

describe('lengths and paces on offer', () => {
  test('a length for which the bodies are closer than 0.10 m is not on offer', () => {
    // r + apart + the robot's corner: 0.3565 + 0.10 + 0.2475 = 0.704; S_min of 0.57 m is 0.700, of 0.58 m 0.712.
    expect(teamOf(card({ leash: { lengths: [0.57, 0.58, 0.8] } })).lengths).toEqual([0.58, 0.8])
  })

  test('paces go by 0.05 from the lesser of handler and robot to 0.25', () => {
    expect(pacesOf(team, false)).toEqual([0.7, 0.65, 0.6, 0.55, 0.5, 0.45, 0.4, 0.35, 0.3, 0.25])
    // Outdoors the handler walks 0.9, the robot 0.7.
    expect(pacesOf(team, true)[0]).toBe(0.7)
    expect(pacesOf(teamOf(card({ robot: { cruise: 1.2 } })), true)[0]).toBe(0.9)
    expect(pacesOf(teamOf(card({ handler: { pace: 0.2 } })), false)).toEqual([0.2])
  })

  test('on a slope the rise between the two is counted, for the worse of up and down', () => {
    const level = leastSeparation(team, 1.2, 0) as number
    const least = leastSeparation(team, 1.2, 0.1) as number
    // By hand: downhill the attachment is 0.35 + 0.1 x D lower; D^2 + (0.35 + 0.1 D)^2 = 1.44 gives D = 1.108.
    expect(least).toBeCloseTo(0.25 + 1.108, 3)
    expect(least).toBeLessThan(level)
    expect(greatestSeparation(team, 1.2, 0.1) as number).toBeGreaterThan(greatestSeparation(team, 1.2, 0) as number)
  })
})
