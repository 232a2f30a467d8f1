import { type Aspect, aspects } from '../../../record/answers.ts'
import type { Segment, Walk } from '../../../record/survey.ts'
import { lengthOf } from '../../components/strip/strip-words.ts'
import { type SheetRoute, sheetOfAspect } from './sheet-route.ts'

/**
 * Where the screen starts. `open` is the address's `<part>`, `<part>/aspect/<aspect>` or `<part>/reading/<id>`: the
 * sheet of that entry lies open. Without it: the open part, else the first.
 */
export function askedFor(walk: Walk, open: string | undefined): { segment: string; trail: SheetRoute[] } {
  const [part, what, which] = open?.split('/').map((one) => decodeURIComponent(one)) ?? []
  const named = walk.segments.find((one) => one.id === part)
  if (!named) {
    const unfinished = walk.segments.find((one) => lengthOf(one) === null) ?? walk.segments[0]
    return { segment: unfinished?.id ?? '', trail: [] }
  }
  const route =
    what === 'aspect' && aspects.includes(which as Aspect)
      ? sheetOfAspect(which as Aspect, named.id)
      : what === 'reading'
        ? sheetOfReading(named, which)
        : null
  return { segment: named.id, trail: route ? [route] : [] }
}

function sheetOfReading(segment: Segment, id: string | undefined): SheetRoute | null {
  for (const holder of [segment, ...segment.features, ...(segment.turn ? [segment.turn] : [])])
    for (const [quantity, readings] of Object.entries(holder.readings))
      if (readings.some((one) => one.id === id)) return { at: 'reading', holder: holder.id, quantity }
  return null
}
