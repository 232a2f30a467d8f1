import { limit } from '../../standards/packs.ts'
import { epsilon, type Finding, finding, ratioOf, stateOf } from '../finding.ts'
import { read } from '../setting.ts'
import { helpLedOtherwise, nameOf, type Site, travelled } from '../site.ts'
import { slope as gradientWords } from '../words.ts'

/** A cross-fall against the robot's own at the unsafe end; the pack's is a caution at the reading itself. */
export function crossFall(site: Site): Finding[] {
  const { setting, segment } = site
  const most = limit(setting.pack, 'cross-fall')
  const capacity = setting.team.card.robot.crossFall
  return segment.features
    .filter((one) => one.kind === 'cross-fall')
    .flatMap((feature) => {
      const gradient = read(setting, feature, 'gradient', 'size')
      if (!gradient) return []
      const { steepest, gentlest } = travelled(gradient, feature)
      const ratio = ratioOf({ low: gentlest, high: steepest }, { low: capacity, high: capacity })
      const over = Math.abs(gradient.value) > most.value + epsilon
      const state = stateOf(ratio)
      const help = helpLedOtherwise(site, feature)
      return [
        finding({
          id: 'cross-fall',
          feature: feature.id,
          subject: `Cross-fall at ${nameOf(feature)}`,
          detail: () => `${gradientWords(steepest)} for ${gradientWords(capacity)} the robot takes`,
          harm: 'fall',
          source: over ? most.clause : 'common practice',
          raw: state === 'passes' && over ? 'tight' : state,
          demand: steepest,
          capacity,
          ratio,
          caution: over || state !== 'passes' ? 'The ground tips. Expect a pull.' : null,
          from: [gradient],
          strict: true,
          ...(help ? { help } : {}),
        }),
      ]
    })
}
