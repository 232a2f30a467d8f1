import { metres, millimetres, stopWords, words } from './attributes.ts'
import type { Kind } from './kind.ts'

/**
 * Edges within 3 m of the walking line: `distance` is the least, from the line to the edge. Only a guard that a body
 * meets settles one (rail, wall, barrier, screen doors); rope, chain or tape is none.
 */
const distance = metres('distance', 'least distance from the walking line', 'always')
const guard = words('guard', 'guard', ['none', 'rail', 'wall', 'barrier', 'screen-doors', 'rope'], 'always')
const shared = {
  aspect: 'edge',
  weight: 'note',
  harm: 'fall',
  feeds: ['edge', 'stop-at-edge'],
  unsensed: 'The robot may not notice the edge.',
  staleDays: 365,
} as const

export const edges: readonly Kind[] = [
  {
    ...shared,
    id: 'drop-off',
    name: 'drop or unguarded edge',
    attributes: [distance, guard, metres('height', 'height of the drop', 'always')],
    spoken: stopWords,
    fix: 'Fit a barrier, or an upstand of 150 mm and a rail.',
    tags: { hazard: 'drop' },
  },
  {
    ...shared,
    id: 'water-edge',
    name: 'water, pool or fountain rim',
    attributes: [distance, guard, millimetres('upstand', 'height of the rim')],
    spoken: stopWords,
    fix: 'Fit a rail between the way and the water.',
    tags: { natural: 'water' },
  },
  {
    ...shared,
    id: 'platform-edge',
    name: 'platform edge',
    attributes: [
      distance,
      guard,
      metres('height', 'height above the track'),
      metres('strip', 'depth of the warning strip'),
    ],
    spoken: stopWords,
    fix: 'Staff escort; a rail or screen doors.',
    tags: { railway: 'platform_edge' },
  },
  {
    ...shared,
    id: 'traffic-edge',
    name: 'edge to moving traffic',
    attributes: [distance, guard, millimetres('kerb', 'height of the kerb between, 0 for none', 'always')],
    harm: 'road',
    spoken: stopWords,
    fix: 'Fit a rail or a kerb of at least 60 mm.',
    tags: { highway: 'service' },
  },
  {
    ...shared,
    id: 'kerb-edge',
    name: 'kerb beside the way',
    attributes: [distance, guard, millimetres('height', 'height of the kerb', 'always')],
    spoken: 'Kerb on the {side}. If the ground changes underfoot, stop.',
    fix: 'Mark the kerb with a warning surface.',
    tags: { barrier: 'kerb' },
  },
]
