import type { Boundary } from '../geometry/boundary.ts'
import type { Scene, SceneForm } from '../geometry/scene.ts'
import type { Metres, Radians } from '../units/quantity.ts'
import type { Bodies } from './answer.ts'
import { assignHeadings } from './headings.ts'
import { arcFrom, type Node } from './nodes.ts'

type Turn = Extract<SceneForm, { kind: 'turn' }>

/** How far past the corner the handler must come, as the scene has it; a little more, to end inside. */
const past = 0.605
/** The robot's way along the far wall is walked in steps of this, metres. */
const pace = 0.03

/**
 * Whether the closed form holds: a turn up to a right angle, a robot that stands across its leash at the corner.
 * A hair above 90 degrees is 90 after conversion.
 */
export function hasClosedTurn(form: Turn, bodies: Bodies): boolean {
  return isBoundedTurn(form, bodies) && bodies.sideways && bodies.phiMax >= Math.PI / 2 - 1e-9
}

/** Whether the closed form is at least a bound: wheels and a leash that must pull from behind only take freedom away. */
export function isBoundedTurn(form: Turn, bodies: Bodies): boolean {
  return form.angle <= Math.PI / 2 + 1e-9 && bodies.r >= bodies.a / 2 - bodies.d - 1e-12
}

/**
 * Greatest clearance c at which the handler, pulled along a tractrix from the entry's outer wall by an attachment that
 * runs up the exit's outer wall, still keeps r + c from the inner corner. Metres, negative where nothing passes; never
 * above the free bound (w - max(b, 2r))/2.
 */
export function closedTurn(form: Turn, bodies: Bodies, separation: Metres): Metres {
  const { w1, w2 } = form
  const free = (Math.min(w1, w2) - Math.max(Math.min(bodies.a, bodies.b), 2 * bodies.r)) / 2
  const room = (c: Metres) => tractrixRoom(form, bodies, separation, c, -w1 + bodies.r + c) - c
  return greatest(room, free)
}

/** Greatest c up to `free` with room(c) >= 0; -0.5 where there is none above. */
function greatest(room: (c: Metres) => number, free: Metres): Metres {
  if (room(free) >= 0) return free
  let low = -0.5
  let high = free
  if (room(low) < 0) return low
  while (high - low > 1e-7) {
    const middle = (low + high) / 2
    if (room(middle) >= 0) low = middle
    else high = middle
  }
  return low
}

/** Least distance of the tractrix to the inner corner and the walls that leave it, less the handler's radius. */
function tractrixRoom(form: Turn, bodies: Bodies, separation: Metres, c: Metres, line: Metres): Metres {
  const { angle } = form
  // Seen along the exit: the leash stands at q to the way of the attachment, the handler `across` from the far wall.
  const at = (q: Radians): Metres => {
    const along = lag(angle, q, separation)
    const handler = handlerAt(form, bodies, separation, c, line, along, q)
    return toInner(form, handler.x, handler.y)
  }
  let least = Number.POSITIVE_INFINITY
  const last = Math.min(angle, 0.02)
  let bestQ = angle
  const parts = 24
  for (let i = 0; i <= parts; i++) {
    const q = angle + ((last - angle) * i) / parts
    const room = at(q)
    if (room < least) {
      least = room
      bestQ = q
    }
  }
  const width = (angle - last) / parts
  let from = Math.max(last, bestQ - width)
  let to = Math.min(angle, bestQ + width)
  const golden = (Math.sqrt(5) - 1) / 2
  for (let i = 0; i < 16; i++) {
    const one = to - golden * (to - from)
    const other = from + golden * (to - from)
    if (at(one) < at(other)) to = other
    else from = one
  }
  return Math.min(least, at((from + to) / 2)) - bodies.r
}

/** Way of the attachment along its line until the leash's angle to it has fallen from `from` to `q`. */
function lag(from: Radians, q: Radians, separation: Metres): Metres {
  return separation * Math.log(Math.tan(from / 2) / Math.tan(q / 2))
}

