import { type JudgeOptions, judgeSurvey, runToEnd } from '../../src/judge/judge.ts'
import type { Check, SegmentResult, WalkResult } from '../../src/judge/result.ts'
import type { Planner } from '../../src/leash/answer.ts'
import type { InstrumentId } from '../../src/record/instruments.ts'
import type { Answer, Feature, Help, Reading, Segment, Survey, Walk, Zone } from '../../src/record/survey.ts'
import { defaultTeamCard, type TeamCard } from '../../src/record/team-card.ts'

/** Small surveys for the judgement's tests: a plain stretch that answers everything, changed one thing at a time. */

let count = 0
export const on = '2026-11-30'
const time = '2026-11-30T09:00:00Z'

export function reading(value: number, instrument: InstrumentId = 'tape', more: Partial<Reading> = {}): Reading {
  count++
  return { id: `r${count}`, raw: String(value), value, bound: 'exact', instrument, person: 'A', time, ...more }
}

export const above = (value: number, instrument: InstrumentId = 'rod') => reading(value, instrument, { bound: 'above' })

export function says(word: string, how: Answer['how'] = 'swept'): Answer {
  return { says: word, how, person: 'A', time }
}

export const wholeHelp: Help = {
  role: 'porter',
  call: 'ring the lodge',
  act: 'comes and helps',
  confirmedBy: 'B. Manager',
  confirmedOn: '2026-11-20',
  ifNobody: 'go back to the lodge',
}

type Values = Record<string, Reading | Reading[]>

export function feature(
  kind: string,
  values: Values = {},
  words: Record<string, string> = {},
  more: Partial<Feature> = {},
): Feature {
  count++
  return {
    id: `f${count}`,
    kind,
    readings: Object.fromEntries(Object.entries(values).map(([key, one]) => [key, Array.isArray(one) ? one : [one]])),
    words: Object.fromEntries(Object.entries(words).map(([key, word]) => [key, says(word)])),
    ...more,
  }
}

const answers: Record<string, string> = {
  overhead: 'none',
  step: 'none',
  edge: 'none',
  finish: 'smooth',
  wetness: 'dry',
  slots: 'none',
  door: 'none',
  sensing: 'none',
  shoreline: 'left',
  'end-sign': 'a rail at your left hand',
}
const listedBy: Record<string, string> = {
  overhead: 'overhead',
  step: 'step',
  edge: 'edge',
  surface: 'slots',
  door: 'door',
  sensing: 'sensing',
}

/** A plain stretch of 8 m by 1.80 m, everything answered; its features are listed under their aspects. */
export function stretch(more: Partial<Segment> = {}, aspects: readonly string[] = []): Segment {
  count++
  const words = Object.fromEntries(Object.entries(answers).map(([item, word]) => [item, says(word)]))
  for (const aspect of aspects) words[listedBy[aspect] as string] = says('listed')
  return {
    id: `s${count}`,
    name: `part ${count}`,
    zone: 'z',
    ledBy: 'robot',
    features: [],
    ...more,
    readings: {
      length: [reading(8)],
      width: [reading(1.8)],
      overhead: [above(2.2)],
      ...more.readings,
    },
    words: { ...words, ...more.words },
  }
}

/** A zone that allows the robot, quiet, with a few people, one way. */
export function zone(more: Partial<Zone> = {}, seen: Record<string, string> = {}, noise: Reading[] = []): Zone {
  const { words, ...rest } = more
  return {
    id: 'z',
    name: 'hall',
    outdoors: false,
    nearOutsideDoor: false,
    words: { allowed: says('allowed'), mopped: says('no'), magnet: says('no'), signal: says('yes'), ...words },
    observations: [
      {
        id: 'o',
        from: '08:00',
        to: '18:00',
        words: Object.fromEntries(
          Object.entries({ crowd: 'few', noise: 'quiet', light: 'even', flow: 'one-way', ...seen }).map(([k, w]) => [
            k,
            says(w),
          ]),
        ),
        readings: noise.length > 0 ? { noise } : {},
      },
    ],
    ...rest,
  }
}

