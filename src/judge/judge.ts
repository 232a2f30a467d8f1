import type { Planner } from '../leash/answer.ts'
import { root } from '../record/placement.ts'
import type { Survey } from '../record/survey.ts'
import { defaultTeamCard, type TeamCard } from '../record/team-card.ts'
import type { PackId } from '../standards/pack.ts'
import { pack } from '../standards/packs.ts'
import type { Assessment, JudgeProgress, WalkResult } from './result.ts'
import { roomSolver } from './rooms.ts'
import type { Hours, Setting } from './setting.ts'
import { standingTexts } from './standing-texts.ts'
import { teamOf } from './team.ts'
import { judgeWalk } from './walk.ts'

export interface JudgeOptions {
  planner: Planner
  /** Instead of the survey's own card. */
  team?: TeamCard
  /** Instead of the survey's own code pack. */
  code?: PackId
  /** The day judged for, like 2026-11-30; a demo venue is judged as on its own day. Required otherwise: there is no clock here. */
  on?: string
  /** One hour, like 09:30, instead of the survey's hours. */
  hour?: string
  /** One walk alone. */
  walk?: string
}

/**
 * Judges a survey for one team: record and card in, verdicts out. Yields before each piece of work, so that a worker can
 * say how far it is and be stopped. A walk that is not there, or no day to judge for, breaks a promise: throws.
 */
export function* judgeSurvey(survey: Survey, options: JudgeOptions): Generator<JudgeProgress, Assessment> {
  const { view } = survey
  const setting = settingOf(survey, options)
  const chosen = view.walks.filter((one) => options.walk === undefined || one.id === options.walk)
  if (options.walk !== undefined && chosen.length === 0) throw new Error(`judge/no-walk: ${options.walk}`)
  const rooms = roomSolver(options.planner, setting.team.bodies)
  const progress = { done: 0, total: 2 * chosen.reduce((sum, one) => sum + one.segments.length, 0) }
  const walks: WalkResult[] = []
  for (const walk of chosen) walks.push(yield* judgeWalk(setting, walk, rooms, progress))
  const { card } = setting.team
  return {
    venue: view.name,
    team: { name: card.name, version: card.revision },
    code: setting.pack.id,
    cautions: standingTexts(setting.team, setting.pack, setting.on, view.demo === true),
    on: setting.on,
    walks,
  }
}

/** What a judgement is made with, from a survey and options. */
export function settingOf(survey: Survey, options: Omit<JudgeOptions, 'walk' | 'planner'>): Setting {
  const { view } = survey
  const on = view.demo === true && view.asOn ? view.asOn : options.on
  if (on === undefined)
    throw new Error('judge/no-day: a survey that is no demo is judged for a day that the caller gives')
  // What the caller gives leaves nothing open in the survey's own.
  const given = new Set<string>()
  if (options.team) given.add('team')
  if (options.code) given.add('code')
  if (options.hour) given.add('hours')
  const hours: Hours | null = options.hour ? { from: options.hour, to: options.hour } : (view.hours ?? null)
  return {
    view,
    conflicts: (survey.conflicts ?? []).filter((one) => one.entity !== root || !given.has(one.field)),
    setAside: (survey.setAside ?? []).filter((one) => one.entity !== root || !given.has(one.field)),
    team: teamOf(options.team ?? view.team ?? defaultTeamCard),
    pack: pack(options.code ?? view.code),
    on,
    hours,
  }
}

/** Runs a judgement to its end at once. */
export function runToEnd(judgement: Generator<JudgeProgress, Assessment>): Assessment {
  let step = judgement.next()
  while (!step.done) step = judgement.next()
  return step.value
}
