import type { Caution, SegmentResult } from '../../judge/result.ts'
import type { Feature, LedBy, Segment } from '../../record/survey.ts'
import type { Metres } from '../../units/quantity.ts'
import { featuresOf, roleOf, the } from './help.ts'
import type { Scope } from './scope.ts'

/** Segments that are one piece of the walk to its reader: one led by the robot, or all in a row led by the same person. */
export interface Stretch {
  ledBy: LedBy
  /** Who helps, where somebody is to. */
  role: string | null
  segments: Segment[]
  results: SegmentResult[]
  /** null: a length is missing. */
  length: Metres | null
}

export function stretchesOf(scope: Scope): Stretch[] {
  const stretches: Stretch[] = []
  for (const { segment, result } of scope.stretches) {
    const role = roleOf(segment.help)
    const last = stretches.at(-1)
    const length = lengthOf(segment)
    if (last && segment.ledBy !== 'robot' && last.ledBy === segment.ledBy && last.role === role) {
      last.segments.push(segment)
      last.results.push(result)
      last.length = last.length === null || length === null ? null : last.length + length
    } else stretches.push({ ledBy: segment.ledBy, role, segments: [segment], results: [result], length })
  }
  return stretches
}

/** Of two readings the first counts: it is only walked. */
export function lengthOf(segment: Segment): Metres | null {
  return segment.readings.length?.[0]?.value ?? null
}

export interface ToldCaution {
  harm: Caution['harm']
  /** Where a surveyor corrects it. */
  from: string
  text: string
  /** A place where nobody is led by the robot: nothing else is said of it. */
  stop: boolean
}

const rank = ['fall', 'head', 'trap', 'road', 'comfort'] as const
export const severe: readonly Caution['harm'][] = ['fall', 'head', 'trap']

/** What is told on a segment led by the robot: worst harm first, never by ratio; none is left out. */
export function cautionsOf(
  segment: Segment,
  result: SegmentResult,
  speak: (caution: Caution) => string,
): ToldCaution[] {
  const features = new Map(featuresOf(segment).map((feature) => [feature.id, feature]))
  const stops = new Set(result.checks.filter((check) => isStop(check.id, check.state)).map((check) => check.feature))
  for (const feature of features.values()) if (feature.ledBy && feature.ledBy !== 'robot') stops.add(feature.id)
  const told: ToldCaution[] = [...stops].map((id) => ({
    harm: 'fall',
    from: `help at ${features.get(id)?.name ?? segment.name}`,
    text: stopText(features.get(id), segment),
    stop: true,
  }))
  for (const caution of result.cautions)
    if (!stops.has(caution.feature))
      told.push({
        harm: caution.harm,
        from: `caution at ${features.get(caution.feature)?.name ?? segment.name}`,
        text: speak(caution),
        stop: false,
      })
  return told
    .filter((one, i) => told.findIndex((other) => other.text === one.text) === i)
    .sort((one, other) => rank.indexOf(one.harm) - rank.indexOf(other.harm))
}

/** Unguarded edges and everything that is no robot's business; an edge that only asks for care keeps its caution. */
function isStop(id: string, state: string): boolean {
  return (
    id === 'stop-item' || state === 'stop-item' || (id === 'edge' && (state === 'helped' || state === 'needs-help'))
  )
}

function stopText(feature: Feature | undefined, segment: Segment): string {
  return stopLine(roleOf(feature?.help) ?? roleOf(segment.help))
}

/** The one caution of such a place. */
export function stopLine(role: string | null): string {
  return `Stop. Leash off. Wait for ${role === null ? '[role not named]' : the(role)}.`
}
