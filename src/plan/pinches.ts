import type { Scene, SceneForm } from '../geometry/scene.ts'
import type { Interval, Unsafe } from '../record/interval.ts'
import type { Feature, Reading, Segment } from '../record/survey.ts'
import type { Metres } from '../units/quantity.ts'
import { deadEndScene, liftScene } from './scene-rooms.ts'

/** How a quantity is read: pins and changed uncertainties are the reader's. */
export type Read = (
  holder: { readings: Readonly<Record<string, readonly Reading[]>> },
  quantity: string,
  unsafe: Unsafe,
) => Interval | null

/** A measure of a pinch with its ends. */
export interface Dimension {
  low: Metres
  value: Metres
  high: Metres
}

/**
 * A pinch as the planner is asked it: `widths` never do harm by growing, so the low end gives the certified room and
 * the high end the optimistic one; `free` measures have no one unsafe end and are tried at both ends and their value.
 */
export interface Pinch {
  feature: Feature
  widths: Readonly<Record<string, Dimension>>
  free: Readonly<Record<string, Dimension>>
  from: Interval[]
  /** Straight run-up of the way back. */
  leadBack: Metres
  /** Room taken off the certified end: an angle by 3-4-5 or plan is taken as square. */
  offLow: Metres
  /** The named form, or a scene of its own for a separation, both in metres and radians. */
  build: (dims: Readonly<Record<string, number>>) => SceneForm | OwnScene
}

/** A scene of no named form: `key` tells it from every other. */
export interface OwnScene {
  kind: 'own'
  key: string
  draw(separation: Metres): Scene
}

/** A pinch that cannot be judged yet, and what it lacks, in words. */
export interface Lacking {
  feature: Feature
  lacking: string
}

export interface PinchSite {
  segment: Segment
  before: Segment | null
  after: Segment | null
  read: Read
  team: { a: Metres; d: Metres }
}

/** A bend of less is straight on. */
const gentlest = Math.PI / 12
const sharpest = (Math.PI * 5) / 6
const square = Math.PI / 2
/** What a corner measured square by 3-4-5 or plan may cost, measured on corners of 1.0 to 1.5 m. */
const squareCost: Metres = 0.003
const longestLead: Metres = 1.5
/** Beyond this a width does not matter. */
const wide: Metres = 10
const thinnest: Metres = 0.01

/** Kinds judged as an opening in line, and the depth of the squeeze where nobody measured it. */
const inLine: Readonly<Record<string, Metres>> = {
  narrowing: 0.3,
  furniture: 0.5,
  works: 0.5,
  post: 0.1,
  'security-scan': 0.5,
}
/** Kinds with a frame: in line, or in the side wall by their word `position`. */
const framed = new Set([
  'opening',
  'hinged-door',
  'double-doors',
  'automatic-door',
  'sliding-door',
  'gate',
  'turnstile',
  'strip-curtain',
  'lift',
])

/** Every pinch of a robot-led segment: its features and the turn at its end. */
export function pinchesOf(site: PinchSite): (Pinch | Lacking)[] {
  const { segment } = site
  const found: (Pinch | Lacking)[] = []
  for (const feature of segment.features) {
    const one = ofFeature(site, feature)
    if (one) found.push(one)
  }
  const { turn } = segment
  if (turn && !isThroughDoor(segment, turn, site.read)) {
    const one = ofTurn(site, turn)
    if (one) found.push(one)
  }
  return found
}

function ofFeature(site: PinchSite, feature: Feature): Pinch | Lacking | null {
  if (framed.has(feature.kind)) return ofFrame(site, feature)
  if (feature.kind in inLine) return ofSqueeze(site, feature)
  if (feature.kind === 'obstruction') return ofObstruction(site, feature)
  if (feature.kind === 'chicane') return ofChicane(site, feature)
  if (feature.kind === 'dead-end') return ofDeadEnd(site, feature)
  return null
}

