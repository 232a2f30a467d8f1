import { degrees, metres, words } from './attributes.ts'
import type { Kind } from './kind.ts'

/** Changes of direction. Widths default to the least clear width of the stretch before and after. */
const shared = { aspect: null, feeds: ['turn'], unsensed: null, staleDays: 365, tags: {} } as const

export const turns: readonly Kind[] = [
  {
    ...shared,
    id: 'turn',
    name: 'turn',
    attributes: [
      degrees('angle', 'angle, left positive', 'always'),
      metres('widthBefore', 'clear width before the corner'),
      metres('widthAfter', 'clear width after the corner'),
      words('innerCorner', 'inner corner', ['sharp', 'rounded']),
    ],
    weight: 'note',
    harm: 'comfort',
    spoken: 'Turn to the {side}.',
    fix: 'Move whatever stands on the inside of the corner.',
  },
  {
    ...shared,
    id: 'u-turn',
    name: 'U-turn round a wall end',
    attributes: [
      metres('wallThickness', 'thickness of the wall between the lanes', 'always'),
      metres('endDistance', 'wall end to the wall facing it', 'always'),
      metres('widthBefore', 'clear width of the lane before'),
      metres('widthAfter', 'clear width of the lane after'),
      words('innerCorner', 'inner corner', ['sharp', 'rounded']),
    ],
    weight: 'note',
    harm: 'comfort',
    spoken: 'Turn right round, to the {side}.',
    fix: 'Widen the lanes or the gap at the end of the wall.',
  },
  {
    ...shared,
    id: 'dead-end',
    name: 'dead end, turning round',
    attributes: [
      metres('clearWidth', 'clear width to turn in', 'always'),
      metres('depth', 'clear depth to turn in', 'always'),
      words('robotWaits', 'where the robot waits', null, 'always'),
    ],
    weight: 'note',
    harm: 'comfort',
    spoken: 'End of the way. The robot turns round.',
    fix: 'Keep the turning place clear.',
  },
]
