import type { Observation, Segment, Zone } from '../record/survey.ts'
import { type Hours, read, type Setting } from './setting.ts'

/** What surrounds a segment at the hours judged: the worst of what was observed in them. */
export interface Surroundings {
  /** 0 empty, 1 a few, 2 busy, 3 packed; null: nobody said. */
  crowd: 0 | 1 | 2 | 3 | null
  twoWay: boolean
  /** dB(A) at the unsafe end of a meter, or of the word's band; null: nobody said. */
  noise: number | null
  noiseReadings: string[]
  /** A part of the hours judged for that nobody observed. */
  unseen: boolean
  /** The hours the answers hold for. */
  hours: Hours[]
  /** What was observed in them. */
  seen: readonly Observation[]
}

const crowds: Readonly<Record<string, 0 | 1 | 2 | 3>> = { empty: 0, few: 1, 'a few': 1, 'a-few': 1, busy: 2, packed: 3 }
/** Upper ends of the bands that the words stand for; a word this table does not know is the loudest. */
const noises: Readonly<Record<string, number>> = { quiet: 55, moderate: 65, lively: 65, loud: 73 }
const loudest = 85
/** A noise that masks, where nobody measured it. */
const masking = 73

export function surroundingsOf(setting: Setting, zone: Zone | null): Surroundings {
  const wanted = setting.hours
  const heard = (zone?.observations ?? []).filter((one) => wanted === null || overlaps(one, wanted))
  let crowd: Surroundings['crowd'] = heard.length > 0 ? 0 : null
  let noise: number | null = heard.length > 0 ? 0 : null
  const noiseReadings: string[] = []
  for (const one of heard) {
    const says = one.words.crowd?.says
    crowd = says === undefined || crowd === null ? null : (Math.max(crowd, crowds[says] ?? 3) as 0 | 1 | 2 | 3)
    const meter = read(setting, one, 'noise', 'high')
    const word = one.words.noise?.says
    if (meter) noiseReadings.push(...meter.ids)
    const level = meter ? meter.high : word === undefined ? null : (noises[word] ?? loudest)
    noise = level === null || noise === null ? null : Math.max(noise, level)
  }
  return {
    crowd,
    noise,
    noiseReadings,
    twoWay: heard.some((one) => one.words.flow?.says !== 'one-way'),
    unseen: wanted !== null && heard.length > 0 && !covers(heard, wanted),
    hours: wanted ? [wanted] : heard.map(({ from, to }) => ({ from, to })),
    seen: heard,
  }
}

/** The same with what makes noise on the stretch itself: by its meter; unmeasured it masks, as its name says. */
export function withNoiseOf(setting: Setting, around: Surroundings, { features }: Segment): Surroundings {
  const sources = features.filter((one) => one.kind === 'noise-source')
  if (sources.length === 0 || around.noise === null) return around
  const levels = sources.map((one) => read(setting, one, 'level', 'high'))
  return {
    ...around,
    noise: Math.max(around.noise, ...levels.map((one) => one?.high ?? masking)),
    noiseReadings: [...around.noiseReadings, ...levels.flatMap((one) => one?.ids ?? [])],
  }
}

/** A single hour (from = to) overlaps what it lies in. */
function overlaps(one: Observation, hours: Hours): boolean {
  return hours.from === hours.to
    ? one.from <= hours.from && hours.from <= one.to
    : one.from < hours.to && hours.from < one.to
}

function covers(heard: readonly Observation[], hours: Hours): boolean {
  // Hours over midnight are nobody's single day.
  if (hours.from > hours.to) return false
  let reached = hours.from
  for (const one of [...heard].sort((a, b) => (a.from < b.from ? -1 : 1))) {
    if (one.from > reached) return false
    if (one.to > reached) reached = one.to
  }
  return reached >= hours.to
}

/** Reaction to a felt cue: longer above 65 dB(A), in a crowd of band 2 or more, or where the card says slow. */
export function reaction({ card }: Setting['team'], { crowd, noise }: Surroundings): number {
  const long = card.handler.slowToReact || (crowd ?? 3) >= 2 || (noise ?? loudest) > 65
  return long ? 1.2 : 0.8
}