/** A turn through a door in the side wall is the door's: the same hand, about square. */
function isThroughDoor(segment: Segment, turn: Feature, read: Read): boolean {
  const angle = read(turn, 'angle', 'both')?.value
  if (angle === undefined || Math.abs(angle) < Math.PI / 3 || Math.abs(angle) > (Math.PI * 2) / 3) return false
  const hand = angle > 0 ? 'left' : 'right'
  return segment.features.some((one) => framed.has(one.kind) && one.words.position?.says === hand)
}

function ofTurn(site: PinchSite, turn: Feature): Pinch | Lacking | null {
  const { read, segment, after } = site
  // Facing about at the end of a walk asks no corner.
  if (!after) return null
  const before = read(turn, 'widthBefore', 'low') ?? read(segment, 'width', 'low')
  const past = read(turn, 'widthAfter', 'low') ?? read(after, 'width', 'low')
  if (!before) return { feature: turn, lacking: 'clear width before the corner' }
  if (!past) return { feature: turn, lacking: 'clear width after the corner' }
  const widths = { w1: width(before), w2: width(past) }
  const lead = leadBefore(site, null)
  const leadBack = leadAfter(site, null)
  if (turn.kind === 'u-turn') {
    const k = read(turn, 'wallThickness', 'both')
    const e = read(turn, 'endDistance', 'low')
    if (!k) return { feature: turn, lacking: 'thickness of the wall' }
    if (!e) return { feature: turn, lacking: 'distance from the wall end' }
    return {
      feature: turn,
      widths: { ...widths, e: width(e) },
      free: { k: free(k) },
      from: [before, past, k, e],
      leadBack,
      offLow: 0,
      build: ({ w1 = 0, w2 = 0, k = 0, e = 0 }) => ({ kind: 'uturn', w1, w2, k, e, lead }),
    }
  }
  const angle = read(turn, 'angle', 'both')
  if (!angle) return { feature: turn, lacking: 'angle' }
  const ends = [Math.abs(angle.low), Math.abs(angle.value), Math.abs(angle.high)]
  const least = angle.low <= 0 && angle.high >= 0 ? 0 : Math.min(...ends)
  const most = Math.max(...ends)
  if (most < gentlest) return null
  if (most > sharpest + 1e-9) return { feature: turn, lacking: 'a turn of over 150 degrees: enter it as a U-turn' }
  const squared = isSquare(turn, angle, before, past)
  const bend = squared
    ? { low: square, value: square, high: square }
    : { low: Math.max(gentlest, least), value: Math.max(gentlest, Math.abs(angle.value)), high: most }
  return {
    feature: turn,
    widths,
    free: { angle: bend },
    from: [before, past, angle],
    leadBack,
    // Pinned under a right angle it costs nothing.
    offLow: squared && most > square - 1e-9 ? squareCost : 0,
    build: ({ w1 = 0, w2 = 0, angle = 0 }) => ({ kind: 'turn', w1, w2, angle, lead }),
  }
}

/** Measured square by 3-4-5 or plan (as it was taken, whatever its pin), in corners no narrower than those on which its cost was measured. */
function isSquare(turn: Feature, angle: Interval, before: Interval, after: Interval): boolean {
  const by = (turn.readings.angle ?? []).filter((one) => angle.ids.includes(one.id))
  return (
    by.length > 0 &&
    by.every((one) => one.instrument === 'square' && Math.abs(Math.abs(one.value) - square) < 1e-3) &&
    before.low >= 1 &&
    after.low >= 1
  )
}

function ofFrame(site: PinchSite, feature: Feature): Pinch | Lacking {
  const { read, segment } = site
  const clear = read(feature, 'clearWidth', 'low')
  if (!clear) return { feature, lacking: 'clear width' }
  const position = feature.words.position?.says
  if (position === undefined) return { feature, lacking: 'where it opens' }
  const along = read(segment, 'width', 'low')
  if (!along) return { feature, lacking: 'clear width of the stretch' }
  const depth = read(feature, 'wallThickness', 'both')
  const lead = leadBefore(site, feature)
  if (position === 'ahead') {
    const thick = depth ? free(depth) : { low: 0.15, value: 0.15, high: 0.15 }
    return line(feature, along, clear, thick, offCentre(feature), lead, [along, clear, ...(depth ? [depth] : [])])
  }
  if (!depth) return { feature, lacking: 'depth of the frame' }
  return {
    feature,
    widths: { w: width(along), p: width(clear) },
    free: { t: free(depth) },
    from: [along, clear, depth],
    leadBack: leadAfter(site, feature),
    offLow: 0,
    build: ({ w = 0, p = 0, t = 0 }) => ({ kind: 'sidedoor', w, p: Math.min(p, 3), t, lead, reverse: false }),
  }
}

