import type { Segment } from '../../record/survey.ts'

export type FloorClass = 'smooth' | 'textured' | 'carpet'

/** What nobody could tell counts as smooth, and so does a part that is smooth past a mat's end. */
export function floorClass({ words, features }: Segment): FloorClass {
  const past = features.flatMap((one) => (one.kind === 'floor-edge' ? (one.words.finish?.says ?? []) : []))
  const says = words.finish?.says
  if (past.some((one) => one !== 'textured' && one !== 'carpet')) return 'smooth'
  return says === 'textured' || says === 'carpet' ? says : 'smooth'
}
