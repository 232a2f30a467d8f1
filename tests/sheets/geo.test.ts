import { check, getIssues } from '@placemarkio/check-geojson'
import geodesic from 'geographiclib-geodesic'
import { describe, expect, it } from 'vitest'
import { onEarth } from '../../src/sheets/geo/on-earth.ts'
import { toGeoJson } from '../../src/sheets/geo/to-geojson.ts'
import { hostile } from '../fixtures/sheets/hostile.ts'
import {
  assessment,
  reading,
  segmentResult,
  smallView,
  stretch,
  survey,
  turn,
  walkResult,
} from '../fixtures/sheets/survey.ts'

interface Thing {
  id: string
  geometry: { type: string; coordinates: number[] | number[][] } | null
  properties: Record<string, unknown>
}
interface Collection {
  features: Thing[]
  [member: string]: unknown
}

function read(text: string): Collection {
  expect(getIssues(text)).toEqual([])
  return check(text) as unknown as Collection
}
const thing = (collection: Collection, id: string) => collection.features.find((one) => one.id === id)
const lineOf = (found: Thing | undefined) => (found?.geometry?.coordinates ?? []) as [number, number][]
const anchored = (lat: number, bearingDegrees: number, lon = -3.2) =>
  smallView({ anchor: { place: 'door', lat, lon, bearingDegrees } })

// Oracle: GeographicLib's geodesics on the WGS 84 ellipsoid (Karney 2013), exact to nanometres.
const wgs84 = geodesic.Geodesic.WGS84
function geodesicLength([from, to]: readonly [number, number][]): number {
  if (!from || !to) return Number.NaN
  return wgs84.Inverse(from[1], from[0], to[1], to[0]).s12 ?? Number.NaN
}

describe('in local metres', () => {
  const collection = read(toGeoJson(survey(), assessment()))

  it('says plainly that these are no degrees, and why', () => {
    expect(collection.coordinateSystem).toMatch(/^Local metres, not longitude and latitude/)
    expect(collection.coordinateSystem).toMatch(/no anchor on the earth\.$/)
    const adrift = smallView({ anchor: { place: 'desk', lat: 50, lon: 1, bearingDegrees: 0 } })
    expect(read(toGeoJson(survey(adrift), assessment())).coordinateSystem).toMatch(/anchor is not on the plan\.$/)
  })

  it('lays the walk from its start: 10 m along x, 5 m up y, 2.5 m back', () => {
    expect(lineOf(thing(collection, 'a'))).toEqual([
      [1, 2],
      [11, 2],
    ])
    expect(lineOf(thing(collection, 'b'))).toEqual([
      [11, 2],
      [11, 7],
    ])
    expect(lineOf(thing(collection, 'c'))).toEqual([
      [11, 7],
      [8.5, 7],
    ])
  })

  it('puts a thing along and to its side, a turn at its end, a place where it is', () => {
    expect(thing(collection, 'bench')?.geometry).toEqual({ type: 'Point', coordinates: [5, 3.5] })
    expect(thing(collection, 'a.turn')?.geometry).toEqual({ type: 'Point', coordinates: [11, 2] })
    expect(thing(collection, 'door')?.geometry).toEqual({ type: 'Point', coordinates: [1, 2] })
  })

  it('carries verdict, leash, cautions, team and standing texts', () => {
    expect(thing(collection, 'a')?.properties).toMatchObject({
      verdict: 'with-cautions',
      lengthMetres: 10,
      leashMetres: { least: 1, greatest: 1.4, recommended: 1.2 },
      cautions: [{ harm: 'fall', text: 'Stop. Leash off. Wait for the porter.' }],
      highway: 'corridor',
      indoor: 'yes',
    })
    expect(thing(collection, 'bench')?.properties).toMatchObject({ highway: 'steps', kind: 'stairs', what: 'feature' })
    expect(thing(collection, 'c')?.properties).toMatchObject({ verdict: 'not-known' })
    expect(collection).toMatchObject({
      team: { name: 'Lark team', version: '3' },
      judgedOn: '2026-11-30',
      cautions: ['Local codes and licensed O&M practice take precedence.'],
    })
    expect(collection).not.toHaveProperty('draft')
    expect(read(toGeoJson(survey(), assessment(), { draft: true })).draft).toBe(true)
  })
})