/** How far an opening's middle lies off the walking line, where that was said. */
function offCentre(feature: Feature): Metres {
  return feature.side === 'left' || feature.side === 'right' ? Math.abs(feature.offset ?? wide) : 0
}

function line(
  feature: Feature,
  along: Dimension,
  clear: Dimension,
  depth: Dimension,
  off: Metres,
  lead: Metres,
  from: Interval[],
): Pinch {
  return {
    feature,
    widths: { w: width(along), p: width(clear) },
    free: { t: depth },
    from,
    leadBack: lead,
    offLow: 0,
    build: ({ w = 0, p = 0, t = 0 }) => {
      const gap = Math.min(p, w)
      return { kind: 'indoor', w, p: gap, t, o: Math.min(off, (w - gap) / 2), lead, reverse: false }
    },
  }
}

function ofSqueeze(site: PinchSite, feature: Feature): Pinch | Lacking {
  const { read, segment } = site
  const clear = read(feature, 'clearWidth', 'low')
  if (!clear) return { feature, lacking: 'clear width' }
  const along = read(segment, 'width', 'low')
  if (!along) return { feature, lacking: 'clear width of the stretch' }
  const length = read(feature, 'length', 'both')
  const usual = inLine[feature.kind] ?? 0.3
  const depth = length ? free(length) : { low: usual, value: usual, high: usual }
  // The stretch's least width may be this very place: it is at least as wide as what is passed.
  const around = { ...along, low: Math.max(along.low, clear.low), high: Math.max(along.high, clear.high) }
  const from = [along, clear, ...(length ? [length] : [])]
  return line(feature, around, clear, depth, offCentre(feature), leadBefore(site, feature), from)
}

function ofObstruction(site: PinchSite, feature: Feature): Pinch | Lacking {
  const { read, segment } = site
  const depth = read(feature, 'depth', 'both')
  if (!depth) return { feature, lacking: 'how far it stands out' }
  const along = read(segment, 'width', 'low')
  if (!along) return { feature, lacking: 'clear width of the stretch' }
  const length = read(feature, 'length', 'both')
  const lead = leadBefore(site, feature)
  return {
    feature,
    widths: { w: width(along) },
    free: { j: free(depth), t: length ? free(length) : { low: 0.3, value: 0.3, high: 0.3 } },
    from: [along, depth, ...(length ? [length] : [])],
    leadBack: leadAfter(site, feature),
    offLow: 0,
    build: ({ w = 0, j = 0, t = 0 }) => ({
      kind: 'indoor',
      w,
      p: Math.max(thinnest, w - j),
      t,
      o: Math.min(j, w - thinnest) / 2,
      lead,
      reverse: false,
    }),
  }
}

function ofChicane(site: PinchSite, feature: Feature): Pinch | Lacking {
  const { read, segment } = site
  const depth = read(feature, 'depth', 'both')
  const spacing = read(feature, 'spacing', 'both')
  const along = read(segment, 'width', 'low')
  if (!depth || !spacing) return { feature, lacking: depth ? 'distance between the two' : 'how far they stand out' }
  if (!along) return { feature, lacking: 'clear width of the stretch' }
  const lead = leadBefore(site, feature)
  return {
    feature,
    widths: { w: width(along) },
    free: { j: free(depth), s: free(spacing) },
    from: [along, depth, spacing],
    leadBack: leadAfter(site, feature),
    offLow: 0,
    build: ({ w = 0, j = 0, s = 0 }) => ({
      kind: 'chicane',
      w,
      j: Math.min(j, w - thinnest),
      s,
      lead,
      reverse: false,
    }),
  }
}

