import {
  count,
  doorMetres,
  headMetres,
  metres,
  millimetres,
  newtons,
  seconds,
  stopWords,
  where,
  words,
} from './attributes.ts'
import type { Attribute, Kind } from './kind.ts'

/**
 * Doors and gates. `clearWidth` is door face to stop with the door as far open as it stays. `hold` is the time during
 * which that width really stays, not a closer's time from 90 degrees to 12. `keptOpen`: "stays" has no closer and stays
 * where it is put; "stop" is a hook or hold-open device; "person" somebody holds it.
 */
const way: readonly Attribute[] = [
  doorMetres('clearWidth', 'clear width, door face to stop', 'always'),
  words('position', 'where it opens from', ['ahead', 'left', 'right'], 'always'),
  metres('wallThickness', 'depth of the frame', where('position', 'left', 'right')),
  headMetres('headHeight', 'lowest point of the door head'),
  millimetres('threshold', 'height of the threshold'),
]
const hold = seconds('hold', 'seconds it keeps its clear width', where('keptOpen', 'no', 'closer'))
const keptOpen = words('keptOpen', 'what keeps it open', ['no', 'closer', 'stays', 'stop', 'person'], 'always')
const worked: readonly Attribute[] = [
  words('action', 'push or pull', ['push', 'pull'], 'always'),
  keptOpen,
  hold,
  newtons('force', 'force to open', 'always'),
  metres('closedRoom', 'clear width beside the latch, door shut', 'always'),
  words('robotPlace', 'place for the robot outside the swing', ['yes', 'no'], 'always'),
  words('hinge', 'hinge side', ['left', 'right']),
  words('handle', 'handle', null),
]
const askFire = 'A person holds it, or a hold-open device released by the alarm; ask your fire adviser.'
const shared = { aspect: 'door', harm: 'trap', weight: 'caution', unsensed: null, staleDays: 180 } as const
const manual = ['turn', 'overhead', 'level', 'door-time', 'door-force', 'door-room'] as const
const powered = ['turn', 'overhead', 'level', 'door-time'] as const

export const doors: readonly Kind[] = [
  {
    ...shared,
    id: 'hinged-door',
    name: 'hinged door',
    attributes: [...way, ...worked, words('fire', 'fire door', ['yes', 'no'], 'always')],
    feeds: manual,
    spoken: 'Door, {clock}, {action}. Stop and find the handle first.',
    fix: `Ease the closer or fit a power opener. ${askFire}`,
    tags: { door: 'hinged' },
  },
  {
    ...shared,
    id: 'double-doors',
    name: 'double doors or lobby',
    attributes: [
      ...way,
      ...worked,
      metres('lobbyLength', 'clear length between the two pairs'),
      metres('lobbyWidth', 'clear width between the two pairs'),
      count('pairs', 'pairs of doors, one behind the other'),
      words('fire', 'fire door', ['yes', 'no'], 'always'),
    ],
    feeds: manual,
    spoken: 'Double doors, {clock}, {action}. Stop and find the handle first.',
    fix: `Let both leaves open. ${askFire}`,
    tags: { door: 'hinged', 'door:leafs': '2' },
  },
  {
    ...shared,
    id: 'automatic-door',
    name: 'automatic door',
    attributes: [
      ...way,
      words('opens', 'how it opens', ['slides', 'swings', 'folds']),
      words('staysOpen', 'shown three times to stay open for a body and for the robot', ['yes', 'no'], 'always'),
      seconds('hold', 'seconds it keeps its clear width', where('staysOpen', 'no')),
      headMetres('sensorLowest', 'lowest height at which it senses'),
    ],
    feeds: powered,
    spoken: 'Automatic door, {clock}. Stop, and wait for its sound.',
    fix: 'Set its sensor to notice low robots, and lengthen its hold.',
    tags: { automatic_door: 'yes' },
  },
  {
    ...shared,
    id: 'revolving-door',
    name: 'revolving door',
    attributes: [words('wayRound', 'the way round: which door, where', null, 'always')],
    feeds: ['stop-item'],
    stopItem: true,
    ledBy: 'human-guide',
    spoken: stopWords,
    fix: 'Unlock and sign the side door.',
    tags: { door: 'revolving' },
  },
  {
    ...shared,
    id: 'sliding-door',
    name: 'manual sliding or folding door',
    attributes: [
      ...way,
      keptOpen,
      hold,
      newtons('force', 'force to open', 'always'),
      metres('closedRoom', 'clear width beside the handle, door shut', 'always'),
      words('parks', 'side it parks on', ['left', 'right']),
      words('fire', 'fire door', ['yes', 'no'], 'always'),
    ],
    feeds: manual,
    spoken: 'Sliding door, {clock}. Stop and find the handle first.',
    fix: 'Make the track flush, and let it park open where no fire rule forbids it.',
    tags: { door: 'sliding' },
  },
  {
    ...shared,
    id: 'gate',
    name: 'gate with a latch',
    attributes: [...way, ...worked, words('latch', 'latch side', ['left', 'right'])],
    feeds: manual,
    spoken: 'Gate, {clock}, {action}. Stop and find the latch first.',
    fix: 'Let somebody hold the gate for the visit, and ease its spring.',
    tags: { barrier: 'gate' },
  },
  {
    ...shared,
    id: 'turnstile',
    name: 'turnstile or speed gate',
    attributes: [
      doorMetres('clearWidth', 'clear width of the wide lane', 'always'),
      words('position', 'where it opens from', ['ahead', 'left', 'right'], 'always'),
      metres('wallThickness', 'length of the lane', where('position', 'left', 'right')),
      words('keptOpen', 'what keeps it open', ['no', 'person'], 'always'),
      seconds('hold', 'seconds it stays open', where('keptOpen', 'no')),
    ],
    feeds: ['turn', 'door-time'],
    spoken: 'Gate lane, {clock}. Stop and wait until staff open it.',
    fix: 'Staff open the wide lane until robot, leash and handler are through.',
    unsensed: 'Its beam may close on a slack leash.',
    tags: { barrier: 'turnstile' },
  },
  {
    ...shared,
    id: 'strip-curtain',
    name: 'strip curtain or swing flap',
    attributes: [
      doorMetres('clearWidth', 'clear width', 'always'),
      words('position', 'where it opens from', ['ahead', 'left', 'right'], 'always'),
      metres('wallThickness', 'depth of the opening', where('position', 'left', 'right')),
      headMetres('headHeight', 'lowest fixed point over it'),
    ],
    feeds: ['turn', 'overhead'],
    harm: 'head',
    spoken: 'Plastic strips, {clock}. Slow, forearm up before your face.',
    fix: 'Tie the strips back for the visit.',
    unsensed: 'The robot may take the strips for a wall.',
    tags: { door: 'curtain' },
  },
]
