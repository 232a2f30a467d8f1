import { teamOf } from '../../../judge/team.ts'
import type { SurveyView } from '../../../record/survey.ts'
import { defaultTeamCard } from '../../../record/team-card.ts'
import { limit, pack } from '../../../standards/packs.ts'
import type { Metres } from '../../../units/quantity.ts'

const above: Metres = 0.1
/** The rod's own expanded uncertainty, so that the sweep settles what it is asked for. */
const rod: Metres = 0.01

/** Height of the rod for "swept, nothing": strike height + 0.10 m or the pack's headroom, the higher, up to a whole cm. */
export function sweptHeight(view: SurveyView): Metres {
  const { strike } = teamOf(view.team ?? defaultTeamCard)
  const headroom = limit(pack(view.code), 'headroom').value
  return Math.ceil(Math.max(strike + above + rod, headroom) * 100 - 1e-9) / 100
}
