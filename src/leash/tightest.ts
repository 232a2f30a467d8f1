import { type Boundary, distanceToBoundary, nearest } from '../geometry/boundary.ts'
import { rectangleNearest } from '../geometry/rectangle.ts'
import type { Scene } from '../geometry/scene.ts'
import { pointToSegment } from '../geometry/segment.ts'
import type { Bodies, Motion, Tightest } from './answer.ts'
import { type Certificate, centreX, centreY, robotClearance } from './certify.ts'
import { nodesOf, wrap } from './nodes.ts'

/** Names the tightest place of a certified motion: which part of which body, at which wall, where. */
export function tightestOf(
  scene: Scene,
  walls: Boundary,
  bodies: Bodies,
  motion: Motion,
  certificate: Certificate,
): Tightest | null {
  const node = nodesOf({ samples: motion.samples.subarray(certificate.at * 6, certificate.at * 6 + 6) })[0]
  if (!node) return null
  if (certificate.body === 'handler') {
    distanceToBoundary(walls, node.x, node.y)
    const { edge, x, y } = nearest
    const part = handlerPart(wrap(Math.atan2(y - node.y, x - node.x) - node.psi))
    const wall = nameWall(scene, walls, edge, x, y)
    return { body: 'handler', part, wall, x, y, text: `handler's ${part} at the ${wall}` }
  }
  robotClearance(walls, bodies, node)
  const edge = rectangleNearest.edge
  const cx = centreX(bodies, node)
  const cy = centreY(bodies, node)
  const cos = Math.cos(node.heading)
  const sin = Math.sin(node.heading)
  const x0 = walls.x0[edge] as number
  const y0 = walls.y0[edge] as number
  const x1 = walls.x1[edge] as number
  const y1 = walls.y1[edge] as number
  const corners = [
    ['front left corner', 1, 1],
    ['front right corner', 1, -1],
    ['rear left corner', -1, 1],
    ['rear right corner', -1, -1],
  ] as const
  let part: string = 'front left corner'
  let least = Number.POSITIVE_INFINITY
  let at = { x: cx, y: cy }
  for (const [name, ahead, left] of corners) {
    const px = cx + (ahead * bodies.a * cos) / 2 - (left * bodies.b * sin) / 2
    const py = cy + (ahead * bodies.a * sin) / 2 + (left * bodies.b * cos) / 2
    const distance = pointToSegment(px, py, x0, y0, x1, y1)
    if (distance < least) {
      least = distance
      part = name
      at = footOn(walls, edge, px, py)
    }
  }
  // A wall's corner may be nearer to a side than to any corner of the robot.
  for (const [px, py] of [
    [x0, y0],
    [x1, y1],
  ] as const) {
    const along = (px - cx) * cos + (py - cy) * sin
    const left = (py - cy) * cos - (px - cx) * sin
    const outAlong = Math.abs(along) - bodies.a / 2
    const outLeft = Math.abs(left) - bodies.b / 2
    if (outAlong > 0 && outLeft > 0) continue
    const distance = Math.max(outAlong, outLeft)
    if (distance > least + 1e-9) continue
    least = distance
    part = outLeft > outAlong ? (left > 0 ? 'left side' : 'right side') : along > 0 ? 'front' : 'rear'
    at = { x: px, y: py }
  }
  const wall = nameWall(scene, walls, edge, at.x, at.y)
  return { body: 'robot', part, wall, x: at.x, y: at.y, text: `robot's ${part} at the ${wall}` }
}

function footOn(walls: Boundary, edge: number, x: number, y: number): { x: number; y: number } {
  const tx = walls.tx[edge] as number
  const ty = walls.ty[edge] as number
  const x0 = walls.x0[edge] as number
  const y0 = walls.y0[edge] as number
  const along = Math.min(walls.length[edge] as number, Math.max(0, (x - x0) * tx + (y - y0) * ty))
  return { x: x0 + along * tx, y: y0 + along * ty }
}

function handlerPart(angle: number): string {
  if (Math.abs(angle) < Math.PI / 4) return 'front'
  if (Math.abs(angle) > (3 * Math.PI) / 4) return 'back'
  return angle > 0 ? 'left shoulder' : 'right shoulder'
}

/** The wall's own name, or that of the corner where two walls meet. */
function nameWall(scene: Scene, walls: Boundary, edge: number, x: number, y: number): string {
  const names = scene.walls ?? []
  const isCorner = Math.hypot(x - (walls.x0[edge] as number), y - (walls.y0[edge] as number)) < 1e-6
  const isEnd = Math.hypot(x - (walls.x1[edge] as number), y - (walls.y1[edge] as number)) < 1e-6
  if (!isCorner && !isEnd) return names[edge] ?? 'wall'
  const one = isCorner ? (walls.before[edge] as number) : edge
  const other = isCorner ? edge : walls.before.indexOf(edge)
  if (scene.form?.kind === 'turn' && walls.reflex[other]) return 'inner corner'
  const oneName = names[one] ?? 'wall'
  const otherName = names[other] ?? 'wall'
  const known = [oneName, otherName].find((name) => /jamb|tip|obstruction/.test(name))
  if (known) return known
  return oneName === otherName ? oneName : `corner of the ${oneName} and the ${otherName}`
}
