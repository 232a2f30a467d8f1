import type { Why } from './result.ts'

/** A reason why something is not known, and whether it keeps the verdict there. */
export interface Gap extends Why {
  blocks: boolean
}
