import { kind } from '../catalogue/kinds.ts'
import type { Interval } from '../record/interval.ts'
import type { Feature, LedBy, Segment, Walk, Zone } from '../record/survey.ts'
import { type HelpState, helpState } from './help.ts'
import { read, type Setting } from './setting.ts'
import { reaction, type Surroundings, surroundingsOf, withNoiseOf } from './surroundings.ts'

/** A segment where it lies: all that its checks look at. */
export interface Site {
  setting: Setting
  walk: Walk
  segment: Segment
  before: Segment | null
  after: Segment | null
  zone: Zone | null
  around: Surroundings
  /** Seconds from a felt cue to the first braking. */
  reaction: number
  outdoors: boolean
  /** True: led by the robot. */
  led: boolean
  width: Interval | null
  length: Interval | null
  slope: Slope
  /** Wet floors are to be reckoned with here; and not at patches alone. */
  wetApplies: boolean
  wetAround: boolean
  /** Somebody said so; else it is reckoned with because nobody said of the zone that it is not. */
  wetSaid: boolean
  /** Judged with a wet floor this time. */
  wet: boolean
}

export interface Slope {
  /** Steepest magnitude, and steepest downward part, at the unsafe end; 0 on the level. */
  steepest: number
  down: number
  /** The same magnitude at the safe end. */
  gentlest: number
  /** Steepest at the reading itself. */
  read: number
  /** What it was read from. */
  from: Interval[]
}

const nobody: Surroundings = {
  crowd: null,
  twoWay: true,
  noise: null,
  noiseReadings: [],
  unseen: false,
  hours: [],
  seen: [],
}

export function siteOf(setting: Setting, walk: Walk, index: number, wet: boolean): Site {
  const segment = walk.segments[index]
  if (!segment) throw new Error(`judge/no-segment: ${walk.id} has no part ${index}`)
  const zone = setting.view.zones.find((one) => one.id === segment.zone) ?? null
  const around = withNoiseOf(setting, zone ? surroundingsOf(setting, zone) : nobody, segment)
  const patch = segment.features.some((one) => one.kind === 'wet-patch' || one.kind === 'loose-ground')
  const mopped = zone?.words.mopped?.says ?? null
  const wetZone =
    segment.words.wetness?.says === 'wet' ||
    zone?.outdoors === true ||
    zone?.nearOutsideDoor === true ||
    (mopped !== null && mopped !== 'no')
  // What nobody said of the zone is reckoned wet.
  const wetAround = wetZone || zone?.outdoors !== false || zone.nearOutsideDoor !== false || mopped === null
  const wetSaid = patch || wetZone
  const wetApplies = patch || wetAround
  return {
    setting,
    walk,
    segment,
    before: walk.segments[index - 1] ?? null,
    after: walk.segments[index + 1] ?? null,
    zone,
    around,
    wetAround,
    wetSaid,
    wetApplies,
    reaction: reaction(setting.team, around),
    outdoors: zone?.outdoors === true,
    led: segment.ledBy === 'robot',
    width: read(setting, segment, 'width', 'low'),
    length: read(setting, segment, 'length', 'low'),
    slope: slopeOf(setting, segment),
    wet: wet && wetApplies,
  }
}

/** Features of the segment and the turn at its end. */
export function featuresOf({ segment }: Pick<Site, 'segment'>): Feature[] {
  return segment.turn ? [...segment.features, segment.turn] : segment.features
}

/** Who leads at a feature: its own answer, its segment's; at a stop item on a robot-led part, who leads there by the catalogue. */
export function leaderOf({ segment }: Pick<Site, 'segment'>, feature: Feature): LedBy {
  if (feature.ledBy) return feature.ledBy
  return segment.ledBy === 'robot' ? (kind(feature.kind)?.ledBy ?? 'robot') : segment.ledBy
}

/** The help that stands at a feature: its own, else its segment's. */
export function helpAt({ segment }: Pick<Site, 'segment'>, feature?: Feature): HelpState {
  const own = helpState(feature?.help)
  return own === 'none' ? helpState(segment.help) : own
}

/** Help at a feature that is led otherwise, leash off; undefined while the robot leads: then no help settles it. */
export function helpLedOtherwise(site: Pick<Site, 'segment'>, feature: Feature): HelpState | undefined {
  return leaderOf(site, feature) === 'robot' ? undefined : helpAt(site, feature)
}

/** A gradient as travelled: up positive. A word "down" turns a positive reading round. */
export function travelled(gradient: Interval, feature: Feature): Omit<Slope, 'from'> {
  const turned = feature.words.direction?.says === 'down' && gradient.value > 0
  const low = turned ? -gradient.high : gradient.low
  const high = turned ? -gradient.low : gradient.high
  return {
    steepest: Math.max(Math.abs(low), Math.abs(high)),
    down: Math.max(0, -low),
    gentlest: low <= 0 && high >= 0 ? 0 : Math.min(Math.abs(low), Math.abs(high)),
    read: Math.abs(gradient.value),
  }
}

function slopeOf(setting: Setting, segment: Segment): Slope {
  const from: Interval[] = []
  const all = segment.features
    .filter((one) => one.kind === 'ramp')
    .flatMap((one) => {
      const gradient = read(setting, one, 'gradient', 'size')
      if (gradient) from.push(gradient)
      return gradient ? [travelled(gradient, one)] : []
    })
  const most = (pick: (one: Omit<Slope, 'from'>) => number) => Math.max(0, ...all.map(pick))
  return {
    steepest: most((one) => one.steepest),
    down: most((one) => one.down),
    gentlest: most((one) => one.gentlest),
    read: most((one) => one.read),
    from,
  }
}

/** The name a sentence gives a feature: its own, else the catalogue's. */
export function nameOf(feature: Feature): string {
  return feature.name ?? kind(feature.kind)?.name ?? feature.kind
}
