import { headMetres, metres, words } from './attributes.ts'
import type { Kind } from './kind.ts'

/** What strikes a head or a shoulder: measured at the lowest point over the handler's line, both shoulders. */
const shared = {
  aspect: 'overhead',
  weight: 'note',
  harm: 'head',
  unsensed: 'The robot passes under it.',
  staleDays: 365,
} as const
const lowest = headMetres('lowest', 'lowest point over the walking line', 'always')

export const overheads: readonly Kind[] = [
  {
    ...shared,
    id: 'overhang',
    name: 'overhang at head height',
    attributes: [lowest, metres('projection', 'how far it stands out'), words('what', 'what it is', null)],
    feeds: ['overhead', 'sensing'],
    spoken: 'Head-height object, {clock}. Slow, forearm up before your face.',
    fix: 'Raise or trim it, or set a detectable guard below it.',
    staleDays: 180,
    tags: { hazard: 'overhang' },
  },
  {
    ...shared,
    id: 'under-stair',
    name: 'underside of a stair',
    attributes: [
      lowest,
      metres('offset', 'walking line to where it is 2.03 m high'),
      words('guard', 'rail or planter at that line', ['yes', 'no'], 'always'),
    ],
    feeds: ['overhead', 'sensing'],
    weight: 'caution',
    spoken: 'Stair over the way, {clock}. Stop, forearm up before your face.',
    fix: 'Planter or rail at the line where it is 2.03 m high.',
    tags: { hazard: 'overhang' },
  },
  {
    ...shared,
    id: 'wall-projection',
    name: 'thing standing out from a wall',
    attributes: [
      metres('projection', 'how far it stands out', 'always'),
      headMetres('lowest', 'its lowest edge', 'always'),
      headMetres('top', 'its top'),
      words('mounted', 'mounted on', ['wall', 'post']),
    ],
    feeds: ['protrusion'],
    spoken: 'Object on the {side} at body height. Keep that arm in.',
    fix: 'Set it back, or carry it down to the floor.',
    tags: { hazard: 'projection' },
  },
]
