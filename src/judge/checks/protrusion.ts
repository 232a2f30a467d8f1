import { limit } from '../../standards/packs.ts'
import { epsilon, type Finding, finding } from '../finding.ts'
import { read } from '../setting.ts'
import { nameOf, type Site } from '../site.ts'
import { mmNeeded, mmThere } from '../words.ts'

/**
 * What stands out from a wall or post at body height: over the pack's limit a caution, at the reading itself; always
 * one where the robot's sensing plane passes under it.
 */
export function protrusion({ setting, segment }: Site): Finding[] {
  return segment.features
    .filter((one) => one.kind === 'wall-projection')
    .flatMap((feature) => {
      const out = read(setting, feature, 'projection', 'high')
      const lowest = read(setting, feature, 'lowest', 'low')
      if (!out || !lowest) return []
      const most = limit(setting.pack, feature.words.mounted?.says === 'post' ? 'projection-post' : 'projection-wall')
      const from = limit(setting.pack, 'projection-band-low').value
      const to = limit(setting.pack, 'projection-band-high').value
      const inBand = lowest.value > from + epsilon && lowest.value <= to + epsilon
      const over = inBand && out.value > most.value + epsilon
      const unseen = lowest.value > setting.team.card.robot.sensingPlane + epsilon
      const raw = over || unseen ? 'tight' : 'passes'
      return [
        finding({
          id: 'protrusion',
          feature: feature.id,
          subject: `Projection at ${nameOf(feature)}`,
          detail: () =>
            `${mmNeeded(out.value)} for ${mmThere(most.value)}${unseen ? '; the robot senses under it' : ''}`,
          harm: 'head',
          source: most.clause,
          raw,
          demand: out.value,
          capacity: most.value,
          caution: raw === 'tight' ? 'Object at body height. Keep that arm in.' : null,
          from: [out, lowest],
          strict: true,
        }),
      ]
    })
}
