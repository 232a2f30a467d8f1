import { boundaryOf, distanceToBoundary } from '../geometry/boundary.ts'
import { checkRings, holds } from '../geometry/polygon-check.ts'
import type { Scene } from '../geometry/scene.ts'
import type { SceneProblem } from '../geometry/scene-problem.ts'
import type { Metres } from '../units/quantity.ts'
import type { Bodies, ClearanceOptions } from './answer.ts'

/** The team the reference cases were solved for. */
export const referenceBodies: Bodies = {
  a: 0.65,
  b: 0.35,
  d: 0.15,
  r: 0.27,
  g: 0.1,
  phiMax: Math.PI / 2,
  sideways: true,
}

/** Farthest point of the robot from its leash attachment, metres. */
export function reachOf(bodies: Bodies): Metres {
  return Math.hypot(bodies.a / 2 + bodies.d, bodies.b / 2)
}

/**
 * What is wrong with a question to the planner; null where it can be asked. NaN is refused here: further in it would
 * fail every comparison silently and make a way look wider.
 */
export function checkQuestion(
  scene: Scene,
  bodies: Bodies,
  separation: Metres,
  options: ClearanceOptions = {},
): SceneProblem | null {
  const sizes: [string, number, number, number][] = [
    ['a', bodies.a, 0, 5],
    ['b', bodies.b, 0, 5],
    ['r', bodies.r, 0, 2],
    ['separation', separation, 0.05, 10],
  ]
  for (const [path, value, least, most] of sizes)
    if (!(value > 0 && value >= least && value <= most))
      return problem(path, `metres above ${least}, up to ${most}`, value, 'Give it in metres.')
  for (const [path, value, most] of [
    ['d', bodies.d, bodies.a],
    ['g', bodies.g, 2],
    ['pausesAt', options.pausesAt ?? 0, 5],
    ['drift', options.drift ?? 0, 1],
  ] as const)
    if (!(value >= 0 && value <= most)) return problem(path, `metres from 0 to ${most}`, value, 'Give it in metres.')
  if (!(bodies.phiMax > 0 && bodies.phiMax <= Math.PI))
    return problem('phiMax', 'an angle above 0, up to half a turn', bodies.phiMax, 'Give it in radians.')
  if (options.workCap !== undefined && !(options.workCap >= 0))
    return problem('workCap', 'a number of 0 or more', options.workCap, 'Leave it out for the usual cap.')
  if (separation < bodies.r + bodies.g + bodies.a / 2 - bodies.d - 1e-9)
    return problem(
      'separation',
      'a leash that keeps the bodies apart',
      separation,
      'Take a longer leash: robot and handler would stand closer than the least distance.',
    )
  const rings = checkRings(scene)
  if (rings) return rings
  const { x, y, heading } = scene.start
  if (!(Number.isFinite(x) && Number.isFinite(y) && Number.isFinite(heading)))
    return problem('start', 'numbers', `${x}, ${y}, ${heading}`, 'Give metres and radians.')
  if (!(distanceToBoundary(boundaryOf(scene), x, y) > 0) || !holds(scene.polygon, scene.start))
    return problem('start', 'a place inside the walls', `${x}, ${y}`, 'Move the start into the free region.')
  if (scene.goal.polygon.length < 3 || scene.goal.polygon.some((p) => !(Number.isFinite(p.x) && Number.isFinite(p.y))))
    return problem('goal/polygon', 'at least three corners', scene.goal.polygon.length, 'Draw the goal as an area.')
  return null
}

function problem(path: string, expected: string, found: number | string, whatToDo: string): SceneProblem {
  return { path, expected, found: `${found}`, whatToDo }
}
