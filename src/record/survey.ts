import * as v from 'valibot'
import { instrumentIds } from './instruments.ts'
import { teamCard } from './team-card.ts'

/**
 * The survey view: what the fact log folds into, and what a person writes by hand in a file of shape `view`.
 * One validator gives the types, the check at run time and the JSON Schema. Unknown fields are kept.
 * Metres, radians, seconds, newtons; gradient = rise / run, up positive; a turn to the left is positive.
 */

const id = v.pipe(v.string(), v.minLength(1), v.maxLength(200))
const text = v.pipe(v.string(), v.maxLength(20_000))
const day = v.pipe(v.string(), v.regex(/^\d{4}-\d{2}-\d{2}$/, 'a date like 2026-11-30'))
const moment = v.pipe(v.string(), v.regex(/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}/, 'a time like 2026-11-30T10:15:00Z'))
const clock = v.pipe(v.string(), v.regex(/^([01]\d|2[0-4]):[0-5]\d$/, 'an hour like 09:30'))
const number = v.pipe(v.number(), v.finite())

/** Who leads a segment or a feature. */
export const leads = ['robot', 'human-guide', 'own-cane', 'staff'] as const
const ledBy = v.picklist(leads)

/** How an answer was got. Told and by-eye may lower a verdict, never lift it. */
export const hows = ['measured', 'swept', 'told', 'by-eye', 'inherited'] as const

/** One measured value. The raw text is kept; `value` is SI and, where absent in a hand-written file, read from `raw`. */
export const reading = v.looseObject({
  id,
  raw: text,
  value: number,
  /** 'above': ">2.1", nothing was reached below; 'below': "<20". */
  bound: v.picklist(['exact', 'above', 'below']),
  instrument: v.picklist(instrumentIds),
  /** Who read it. */
  person: v.exactOptional(text),
  time: v.exactOptional(moment),
  /** As found. */
  found: v.exactOptional(v.picklist(['empty', 'in-use'])),
  /** 'another': another place along the stretch (the least rules); 'same' or absent: a repeat at the same place as the one before it. */
  place: v.exactOptional(v.picklist(['same', 'another'])),
  /** A word or two: "lockers". */
  at: v.exactOptional(text),
  note: v.exactOptional(text),
  /** "Take the safe side": the reading counts at its unsafe end alone. */
  safeSide: v.exactOptional(v.boolean()),
  /** A confirmed sweep was quicker than a person can walk the length. */
  tooQuick: v.exactOptional(v.boolean()),
  /** Readings that this one replaces, by a named person's act with a reason. */
  settles: v.exactOptional(v.looseObject({ readings: v.array(id), by: text, reason: text, on: day })),
  photos: v.exactOptional(v.array(id)),
})

/** One answer in words to one item, or "listed": the features on the segment are the answer. */
export const answer = v.looseObject({
  says: v.pipe(v.string(), v.minLength(1), v.maxLength(400)),
  how: v.picklist(hows),
  person: v.exactOptional(text),
  time: v.exactOptional(moment),
  note: v.exactOptional(text),
  /** The role that said so, for robot allowed. */
  role: v.exactOptional(text),
  tooQuick: v.exactOptional(v.boolean()),
  /** Other people's answers to the same item that nobody has settled. */
  rivals: v.exactOptional(v.array(v.looseObject({ says: text, how: v.picklist(hows), person: v.exactOptional(text) }))),
})

/** A helper's act at a place. Complete only with every field; begun but incomplete is not known. */
export const help = v.looseObject({
  role: v.exactOptional(text),
  call: v.exactOptional(text),
  act: v.exactOptional(text),
  confirmedBy: v.exactOptional(text),
  confirmedOn: v.exactOptional(day),
  ifNobody: v.exactOptional(text),
})

const readings = v.record(v.string(), v.array(reading))
const words = v.record(v.string(), answer)

/** A thing on the way: a row of the catalogue gives its attributes. A turn is the feature at a segment's end. */
export const feature = v.looseObject({
  id,
  kind: id,
  name: v.exactOptional(text),
  /** Metres from the segment's start. */
  along: v.exactOptional(number),
  side: v.exactOptional(v.picklist(['left', 'right', 'centre', 'across'])),
  /** Metres from the walking line. */
  offset: v.exactOptional(number),
  ledBy: v.exactOptional(ledBy),
  help: v.exactOptional(help),
  readings,
  words,
  note: v.exactOptional(text),
  photos: v.exactOptional(v.array(id)),
})

/** A stretch between two decisions, 25 m at most. Its items (see answers.ts) are answered in `words`. */
export const segment = v.looseObject({
  id,
  name: text,
  /** The zone it lies in. */
  zone: v.exactOptional(id),
  ledBy,
  help: v.exactOptional(help),
  /** `length`, `width`; `overhead` (swept clear to this height: a bound) and `pendulum` where taken. */
  readings,
  words,
  features: v.array(feature),
  /** The change of direction at the segment's end: kind `turn` or `u-turn`. Absent: straight on, or the end of the walk. */
  turn: v.exactOptional(feature),
  note: v.exactOptional(text),
})

/** Surroundings at an hour: crowd, noise, light, two-way flow, in words; a meter value in readings. */
export const observation = v.looseObject({
  id,
  from: clock,
  to: clock,
  words,
  readings,
})

