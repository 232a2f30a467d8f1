import { signedArea } from './boundary.ts'
import type { Point, Scene } from './scene.ts'
import type { SceneProblem } from './scene-problem.ts'

/** More corners than a surveyed pinch ever has; the search's time grows with them. */
export const mostVertices = 200

/** Walls shorter than this are a slip of the pen, metres. */
const shortest = 1e-6

/** Finds what is wrong with a scene's rings; null where they bound a region. Start and goal are checked elsewhere. */
export function checkRings(scene: Pick<Scene, 'polygon' | 'holes'>): SceneProblem | null {
  const total = scene.holes.reduce((sum, hole) => sum + hole.length, scene.polygon.length)
  if (total > mostVertices)
    return problem('polygon', `at most ${mostVertices} corners`, `${total}`, 'Leave out corners that bound nothing.')
  const rings: [string, readonly Point[]][] = [['polygon', scene.polygon]]
  for (const [i, hole] of scene.holes.entries()) rings.push([`holes/${i}`, hole])
  for (const [path, ring] of rings) {
    const wrong = checkRing(path, ring)
    if (wrong) return wrong
  }
  for (let i = 0; i < rings.length; i++)
    for (let j = i; j < rings.length; j++) {
      const [path, ring] = rings[i] as [string, readonly Point[]]
      const [other, otherRing] = rings[j] as [string, readonly Point[]]
      const at = crossing(ring, otherRing, i === j)
      if (at)
        return problem(
          path,
          i === j ? 'a ring that does not cross itself' : `walls that keep clear of ${other}`,
          `edge ${at[0]} meets edge ${at[1]}`,
          'Walk the walls in order and write each corner once.',
        )
    }
  for (const [path, hole] of rings.slice(1))
    if (!holds(scene.polygon, hole[0] as Point))
      return problem(path, 'an obstruction inside the outer wall', 'one outside it', 'Move it in or leave it out.')
  return null
}

function checkRing(path: string, ring: readonly Point[]): SceneProblem | null {
  if (ring.length < 3)
    return problem(path, 'at least three corners', `${ring.length}`, 'Write every corner of the ring once.')
  for (const [i, point] of ring.entries()) {
    if (!(Number.isFinite(point.x) && Number.isFinite(point.y)) || Math.hypot(point.x, point.y) > 1000)
      return problem(`${path}/${i}`, 'coordinates in metres', `${point.x}, ${point.y}`, 'Write numbers under 1000 m.')
    const next = ring[(i + 1) % ring.length] as Point
    if (Math.hypot(next.x - point.x, next.y - point.y) < shortest)
      return problem(`${path}/${i}`, 'corners apart from each other', 'the same corner twice', 'Leave out the repeat.')
  }
  if (Math.abs(signedArea(ring)) < 1e-6)
    return problem(path, 'a ring that bounds an area', 'none', 'Walk the walls in order.')
  return null
}

/** Edges that share a point they should not share; neighbours of one ring may share their corner only. */
function crossing(ring: readonly Point[], other: readonly Point[], same: boolean): [number, number] | null {
  for (let i = 0; i < ring.length; i++)
    for (let j = same ? i + 1 : 0; j < other.length; j++) {
      const a = ring[i] as Point
      const b = ring[(i + 1) % ring.length] as Point
      const c = other[j] as Point
      const d = other[(j + 1) % other.length] as Point
      if (same && j === i + 1) {
        if (foldsBack(a, b, d)) return [i, j]
      } else if (same && (j + 1) % other.length === i) {
        if (foldsBack(c, a, b)) return [i, j]
      } else if (touch(a, b, c, d)) return [i, j]
    }
  return null
}

function side(a: Point, b: Point, c: Point): number {
  return (b.x - a.x) * (c.y - a.y) - (b.y - a.y) * (c.x - a.x)
}

/** The wall b-c runs back over the wall a-b. */
function foldsBack(a: Point, b: Point, c: Point): boolean {
  return side(a, b, c) === 0 && (a.x - b.x) * (c.x - b.x) + (a.y - b.y) * (c.y - b.y) > 0
}

function touch(a: Point, b: Point, c: Point, d: Point): boolean {
  const c1 = side(a, b, c)
  const d1 = side(a, b, d)
  const a1 = side(c, d, a)
  const b1 = side(c, d, b)
  if (((c1 > 0 && d1 < 0) || (c1 < 0 && d1 > 0)) && ((a1 > 0 && b1 < 0) || (a1 < 0 && b1 > 0))) return true
  const on = (p: Point, q: Point, s: number, r: Point) =>
    s === 0 &&
    Math.min(p.x, q.x) <= r.x &&
    r.x <= Math.max(p.x, q.x) &&
    Math.min(p.y, q.y) <= r.y &&
    r.y <= Math.max(p.y, q.y)
  return on(a, b, c1, c) || on(a, b, d1, d) || on(c, d, a1, a) || on(c, d, b1, b)
}

/** Whether a ring encloses a point (ray crossing); points on the ring may fall either way. */
export function holds(ring: readonly Point[], point: Point): boolean {
  let inside = false
  for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
    const a = ring[i] as Point
    const b = ring[j] as Point
    if (a.y > point.y !== b.y > point.y && point.x < ((b.x - a.x) * (point.y - a.y)) / (b.y - a.y) + a.x)
      inside = !inside
  }
  return inside
}

function problem(path: string, expected: string, found: string, whatToDo: string): SceneProblem {
  return { path, expected, found, whatToDo }
}
