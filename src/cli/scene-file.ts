import type { Point, Scene } from '../geometry/scene.ts'
import type { SceneProblem } from '../geometry/scene-problem.ts'

/** No scene of a few hundred corners is longer. */
const longest = 200_000

/**
 * Reads a scene a person or another program wrote: `{polygon: [{x, y}], holes?: [[{x, y}]], start: {x, y, heading},
 * goal: {polygon: [{x, y}]}, walls?: [names]}`; metres, heading in radians. Only its shape is checked here.
 */
export function readSceneFile(text: string): { ok: true; scene: Scene } | { ok: false; problem: SceneProblem } {
  if (text.length > longest) return wrong('', `a scene of at most ${longest} characters`, `${text.length}`)
  let value: unknown
  try {
    value = JSON.parse(text)
  } catch {
    return wrong('', 'JSON', 'something else')
  }
  if (!isRecord(value)) return wrong('', 'an object', nameOf(value))
  const polygon = pointsOf(value.polygon)
  if (!polygon) return wrong('polygon', 'a list of {x, y}', nameOf(value.polygon))
  const holes: Point[][] = []
  const given = value.holes ?? []
  if (!Array.isArray(given)) return wrong('holes', 'a list of rings', nameOf(given))
  for (const [i, hole] of given.entries()) {
    const points = pointsOf(hole)
    if (!points) return wrong(`holes/${i}`, 'a list of {x, y}', nameOf(hole))
    holes.push(points)
  }
  const { start, goal, walls } = value
  if (!isRecord(start) || !isNumber(start.x) || !isNumber(start.y) || !isNumber(start.heading))
    return wrong('start', '{x, y, heading} in metres and radians', nameOf(start))
  const area = isRecord(goal) ? pointsOf(goal.polygon) : null
  if (!area) return wrong('goal/polygon', 'a list of {x, y}', nameOf(goal))
  const scene: Scene = {
    polygon,
    holes,
    start: { x: start.x, y: start.y, heading: start.heading },
    goal: { polygon: area },
  }
  if (walls !== undefined) {
    if (!Array.isArray(walls) || walls.some((wall) => typeof wall !== 'string'))
      return wrong('walls', 'a list of names', nameOf(walls))
    scene.walls = walls
  }
  return { ok: true, scene }
}

function pointsOf(value: unknown): Point[] | null {
  if (!Array.isArray(value)) return null
  const points: Point[] = []
  for (const point of value) {
    if (!isRecord(point) || !isNumber(point.x) || !isNumber(point.y)) return null
    points.push({ x: point.x, y: point.y })
  }
  return points
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value)
}

function isNumber(value: unknown): value is number {
  return typeof value === 'number' && Number.isFinite(value)
}

function nameOf(value: unknown): string {
  if (value === undefined) return 'nothing'
  if (value === null) return 'null'
  return Array.isArray(value) ? 'a list' : `a ${typeof value}`
}

function wrong(path: string, expected: string, found: string): { ok: false; problem: SceneProblem } {
  return { ok: false, problem: { path, expected, found, whatToDo: 'Write the scene as README shows it.' } }
}
