import { type Finding, finding } from '../finding.ts'
import type { Site } from '../site.ts'

/** Who allows the robot in this zone: forbidden fails; not asked is not known (see answered.ts). */
export function allowed({ zone, segment }: Site): Finding[] {
  const says = zone?.words.allowed?.says
  if (says === undefined) return []
  return [
    finding({
      id: 'allowed',
      feature: segment.id,
      subject: `Robot in ${zone?.name ?? 'this zone'}`,
      detail: () => (says === 'forbidden' ? 'forbidden' : says === 'allowed' ? 'allowed' : 'not asked'),
      harm: 'comfort',
      source: 'the venue',
      raw: says === 'forbidden' ? 'fails' : says === 'allowed' ? 'passes' : 'unsure',
    }),
  ]
}
