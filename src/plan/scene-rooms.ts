import type { Point, Scene } from '../geometry/scene.ts'
import type { Metres } from '../units/quantity.ts'

/** How far past a door or back along the way the handler must come, metres. */
const past: Metres = 0.6
const doorDepth: Metres = 0.15

interface RoomTeam {
  a: Metres
  d: Metres
}

/**
 * A dead end in which the team turns round: a way of clear width `w`, closed after a clear depth `e`. The handler comes
 * in led, and must be led out again the way it came.
 */
export function deadEndScene({ w, e }: { w: Metres; e: Metres }, { a, d }: RoomTeam, separation: Metres): Scene {
  const back = separation + a + d + 2
  const polygon = box(-back, -w / 2, e, w / 2)
  return {
    polygon,
    holes: [],
    start: { x: -separation, y: 0, heading: 0 },
    goal: { polygon: box(-back, -w / 2, -separation - past, w / 2) },
    walls: ['right wall', 'end wall', 'left wall', 'the way back'],
  }
}

/**
 * A lift car of width `w` and depth `e` with its door of clear width `p` in the middle of one side, seen from inside:
 * robot at the back, handler by the door; the team turns round and leaves.
 */
export function liftScene(
  { w, p, e }: { w: Metres; p: Metres; e: Metres },
  { a, d }: RoomTeam,
  separation: Metres,
): Scene {
  const out = separation + a + d + 1.5
  const hall = Math.max(w, 2)
  const polygon: Point[] = [
    { x: 0, y: -w / 2 },
    { x: e, y: -w / 2 },
    { x: e, y: w / 2 },
    { x: 0, y: w / 2 },
    { x: 0, y: p / 2 },
    { x: -doorDepth, y: p / 2 },
    { x: -doorDepth, y: hall / 2 },
    { x: -doorDepth - out, y: hall / 2 },
    { x: -doorDepth - out, y: -hall / 2 },
    { x: -doorDepth, y: -hall / 2 },
    { x: -doorDepth, y: -p / 2 },
    { x: 0, y: -p / 2 },
  ]
  const nose = separation + a / 2 + d
  return {
    polygon: polygon.filter(({ x, y }, i) => {
      const next = polygon[(i + 1) % polygon.length]
      return next !== undefined && Math.hypot(next.x - x, next.y - y) > 1e-9
    }),
    holes: [],
    // As deep as the car lets the robot's nose come, with 0.05 m left.
    start: { x: e - nose - 0.05, y: 0, heading: 0 },
    goal: { polygon: box(-doorDepth - out, -hall / 2, -doorDepth - past, hall / 2) },
  }
}

function box(x0: Metres, y0: Metres, x1: Metres, y1: Metres): Point[] {
  return [
    { x: x0, y: y0 },
    { x: x1, y: y0 },
    { x: x1, y: y1 },
    { x: x0, y: y1 },
  ]
}
