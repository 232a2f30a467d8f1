import { kind } from '../../catalogue/kinds.ts'
import type { Point } from '../../geometry/scene.ts'
import type { Assessment, SegmentResult, WalkResult } from '../../judge/result.ts'
import type { Anchor } from '../../plan/georeference.ts'
import type { Feature, Segment, Survey, SurveyView, Walk } from '../../record/survey.ts'
import { own, ownWhole } from '../content/own.ts'
import { type Laid, layWalk, placeOn } from './lay-walk.ts'
import { onEarth } from './on-earth.ts'

/** One walk alone, and whether the collection says DRAFT. */
export interface GeoOptions {
  walk?: string
  draft?: boolean
}

type Position = [number, number]
type Geometry = { type: 'LineString'; coordinates: Position[] } | { type: 'Point'; coordinates: Position } | null
interface Thing {
  type: 'Feature'
  id: string
  geometry: Geometry
  properties: Record<string, unknown>
}

/**
 * The walks as a FeatureCollection of RFC 7946: segments as lines with verdict and lengths, features and places as points;
 * what nobody measured has no geometry and says why. WGS 84 where the survey is anchored to a place on its plan; otherwise
 * metres on the plan, said in the member `coordinateSystem`. Keys of `properties` that OpenStreetMap has are its tags.
 */
export function toGeoJson(survey: Survey, assessment: Assessment, options: GeoOptions = {}): string {
  const { view } = survey
  const anchor = anchorOf(view)
  const put = anchor
    ? (point: Point): Position => onEarth(point, anchor).map((degrees) => rounded(degrees, 1e9)) as Position
    : ({ x, y }: Point): Position => [rounded(x, 1e4), rounded(y, 1e4)]
  const walks = view.walks.filter(({ id }) => options.walk === undefined || id === options.walk)
  const collection = {
    type: 'FeatureCollection',
    ...(options.draft ? { draft: true } : {}),
    venue: ownWhole(view.name),
    ...(view.demo ? { invented: true } : {}),
    coordinateSystem: anchor
      ? 'WGS 84, longitude and latitude in degrees'
      : `Local metres, not longitude and latitude: x and y of the plan, y a quarter turn anticlockwise from x. ${unanchored(view)}`,
    team: { name: ownWhole(assessment.team.name), version: ownWhole(assessment.team.version) },
    code: assessment.code,
    judgedOn: assessment.on,
    cautions: assessment.cautions,
    features: [
      ...walks.flatMap((walk) =>
        walkThings(
          walk,
          view,
          assessment.walks.find(({ id }) => id === walk.id),
          put,
          anchor,
        ),
      ),
      ...placeThings(view, put),
    ],
  }
  return `${JSON.stringify(collection, null, 2)}\n`
}

function walkThings(
  walk: Walk,
  view: SurveyView,
  judged: WalkResult | undefined,
  put: (point: Point) => Position,
  anchor: Anchor | null,
): Thing[] {
  const { segments, onPlan } = layWalk(walk, view)
  const ownFrame = 'where this walk starts or which way it sets off is not on the plan'
  return walk.segments.flatMap((segment) => {
    let laid: Laid = segments.get(segment.id) ?? { placed: false, why: ownFrame, length: null }
    // On the earth a walk of its own frame would stand where it is not.
    if (anchor && !onPlan) laid = { placed: false, why: ownFrame, length: laid.length }
    const shared = {
      walk: own(walk.name),
      ...(onPlan || anchor ? {} : { frame: 'own: starts at 0, 0 along x' }),
      ...levelTags(walk, view),
    }
    const result = judged?.segments.find(({ id }) => id === segment.id)
    return [
      segmentThing(segment, laid, result, { ...shared, ...wayTags(segment, view) }, put),
      ...segment.features.map((one) => pointThing(one, placeOn(laid, one), laid, shared, segment, put)),
      ...(segment.turn ? [pointThing(segment.turn, laid.placed ? laid.to : null, laid, shared, segment, put)] : []),
    ]
  })
}

