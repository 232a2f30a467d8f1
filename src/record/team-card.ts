import * as v from 'valibot'

/**
 * The team card: robot, handler, leash, versioned and dated. Defaults are common practice without a source unless the
 * line says otherwise. Metres, kilograms, metres per second, newtons, minutes where named; angles in degrees where named.
 */
const number = v.pipe(v.number(), v.finite())
const size = v.pipe(number, v.minValue(0), v.maxValue(10))
const text = v.pipe(v.string(), v.maxLength(2000))
const shown = v.looseObject({ name: text, date: v.pipe(v.string(), v.regex(/^\d{4}-\d{2}-\d{2}$/)) })
const friction = v.looseObject({ dry: number, wet: number })

const robot = v.looseObject({
  name: text,
  length: size,
  width: size,
  height: size,
  mass: v.pipe(number, v.minValue(0), v.maxValue(500)),
  /** Leash attachment behind the body centre, and its height. */
  attachBehind: size,
  attachHeight: size,
  cruise: v.pipe(number, v.minValue(0.05), v.maxValue(3)),
  /** Hardest braking, only where measured: then its run-out is credited. */
  hardestBraking: v.exactOptional(number),
  /** Where it stops before an edge. */
  standOff: size,
  riser: size,
  slope: number,
  crossFall: number,
  slot: size,
  sillGap: size,
  friction: v.looseObject({ smooth: friction, textured: friction, carpet: friction }),
  sideways: v.boolean(),
  phiMaxDegrees: v.pipe(number, v.minValue(1), v.maxValue(180)),
  holdsSlopeWithPowerLost: v.boolean(),
  onLetGo: v.picklist(['stops', 'goes-on', 'unknown']),
  sensingPlane: size,
  senses: v.looseObject({ glass: v.boolean(), darkFloor: v.boolean(), overhangs: v.boolean(), drops: v.boolean() }),
  batteryMinutes: number,
  rainRating: v.exactOptional(text),
  opensDoors: v.boolean(),
  callsLifts: v.boolean(),
})

const handler = v.looseObject({
  name: v.exactOptional(text),
  shoulders: size,
  clothing: size,
  /** Where the bag is carried: beside adds 0.10 to the breadth, in front 0.15 to the front reach. */
  bag: v.picklist(['beside', 'in-front', 'left-behind']),
  depth: size,
  stature: v.pipe(number, v.minValue(0.8), v.maxValue(2.5)),
  shoes: size,
  headgear: size,
  handHeight: size,
  handAhead: size,
  arm: size,
  shoulderHeight: size,
  pace: v.pipe(number, v.minValue(0.1), v.maxValue(2.5)),
  paceOutdoors: v.pipe(number, v.minValue(0.1), v.maxValue(2.5)),
  /** Length of one of the handler's own paces. */
  step: v.exactOptional(size),
  slowToReact: v.boolean(),
  deceleration: v.pipe(number, v.minValue(0.1), v.maxValue(5)),
  side: v.picklist(['left', 'right']),
  caneCarried: v.boolean(),
  /** Compulsory, no default: null is an unanswered question. */
  opensDoors: v.nullable(v.boolean()),
  /** Shown to stand still when the leash goes slack: to whom, when. null: not shown. */
  standsWhenSlack: v.nullable(shown),
  ownWayThroughLifts: v.nullable(shown),
  /** Gathers a slack leash in the hand. */
  gathersLeash: v.exactOptional(v.boolean()),
})

const leash = v.looseObject({
  lengths: v.pipe(v.array(size), v.minLength(1), v.maxLength(20)),
  changeable: v.boolean(),
  longestInCrowd: size,
  startForce: number,
  clearTug: number,
  plannedSlack: size,
  apart: size,
  clearanceStraight: size,
  clearancePinch: size,
})

export const teamCard = v.looseObject({
  name: text,
  /** Changes with every change of the card; a sheet names it. */
  revision: text,
  date: v.pipe(v.string(), v.regex(/^\d{4}-\d{2}-\d{2}$/)),
  robot,
  handler,
  leash,
})

export const teamCardFile = v.looseObject({
  kind: v.literal('tautline-team'),
  version: v.literal(1),
  ...teamCard.entries,
})

export type TeamCard = v.InferOutput<typeof teamCard>

/** The default card: every figure editable, each common practice without a source unless noted. */
export const defaultTeamCard: TeamCard = {
  name: 'default team',
  revision: '1',
  date: '2026-01-01',
  robot: {
    name: 'small walking robot',
    length: 0.65,
    width: 0.35,
    height: 0.45,
    mass: 15,
    attachBehind: 0.15,
    attachHeight: 0.4,
    cruise: 0.7,
    standOff: 0.15,
    riser: 0.02,
    slope: 1 / 10,
    crossFall: 1 / 25,
    slot: 0.013,
    sillGap: 0.035,
    // Low ends, no source: to be measured.
    friction: {
      smooth: { dry: 0.5, wet: 0.2 },
      textured: { dry: 0.6, wet: 0.35 },
      carpet: { dry: 0.6, wet: 0.35 },
    },
    sideways: true,
    phiMaxDegrees: 90,
    holdsSlopeWithPowerLost: false,
    onLetGo: 'unknown',
    sensingPlane: 0.2,
    senses: { glass: false, darkFloor: false, overhangs: false, drops: false },
    batteryMinutes: 90,
    opensDoors: false,
    callsLifts: false,
  },
  handler: {
    // ANSUR II, men and women mixed, 95th percentile, bideltoid breadth; +0.06 clothing.
    shoulders: 0.553,
    clothing: 0.06,
    bag: 'beside',
    depth: 0.35,
    // ANSUR II, men and women mixed, 95th percentile.
    stature: 1.844,
    shoes: 0.03,
    headgear: 0.025,
    handHeight: 0.75,
    handAhead: 0.25,
    arm: 0.68,
    shoulderHeight: 1.4,
    pace: 0.7,
    paceOutdoors: 0.9,
    slowToReact: false,
    deceleration: 1.5,
    side: 'left',
    caneCarried: true,
    opensDoors: null,
    standsWhenSlack: null,
    ownWayThroughLifts: null,
  },
  leash: {
    lengths: [0.6, 0.8, 1.0, 1.2, 1.5, 1.8],
    changeable: true,
    longestInCrowd: 1.0,
    startForce: 12,
    clearTug: 20,
    plannedSlack: 0.15,
    apart: 0.1,
    clearanceStraight: 0.1,
    clearancePinch: 0.05,
  },
}
