import type { Walk } from '../../../record/survey.ts'
import { featureName } from '../../components/strip/strip-words.ts'
import type { EntryDraft } from '../../state/session.ts'
import { quantityEntry } from './quantity-entry.ts'
import type { SheetRoute } from './sheet-route.ts'

/** Where a half-typed entry belongs: its part, what to call it, its sheet. Null: its holder is gone or it is empty. */
export function placeOfDraft(
  walk: Walk,
  draft: EntryDraft | null,
): { index: number; name: string; route: SheetRoute } | null {
  if (!draft || draft.walk !== walk.id || draft.text === '') return null
  const { holder, quantity } = draft
  for (const [index, segment] of walk.segments.entries()) {
    const feature = [...segment.features, ...(segment.turn ? [segment.turn] : [])].find((one) => one.id === holder)
    if (!feature && segment.id !== holder) continue
    const name = feature ? featureName(feature) : ''
    if (quantity.startsWith('text:'))
      return {
        index,
        name: name || quantity.slice(5).replace('-', ' '),
        route: feature
          ? { at: 'feature', feature: holder }
          : quantity === 'text:end-sign'
            ? { at: 'sign' }
            : { at: 'part' },
      }
    if (feature && (quantity === 'along' || quantity === 'offset'))
      return { index, name, route: { at: 'place', feature: holder, field: quantity } }
    const entry = quantityEntry(walk, holder, quantity)
    return entry && { index, name: entry.name, route: { at: 'reading', holder, quantity } }
  }
  return null
}