function segmentThing(
  segment: Segment,
  laid: Laid,
  result: SegmentResult | undefined,
  shared: Record<string, unknown>,
  put: (point: Point) => Position,
): Thing {
  return {
    type: 'Feature',
    id: segment.id,
    geometry: laid.placed ? { type: 'LineString', coordinates: [put(laid.from), put(laid.to)] } : null,
    properties: {
      ...shared,
      what: 'segment',
      name: own(segment.name),
      ledBy: segment.ledBy,
      lengthMetres: laid.length,
      ...(laid.placed ? {} : { noPlace: own(laid.why, 400) }),
      ...(laid.placed && laid.doubled ? { note: 'After a U-turn: both lanes are drawn on each other.' } : {}),
      verdict: result?.verdict ?? 'not-known',
      governing: result?.governing ?? null,
      sentence: result ? ownWhole(result.sentence) : 'Nobody has judged this segment.',
      leashMetres: result?.leash ?? null,
      pace: result?.pace ?? null,
      pauses: result?.pauses ?? null,
      cautions: (result?.cautions ?? []).map(({ harm, text }) => ({ harm, text: ownWhole(text) })),
      why: (result?.why ?? []).map(({ kind: sort, text }) => ({ kind: sort, text: ownWhole(text) })),
      missing: result?.missing ?? [],
      conditions: (result?.conditions ?? []).map((one) => ownWhole(one)),
      ...(result?.override ? { override: spoken(result.override) } : {}),
    },
  }
}

/** A practitioner's last word stands beside the verdict, with what was measured. */
function spoken(override: NonNullable<SegmentResult['override']>): Record<string, string> {
  return Object.fromEntries(Object.entries(override).map(([key, text]) => [key, ownWhole(text)]))
}

function pointThing(
  feature: Feature,
  point: Point | null,
  laid: Laid,
  shared: Record<string, unknown>,
  segment: Segment,
  put: (point: Point) => Position,
): Thing {
  const row = kind(feature.kind)
  const why = laid.placed ? 'how far along its segment it stands is not recorded' : laid.why
  return {
    type: 'Feature',
    id: feature.id,
    geometry: point ? { type: 'Point', coordinates: put(point) } : null,
    properties: {
      ...row?.tags,
      ...shared,
      what: 'feature',
      kind: ownWhole(feature.kind),
      name: own(feature.name ?? row?.name ?? feature.kind),
      segment: segment.id,
      side: feature.side ?? null,
      alongMetres: feature.along ?? null,
      ...(point ? {} : { noPlace: own(why, 400) }),
    },
  }
}

function placeThings(view: SurveyView, put: (point: Point) => Position): Thing[] {
  return view.places.map((place) => {
    const known = place.x !== undefined && place.y !== undefined
    return {
      type: 'Feature',
      id: place.id,
      geometry: known ? { type: 'Point', coordinates: put({ x: place.x ?? 0, y: place.y ?? 0 }) } : null,
      properties: {
        what: 'place',
        name: own(place.name),
        ...levelOf(place.floor, view),
        ...(known ? {} : { noPlace: 'not placed on the plan' }),
      },
    }
  })
}

/** A walkway under OpenStreetMap's keys: a corridor indoors, a footway outdoors, neither where nobody said which. */
function wayTags(segment: Segment, view: SurveyView): Record<string, string> {
  const outdoors = view.zones.find(({ id }) => id === segment.zone)?.outdoors
  if (outdoors === undefined) return {}
  return outdoors ? { highway: 'footway' } : { highway: 'corridor', indoor: 'yes' }
}

/** The level is known for a walk that begins and ends on one floor. */
function levelTags(walk: Walk, view: SurveyView): Record<string, string> {
  const floorOf = (place: string | undefined) => view.places.find(({ id }) => id === place)?.floor
  const from = floorOf(walk.from)
  return from !== undefined && from === floorOf(walk.to) ? levelOf(from, view) : {}
}

function levelOf(floor: string | undefined, view: SurveyView): Record<string, string> {
  const level = view.floors.find(({ id }) => id === floor)?.level
  return level === undefined ? {} : { level: String(level) }
}

function anchorOf({ anchor, places }: SurveyView): Anchor | null {
  const place = anchor && places.find(({ id }) => id === anchor.place)
  if (!anchor || place?.x === undefined || place.y === undefined) return null
  const { lat, lon, bearingDegrees } = anchor
  return { point: { x: place.x, y: place.y }, lat, lon, bearingDegrees }
}

function unanchored({ anchor }: SurveyView): string {
  return anchor ? 'The place of its anchor is not on the plan.' : 'The survey has no anchor on the earth.'
}

function rounded(value: number, per: number): number {
  // No "-0" in a file.
  return Math.round(value * per) / per + 0
}
