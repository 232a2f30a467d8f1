import type { Kind } from '../catalogue/kind.ts'
import { kind } from '../catalogue/kinds.ts'
import type { Feature } from '../record/survey.ts'
import { isGuarded } from './checks/edge.ts'
import type { Finding } from './finding.ts'
import { type Caution, harms } from './result.ts'
import { featuresOf, leaderOf, nameOf, type Site } from './site.ts'

/**
 * What the handler is told on a part, ranked by harm and never by ratio: the row of each feature that is a caution or
 * whose check asks for one, and the cautions of checks that are no feature's.
 */
export function cautionsOf(site: Site, findings: readonly Finding[]): Caution[] {
  const found: Caution[] = []
  const spoken = new Set<string>()
  for (const feature of featuresOf(site)) {
    const row = kind(feature.kind)
    if (!row) continue
    const own = findings.filter((one) => one.feature === feature.id)
    if (!isSpoken(row, feature, own)) continue
    spoken.add(feature.id)
    found.push({ feature: feature.id, harm: row.harm, text: fill(row.spoken, site, feature) })
    // What the row does not say: a pause, a heavy door, a step at a sill.
    for (const one of own)
      if (one.caution && (row.weight === 'caution' || one.id === 'turn' || one.id === 'slack-leash') && !row.stopItem)
        found.push({ feature: feature.id, harm: one.harm, text: one.caution })
  }
  for (const one of findings)
    if (one.caution && !spoken.has(one.feature)) found.push({ feature: one.feature, harm: one.harm, text: one.caution })
  const unique = found.filter(
    (one, i) => found.findIndex((other) => other.text === one.text && other.feature === one.feature) === i,
  )
  return unique.sort((a, b) => harms.indexOf(a.harm) - harms.indexOf(b.harm))
}

/** A caution row always; a note only where its check asks. A guarded edge and a clear turn say nothing. */
function isSpoken(row: Kind, feature: Feature, own: readonly Finding[]): boolean {
  if (row.stopItem || row.weight === 'caution') return true
  if (row.aspect === 'edge' && isGuarded(feature)) return false
  return own.some((one) => one.state !== 'passes' && one.id !== 'turn')
}

/** Features whose row is a caution: they keep a part from being usable. */
export function cautioned(site: Site): Set<string> {
  return new Set(
    featuresOf(site)
      .filter((one) => kind(one.kind)?.weight === 'caution')
      .map((one) => one.id),
  )
}

const clocks: Readonly<Record<string, string>> = { left: "at 9 o'clock", right: "at 3 o'clock", ahead: "at 12 o'clock" }

/** The row's words with this feature's own in them. */
export function fill(spoken: string, site: Pick<Site, 'segment'>, feature: Feature): string {
  const helper = (feature.help?.role ?? site.segment.help?.role ?? '').trim() || leaderWords(leaderOf(site, feature))
  const side = feature.side === 'left' || feature.side === 'right' ? feature.side : turnSide(feature)
  const clock = clocks[feature.words.position?.says ?? side ?? 'ahead'] ?? "at 12 o'clock"
  return spoken.replace(/\{(\w+)\}/g, (_, field: string) => {
    if (field === 'role') return helper
    if (field === 'side') return side ?? 'left or right'
    if (field === 'clock') return clock
    if (field === 'name') return nameOf(feature)
    return feature.words[field]?.says.replaceAll('-', ' ') ?? 'not known'
  })
}

function turnSide(feature: Feature): string | null {
  const angle = feature.readings.angle?.[0]?.value
  return angle === undefined ? null : angle > 0 ? 'left' : 'right'
}

function leaderWords(leader: string): string {
  return leader === 'human-guide' ? 'your guide' : leader === 'staff' ? 'staff' : 'your helper'
}
