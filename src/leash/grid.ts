import type { Scene } from '../geometry/scene.ts'
import type { Metres } from '../units/quantity.ts'

/** Places of a scene as a rectangular grid; node (i, j) is number j * columns + i. */
export interface Grid {
  x0: Metres
  y0: Metres
  dx: Metres
  dy: Metres
  columns: number
  rows: number
}

/**
 * The grid of a scene. It is anchored where a motion has no play sideways: on the start's centre line and on that of
 * the opening or exit beyond it, each on grid nodes, because a line between two nodes loses half a cell. Nothing in it
 * depends on the separation where the scene has a form, so that all separations share their tables.
 */
export function gridOf(scene: Scene, spacing: Metres): Grid {
  const xs = scene.polygon.map((p) => p.x)
  const ys = scene.polygon.map((p) => p.y)
  const lines = centreLines(scene)
  const [x0, dx, columns] = axis(Math.min(...xs), Math.max(...xs), lines.x, spacing)
  const [y0, dy, rows] = axis(Math.min(...ys), Math.max(...ys), lines.y, spacing)
  return { x0, y0, dx, dy, columns, rows }
}

function axis(low: Metres, high: Metres, lines: Metres[], spacing: Metres): [Metres, Metres, number] {
  const [anchor = low, other = anchor] = lines
  const apart = Math.abs(other - anchor)
  const d = apart < spacing / 4 ? spacing : apart / Math.max(1, Math.round(apart / spacing))
  const first = anchor - Math.ceil((anchor - low) / d) * d
  return [first, d, Math.ceil((high - first) / d) + 1]
}

/** Lines on which a motion has no play: at most two an axis. */
function centreLines(scene: Scene): { x: Metres[]; y: Metres[] } {
  const form = scene.form
  switch (form?.kind) {
    case undefined:
      return { x: [scene.start.x], y: [scene.start.y] }
    case 'turn':
      return { x: [0], y: [-form.w1 / 2] }
    case 'sidedoor':
      return { x: [form.p / 2], y: [-form.w / 2] }
    case 'indoor':
      return { x: [0], y: [0, form.o] }
    case 'uturn':
      return { x: [form.e / 2], y: [-form.w1 / 2, form.k + form.w2 / 2] }
    case 'chicane':
      return { x: [0], y: [0, form.j / 2] }
  }
}
