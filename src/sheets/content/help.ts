import type { CheckState } from '../../judge/result.ts'
import type { Feature, Help, Segment } from '../../record/survey.ts'
import { own } from './own.ts'
import type { Scope } from './scope.ts'
import { joined, verdictWords } from './words.ts'

export interface PlaceHelp {
  /** Feature or segment it is recorded at. */
  holder: string
  segment: Segment
  place: string
  help: Help
  /** The walk holds only with it: led by a person, or a check that it helps. */
  needed: boolean
}

const leans: readonly CheckState[] = ['helped', 'needs-help', 'stop-item']

/** Everybody who is to help on the walk and where, in walking order. */
export function helpsOf(scope: Scope): PlaceHelp[] {
  const last = scope.walk.segments.at(-1)
  const out = scope.result.checks.some((check) => check.id === 'emergency' && leans.includes(check.state))
  const wayOut: PlaceHelp[] =
    out && last && scope.walk.alarm
      ? [{ holder: scope.walk.id, segment: last, place: 'the way out', help: scope.walk.alarm, needed: true }]
      : []
  return [...onTheWay(scope), ...wayOut]
}

function onTheWay(scope: Scope): PlaceHelp[] {
  return scope.stretches.flatMap(({ segment, result }) => {
    const leaning = new Set(result.checks.filter((check) => leans.includes(check.state)).map((check) => check.feature))
    const found: PlaceHelp[] = []
    if (segment.help)
      found.push({
        holder: segment.id,
        segment,
        place: segmentPlace(segment),
        help: segment.help,
        needed: segment.ledBy !== 'robot' || leaning.size > 0,
      })
    for (const feature of featuresOf(segment))
      if (feature.help)
        found.push({
          holder: feature.id,
          segment,
          place: the(featureName(feature)),
          help: feature.help,
          needed: leaning.has(feature.id) || (feature.ledBy ?? segment.ledBy) !== 'robot',
        })
    return found
  })
}

export function featuresOf(segment: Segment): Feature[] {
  return segment.turn ? [...segment.features, segment.turn] : segment.features
}

export function featureName(feature: Feature): string {
  return own(feature.name ?? feature.kind.replaceAll('-', ' '))
}

/** A part led by a person is named for what stands on it, else as the surveyor named it. */
function segmentPlace(segment: Segment): string {
  const first = segment.features[0]
  return first ? the(featureName(first)) : `"${own(segment.name)}"`
}

/** "the main stair" of "main stair"; a name with its own article, a capital or a figure stays. */
export function the(name: string): string {
  return /^\p{Ll}/u.test(name) && !/^(an?|the|my|our|your|every|each)\s/.test(name) ? `the ${name}` : name
}

export function roleOf(help: Help | undefined): string | null {
  return help?.role?.trim() ? own(help.role) : null
}

/** "the porter at the lift and the main door, and the warden at the steps"; '' where no role is named. */
export function whoWhere(helps: readonly PlaceHelp[]): string {
  const places = new Map<string, Set<string>>()
  for (const { help, place } of meetings(helps)) {
    const role = roleOf(help)
    if (role) places.set(role, (places.get(role) ?? new Set()).add(place))
  }
  return [...places].map(([role, at]) => `${the(role)} at ${joined([...at])}`).join(', and ')
}

/** One for each time that somebody is waited for: who leads on over the next segment is met once. */
export function meetings(helps: readonly PlaceHelp[]): PlaceHelp[] {
  return helps.filter(({ segment, holder, help }, i) => {
    const before = helps[i - 1]
    const whole = holder === segment.id && segment.ledBy !== 'robot'
    return !(
      whole &&
      before?.holder === before?.segment.id &&
      before?.segment.ledBy === segment.ledBy &&
      roleOf(before.help) === roleOf(help)
    )
  })
}

/** "Only with help: the porter at the lift." */
export function verdictLine(scope: Scope): string {
  const who = scope.result.verdict === 'with-help' ? whoWhere(helpsOf(scope).filter((help) => help.needed)) : ''
  return `${verdictWords[scope.result.verdict]}${who === '' ? '' : `: ${who}`}.`
}

/** "the porter and the warden". */
export function whoOnly(helps: readonly PlaceHelp[]): string {
  return joined([...new Set(helps.flatMap(({ help }) => roleOf(help) ?? []))].map(the))
}