export function walkOf(segments: Segment[], more: Partial<Walk> = {}): Walk {
  return {
    id: 'w',
    name: 'the walk',
    words: { wayOut: says('yes'), helpCall: says('ring 0'), rest: says('a bench') },
    alarm: wholeHelp,
    segments,
    states: [],
    ...more,
  }
}

export function survey(walks: Walk[], zones: Zone[] = [zone()], more: Partial<Survey['view']> = {}): Survey {
  return {
    survey: 'test',
    view: { name: 'test hall', hours: { from: '09:00', to: '17:00' }, floors: [], zones, places: [], walks, ...more },
  }
}

type Patch = { [K in 'robot' | 'handler' | 'leash']?: Partial<TeamCard[K]> }

/** The default card, of a robot that stops when let go and a handler who opens doors. */
export function card({ robot, handler, leash }: Patch = {}): TeamCard {
  return {
    ...defaultTeamCard,
    robot: { ...defaultTeamCard.robot, onLetGo: 'stops', ...robot },
    handler: { ...defaultTeamCard.handler, opensDoors: true, ...handler },
    leash: { ...defaultTeamCard.leash, ...leash },
  }
}

/**
 * A double of the planner, made up and monotone: room falls with the separation and grows with every width. Its answers
 * are points. Nothing of it is the real planner's.
 */
export const doublePlanner: Planner = (scene, { a, b, d, r }, separation, options = {}) => {
  const form = scene.form
  const widest = Math.max(b, 2 * r)
  let taut = 0.5
  let slack = taut
  if (form?.kind === 'indoor') taut = slack = (Math.min(form.p, form.w) - widest) / 2
  if (form?.kind === 'turn') {
    const least = (Math.min(form.w1, form.w2) - widest) / 2
    taut = Math.min(least, 0.285 * (form.w1 + form.w2) - 0.278 * separation - 0.2816 - 0.1 * (form.angle - Math.PI / 2))
    slack = Math.min(least, taut + 0.04)
  }
  if (form?.kind === 'sidedoor') {
    slack = (form.p - widest) / 2
    taut = Math.min(slack, 0.4 * form.w + 0.4 * form.p - 0.3 * separation - 0.3 - 0.1 * form.t)
  }
  if (form?.kind === 'uturn') taut = slack = (Math.min(form.w1, form.w2, form.e) - widest) / 2 - 0.1 * separation
  if (form?.kind === 'chicane') taut = slack = (form.w - form.j - widest) / 2 - 0.05 * separation + 0.05 * form.s
  if (!form) taut = slack = 0.2
  if (options.slack === false) slack = taut
  const found = (room: number) => (room < 0 ? null : room)
  // In a pause of the double the robot comes back to a body's length.
  const samples = new Float64Array([0, 0, 0, -(r + a / 2 - d + 0.3), 0, 1])
  return {
    mTaut: found(taut),
    mTautHigh: found(taut),
    mSlack: found(slack),
    mSlackHigh: found(slack),
    pauses: slack > taut ? 1 : 0,
    tightest: null,
    swing: 0,
    motion: slack > taut ? { samples } : null,
    tautMotion: null,
    decided: true,
  }
}

export interface Judge extends Partial<Omit<JudgeOptions, 'team'>> {
  team?: Patch
  zone?: Zone
  walk?: never
}

/** The walk of these segments judged with the double. */
export function judgedWalk(
  segments: Segment[],
  { team, zone: place, ...options }: Judge = {},
  walk: Partial<Walk> = {},
): WalkResult {
  const judgement = judgeSurvey(survey([walkOf(segments, walk)], [place ?? zone()]), {
    planner: doublePlanner,
    on,
    ...options,
    team: card(team),
  })
  return runToEnd(judgement).walks[0] as WalkResult
}

export function judged(segment: Segment, options: Judge = {}): SegmentResult {
  return judgedWalk([segment], options).segments[0] as SegmentResult
}

/** The one check of that id. */
export function check(result: { checks: Check[] }, id: string): Check {
  const found = result.checks.filter((one) => one.id === id)
  if (found.length !== 1)
    throw new Error(`${found.length} checks ${id}: ${result.checks.map((one) => one.id).join(', ')}`)
  return found[0] as Check
}
