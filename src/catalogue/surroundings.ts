import { decibels, metres, words } from './attributes.ts'
import type { Kind } from './kind.ts'

/** Light, sound and air at one spot. The zone's observations carry what holds for a whole stretch. */
const shared = { aspect: null, feeds: [], harm: 'comfort', unsensed: null, staleDays: 60, tags: {} } as const

export const surroundings: readonly Kind[] = [
  {
    ...shared,
    id: 'light-change',
    name: 'sudden change of light',
    attributes: [words('change', 'change', ['bright-to-dark', 'dark-to-bright', 'flicker'], 'always')],
    weight: 'note',
    spoken: 'The light changes. Pause.',
    fix: 'Even the lighting, or fit blinds.',
    unsensed: 'Its camera may need a moment.',
    staleDays: 180,
    tags: { lit: 'yes' },
  },
  {
    ...shared,
    id: 'noise-source',
    name: 'noise that masks',
    attributes: [decibels('level', 'level at the ear'), words('what', 'what makes it', null)],
    feeds: ['noise'],
    weight: 'note',
    spoken: 'Loud noise. Feel the leash; expect no speech.',
    fix: 'Turn the source down, or offer a quiet hour.',
  },
  {
    ...shared,
    id: 'open-hall',
    name: 'wide space without a wall to follow',
    attributes: [metres('span', 'distance without a wall', 'always'), words('sound', 'sound to walk towards', null)],
    weight: 'note',
    spoken: 'Open hall, no wall within reach.',
    fix: 'Add a line underfoot, a carpet runner or a sound.',
    unsensed: 'Few things to locate itself by.',
    staleDays: 365,
  },
  {
    ...shared,
    id: 'draught',
    name: 'heat curtain, fan or draught',
    attributes: [words('strength', 'strength', ['weak', 'strong'])],
    weight: 'note',
    spoken: 'Moving air on your face.',
    fix: 'None asked.',
  },
  {
    ...shared,
    id: 'dead-zone',
    name: 'no phone signal',
    attributes: [words('lost', 'what is lost', ['phone', 'robot', 'both'], 'always')],
    weight: 'note',
    spoken: 'No phone signal on this part.',
    fix: 'A helper walks behind, or a fixed telephone.',
    unsensed: 'Help from afar may not reach the robot.',
    staleDays: 180,
  },
]
