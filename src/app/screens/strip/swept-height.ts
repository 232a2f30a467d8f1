import type { SurveyView } from '../../../record/survey.ts'
import { defaultTeamCard } from '../../../record/team-card.ts'
import type { Metres } from '../../../units/quantity.ts'

/** Above what strikes a head: the bounce and lean of a walk. judging.md's strike height adds it to stature, shoes, headgear. */
const bounce: Metres = 0.02
const above: Metres = 0.1
/** The rod's own expanded uncertainty, so that the sweep settles what it is asked for. */
const rod: Metres = 0.01
const packHeadroom: Metres = 2.03

/** Height of the rod for "swept, nothing": strike height + 0.10 m or the pack's headroom, the higher, up to a whole cm. */
export function sweptHeight(view: SurveyView): Metres {
  const { stature, shoes, headgear } = (view.team ?? defaultTeamCard).handler
  const strike = stature + shoes + headgear + bounce
  return Math.ceil(Math.max(strike + above + rod, packHeadroom) * 100 - 1e-9) / 100
}
