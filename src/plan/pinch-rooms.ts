import type { Feature } from '../record/survey.ts'
import type { Lacking, Pinch, PinchSite } from './pinch.ts'
import { width } from './pinch.ts'
import { line } from './pinch-openings.ts'
import { deadEndScene, liftScene } from './scene-rooms.ts'

/** A dead end in which the team turns round. */
export function ofDeadEnd(site: PinchSite, feature: Feature): Pinch | Lacking {
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
