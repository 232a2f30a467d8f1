import { type Finding, finding, ratioOf, stateOf } from '../finding.ts'
import type { Site } from '../site.ts'
import { newtonsNeeded, newtonsThere } from '../words.ts'
import { floorClass } from './floor-class.ts'

const gravity = 9.81

/**
 * Whether the robot can give a clear tug before it slips: m g (mu cos(alpha) - sin(alpha)), alpha the magnitude of the
 * steepest slope, mu the card's low end for the floor class. Loose ground counts as smooth and wet.
 */
export function traction(site: Site): Finding[] {
  if (!site.led) return []
  const { segment, setting, wet, slope } = site
  const { robot, leash } = setting.team.card
  const loose = segment.features.some((one) => one.kind === 'loose-ground')
  const floor = loose ? 'smooth' : floorClass(segment)
  const mu = robot.friction[floor][wet || loose ? 'wet' : 'dry']
  const pull = (gradient: number) => {
    const alpha = Math.atan(gradient)
    return robot.mass * gravity * (mu * Math.cos(alpha) - Math.sin(alpha))
  }
  const ramps = segment.features.filter((one) => one.kind === 'ramp')
  const steepest = ramps.length > 0 ? slope.steepest : 0
  const gentlest = ramps.length > 0 ? slope.gentlest : 0
  const there = { low: pull(steepest), high: pull(gentlest) }
  const ratio = ratioOf({ low: leash.clearTug, high: leash.clearTug }, there)
  const raw = stateOf(ratio)
  return [
    finding({
      id: 'traction',
      feature: ramps[0]?.id ?? segment.id,
      subject: `Pull before slipping on ${segment.name}`,
      detail: () =>
        `${newtonsThere(there.low)} on a ${wet || loose ? 'wet' : 'dry'} ${floor} floor for a clear tug of ${newtonsNeeded(leash.clearTug)}`,
      harm: 'fall',
      source: 'common practice',
      raw,
      demand: leash.clearTug,
      capacity: there.low,
      ratio,
      caution: raw === 'passes' ? null : 'The robot may slip. Expect a weak pull.',
      from: slope.from,
    }),
  ]
}
