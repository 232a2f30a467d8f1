import { kind } from '../../catalogue/kinds.ts'
import type { Feature } from '../../record/survey.ts'
import { type Finding, finding } from '../finding.ts'
import { type HelpState, helpState } from '../help.ts'
import { helpAt, helpLedOtherwise, nameOf, type Site } from '../site.ts'

/**
 * Two or more risers, escalator, moving walk, revolving door, road crossing, magnet area: led otherwise, leash off, the
 * way round named. An unguarded edge within 2 m is one too (check `edge`).
 */
export function stopItem(site: Site): Finding[] {
  const { segment, zone } = site
  const found = segment.features
    .filter((feature) => kind(feature.kind)?.stopItem)
    .map((feature) => judged(feature.id, nameOf(feature), kind(feature.kind)?.harm ?? 'fall', helpPast(site, feature)))
  const magnet = zone?.words.magnet?.says === 'yes' && !segment.features.some((one) => one.kind === 'magnet-area')
  if (magnet) found.push(judged(segment.id, 'magnet area', 'trap', site.led ? undefined : helpAt(site)))
  return found
}

/** On a robot-led part where nobody said who leads past it, help of the part for something else leads nobody. */
function helpPast(site: Site, feature: Feature): HelpState | undefined {
  return site.led && feature.ledBy === undefined ? helpState(feature.help) : helpLedOtherwise(site, feature)
}

function judged(
  feature: string,
  name: string,
  harm: Finding['harm'],
  help: ReturnType<typeof helpLedOtherwise>,
): Finding {
  return finding({
    id: 'stop-item',
    feature,
    subject: `Stop item, ${name}`,
    detail: () => 'never led by the robot; leash off, somebody else leads',
    harm,
    source: 'common practice',
    raw: 'stop-item',
    ...(help ? { help } : {}),
  })
}
