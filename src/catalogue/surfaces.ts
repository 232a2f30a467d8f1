import { figure, metres, millimetres, words } from './attributes.ts'
import type { Kind } from './kind.ts'

/** What the ground is made of where it is not as the stretch says. */
const shared = { aspect: 'surface', harm: 'fall', unsensed: null } as const

export const surfaces: readonly Kind[] = [
  {
    ...shared,
    id: 'grating',
    name: 'grating or slot',
    attributes: [
      millimetres('slot', 'width of a slot', 'always'),
      words('direction', 'long way of the slots', ['across', 'along'], 'always'),
      metres('length', 'length along the way'),
      figure('pendulum', 'pendulum value'),
    ],
    feeds: ['gap'],
    weight: 'note',
    spoken: 'Metal grid underfoot. Short steps.',
    fix: 'Cover it with a mat fixed down.',
    staleDays: 365,
    tags: { surface: 'metal_grid' },
  },
  {
    ...shared,
    id: 'wet-patch',
    name: 'wet or soiled floor',
    attributes: [
      metres('length', 'length along the way'),
      words('cause', 'cause', null, 'always'),
      figure('pendulum', 'pendulum value, wet'),
    ],
    feeds: ['traction', 'slip'],
    weight: 'caution',
    spoken: 'Wet floor. Short steps. If it slides, stop.',
    fix: 'Dry it, and lay a mat that is fixed down.',
    staleDays: 0,
    tags: {},
  },
  {
    ...shared,
    id: 'loose-ground',
    name: 'leaves, ice, snow, gravel or sand',
    attributes: [words('what', 'what it is', null, 'always'), metres('length', 'length along the way')],
    feeds: ['traction', 'slip'],
    weight: 'caution',
    spoken: 'Loose ground. Short steps. If it slides, stop.',
    fix: 'Clear it before the visit.',
    unsensed: 'What lies under it may not be noticed.',
    staleDays: 0,
    tags: { surface: 'gravel' },
  },
]
