import geodesic from 'geographiclib-geodesic'
import { describe, expect, it } from 'vitest'
import { sphereError, toLonLat, toPlan } from '../../src/plan/georeference.ts'

// Oracle: GeographicLib's geodesics on the WGS 84 ellipsoid (Karney 2013), exact to nanometres.
const wgs84 = geodesic.Geodesic.WGS84

const latitudes = [-80, -45, -33.9, 0, 1.3, 24.7, 51.5, 64.1, 85]
const ways = [0, 30, 90, 135, 180, 270, 315]

/** Metres between two places on the ellipsoid. */
function apart([lon1, lat1]: readonly [number, number], [lon2, lat2]: readonly [number, number]): number {
  return wgs84.Inverse(lat1, lon1, lat2, lon2).s12 ?? Number.NaN
}

/** A plan point `length` from the anchor, `way` degrees clockwise from the plan's y axis. */
function away(length: number, way: number): { x: number; y: number } {
  const angle = (way * Math.PI) / 180
  return { x: 3 + length * Math.sin(angle), y: -7 + length * Math.cos(angle) }
}

describe('a plan point on the earth, against the ellipsoid', () => {
  it.each(latitudes)('from an anchor at %d degrees north, within the stated error', (lat) => {
    for (const way of ways) {
      for (const length of [1, 25, 100, 400]) {
        const anchor = { point: { x: 3, y: -7 }, lat, lon: -12.5, bearingDegrees: 37 }
        const exact = wgs84.Direct(lat, -12.5, way + 37, length)
        const off = apart(toLonLat(away(length, way), anchor), [exact.lon2 ?? Number.NaN, exact.lat2 ?? Number.NaN])
        expect(off).toBeLessThanOrEqual(sphereError(length))
      }
    }
  })

  it('the stated error is reached at the equator along the meridian: no slack is hidden in it', () => {
    const anchor = { point: { x: 0, y: 0 }, lat: 0, lon: 10, bearingDegrees: 0 }
    const exact = wgs84.Direct(0, 10, 0, 100)
    const off = apart(toLonLat({ x: 0, y: 100 }, anchor), [exact.lon2 ?? Number.NaN, exact.lat2 ?? Number.NaN])
    expect(off).toBeGreaterThan(0.99 * sphereError(100))
  })

  it('comes back to the plan where it began, across the date line too', () => {
    for (const lon of [-180, -12.5, 0, 179.9999, 180]) {
      const anchor = { point: { x: 3, y: -7 }, lat: 51.5, lon, bearingDegrees: 200 }
      for (const way of ways) {
        const point = away(60, way)
        const back = toPlan(toLonLat(point, anchor), anchor)
        expect(back.x).toBeCloseTo(point.x, 5)
        expect(back.y).toBeCloseTo(point.y, 5)
      }
    }
  })
})
