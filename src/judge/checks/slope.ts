import { limit } from '../../standards/packs.ts'
import { epsilon, type Finding, finding, ratioOf, stateOf } from '../finding.ts'
import { read } from '../setting.ts'
import { helpAt, helpLedOtherwise, nameOf, type Site, travelled } from '../site.ts'
import { slope as gradientWords } from '../words.ts'

/** A slope read over 1:20 asks that the robot is shown to hold it with power lost. */
export const slopeFrom = 1 / 20

/** A ramp against the robot's slope at the unsafe end; the pack's ramp is a caution at the reading itself. */
export function slope(site: Site): Finding[] {
  const { setting, segment } = site
  const { robot } = setting.team.card
  return segment.features
    .filter((one) => one.kind === 'ramp')
    .flatMap((feature) => {
      const gradient = read(setting, feature, 'gradient', 'size')
      if (!gradient) return []
      const { steepest, gentlest, read: value } = travelled(gradient, feature)
      const ratio = ratioOf({ low: gentlest, high: steepest }, { low: robot.slope, high: robot.slope })
      const most = limit(setting.pack, 'slope')
      const over = value > most.value + epsilon
      const state = stateOf(ratio)
      const led = helpLedOtherwise(site, feature)
      const found = [
        finding({
          id: 'slope',
          feature: feature.id,
          subject: `Slope at ${nameOf(feature)}`,
          detail: () => `${gradientWords(steepest)} for ${gradientWords(robot.slope)} the robot takes`,
          harm: 'fall',
          source: over ? most.clause : 'common practice',
          raw: state === 'passes' && over ? 'tight' : state,
          demand: steepest,
          capacity: robot.slope,
          ratio,
          caution: over || state !== 'passes' ? 'Steep slope. Slow.' : null,
          from: [gradient],
          strict: true,
          ...(led ? { help: led } : {}),
        }),
      ]
      if (value > slopeFrom + epsilon && !robot.holdsSlopeWithPowerLost)
        found.push(
          finding({
            id: 'slope',
            feature: feature.id,
            subject: `Slope at ${nameOf(feature)}`,
            detail: () => `${gradientWords(value)}, and the robot is not shown to hold it with power lost`,
            harm: 'fall',
            source: 'common practice',
            raw: 'needs-help',
            caution: null,
            from: [gradient],
            strict: true,
            help: helpAt(site, feature),
          }),
        )
      return found
    })
}