it('a U-turn comes back on its own line without an angle read, and says so', () => {
  const view = smallView()
  const around = { id: 'u', kind: 'u-turn', readings: {}, words: {} }
  view.walks[0]?.segments.splice(
    0,
    3,
    stretch('a', 10, { turn: around }),
    stretch('b', 8, { turn: turn('t', 90) }),
    stretch('c', 2),
  )
  const collection = read(toGeoJson(survey(view), assessment()))
  expect(lineOf(thing(collection, 'b'))).toEqual([
    [11, 2],
    [3, 2],
  ])
  // A turn to the left when walking back along x leads down.
  expect(lineOf(thing(collection, 'c'))[1]).toEqual([3, 0])
  expect(thing(collection, 'a')?.properties).not.toHaveProperty('note')
  expect(thing(collection, 'b')?.properties.note).toMatch(/drawn on each other/)
})

describe('what nobody measured has no place, and says why', () => {
  it('past a missing length', () => {
    const view = smallView()
    view.walks[0]?.segments.splice(1, 1, stretch('b', null))
    const collection = read(toGeoJson(survey(view), assessment()))
    expect(thing(collection, 'a')?.geometry).not.toBeNull()
    for (const id of ['b', 'c']) {
      expect(thing(collection, id)?.geometry).toBeNull()
      expect(thing(collection, id)?.properties.noPlace).toBe('the length of "Stretch b" is not known')
    }
    expect(thing(collection, 'c')?.properties.lengthMetres).toBe(2.5)
  })

  it('past a bound in place of a length, and past a turn without an angle', () => {
    const bound = smallView()
    bound.walks[0]?.segments.splice(
      0,
      1,
      stretch('a', null, { readings: { length: [reading('x', 9, { bound: 'above' })] } }),
    )
    expect(thing(read(toGeoJson(survey(bound), assessment())), 'a')?.geometry).toBeNull()
    const bent = smallView()
    bent.walks[0]?.segments.splice(1, 1, stretch('b', 5, { turn: { ...turn('t', 0), readings: {} } }))
    const collection = read(toGeoJson(survey(bent), assessment()))
    expect(thing(collection, 'b')?.geometry).not.toBeNull()
    expect(thing(collection, 'c')?.properties.noPlace).toBe('the turn after "Stretch b" is not known')
  })

  it('a thing whose distance along is not recorded, a place that is not on the plan', () => {
    const collection = read(toGeoJson(survey(), assessment()))
    expect(thing(collection, 'desk')).toMatchObject({
      geometry: null,
      properties: { noPlace: 'not placed on the plan' },
    })
  })

  it('a walk that starts nowhere known stands on no place of the earth', () => {
    const view = anchored(50, 0)
    for (const walk of view.walks) delete walk.heading
    const collection = read(toGeoJson(survey(view), assessment()))
    expect(['a', 'b', 'c'].map((id) => thing(collection, id)?.geometry)).toEqual([null, null, null])
    const local = smallView()
    for (const walk of local.walks) delete walk.from
    expect(thing(read(toGeoJson(survey(local), assessment())), 'a')).toMatchObject({
      geometry: {
        coordinates: [
          [0, 0],
          [10, 0],
        ],
      },
      properties: { frame: 'own: starts at 0, 0 along x' },
    })
  })
})