/** Where the attachment meets the exit's outer wall: on the handler's line y, b/2 + c from that wall. */
function meeting(form: Turn, bodies: Bodies, c: Metres, y: Metres): { x: Metres; y: Metres } {
  const { w2, angle } = form
  return { x: (w2 - bodies.b / 2 - c + y * Math.cos(angle)) / Math.sin(angle), y }
}

function handlerAt(
  form: Turn,
  bodies: Bodies,
  separation: Metres,
  c: Metres,
  line: Metres,
  along: Metres,
  q: Radians,
): { x: Metres; y: Metres } {
  const from = meeting(form, bodies, c, line)
  const psi = form.angle - q
  return {
    x: from.x + along * Math.cos(form.angle) - separation * Math.cos(psi),
    y: from.y + along * Math.sin(form.angle) - separation * Math.sin(psi),
  }
}

/** Distance to the two walls that leave the inner corner: y = 0 before it, the exit's left wall after it. */
function toInner(form: Turn, x: Metres, y: Metres): Metres {
  const c = Math.cos(form.angle)
  const s = Math.sin(form.angle)
  const along = x * c + y * s
  const right = x * s - y * c
  const entry = x <= 0 ? -y : Math.hypot(x, y)
  const exit = along >= 0 ? right : Math.hypot(x, y)
  return Math.min(entry, exit)
}

/**
 * Greatest clearance with the run-up there is: where it is too short to bring the handler down to the outer wall, he
 * comes as far as the robot can draw him while it keeps c from that wall itself. Never above `closedTurn`.
 */
function reachedTurn(scene: Scene, form: Turn, bodies: Bodies, separation: Metres): Metres {
  const top = closedTurn(form, bodies, separation)
  const room = (c: Metres) => {
    const line = lowestLine(scene, form, bodies, separation, c)
    return line === null ? -1 : tractrixRoom(form, bodies, separation, c, line) - c
  }
  return greatest(room, top)
}

/** The lowest line along the entry that the handler can be drawn to before the attachment meets the far wall. */
function lowestLine(scene: Scene, form: Turn, bodies: Bodies, separation: Metres, c: Metres): Metres | null {
  const spare = (y: Metres) =>
    meeting(form, bodies, c, y).x - separation - scene.start.x - wayDown(scene, form, bodies, separation, c, y)
  const wanted = -form.w1 + bodies.r + c
  let high = scene.start.y
  if (wanted >= high) return wanted <= high + 1e-9 ? high : null
  if (spare(wanted) >= 0) return wanted
  if (spare(high) < 0) return null
  let low = wanted
  while (high - low > 1e-5) {
    const middle = (low + high) / 2
    if (spare(middle) >= 0) high = middle
    else low = middle
  }
  return high
}

/** Way along the entry in which the handler is drawn down to the line y, the attachment as low as c allows. */
function wayDown(scene: Scene, form: Turn, bodies: Bodies, separation: Metres, c: Metres, y: Metres): Metres {
  return wayTo(separation, scene.start.y, y, Math.max(-form.w1 + bodies.b / 2 + c, scene.start.y - 0.9 * separation))
}

function wayTo(separation: Metres, from: Metres, to: Metres, line: Metres): Metres {
  if (to >= from) return 0
  if (to <= line) return Number.POSITIVE_INFINITY
  const q0 = Math.asin((from - line) / separation)
  const q1 = Math.asin((to - line) / separation)
  return separation * (Math.log(Math.tan(q0 / 2) / Math.tan(q1 / 2)) - Math.cos(q1) + Math.cos(q0))
}

/**
 * The motion of the closed form: down to the outer wall, along it, the robot up the exit's outer wall, the leash swung
 * straight once the handler is past the corner, and on to the goal. null where there is none of clearance zero or more.
 */
