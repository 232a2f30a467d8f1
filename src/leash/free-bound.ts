import { type Boundary, distanceToBoundary } from '../geometry/boundary.ts'
import type { Scene } from '../geometry/scene.ts'
import type { Metres } from '../units/quantity.ts'
import type { Bodies } from './answer.ts'
import { robotClearance } from './certify.ts'

/**
 * What no motion can exceed, by reasons that need no search: half of what each narrow place leaves beside the wider
 * body, and the clearance of the start itself, which every motion has to begin with. Metres, may be negative.
 */
export function freeBound(scene: Scene, walls: Boundary, bodies: Bodies, separation: Metres): Metres {
  const { x, y, heading } = scene.start
  const robot = robotClearance(walls, bodies, { x, y, psi: heading, length: separation, heading, slack: false })
  const handler = distanceToBoundary(walls, x, y) - bodies.r
  const width = Math.max(Math.min(bodies.a, bodies.b), 2 * bodies.r)
  return Math.min(robot, handler, (narrowest(scene) - width) / 2)
}

/** The narrowest place that both bodies must pass, metres; infinite where only a polygon is known. */
function narrowest(scene: Scene): Metres {
  const form = scene.form
  switch (form?.kind) {
    case undefined:
      return Number.POSITIVE_INFINITY
    case 'turn':
      return Math.min(form.w1, form.w2)
    case 'sidedoor':
    case 'indoor':
      return Math.min(form.w, form.p)
    case 'uturn':
      return Math.min(form.w1, form.w2, form.e)
    case 'chicane':
      return form.w - form.j
  }
}
