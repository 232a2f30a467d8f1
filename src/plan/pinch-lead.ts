import type { Feature } from '../record/survey.ts'
import type { Metres } from '../units/quantity.ts'
import type { PinchSite } from './pinch.ts'

const longestLead: Metres = 1.5

/** Kinds judged as an opening in line, and the depth of the squeeze where nobody measured it. */
export const inLine: Readonly<Record<string, Metres>> = {
  narrowing: 0.3,
  furniture: 0.5,
  works: 0.5,
  post: 0.1,
  'security-scan': 0.5,
}
/** Kinds with a frame: in line, or in the side wall by their word `position`. */
export const framed = new Set([
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

/**
 * The straight run-up really there: to a feature from whatever pinch stands before it on its segment, to a turn from
 * the last of them; 1.5 m at most. Where a thing stands is not known, its run-up is none.
 */
export function leadBefore({ segment, read }: PinchSite, feature: Feature | null): Metres {
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
export function leadAfter({ segment, after, read }: PinchSite, feature: Feature | null): Metres {
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
