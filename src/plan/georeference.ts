import bearing from '@turf/bearing'
import destination from '@turf/destination'
import distance from '@turf/distance'
import type { Point } from '../geometry/scene.ts'
import type { Degrees, Metres } from '../units/quantity.ts'

/** Ties a floor's plan to the earth: one plan point whose place is known, and which way the plan looks. */
export interface Anchor {
  /** The anchored point on the plan. */
  point: Point
  /** Where it is, WGS 84. */
  lat: Degrees
  lon: Degrees
  /** Bearing of the plan's y axis, clockwise from true north. */
  bearingDegrees: Degrees
}

/** Longitude and latitude in degrees, in the order of GeoJSON (RFC 7946). */
export type LonLat = [lon: Degrees, lat: Degrees]

const degrees = 180 / Math.PI
const metres = { units: 'meters' } as const

/**
 * A plan point on the earth. Great circles on a sphere of 6 371 008.8 m: see `sphereError` for what that leaves out.
 * Longitude comes back in [-180, 180).
 * @throws RangeError on a coordinate that is not finite, or an anchor outside the globe.
 */
export function toLonLat(point: Point, anchor: Anchor): LonLat {
  check(anchor)
  const east = point.x - anchor.point.x
  const north = point.y - anchor.point.y
  if (!Number.isFinite(east + north)) throw new RangeError(`no place for (${point.x}, ${point.y})`)
  const away = Math.atan2(east, north) * degrees + anchor.bearingDegrees
  const placed = destination([anchor.lon, anchor.lat], Math.hypot(east, north), halfTurn(away), metres)
  const [lon = Number.NaN, lat = Number.NaN] = placed.geometry.coordinates
  return [halfTurn(lon), lat]
}

/** The plan point of a place on the earth: the way back of `toLonLat`. */
export function toPlan([lon, lat]: LonLat, anchor: Anchor): Point {
  check(anchor)
  if (!Number.isFinite(lon + lat) || Math.abs(lat) > 90) throw new RangeError(`no place at ${lat}, ${lon}`)
  const origin: LonLat = [anchor.lon, anchor.lat]
  const length = distance(origin, [lon, lat], metres)
  const angle = (bearing(origin, [lon, lat]) - anchor.bearingDegrees) / degrees
  return { x: anchor.point.x + length * Math.sin(angle), y: anchor.point.y + length * Math.cos(angle) }
}

/**
 * How far a point may lie from where the sphere puts it, this far from the anchor: 0.56 % at most. The ellipsoid's
 * radius of curvature runs from 6 335 439 m (equator, along the meridian) to 6 399 594 m (poles), against the sphere's
 * 6 371 008.8 m (WGS 84, a = 6 378 137 m, 1/f = 298.257223563). 0.6 m in 100 m: less than a phone's own fix.
 */
export function sphereError(fromAnchor: Metres): Metres {
  return 0.0056 * Math.abs(fromAnchor)
}

function check({ lat, lon, bearingDegrees, point }: Anchor): void {
  if (!Number.isFinite(lat + lon + bearingDegrees + point.x + point.y) || Math.abs(lat) > 90 || Math.abs(lon) > 180)
    throw new RangeError(`no anchor at ${lat}, ${lon}`)
}

/** An angle in degrees brought to [-180, 180). */
function halfTurn(angle: Degrees): Degrees {
  return angle - 360 * Math.floor((angle + 180) / 360)
}
