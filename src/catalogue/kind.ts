import type { Aspect } from '../record/answers.ts'
import type { LedBy } from '../record/survey.ts'

/**
 * One row of the feature catalogue. Entry forms, checks, cautions, fixes, expiry and open-data tags are read from rows:
 * adding a kind is adding a row.
 */
export interface Kind {
  id: string
  /** The trade's name for it, lower case: "hinged door". */
  name: string
  /** The aspect of a segment that it answers when its item says "listed"; null for turns and pinches. */
  aspect: Aspect | null
  attributes: readonly Attribute[]
  /** Ids of the checks it feeds. */
  feeds: readonly string[]
  /** 'caution' changes what the handler does and moves the verdict; 'note' only announces. */
  weight: 'caution' | 'note'
  harm: 'fall' | 'head' | 'trap' | 'road' | 'comfort'
  /** A stop item is never robot-led: led otherwise, leash off. */
  stopItem?: true
  /** Who leads here unless the survey says otherwise. */
  ledBy?: LedBy
  /** What the handler is told, 15 words a sentence at most; {side}, {clock}, {name} and {<attribute>} are filled in. */
  spoken: string
  /** What the venue is asked to do. */
  fix: string
  /** What the robot cannot sense here, in words; null: nothing particular. */
  unsensed: string | null
  /** Days until a finding of this kind is stale (wet: 0, today only). */
  staleDays: number
  /** OpenStreetMap tags where they exist, key to value. */
  tags: Readonly<Record<string, string>>
}

export type Attribute = QuantityAttribute | WordAttribute

interface Common {
  id: string
  name: string
  /** 'always', or the condition in words (item of the same feature and the word it must say). */
  required: 'always' | 'optional' | { item: string; says: readonly string[] }
}

export interface QuantityAttribute extends Common {
  type: 'quantity'
  quantity: 'length' | 'angle' | 'gradient' | 'force' | 'time' | 'sound' | 'count' | 'number'
  /** Unit shown and locked on the keypad: 'm', 'mm', 'deg', '1:n', 'N', 's', 'dB(A)', ''. */
  unit: string
  /** Instruments offered first. */
  instruments: readonly string[]
}

export interface WordAttribute extends Common {
  type: 'words'
  /** Words it takes; null: free text. */
  says: readonly string[] | null
}