export function closedTurnNodes(
  scene: Scene,
  walls: Boundary,
  form: Turn,
  bodies: Bodies,
  separation: Metres,
): Node[] | null {
  const c = reachedTurn(scene, form, bodies, separation)
  const line = lowestLine(scene, form, bodies, separation, c)
  if (c < 0 || line === null) return null
  const { angle, w2 } = form
  const corner = meeting(form, bodies, c, line)
  const nodes: Node[] = [{ x: scene.start.x, y: scene.start.y, psi: 0, length: separation, heading: 0, slack: false }]
  const last = () => nodes.at(-1) as Node
  shiftToWall(nodes, separation, -form.w1 + bodies.b / 2 + c, line, corner.x - separation)
  walk(nodes, corner.x - separation - last().x)
  // Up the far wall: q falls exactly as on a tractrix, each step an arc of the same turn.
  let q = angle
  const done = () => {
    const right = last().x * Math.sin(angle) - last().y * Math.cos(angle)
    return right >= bodies.r + c && (w2 - right <= Math.max(bodies.r + c, w2 / 2) + 1e-9 || q < 0.01)
  }
  for (let i = 0; i < 1000 && !done(); i++) {
    const next = 2 * Math.atan(Math.tan(q / 2) * Math.exp(-pace / separation))
    nodes.push(arcFrom(last(), separation * Math.log(Math.sin(q) / Math.sin(next)), q - next, angle))
    q = next
  }
  // The leash swings straight, then all go on along the exit.
  swing(nodes, q)
  walk(nodes, past - last().x * Math.cos(angle) - last().y * Math.sin(angle))
  const phi = Math.min(bodies.phiMax, Math.PI / 2)
  return assignHeadings(walls, bodies, nodes, headingSteps(angle), phi, c + 0.02)?.nodes ?? null
}

/** Equal steps of the full turn that hit the turn's own angle where it is a multiple of 5 degrees. */
function headingSteps(angle: Radians): number {
  return Math.abs(angle / (Math.PI / 24) - Math.round(angle / (Math.PI / 24))) < 1e-6 ? 48 : 72
}

function walk(nodes: Node[], way: Metres): void {
  const steps = Math.ceil(way / 0.06)
  for (let i = 0; i < steps; i++) nodes.push(arcFrom(nodes.at(-1) as Node, way / steps, 0, 0))
}

function swing(nodes: Node[], turn: Radians): void {
  const steps = Math.ceil(Math.abs(turn) / 0.06)
  for (let i = 0; i < steps; i++) nodes.push(arcFrom(nodes.at(-1) as Node, 0, turn / steps, 0))
}

/** From the centre line down to `target`: the robot runs along a line a little lower and the handler follows. */
function shiftToWall(nodes: Node[], separation: Metres, lowest: Metres, target: Metres, end: Metres): void {
  const start = nodes[0] as Node
  if (start.y - target < 1e-9) return
  const floor = Math.max(lowest, start.y - 0.9 * separation)
  // The gentlest line that brings the handler down in the way there is.
  let line = floor
  for (let part = 1; part < 8; part++) {
    const gentler = target - ((target - floor) * part) / 8
    if (wayTo(separation, start.y, target, gentler) > (end - start.x) * 0.8) continue
    line = gentler
    break
  }
  const q0 = Math.asin((start.y - line) / separation)
  const q1 = Math.asin((target - line) / separation)
  swing(nodes, -q0)
  const steps = Math.ceil((q0 - q1) / 0.015)
  for (let i = 1; i <= steps; i++) {
    const from = nodes.at(-1) as Node
    const q = q0 + ((q1 - q0) * i) / steps
    nodes.push(arcFrom(from, separation * Math.log(Math.sin(-from.psi) / Math.sin(q)), -from.psi - q, 0))
  }
  swing(nodes, q1)
  ;(nodes.at(-1) as Node).psi = 0
}
