import type { Segment } from '../../record/survey.ts'

export type FloorClass = 'smooth' | 'textured' | 'carpet'

/** What nobody could tell counts as smooth. */
export function floorClass(segment: Segment): FloorClass {
  const says = segment.words.finish?.says
  return says === 'textured' || says === 'carpet' ? says : 'smooth'
}
