import type { FieldQuantity } from '../../../units/parse.ts'

/** What a field is called and measured in. A field that is not named here is still shown, by its own name. */
export interface FieldName {
  label: string
  quantity?: FieldQuantity
  /** Unit of a bare number, and of what is kept; a gradient is kept as rise over run. */
  unit?: string
  hint?: string
}

const metres = (label: string, hint?: string): FieldName => ({
  label,
  quantity: 'length',
  unit: 'm',
  ...(hint ? { hint } : {}),
})
const figure = (label: string, unit: string, quantity: FieldQuantity = 'number'): FieldName => ({
  label,
  quantity,
  unit,
})

export const fieldNames: Readonly<Record<string, FieldName>> = {
  name: { label: 'Name of the team' },
  'robot.name': { label: 'Robot' },
  'robot.length': metres('Length'),
  'robot.width': metres('Width'),
  'robot.height': metres('Height'),
  'robot.mass': figure('Mass', 'kg', 'mass'),
  'robot.attachBehind': metres('Leash attachment behind its middle'),
  'robot.attachHeight': metres('Height of the leash attachment'),
  'robot.cruise': figure('Usual speed', 'm/s', 'speed'),
  'robot.hardestBraking': { ...figure('Hardest braking', 'm/s²'), hint: 'Only where it was measured.' },
  'robot.standOff': metres('Stops before an edge by'),
  'robot.riser': metres('Highest single step it takes'),
  'robot.slope': { label: 'Steepest slope', quantity: 'gradient', unit: '1:n' },
  'robot.crossFall': { label: 'Steepest cross-fall', quantity: 'gradient', unit: '1:n' },
  'robot.slot': metres('Widest slot it crosses'),
  'robot.sillGap': metres('Widest gap at a sill'),
  'robot.friction.smooth.dry': { label: 'Grip on smooth floor, dry' },
  'robot.friction.smooth.wet': { label: 'Grip on smooth floor, wet' },
  'robot.friction.textured.dry': { label: 'Grip on textured floor, dry' },
  'robot.friction.textured.wet': { label: 'Grip on textured floor, wet' },
  'robot.friction.carpet.dry': { label: 'Grip on carpet, dry' },
  'robot.friction.carpet.wet': { label: 'Grip on carpet, wet' },
  'robot.sideways': { label: 'Steps sideways and turns on the spot' },
  'robot.phiMaxDegrees': figure('Greatest angle of the leash from straight behind', 'degrees'),
  'robot.holdsSlopeWithPowerLost': { label: 'Holds on a slope with its power lost' },
  'robot.onLetGo': { label: 'When the leash is let go, it' },
  'robot.sensingPlane': metres('Height of its sensing plane'),
  'robot.senses.glass': { label: 'Senses glass' },
  'robot.senses.darkFloor': { label: 'Senses a dark floor' },
  'robot.senses.overhangs': { label: 'Senses overhangs' },
  'robot.senses.drops': { label: 'Senses drops' },
  'robot.batteryMinutes': figure('Battery', 'minutes'),
  'robot.rainRating': { label: 'Rain rating' },
  'robot.opensDoors': { label: 'Opens doors by itself' },
  'robot.callsLifts': { label: 'Calls lifts by itself' },
  'handler.name': { label: 'Name, or initials' },
  'handler.shoulders': metres('Breadth across the shoulders'),
  'handler.clothing': metres('Clothing adds'),
  'handler.bag': { label: 'Bag is carried' },
  'handler.depth': metres('Depth of the body'),
  'handler.stature': metres('Height'),
  'handler.shoes': metres('Shoes add'),
  'handler.headgear': metres('Headgear adds'),
  'handler.handHeight': metres('Height of the leash hand'),
  'handler.handAhead': metres('Leash hand ahead of the body'),
  'handler.arm': metres('Arm’s length'),
  'handler.shoulderHeight': metres('Height of the shoulder'),
  'handler.pace': figure('Walking pace indoors', 'm/s', 'speed'),
  'handler.paceOutdoors': figure('Walking pace outdoors', 'm/s', 'speed'),
  'handler.step': metres('Length of one pace'),
  'handler.slowToReact': { label: 'Needs longer to react' },
  'handler.deceleration': figure('Slows down at', 'm/s²'),
  'handler.side': { label: 'Leash hand' },
  'handler.caneCarried': { label: 'Carries a cane' },
  'handler.opensDoors': {
    label: 'Opens doors on the way',
    hint: 'Must be asked of the handler; there is no default.',
  },
  'handler.standsWhenSlack': { label: 'Has been shown to stand still when the leash goes slack' },
  'handler.ownWayThroughLifts': { label: 'Has been shown an own way through lifts' },
  'handler.gathersLeash': { label: 'Gathers a slack leash in the hand' },
  'leash.lengths': { ...metres('Lengths on offer'), hint: 'One after the other, with ; between them.' },
  'leash.changeable': { label: 'Length can be changed on the way' },
  'leash.longestInCrowd': metres('Longest in a crowd'),
  'leash.startForce': figure('Pull that starts the robot', 'N', 'force'),
  'leash.clearTug': figure('Pull that is felt clearly', 'N', 'force'),
  'leash.plannedSlack': metres('Slack planned for'),
  'leash.apart': metres('Least distance between robot and handler'),
  'leash.clearanceStraight': metres('Room to each side on the straight'),
  'leash.clearancePinch': metres('Room to each side at a narrow place'),
}

/** The name of a path that the table does not know: its last part in words. */
export function nameOf(path: string): FieldName {
  const known = fieldNames[path]
  if (known) return known
  const last = path.split('.').at(-1) ?? path
  return { label: last.replace(/([A-Z])/g, (letter) => ` ${letter.toLowerCase()}`) }
}

const words: Readonly<Record<string, string>> = {
  'in-front': 'in front',
  'left-behind': 'left behind',
  'goes-on': 'goes on',
}

export function choiceWord(choice: string): string {
  return words[choice] ?? choice
}
