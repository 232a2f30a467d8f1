import type { Metres, MetresPerSecond } from '../../units/quantity.ts'
import type { Finding, Ratio } from '../finding.ts'

/** A check that depends on leash length or pace. Cells are cheap and made for the whole grid; findings for what is shown. */
export interface PairCheck {
  id: string
  feature: string
  /** Stop, door and lift times: aimed at 0.85 or less when a pace is chosen. */
  timed: boolean
  cell(leash: Metres, pace: MetresPerSecond): Cell
  finding(leash: Metres, pace: MetresPerSecond): Finding
  /** The ratio of the way back at that length: shown, never judged here. */
  back?(leash: Metres): Ratio
  /** What comes with it at this pair: the slack leash of a planned pause. */
  beside?(leash: Metres, pace: MetresPerSecond): Finding[]
}

export interface Cell {
  state: Finding['state']
  /** Asked for only where lengths are ranked. */
  ratio(): Ratio | null
  /** Told readings that cannot lift a verdict. */
  told: boolean
}

/** What a check says of one pair, before the sentence. */
export interface Reckoned {
  raw: Exclude<Finding['state'], 'helped'>
  ratio: Ratio
  demand: number
  capacity: number
}
