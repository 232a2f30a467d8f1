import type { QuantityAttribute } from '../../../catalogue/kind.ts'
import { kind } from '../../../catalogue/kinds.ts'
import { type InstrumentId, instrumentIds, instruments } from '../../../record/instruments.ts'
import type { Feature, Reading, Segment, Walk } from '../../../record/survey.ts'
import type { FieldQuantity } from '../../../units/parse.ts'
import { featureName } from '../../components/strip/strip-words.ts'

/** What a keypad sheet for one quantity of one holder needs to know. */
export interface QuantityEntry {
  segment: Segment
  index: number
  feature: Feature | null
  /** "hinged door, clear width" */
  name: string
  /** "clear width" */
  short: string
  field: { quantity: FieldQuantity; unit: string }
  instruments: readonly InstrumentId[]
  readings: readonly Reading[]
}

const ofSegment: Record<
  string,
  { name: string; quantity: FieldQuantity; unit: string; instruments: readonly InstrumentId[] }
> = {
  length: {
    name: 'length',
    quantity: 'length',
    unit: 'm',
    instruments: ['tape', 'laser', 'wheel', 'tape-in-lays', 'paces', 'plan', 'by-eye', 'told'],
  },
  width: { name: 'width', quantity: 'length', unit: 'm', instruments: ['tape', 'laser', 'stick', 'plan', 'told'] },
  overhead: {
    name: 'swept height',
    quantity: 'length',
    unit: 'm',
    instruments: ['rod', 'overhead-tape', 'laser', 'told'],
  },
  pendulum: { name: 'pendulum value', quantity: 'number', unit: '', instruments: ['pendulum', 'told'] },
}

/** Null: nothing of that name is on the walk. */
export function quantityEntry(walk: Walk, holder: string, quantity: string): QuantityEntry | null {
  for (const [index, segment] of walk.segments.entries()) {
    const own = ofSegment[quantity]
    if (segment.id === holder && own)
      return {
        segment,
        index,
        feature: null,
        name: own.name,
        short: own.name,
        field: { quantity: own.quantity, unit: own.unit },
        instruments: own.instruments,
        readings: segment.readings[quantity] ?? [],
      }
    const feature = [...segment.features, ...(segment.turn ? [segment.turn] : [])].find((one) => one.id === holder)
    const attribute = kind(feature?.kind ?? '')?.attributes.find((one) => one.id === quantity)
    if (feature && attribute?.type === 'quantity')
      return {
        segment,
        index,
        feature,
        name: `${featureName(feature)}, ${attribute.name}`,
        short: attribute.name,
        field: { quantity: attribute.quantity, unit: attribute.unit },
        instruments: toolsFor(attribute, feature),
        readings: feature.readings[quantity] ?? [],
      }
  }
  return null
}

const readBy: Partial<Record<QuantityAttribute['quantity'], string>> = {
  length: 'length',
  angle: 'angle',
  gradient: 'gradient',
  force: 'force',
  time: 'time',
  sound: 'sound',
}

/** The row's own first, then whatever else reads it. By eye is no way to read a width, a height or an edge. */
function toolsFor(attribute: QuantityAttribute, feature: Feature): InstrumentId[] {
  const reads = readBy[attribute.quantity]
  const fitting = instrumentIds.filter((id) => instruments[id].reads === reads || id === 'told' || id === 'by-eye')
  const named = attribute.instruments.filter((id): id is InstrumentId => id in instruments)
  const neverByEye =
    /width|height|clear|distance/.test(attribute.id) || ['edge', 'overhead'].includes(kind(feature.kind)?.aspect ?? '')
  return [...new Set([...named, ...fitting])].filter((id) => id !== 'by-eye' || !neverByEye)
}
