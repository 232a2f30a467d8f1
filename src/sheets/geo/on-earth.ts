import type { Point } from '../../geometry/scene.ts'
import type { Anchor, LonLat } from '../../plan/georeference.ts'

/** WGS 84 (NIMA TR8350.2): equatorial radius in metres, first eccentricity squared. */
const radius = 6_378_137
const flattening = 1 / 298.257223563
const eccentricity2 = flattening * (2 - flattening)
const degree = Math.PI / 180

/**
 * A plan point on the ellipsoid: the plan is the plane that touches it at the anchor. Lengths on the plan are lengths on the
 * ground to 1 mm in 25 m up to 10 km from the anchor, where a sphere would be out by up to 14 cm (see `sphereError`).
 * East-north-up to geocentric to geodetic, by the fixed point of Bowring's latitude; standard formulas of any geodesy text.
 * Longitude comes back in [-180, 180).
 * @throws RangeError on a coordinate that is not finite, or an anchor outside the globe.
 */
export function onEarth(point: Point, anchor: Anchor): LonLat {
  const right = point.x - anchor.point.x
  const up = point.y - anchor.point.y
  if (
    !Number.isFinite(right + up + anchor.bearingDegrees) ||
    !(Math.abs(anchor.lat) <= 90) ||
    !(Math.abs(anchor.lon) <= 180)
  )
    throw new RangeError(`no place for (${point.x}, ${point.y}) from an anchor at ${anchor.lat}, ${anchor.lon}`)
  const bearing = anchor.bearingDegrees * degree
  const east = right * Math.cos(bearing) + up * Math.sin(bearing)
  const north = up * Math.cos(bearing) - right * Math.sin(bearing)
  const sinLat = Math.sin(anchor.lat * degree)
  const cosLat = Math.cos(anchor.lat * degree)
  const normal = radius / Math.sqrt(1 - eccentricity2 * sinLat ** 2)
  // Geocentric axes turned about the pole so that the anchor's meridian is the first.
  const outward = normal * cosLat - north * sinLat
  const z = normal * (1 - eccentricity2) * sinLat + north * cosLat
  const fromAxis = Math.hypot(outward, east)
  const lon = anchor.lon + Math.atan2(east, outward) / degree
  return [lon - 360 * Math.floor((lon + 180) / 360), latitude(fromAxis, z) / degree]
}

/** Geodetic latitude in radians; two rounds reach a nanometre near the ellipsoid, the third is for the poles. */
function latitude(fromAxis: number, z: number): number {
  const polar = radius * (1 - flattening)
  const secondEccentricity2 = eccentricity2 / (1 - eccentricity2)
  let reduced = Math.atan2(z, (1 - flattening) * fromAxis)
  let found = 0
  for (let round = 0; round < 3; round++) {
    found = Math.atan2(
      z + secondEccentricity2 * polar * Math.sin(reduced) ** 3,
      fromAxis - eccentricity2 * radius * Math.cos(reduced) ** 3,
    )
    reduced = Math.atan2((1 - flattening) * Math.sin(found), Math.cos(found))
  }
  return found
}