export const zone = v.looseObject({
  id,
  name: text,
  outdoors: v.exactOptional(v.boolean()),
  /** An outside door is within 10 m: wet floors reach that far. */
  nearOutsideDoor: v.exactOptional(v.boolean()),
  /** `allowed` (allowed | not-asked | forbidden, with role and time), `signal` (yes | none), `mopped` (no | yes), `magnet` (no | yes). */
  words,
  observations: v.array(observation),
})

export const states = ['surveyed', 'judged', 'tried', 'walked', 'reviewed', 'issued'] as const
export const stateMark = v.looseObject({
  state: v.picklist(states),
  name: text,
  role: v.exactOptional(text),
  date: day,
  /** The team card's version it was done with. */
  team: v.exactOptional(text),
  note: v.exactOptional(text),
})

export const override = v.looseObject({
  id,
  segment: id,
  verdict: v.picklist(['usable', 'with-cautions', 'with-help', 'do-not-use', 'not-known']),
  reason: text,
  name: text,
  role: text,
  until: day,
  team: v.exactOptional(text),
  leash: v.exactOptional(number),
})

/** What a walk answers for itself: way out, alarm, help call, rest, dead end. */
export const walk = v.looseObject({
  id,
  name: text,
  from: v.exactOptional(id),
  to: v.exactOptional(id),
  /** True: it ends where it began, so that its misclosure can be told. */
  loop: v.exactOptional(v.boolean()),
  /** Heading of the first segment on the plan, radians anticlockwise from the plan's x axis. */
  heading: v.exactOptional(number),
  /** What the hand, foot or ear meets at the start. */
  startSign: v.exactOptional(text),
  /** `wayOut` (yes: needs neither robot nor lift | robot | lift | none), `helpCall`, `rest`, `deadEnd`, `signal`. */
  words,
  /** Who comes when the alarm sounds. */
  alarm: v.exactOptional(help),
  segments: v.array(segment),
  states: v.array(stateMark),
  overrides: v.exactOptional(v.array(override)),
  note: v.exactOptional(text),
})

export const floor = v.looseObject({ id, name: text, level: v.exactOptional(number) })
export const place = v.looseObject({
  id,
  name: text,
  floor: v.exactOptional(id),
  /** On the floor's plan, metres. */
  x: v.exactOptional(number),
  y: v.exactOptional(number),
  note: v.exactOptional(text),
})

export const anchor = v.looseObject({
  place: id,
  lat: v.pipe(number, v.minValue(-90), v.maxValue(90)),
  lon: v.pipe(number, v.minValue(-180), v.maxValue(180)),
  /** Degrees clockwise from true north of the plan's y axis. */
  bearingDegrees: number,
})

export const surveyView = v.looseObject({
  name: text,
  /** Invented, for trying the app: judged as on `asOn`, and every sheet says so. */
  demo: v.exactOptional(v.boolean()),
  asOn: v.exactOptional(day),
  contact: v.exactOptional(text),
  /** The hours for which verdicts are wanted. */
  hours: v.exactOptional(v.looseObject({ from: clock, to: clock })),
  code: v.exactOptional(v.picklist(['us-ada-2010', 'uk-adm-k', 'iso-21542', 'own'])),
  team: v.exactOptional(teamCard),
  /** Changed expanded uncertainties by instrument. */
  instruments: v.exactOptional(v.record(v.string(), v.looseObject({ absolute: number, relative: number }))),
  floors: v.array(floor),
  zones: v.array(zone),
  places: v.array(place),
  walks: v.array(walk),
  anchor: v.exactOptional(anchor),
  note: v.exactOptional(text),
})

/** The view shape of a survey file. */
export const surveyViewFile = v.looseObject({
  kind: v.literal('tautline-survey'),
  version: v.literal(1),
  survey: id,
  view: surveyView,
})

export type Reading = v.InferOutput<typeof reading>
export type Answer = v.InferOutput<typeof answer>
export type Help = v.InferOutput<typeof help>
export type Feature = v.InferOutput<typeof feature>
export type Segment = v.InferOutput<typeof segment>
export type Observation = v.InferOutput<typeof observation>
export type Zone = v.InferOutput<typeof zone>
export type StateMark = v.InferOutput<typeof stateMark>
export type Override = v.InferOutput<typeof override>
export type Walk = v.InferOutput<typeof walk>
export type Floor = v.InferOutput<typeof floor>
export type Place = v.InferOutput<typeof place>
export type SurveyView = v.InferOutput<typeof surveyView>
export type LedBy = (typeof leads)[number]
export type WalkState = (typeof states)[number]

/** Several people's versions of one thing that nobody has settled. Answers in words carry theirs in `rivals` as well. */
export interface Conflict {
  entity: string
  /**
   * The plain field; `word/<item>` for an answer; `in` for an entity put in two places; `gone` for one removed here and
   * edited there (it stays in view); `turn` for two turns at one segment's end.
   */
  field: string
  /** The first is what the view shows. */
  versions: readonly { fact: string; value: unknown; person?: string; clock: string }[]
}

/** A fact that this version of the view has no room for: kept and sent on, never shown as if it had been read. */
export interface SetAside {
  entity: string
  field: string
  expected: string
  found: string
}

/** A survey in hand: its id and the folded view. Absent lists are empty ones. */
export interface Survey {
  survey: string
  view: SurveyView
  conflicts?: readonly Conflict[]
  setAside?: readonly SetAside[]
}
