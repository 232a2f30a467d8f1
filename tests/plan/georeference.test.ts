import { describe, expect, it } from 'vitest'
import { toLonLat, toPlan } from '../../src/plan/georeference.ts'

const anchor = { point: { x: 2, y: 3 }, lat: 10, lon: 20, bearingDegrees: 0 }
// One degree of a great circle on a sphere of 6 371 008.8 m.
const oneDegree = (6_371_008.8 * Math.PI) / 180

describe('the way a plan looks', () => {
  it('the anchor is where it is', () => {
    expect(toLonLat(anchor.point, anchor)).toEqual([20, 10])
  })

  it.each([
    [0, 'north', 0, 1],
    [90, 'east', 1, 0],
    [180, 'south', 0, -1],
    [-90, 'west', -1, 0],
    [450, 'east, told past the circle', 1, 0],
  ])('y axis at %d degrees: up the plan is %s', (bearingDegrees, _name, east, north) => {
    const [lon, lat] = toLonLat({ x: 2, y: 103 }, { ...anchor, bearingDegrees })
    expect((lat - 10) * oneDegree).toBeCloseTo(100 * north, 2)
    expect((lon - 20) * oneDegree * Math.cos((10 * Math.PI) / 180)).toBeCloseTo(100 * east, 2)
  })

  it('x is to the right of y: with y north, x is east', () => {
    const [lon, lat] = toLonLat({ x: 102, y: 3 }, anchor)
    expect(lon).toBeGreaterThan(20)
    expect(lat).toBeCloseTo(10, 6)
  })

  it('stays within half a turn across the date line', () => {
    const [lon] = toLonLat({ x: 102, y: 3 }, { ...anchor, lon: 179.9999 })
    expect(lon).toBeLessThan(-179.99)
    expect(toPlan([lon, 10], { ...anchor, lon: 179.9999 }).x).toBeCloseTo(102, 2)
  })
})

it('refuses what is no place', () => {
  expect(() => toLonLat({ x: Number.NaN, y: 0 }, anchor)).toThrow(RangeError)
  expect(() => toLonLat({ x: 0, y: 0 }, { ...anchor, lat: 91 })).toThrow(RangeError)
  expect(() => toLonLat({ x: 0, y: 0 }, { ...anchor, bearingDegrees: Number.NaN })).toThrow(RangeError)
  expect(() => toPlan([20, Number.POSITIVE_INFINITY], anchor)).toThrow(RangeError)
  expect(() => toPlan([20, -91], anchor)).toThrow(RangeError)
})
