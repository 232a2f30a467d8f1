import { atReading, type Interval, magnitude } from '../../record/interval.ts'
import type { Feature } from '../../record/survey.ts'
import { type Draft, epsilon, type Finding, finding } from '../finding.ts'
import { read } from '../setting.ts'
import { helpAt, helpLedOtherwise, nameOf, type Site } from '../site.ts'
import { metresThere } from '../words.ts'

/** Only what a body meets settles an edge: rope, chain or tape is no guard. */
const guards = new Set(['rail', 'wall', 'barrier', 'screen-doors'])
const kerbHeight = 0.18
/** A kerb under this does not hold a wheel back. */
const holdsWheels = 0.06
const kerbWithin = 1.5
const kerbCaution = 1.0
const kerbHelp = 0.6
const stopUnder = 2.0
const within = 3.0

type Kind = 'kerb' | 'drop' | 'traffic'

/** Whether a guard stands that settles the edge. */
export function isGuarded(feature: Feature): boolean {
  return guards.has(feature.words.guard?.says ?? 'none')
}

/** Edges within 3 m of the walking line, by kind and by their least distance. No ratio. Common practice; traffic from memory. */
export function edge(site: Site): Finding[] {
  return site.segment.features.flatMap((feature) => {
    if (!isEdge(feature)) return []
    const distance = read(site.setting, feature, 'distance', 'low')
    if (!distance) return []
    return [judged(site, feature, distance)]
  })
}

/** A row of the catalogue that is an edge beside the way. */
export function isEdge(feature: Feature): boolean {
  return ['drop-off', 'water-edge', 'platform-edge', 'traffic-edge', 'kerb-edge'].includes(feature.kind)
}

/** What the edge is by its height, and the reading that says so. */
function edgeKind({ setting }: Site, feature: Feature): { kind: Kind; by: Interval | null } {
  if (feature.kind === 'traffic-edge') {
    const kerb = read(setting, feature, 'kerb', 'low')
    if (!kerb || atReading(kerb, 'low') < holdsWheels - epsilon) return { kind: 'traffic', by: kerb }
    return { kind: atReading(kerb, 'high') <= kerbHeight + epsilon ? 'kerb' : 'drop', by: kerb }
  }
  if (feature.kind !== 'kerb-edge') return { kind: 'drop', by: null }
  const height = read(setting, feature, 'height', 'high')
  // A kerb of unknown height is as deep as it likes.
  const most = height ? atReading(magnitude(height), 'high') : Number.POSITIVE_INFINITY
  return { kind: most <= kerbHeight + epsilon ? 'kerb' : 'drop', by: height }
}

function judged(site: Site, feature: Feature, distance: Interval): Finding {
  const { kind, by } = edgeKind(site, feature)
  const led = helpLedOtherwise(site, feature)
  const guarded = isGuarded(feature)
  const raw = guarded ? (led ? 'needs-help' : 'passes') : stateOf(kind, distance)
  // Past a drop within 2 m somebody else leads; further edges are the helper's while the robot leads.
  const help = led ?? (raw === 'needs-help' ? helpAt(site, feature) : undefined)
  const told = ['told', 'by-eye'].includes(feature.words.guard?.how ?? '') && guarded
  return finding({
    // An edge within reach is one of the stop items.
    id: raw === 'stop-item' ? 'stop-item' : 'edge',
    feature: feature.id,
    subject: `Edge at ${nameOf(feature)}`,
    detail: () =>
      guarded
        ? `${feature.words.guard?.says?.replace('-', ' ')} at ${metresThere(distance.low)}`
        : `no guard at ${metresThere(distance.low)} from the walking line`,
    harm: kind === 'traffic' ? 'road' : 'fall',
    source: kind === 'traffic' ? 'common practice, from memory' : 'common practice',
    raw,
    demand: stopUnder,
    capacity: distance.low,
    caution: raw === 'tight' ? cautionOf(kind) : null,
    from: [distance, by],
    strict: true,
    told,
    ...(help ? { help } : {}),
  })
}

function cautionOf(kind: Kind): string {
  return kind === 'kerb'
    ? 'Kerb near the way. If the ground changes underfoot, stop.'
    : 'Traffic near the way. If the ground changes underfoot, stop.'
}

function stateOf(kind: Kind, distance: Interval): Draft['raw'] {
  const { low, high } = distance
  if (kind === 'kerb') {
    const value = atReading(distance, 'low')
    if (value > kerbWithin + epsilon || value >= kerbCaution - epsilon) return 'passes'
    return value < kerbHelp - epsilon ? 'needs-help' : 'tight'
  }
  if (kind === 'traffic') {
    if (low < stopUnder - epsilon) return 'needs-help'
    return low <= within + epsilon ? 'tight' : 'passes'
  }
  if (high < stopUnder - epsilon) return 'stop-item'
  if (low < stopUnder - epsilon) return 'unsure'
  return low <= within + epsilon ? 'needs-help' : 'passes'
}
