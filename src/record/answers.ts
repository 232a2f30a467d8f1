/**
 * What every robot-led segment must answer, and in which words. An aspect is answered when all of its items are:
 * a quantity by a reading, an item by an answer. "none" says that somebody looked and found nothing;
 * "listed" says that the segment's features are the answer. Absent is never a pass.
 */
export const aspects = [
  'length',
  'width',
  'overhead',
  'step',
  'edge',
  'surface',
  'door',
  'sensing',
  'shoreline',
  'end-sign',
] as const
export type Aspect = (typeof aspects)[number]

/** Items answered in words on a segment, the aspect each belongs to, and the words it takes (null: free text). */
export const items = {
  overhead: { aspect: 'overhead', says: ['none', 'listed'] },
  step: { aspect: 'step', says: ['none', 'listed'] },
  edge: { aspect: 'edge', says: ['none', 'listed'] },
  finish: { aspect: 'surface', says: ['smooth', 'textured', 'carpet', 'unknown'] },
  wetness: { aspect: 'surface', says: ['dry', 'wet'] },
  slots: { aspect: 'surface', says: ['none', 'listed'] },
  door: { aspect: 'door', says: ['none', 'listed'] },
  sensing: { aspect: 'sensing', says: ['none', 'listed'] },
  shoreline: { aspect: 'shoreline', says: ['left', 'right', 'none'] },
  'end-sign': { aspect: 'end-sign', says: null },
} as const satisfies Record<string, { aspect: Aspect; says: readonly string[] | null }>

export type Item = keyof typeof items

/** Never taken over from the stretch before, and told or by-eye answers to them never lift a verdict (width too). */
export const neverInherited: readonly Item[] = ['overhead', 'edge', 'step', 'door']

/** A part not led by the robot asks only these, who leads, and how the robot gets across. */
export const aspectsLedOtherwise: readonly Aspect[] = ['overhead', 'edge', 'step']
