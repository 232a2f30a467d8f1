import { headMetres, metres, words } from './attributes.ts'
import type { Kind } from './kind.ts'

/** What a robot may not sense, or take for something else. */
const shared = { aspect: 'sensing', feeds: ['sensing'], weight: 'caution', harm: 'trap', tags: {} } as const

export const sensing: readonly Kind[] = [
  {
    ...shared,
    id: 'glass',
    name: 'glass wall or glass door beside the way',
    attributes: [words('marks', 'marks on it', ['two-heights', 'one-height', 'none'], 'always')],
    spoken: 'Glass on the {side}. Slow.',
    fix: 'Contrasting bands at two heights, and film low down.',
    unsensed: 'The robot may not notice glass.',
    staleDays: 365,
    tags: { material: 'glass' },
  },
  {
    ...shared,
    id: 'mirror',
    name: 'mirror or polished metal',
    attributes: [headMetres('lowest', 'its lowest edge')],
    spoken: 'Mirror on the {side}. The robot may stop.',
    fix: 'Cover the lowest 600 mm, or set a screen before it.',
    unsensed: 'The robot may take the reflection for a way.',
    staleDays: 365,
  },
  {
    ...shared,
    id: 'shiny-floor',
    name: 'shiny floor',
    attributes: [metres('length', 'length along the way')],
    spoken: 'Smooth shiny floor. The robot may slow or stop.',
    fix: 'Treat the floor matt.',
    unsensed: 'The reflection may confuse the robot.',
    staleDays: 365,
  },
  {
    ...shared,
    id: 'dark-floor',
    name: 'dark floor or black mat',
    attributes: [metres('length', 'length along the way')],
    spoken: 'Dark mat. The robot may stop. Then stand still.',
    fix: 'Lay a lighter mat.',
    unsensed: 'The robot may take a dark floor for a drop.',
    staleDays: 180,
  },
  {
    ...shared,
    id: 'low-sun',
    name: 'low sun or glare',
    attributes: [words('hours', 'hours and season', null, 'always')],
    spoken: 'Low sun. The robot may slow or stop.',
    fix: 'Blinds, or another hour.',
    unsensed: 'Sun in its sensor may hide what stands ahead.',
    staleDays: 180,
  },
  {
    ...shared,
    id: 'rope',
    name: 'rope, chain or tape',
    attributes: [
      headMetres('lowest', 'its lowest height', 'always'),
      words('place', 'across the way or beside it', ['across', 'beside'], 'always'),
    ],
    spoken: 'Rope barrier, {clock}. Stop, and wait for help.',
    fix: 'Set barriers with a solid base, or remove them.',
    unsensed: 'The robot may pass under it.',
    staleDays: 60,
    tags: { barrier: 'rope' },
  },
]
