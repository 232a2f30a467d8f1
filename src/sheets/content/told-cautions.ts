import { type Caution, harms, type SegmentResult } from '../../judge/result.ts'
import type { Feature, Segment } from '../../record/survey.ts'
import { featuresOf, roleOf, the } from './help.ts'
import { own } from './own.ts'
import { sentences } from './words.ts'

export interface ToldCaution {
  harm: Caution['harm']
  /** Where a surveyor corrects it. */
  from: string
  text: string
  /** A place where nobody is led by the robot: nothing else is said of it. */
  stop: boolean
}

/** Two of these are never told in one part. */
export const severe: readonly Caution['harm'][] = ['fall', 'head', 'trap']

/** What is told on a segment led by the robot: worst harm first, never by ratio; none is left out. */
export function cautionsOf(segment: Segment, result: SegmentResult): ToldCaution[] {
  const features = new Map(featuresOf(segment).map((feature) => [feature.id, feature]))
  const nameOf = (id: string) => own(features.get(id)?.name ?? segment.name)
  const stops = stopsOf(result, features.values())
  const told: ToldCaution[] = [...stops].map((id) => ({
    harm: 'fall',
    from: `help at "${nameOf(id)}"`,
    text: stopLine(roleOf(features.get(id)?.help) ?? roleOf(segment.help)),
    stop: true,
  }))
  const helped = helpedBy(segment, result, features)
  for (const caution of merged(result.cautions, segment.id, [...helped.keys()])) {
    if (stops.has(caution.feature)) continue
    const text = spoken(caution, helped.get(caution.feature) ?? null)
    told.push({ harm: caution.harm, from: `caution at "${nameOf(caution.feature)}"`, text, stop: false })
  }
  return told
    .filter((one, i) => told.findIndex((other) => other.text === one.text) === i)
    .sort((one, other) => harms.indexOf(one.harm) - harms.indexOf(other.harm))
}

/** Unguarded edges and everything that is no robot's business; an edge that only asks for care keeps its caution. */
function stopsOf(result: SegmentResult, features: Iterable<Feature>): Set<string> {
  const stops = new Set(
    result.checks
      .filter(
        ({ id, state }) =>
          id === 'stop-item' ||
          state === 'stop-item' ||
          (id === 'edge' && (state === 'helped' || state === 'needs-help')),
      )
      .map((check) => check.feature),
  )
  for (const { id, ledBy } of features) if (ledBy && ledBy !== 'robot') stops.add(id)
  return stops
}

/** Who is waited for, by what a check leans on them for: a feature, or the segment itself. */
function helpedBy(
  segment: Segment,
  { checks }: SegmentResult,
  features: ReadonlyMap<string, Feature>,
): Map<string, string> {
  const leaning = checks.filter(({ state }) => state === 'helped' || state === 'needs-help')
  return new Map(
    leaning.flatMap(({ feature }) => {
      const role = roleOf(features.get(feature)?.help) ?? roleOf(segment.help)
      return role === null ? [] : [[feature, role] as const]
    }),
  )
}

/**
 * All that is said of one thing is one caution of its worst harm, unless it can do two of the severe harms: those stay
 * apart. What is said of the segment itself is of different things. `waited`: where somebody is waited for, said or not.
 */
function merged(cautions: readonly Caution[], segment: string, waited: readonly string[]): Caution[] {
  const found: Caution[] = []
  for (const caution of cautions) {
    const same = found.find(
      ({ feature, harm }) =>
        feature === caution.feature &&
        feature !== segment &&
        (harm === caution.harm || !severe.includes(harm) || !severe.includes(caution.harm)),
    )
    if (!same) found.push({ ...caution })
    else {
      same.text = `${same.text} ${caution.text}`
      if (harms.indexOf(caution.harm) < harms.indexOf(same.harm)) same.harm = caution.harm
    }
  }
  for (const feature of waited)
    if (!found.some((one) => one.feature === feature)) found.push({ feature, harm: 'trap', text: '' })
  return found
}

/** The judge's words, each once, one line. "Here" says nothing: the part says where. Whoever helps finds the handle. */
function spoken({ text }: Caution, role: string | null): string {
  const said = sentences(own(text, 800).replace(/ here\b/g, '')).filter(
    (sentence, i, all) =>
      all.indexOf(sentence) === i && !(role !== null && /find the (handle|latch) first/.test(sentence)),
  )
  const line = said.join(' ')
  if (role === null) return line
  return line.includes(`for ${role}`)
    ? line.replaceAll(`for ${role}`, `for ${the(role)}`)
    : `Stop. Wait for ${the(role)}. ${line}`.trim()
}

/** The one caution of a place where somebody else leads. */
export function stopLine(role: string | null): string {
  return `Stop. Leash off. Wait for ${role === null ? '[role not named]' : the(role)}.`
}
