import type { Scene, SceneForm } from '../geometry/scene.ts'
import type { Metres } from '../units/quantity.ts'
import { arcFrom, type Node } from './nodes.ts'

type Opening = Extract<SceneForm, { kind: 'indoor' }>

/** How far past the opening the handler must come, as the scene has it; a little more, to end inside. */
const past = 0.605
/** The way is cut into steps of this, metres. */
const pace = 0.06

/** Whether the opening lies on the centre line: then the straight way through it has the free bound's clearance. */
export function isCentred(form: Opening): boolean {
  return Math.abs(form.o) < 1e-9
}

/** The straight way through a centred opening, robot ahead on a taut leash all along. */
export function straightNodes(scene: Scene, form: Opening, separation: Metres): Node[] {
  const { x, y, heading } = scene.start
  const end = form.reverse ? -past : form.t + past
  const way = Math.abs(end - x)
  const steps = Math.ceil(way / pace)
  const nodes: Node[] = [{ x, y, psi: heading, length: separation, heading, slack: false }]
  for (let i = 0; i < steps; i++) nodes.push(arcFrom(nodes.at(-1) as Node, way / steps, 0, heading))
  return nodes
}