function ofDeadEnd(site: PinchSite, feature: Feature): Pinch | Lacking {
  const { read, team } = site
  const clear = read(feature, 'clearWidth', 'low')
  const depth = read(feature, 'depth', 'low')
  if (!clear || !depth) return { feature, lacking: clear ? 'clear depth' : 'clear width' }
  return {
    feature,
    widths: { w: width(clear), e: width(depth) },
    free: {},
    from: [clear, depth],
    leadBack: 0,
    offLow: 0,
    build: ({ w = 0, e = 0 }) => ({
      kind: 'own',
      key: `dead end ${w} ${e}`,
      draw: (separation) => deadEndScene({ w, e }, team, separation),
    }),
  }
}

/** The car of a lift in which the team turns, leash gathered; null where it needs no scene or a measure is missing. */
export function liftCar(site: PinchSite, feature: Feature): Pinch | null {
  const { read, team } = site
  const clear = read(feature, 'clearWidth', 'low')
  const depth = read(feature, 'carDepth', 'low')
  const across = read(feature, 'carWidth', 'low')
  if (!clear || !depth || !across) return null
  const from = [clear, depth, across]
  if (feature.words.wayOut?.says !== 'turns-inside')
    return line(feature, across, clear, { low: 0.15, value: 0.15, high: 0.15 }, 0, 0, from)
  return {
    feature,
    widths: { p: width(clear), e: width(depth), w: width(across) },
    free: {},
    from,
    leadBack: 0,
    offLow: 0,
    build: ({ p = 0, e = 0, w = 0 }) => ({
      kind: 'own',
      key: `lift ${w} ${p} ${e}`,
      draw: (separation) => liftScene({ w, p: Math.min(p, w), e }, team, separation),
    }),
  }
}

/**
 * The straight run-up really there: to a feature from whatever pinch stands before it on its segment, to a turn from
 * the last of them; 1.5 m at most. Where a thing stands is not known, its run-up is none.
 */
function leadBefore({ segment, read }: PinchSite, feature: Feature | null): Metres {
  const end = feature ? (feature.along ?? 0) : (read(segment, 'length', 'low')?.low ?? 0)
  let start = 0
  for (const one of segment.features) {
    if (one === feature || !isInTheWay(one)) continue
    const own = read(one, 'length', 'high')?.high ?? 0
    if (one.along === undefined) {
      if (!feature) start += own
      continue
    }
    if (!feature || one.along < end) start = Math.max(start, one.along + own)
  }
  return Math.min(longestLead, Math.max(0, end - start))
}

/** The run-up of the way back: from whatever pinch stands past it; for a turn on the stretch after it. */
function leadAfter({ segment, after, read }: PinchSite, feature: Feature | null): Metres {
  const on = feature ? segment : after
  if (!on) return 0
  const begin = feature ? (feature.along ?? Number.POSITIVE_INFINITY) : 0
  let end = read(on, 'length', 'low')?.low ?? 0
  for (const one of on.features)
    if (one !== feature && isInTheWay(one) && (one.along ?? 0) >= begin) end = Math.min(end, one.along ?? 0)
  return Math.min(longestLead, Math.max(0, end - begin))
}

function isInTheWay(feature: Feature): boolean {
  return framed.has(feature.kind) || feature.kind in inLine || ['obstruction', 'chicane'].includes(feature.kind)
}

function width({ low, value, high }: Dimension): Dimension {
  const within = (one: number) => Math.min(wide, Math.max(thinnest, one))
  return { low: within(low), value: within(value), high: within(high) }
}

/** A measure without an unsafe end, by its size, never nothing and never beyond what matters. */
function free(one: Dimension): Dimension {
  const within = (end: number) => Math.min(wide, Math.max(thinnest, Math.abs(end)))
  return { low: within(one.low), value: within(one.value), high: within(one.high) }
}
