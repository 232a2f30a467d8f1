import { limit } from '../../standards/packs.ts'
import { epsilon, type Finding, finding } from '../finding.ts'
import { read } from '../setting.ts'
import { helpAt, nameOf, type Site } from '../site.ts'
import { newtonsNeeded, newtonsThere } from '../words.ts'
import { doorWays } from './doors.ts'

/**
 * A manual door: the handler opens it if the card says so, else somebody must. Over the pack's force a caution at the
 * reading itself. A fire door found held open is judged shut as well: there help settles force and hold.
 */
export function doorForce(site: Site): Finding[] {
  const { setting, segment } = site
  const { handler, robot } = setting.team.card
  const most = limit(setting.pack, 'door-force')
  return segment.features.flatMap((feature) => {
    const ways = doorWays(feature)
    if (!ways.manual) return []
    const force = read(setting, feature, 'force', 'high')
    const heavy = force !== null && force.value > most.value + epsilon
    // A card that does not answer who opens doors asks for help as if nobody did; answered.ts names the gap.
    const opens = handler.opensDoors === true || robot.opensDoors
    const needsHelp = !opens || ways.judgedShut || ways.person
    return [
      finding({
        id: 'door-force',
        feature: feature.id,
        subject: `Opening ${nameOf(feature)}`,
        detail: () =>
          `${force ? `${newtonsNeeded(force.value)} for ${newtonsThere(most.value)}` : 'force not measured'}; ${needsHelp ? 'somebody opens it' : robot.opensDoors ? 'the robot opens it' : 'you open it'}`,
        harm: 'trap',
        source: heavy ? most.clause : 'common practice',
        raw: needsHelp ? 'needs-help' : 'tight',
        demand: force?.value ?? null,
        capacity: most.value,
        caution: heavy ? 'Heavy door.' : opens && !robot.opensDoors ? 'You open it.' : null,
        from: [force],
        strict: true,
        ...(needsHelp ? { help: helpAt(site, feature) } : {}),
      }),
    ]
  })
}
