import { metres, words } from './attributes.ts'
import type { Kind } from './kind.ts'

/** People, and what they do on the way. */
const shared = { aspect: null, unsensed: null, tags: {} } as const

export const people: readonly Kind[] = [
  {
    ...shared,
    id: 'queue',
    name: 'queue or queue lines',
    attributes: [
      metres('laneWidth', 'width of the lane'),
      words('staff', 'who takes the team through', null, 'always'),
    ],
    feeds: ['crowd'],
    weight: 'caution',
    harm: 'trap',
    spoken: 'Queue. Stop, and let staff take you through.',
    fix: 'Offer a side entry.',
    staleDays: 60,
  },
  {
    ...shared,
    id: 'crowding-place',
    name: 'place where people gather',
    attributes: [words('hours', 'hours', null)],
    feeds: ['crowd'],
    weight: 'caution',
    harm: 'road',
    spoken: 'People gather on this part. Slow. They may cross the leash.',
    fix: 'Offer a quiet hour or an escort.',
    unsensed: 'The robot may stand still among people.',
    staleDays: 60,
  },
  {
    ...shared,
    id: 'animals',
    name: 'animals',
    attributes: [words('which', 'which, and when', null)],
    feeds: [],
    weight: 'caution',
    harm: 'trap',
    spoken: 'Dogs may be about. Stop if one comes close.',
    fix: 'Ask that animals are kept on a lead away from the way.',
    staleDays: 60,
  },
  {
    ...shared,
    id: 'reception',
    name: 'reception or service point',
    attributes: [metres('distance', 'distance from the door'), words('greets', 'who speaks first', null)],
    feeds: [],
    weight: 'note',
    harm: 'comfort',
    spoken: 'Desk, {clock}. Stop, speak, and wait.',
    fix: 'Staff speak first, and by name.',
    staleDays: 180,
    tags: { amenity: 'reception_desk' },
  },
]
