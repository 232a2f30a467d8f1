import type { FactDraft } from '../facts.ts'
import { type OrderKey, orderBetween } from '../order.ts'
import { root } from '../placement.ts'
import { fieldOfKey, fieldOfMark, rootShape, type Shape, shapeOf } from '../shapes.ts'
import type { Answer, StateMark, SurveyView } from '../survey.ts'

type Node = Record<string, unknown>

/** The facts that a valid, completed view folds from, as if one person had entered it top to bottom on `device`. */
export function factsOfView(view: SurveyView, device: string): FactDraft[] {
  return draftsWithin(root, view, rootShape, device)
}

function draftsWithin(entity: string, node: Node, shape: Shape, device: string): FactDraft[] {
  const drafts: FactDraft[] = []
  const put = (field: string, value: unknown) => drafts.push({ entity, field, value, replaces: [] })
  const lists = new Set([...(shape.lists ?? []), ...(shape.sparse ?? []), ...(shape.single ?? [])])
  if (shape.whole) put(shape.whole, node)
  for (const [key, value] of Object.entries(node)) {
    if (key === 'id' && entity !== root) continue
    if (lists.has(key)) drafts.push(...draftsOfList(entity, key, value, device))
    else if (shape.whole) continue
    else if (key === 'words' && shape.words) putWords(value as Record<string, Answer>, put)
    else if (key === 'readings' && shape.readings)
      for (const [quantity, taken] of Object.entries(value as Node))
        drafts.push(...draftsOfList(entity, `readings/${quantity}`, taken, device))
    else if (key === 'states' && shape.states) for (const mark of value as StateMark[]) put(fieldOfMark(mark), mark)
    else if (key === 'photos' && shape.photos) for (const photo of value as string[]) put(`photo/${photo}`, true)
    else put(fieldOfKey(key), value)
  }
  return drafts
}

function draftsOfList(parent: string, list: string, value: unknown, device: string): FactDraft[] {
  const shape = shapeOf(list)
  if (!shape) return []
  const nodes = (Array.isArray(value) ? value : [value]) as Node[]
  let order: OrderKey | null = null
  return nodes.flatMap((node) => {
    order = orderBetween(order, null, device)
    const entity = node.id as string
    return [
      { entity, field: 'in', value: { parent, list, order }, replaces: [] },
      ...draftsWithin(entity, node, shape, device),
    ]
  })
}

/** A disputed answer in a view is one fact a person, none replacing another. */
function putWords(words: Record<string, Answer>, put: (field: string, value: unknown) => void): void {
  for (const [item, { rivals, ...answer }] of Object.entries(words)) {
    put(`word/${item}`, answer)
    for (const rival of rivals ?? []) put(`word/${item}`, rival)
  }
}
