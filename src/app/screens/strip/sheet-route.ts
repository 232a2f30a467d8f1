import type { Aspect } from '../../../record/answers.ts'

/** Which sheet lies over the strip. */
export type SheetRoute =
  | { at: 'plain' }
  | { at: 'reading'; holder: string; quantity: string }
  | { at: 'place'; feature: string; field: 'along' | 'offset' }
  | { at: 'feature'; feature: string }
  | { at: 'aspect'; aspect: AspectWithKinds }
  | { at: 'surface' }
  | { at: 'sign' }
  | { at: 'turn' }
  | { at: 'part' }
  | { at: 'more' }

/** Aspects answered by "none" or by listed features. */
export type AspectWithKinds = Extract<Aspect, 'overhead' | 'step' | 'edge' | 'door' | 'sensing'>

export const aspectTitles: Record<AspectWithKinds, { title: string; none: string }> = {
  overhead: { title: 'Overhead', none: 'Swept, nothing overhead' },
  step: { title: 'Step or slope', none: 'No step, slope or cross-fall' },
  edge: { title: 'Edge', none: 'No edge within 3 m' },
  door: { title: 'Door', none: 'No door or gate' },
  sensing: { title: 'What the robot may not sense', none: 'No glass, mirror, dark or shiny floor, rope, low sun' },
}

/** The sheet that answers an aspect of a part. */
export function sheetOfAspect(aspect: Aspect, segment: string): SheetRoute {
  switch (aspect) {
    case 'length':
    case 'width':
      return { at: 'reading', holder: segment, quantity: aspect }
    case 'surface':
      return { at: 'surface' }
    case 'shoreline':
    case 'end-sign':
      return { at: 'sign' }
    default:
      return { at: 'aspect', aspect }
  }
}
