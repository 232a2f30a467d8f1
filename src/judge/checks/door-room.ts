import { limit } from '../../standards/packs.ts'
import { epsilon, type Finding, finding } from '../finding.ts'
import { read } from '../setting.ts'
import { helpAt, nameOf, type Site } from '../site.ts'
import { mmNeeded, mmThere } from '../words.ts'
import { doorWays } from './doors.ts'

/**
 * A place for the robot outside the swing, which the team needs; and the clear width beside the latch, the pack's: less
 * than that is a caution at the reading itself (on the push side only where a closer pushes back).
 */
export function doorRoom(site: Site): Finding[] {
  const { setting, segment } = site
  return segment.features.flatMap((feature) => {
    if (!doorWays(feature).manual) return []
    const clear = read(setting, feature, 'closedRoom', 'low')
    const pull = feature.words.action?.says !== 'push'
    const closer = ['closer', 'no'].includes(feature.words.keptOpen?.says ?? '')
    const least = limit(setting.pack, pull ? 'door-pull-side' : 'door-push-side')
    const asked = pull || closer ? least.value : 0
    const noPlace = feature.words.robotPlace?.says === 'no'
    const short = clear !== null && clear.value < asked - epsilon
    return [
      finding({
        id: 'door-room',
        feature: feature.id,
        subject: `Room at ${nameOf(feature)}`,
        detail: () =>
          noPlace
            ? 'no place for the robot outside the swing'
            : `${clear ? mmThere(clear.value) : 'not measured'} beside the latch for ${mmNeeded(asked)}`,
        harm: 'trap',
        source: noPlace ? 'common practice' : least.clause,
        raw: noPlace ? 'fails' : short ? 'tight' : 'passes',
        demand: asked,
        capacity: clear?.value ?? null,
        caution: short ? 'Little room beside the door.' : null,
        from: [clear],
        strict: true,
        help: helpAt(site, feature),
      }),
    ]
  })
}
