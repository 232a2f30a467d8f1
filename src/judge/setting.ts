import { type Interval, interval, type Unsafe } from '../record/interval.ts'
import type { Conflict, Reading, SetAside, SurveyView } from '../record/survey.ts'
import type { CodePack } from '../standards/pack.ts'
import type { Team } from './team.ts'

/** Hours of a day, "09:30" to "16:00". */
export interface Hours {
  from: string
  to: string
}

/** What one judgement is made with. Nothing here changes while it runs. */
export interface Setting {
  view: SurveyView
  conflicts: readonly Conflict[]
  /** What was recorded and this version cannot read. */
  setAside: readonly SetAside[]
  team: Team
  pack: CodePack
  /** ISO date judged for. */
  on: string
  /** Null: every hour that somebody observed. */
  hours: Hours | null
  /** Readings taken as known at one value: for retakes. */
  pins?: ReadonlyMap<string, number>
}

/** The joined interval of one quantity of a segment, feature or observation; null: nobody read it. */
export function read(
  { view, pins }: Setting,
  holder: { readings: Readonly<Record<string, readonly Reading[]>> },
  quantity: string,
  unsafe: Unsafe,
): Interval | null {
  const readings = holder.readings[quantity]
  return readings === undefined ? null : interval(readings, { unsafe, changed: view.instruments, pins })
}
