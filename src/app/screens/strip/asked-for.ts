import { type Aspect, aspects, type Item, items } from '../../../record/answers.ts'
import type { Walk } from '../../../record/survey.ts'
import { lengthOf } from '../../components/strip/strip-words.ts'
import { quantityEntry } from './quantity-entry.ts'
import { type SheetRoute, sheetOfAspect } from './sheet-route.ts'

/**
 * Where the screen starts. `open` is the address's `<part>` or `<part>/<holder>/<quantity, item or aspect>`: the sheet of
 * that entry lies open. Without it: the open part, else the first.
 */
export function askedFor(walk: Walk, open: string | undefined): { segment: string; trail: SheetRoute[] } {
  const [part, holder, quantity] = open?.split('/').map((one) => decodeURIComponent(one)) ?? []
  const named = walk.segments.find((one) => one.id === part)
  if (!named) {
    const unfinished = walk.segments.find((one) => lengthOf(one) === null) ?? walk.segments[0]
    return { segment: unfinished?.id ?? '', trail: [] }
  }
  const route = holder === undefined ? null : sheetOf(walk, named.id, holder, quantity ?? '')
  return { segment: named.id, trail: route ? [route] : [] }
}

function sheetOf(walk: Walk, segment: string, holder: string, quantity: string): SheetRoute | null {
  if (holder !== segment) {
    const there = walk.segments.some((one) => one.turn?.id === holder || one.features.some(({ id }) => id === holder))
    if (!there) return null
    return quantityEntry(walk, holder, quantity)
      ? { at: 'reading', holder, quantity }
      : { at: 'feature', feature: holder }
  }
  const aspect = quantity in items ? items[quantity as Item].aspect : quantity
  return aspects.includes(aspect as Aspect) ? sheetOfAspect(aspect as Aspect, segment) : null
}