describe('each segment is as long as its tape says, within 1 mm', () => {
  const tapes = [25, 0.4, 17.355, 6.4, 24.99, 3.333]
  const turns = [90, -45, 12.5, 180, -135, 30]
  const view = smallView()
  view.walks[0]?.segments.splice(
    0,
    3,
    ...tapes.map((tape, i) => stretch(`s${i}`, tape, { turn: turn(`t${i}`, turns[i] ?? 0) })),
  )

  it('on the plan', () => {
    const collection = read(toGeoJson(survey(view), assessment()))
    for (const [i, tape] of tapes.entries()) {
      const [from = [0, 0], to = [0, 0]] = lineOf(thing(collection, `s${i}`))
      expect(Math.abs(Math.hypot(to[0] - from[0], to[1] - from[1]) - tape)).toBeLessThan(0.001)
    }
  })

  it.each([
    [0, 0],
    [1.3, 200],
    [-33.9, 91],
    [51.5, 17],
    [64.1, -30],
    [85, 180],
  ])('on the ellipsoid at %d degrees north, the plan looking %d degrees', (lat, bearingDegrees) => {
    const collection = read(
      toGeoJson(survey({ ...view, anchor: { place: 'door', lat, lon: 179.9999, bearingDegrees } }), assessment()),
    )
    expect(collection.coordinateSystem).toBe('WGS 84, longitude and latitude in degrees')
    for (const [i, tape] of tapes.entries())
      expect(Math.abs(geodesicLength(lineOf(thing(collection, `s${i}`))) - tape)).toBeLessThan(0.001)
  })
})

describe('on the earth', () => {
  it.each([0, -33.9, 51.5, 85])('direction and distance from an anchor at %d agree with the geodesic', (lat) => {
    for (const way of [0, 30, 90, 180, 315])
      for (const length of [1, 100, 2000]) {
        const radians = (way * Math.PI) / 180
        const point = { x: 3 + length * Math.sin(radians), y: -7 + length * Math.cos(radians) }
        const put = onEarth(point, { point: { x: 3, y: -7 }, lat, lon: -12.5, bearingDegrees: 37 })
        const exact = wgs84.Direct(lat, -12.5, way + 37, length)
        expect(geodesicLength([put, [exact.lon2 ?? Number.NaN, exact.lat2 ?? Number.NaN]])).toBeLessThan(0.001)
      }
  })

  it('refuses what is no place', () => {
    const anchor = { point: { x: 0, y: 0 }, lat: 10, lon: 20, bearingDegrees: 0 }
    expect(() => onEarth({ x: Number.NaN, y: 0 }, anchor)).toThrow(RangeError)
    expect(() => onEarth({ x: 0, y: 0 }, { ...anchor, lat: 91 })).toThrow(RangeError)
    expect(() => onEarth({ x: 0, y: 0 }, { ...anchor, lon: Number.NaN })).toThrow(RangeError)
  })
})

const override = {
  verdict: 'with-help',
  machine: 'not-known',
  reason: '',
  name: '',
  role: 'assessor',
  until: '2027-01-31',
} as const

it('a practitioner’s last word stands beside the verdict, with what was measured', () => {
  const segments = [
    segmentResult('a', { verdict: 'with-help', override: { ...override, reason: 'Walked twice', name: 'Ada' } }),
  ]
  const collection = read(toGeoJson(survey(), assessment({ walks: [walkResult({ segments })] })))
  expect(thing(collection, 'a')?.properties.override).toEqual({
    verdict: 'with-help',
    machine: 'not-known',
    reason: 'Walked twice',
    name: 'Ada',
    role: 'assessor',
    until: '2027-01-31',
  })
})

it.each(Object.entries(hostile))('%s stays text', (_what, text) => {
  const view = smallView()
  view.walks[0]?.segments.push(stretch('h', 1, { name: text }))
  view.places.push({ id: 'p', name: text })
  const judged = assessment({
    walks: [
      walkResult({
        segments: [
          segmentResult('h', {
            sentence: text,
            conditions: [text],
            override: { ...override, reason: text, name: text },
          }),
        ],
      }),
    ],
  })
  const file = toGeoJson(survey(view), judged)
  const collection = read(file)
  expect(String(thing(collection, 'h')?.properties.name).length).toBeGreaterThan(3)
  expect(thing(collection, 'h')?.properties.verdict).toBe('usable')
  // biome-ignore lint/suspicious/noControlCharactersInRegex: none may be left, that is what is asked
  expect(file).not.toMatch(/[\u0000-\u0009\u000b-\u001f\u007f\u202a-\u202e\u2066\u2067\ud800-\udfff]/u)
})
