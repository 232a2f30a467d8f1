import type { Boundary } from '../geometry/boundary.ts'
import { lengthOf } from '../geometry/segment.ts'
import type { Metres, Radians } from '../units/quantity.ts'
import type { Bodies } from './answer.ts'

/**
 * Every margin of a pose on its own, smooth, with its slope by handler x, handler y, leash direction, heading: corner by
 * wall, wall by wall. The least of the clearances is the pose's clearance; kept apart, a polisher sees past the kinks.
 */
export interface Margins {
  count: number
  /** Metres. Constraints that are no clearances (leash, angle, bodies apart, goal) are met at 0 and above. */
  value: Float64Array
  /** Four slopes a margin. */
  slope: Float64Array
  /** 1 for a clearance, 0 for a constraint. */
  clears: Uint8Array
}

const most = 256

export function makeMargins(): Margins {
  return {
    count: 0,
    value: new Float64Array(most),
    slope: new Float64Array(most * 4),
    clears: new Uint8Array(most),
  }
}

/** What a radian of leash angle weighs against a metre of clearance. */
const angleWeight = 0.15
/** The leash is kept this far from corners, so that the certificate can prove it, metres. */
const leashSpare = 0.002
const angleSpare = 1e-3

export interface PoseTerms {
  walls: Boundary
  bodies: Bodies
  phi: Radians
  drift: Metres
}

/**
 * Gathers the margins below `above` (clearances) of one pose. `slack` poses have no limit to the leash's angle; they
 * keep the bodies apart, and the handler clear when drawn `drift` towards the robot.
 */
export function gather(
  out: Margins,
  terms: PoseTerms,
  hx: Metres,
  hy: Metres,
  psi: Radians,
  length: Metres,
  theta: Radians,
  slack: boolean,
  above: Metres,
): void {
  const { walls, bodies } = terms
  out.count = 0
  const cu = Math.cos(psi)
  const su = Math.sin(psi)
  const ct = Math.cos(theta)
  const st = Math.sin(theta)
  const half = bodies.a / 2
  const side = bodies.b / 2
  const cx = hx + length * cu + bodies.d * ct
  const cy = hy + length * su + bodies.d * st
  // Slopes of the centre by direction and heading.
  const cxPsi = -length * su
  const cyPsi = length * cu
  const cxTheta = -bodies.d * st
  const cyTheta = bodies.d * ct
  const reach = lengthOf(half, side)
  for (let i = 0; i < walls.count; i++) {
    const x0 = walls.x0[i] as number
    const y0 = walls.y0[i] as number
    const tx = walls.tx[i] as number
    const ty = walls.ty[i] as number
    const nx = walls.nx[i] as number
    const ny = walls.ny[i] as number
    const size = walls.length[i] as number
    const hAlong = (hx - x0) * tx + (hy - y0) * ty
    const hAcross = (hx - x0) * nx + (hy - y0) * ny
    if (hAcross > 0 && hAlong > 0 && hAlong < size && hAcross - bodies.r < above)
      add(out, hAcross - bodies.r, nx, ny, 0, 0, 1)
    if (slack && terms.drift > 0) {
      const along = hAlong + terms.drift * (cu * tx + su * ty)
      const across = hAcross + terms.drift * (cu * nx + su * ny)
      if (across > 0 && along > 0 && along < size && across - bodies.r < above)
        add(out, across - bodies.r, nx, ny, terms.drift * (cu * ny - su * nx), 0, 1)
    }
    const cAcross = (cx - x0) * nx + (cy - y0) * ny
    if (Math.abs(cAcross) < reach + Math.max(above, 0)) {
      for (let corner = 0; corner < 4; corner++) {
        const along = corner & 1 ? half : -half
        const left = corner & 2 ? side : -side
        const px = along * ct - left * st
        const py = along * st + left * ct
        const foot = (cx + px - x0) * tx + (cy + py - y0) * ty
        if (foot <= 0 || foot >= size) continue
        const across = cAcross + px * nx + py * ny
        // A corner behind a wall counts only where the centre is before it: else it is round a bend.
        if (across >= above || (across < 0 && cAcross < 0)) continue
        add(out, across, nx, ny, cxPsi * nx + cyPsi * ny, (cxTheta - py) * nx + (cyTheta + px) * ny, 1)
      }
    }
    if (walls.reflex[i]) {
      cornerMargins(out, terms, i, hx, hy, psi, length, slack, above, cx, cy, ct, st)
    }
  }
  if (slack) addApart(out, terms, hx, hy, cu, su, length, ct, st)
  else {
    const angle = theta - psi
    const turned = angle - 2 * Math.PI * Math.round(angle / (2 * Math.PI))
    const sign = turned > 0 ? 1 : -1
    add(
      out,
      angleWeight * (terms.phi - angleSpare - Math.abs(turned)),
      0,
      0,
      angleWeight * sign,
      -angleWeight * sign,
      0,
    )
  }
}

function cornerMargins(
  out: Margins,
  terms: PoseTerms,
  i: number,
  hx: number,
  hy: number,
  psi: number,
  length: number,
  slack: boolean,
  above: number,
  cx: number,
  cy: number,
  ct: number,
  st: number,
): void {
  const { walls, bodies } = terms
  const vx = walls.x0[i] as number
  const vy = walls.y0[i] as number
  const before = walls.before[i] as number
  // Handler against the corner, where the corner is what is nearest.
  const dx = hx - vx
  const dy = hy - vy
  const along = dx * (walls.tx[i] as number) + dy * (walls.ty[i] as number)
  const alongBefore = dx * (walls.tx[before] as number) + dy * (walls.ty[before] as number)
  if (along <= 0 && alongBefore >= 0) {
    const distance = lengthOf(dx, dy)
    if (distance - bodies.r < above && distance > 1e-9)
      add(out, distance - bodies.r, dx / distance, dy / distance, 0, 0, 1)
  }
  const cu = Math.cos(psi)
  const su = Math.sin(psi)
  if (slack && terms.drift > 0) {
    const ex = dx + terms.drift * cu
    const ey = dy + terms.drift * su
    const distance = lengthOf(ex, ey)
    if (distance - bodies.r < above && distance > 1e-9)
      add(out, distance - bodies.r, ex / distance, ey / distance, (terms.drift * (ey * cu - ex * su)) / distance, 0, 1)
  }
  leashMargin(out, terms, i, hx, hy, cu, su, length)
  // Robot's sides against the corner, in the robot's own axes.
  const far = (bodies.a + bodies.b) / 2 + above
  if (far < 0 || (vx - cx) * (vx - cx) + (vy - cy) * (vy - cy) > far * far) return
  const qx = (vx - cx) * ct + (vy - cy) * st
  const qy = (vy - cy) * ct - (vx - cx) * st
  const outX = Math.abs(qx) - bodies.a / 2
  const outY = Math.abs(qy) - bodies.b / 2
  let distance: number
  let gx = 0
  let gy = 0
  if (outX > 0 && outY > 0) {
    distance = lengthOf(outX, outY)
    gx = (Math.sign(qx) * outX) / distance
    gy = (Math.sign(qy) * outY) / distance
  } else if (outX > outY) {
    distance = outX
    gx = Math.sign(qx)
  } else {
    distance = outY
    gy = Math.sign(qy)
  }
  if (distance < above) {
    // Moving the centre by w moves the corner by -w; turning moves it against the turn.
    const wx = -(gx * ct - gy * st)
    const wy = -(gx * st + gy * ct)
    add(out, distance, wx, wy, length * (cu * wy - su * wx), bodies.d * (ct * wy - st * wx) + gx * qy - gy * qx, 1)
  }
  leashMargin(out, terms, i, hx, hy, cu, su, length)
}

/** The leash against a corner: positive while it passes on the free side. */
function leashMargin(
  out: Margins,
  terms: PoseTerms,
  i: number,
  hx: number,
  hy: number,
  cu: number,
  su: number,
  length: number,
): void {
  const { walls } = terms
  const vx = walls.x0[i] as number
  const vy = walls.y0[i] as number
  const before = walls.before[i] as number
  const along = (vx - hx) * cu + (vy - hy) * su
  if (along <= 0 || along >= length) return
  const across = (vy - hy) * cu - (vx - hx) * su
  if (Math.abs(across) > 0.3) return
  // The solid lies against the mean of the normals of both walls; the leash must pass on the other side.
  const solid =
    -((walls.nx[i] as number) + (walls.nx[before] as number)) * -su -
    ((walls.ny[i] as number) + (walls.ny[before] as number)) * cu
  const sign = across * solid >= 0 ? 1 : -1
  // On the wrong side of a corner it is wrong only if it crosses a wall there: another wall may lie between.
  if (sign < 0 && !crosses(walls, i, hx, hy, cu, su, length) && !crosses(walls, before, hx, hy, cu, su, length)) return
  const value = sign * Math.abs(across) - leashSpare
  // d across: by h (su, -cu), by psi -along.
  const towards = Math.sign(across) * sign
  add(out, value, towards * su, -towards * cu, -towards * along, 0, 0)
}

function crosses(walls: Boundary, i: number, hx: number, hy: number, cu: number, su: number, length: number): boolean {
  const nx = walls.nx[i] as number
  const ny = walls.ny[i] as number
  const off = (hx - (walls.x0[i] as number)) * nx + (hy - (walls.y0[i] as number)) * ny
  const end = off + length * (cu * nx + su * ny)
  if (off > 0 === end > 0) return false
  const one = ((walls.y0[i] as number) - hy) * cu - ((walls.x0[i] as number) - hx) * su
  const other = ((walls.y1[i] as number) - hy) * cu - ((walls.x1[i] as number) - hx) * su
  return one > 0 !== other > 0
}

/** Slack bodies kept apart; only the attachment's end of the leash moves, so only direction and heading have slopes. */
function addApart(
  out: Margins,
  terms: PoseTerms,
  hx: number,
  hy: number,
  cu: number,
  su: number,
  length: number,
  ct: number,
  st: number,
): void {
  const { bodies, drift } = terms
  const at = (c: number, s: number, c2: number, s2: number) => {
    const ax = (length - drift) * c + bodies.d * c2
    const ay = (length - drift) * s + bodies.d * s2
    const qx = -(ax * c2 + ay * s2)
    const qy = -(ay * c2 - ax * s2)
    const outX = Math.max(0, Math.abs(qx) - bodies.a / 2)
    const outY = Math.max(0, Math.abs(qy) - bodies.b / 2)
    return lengthOf(outX, outY) - bodies.r - bodies.g - 1e-3
  }
  const here = at(cu, su, ct, st)
  if (here > 0.1 || Number.isNaN(hx + hy)) return
  const e = 1e-5
  const byPsi = (at(cu - e * su, su + e * cu, ct, st) - here) / e
  const byTheta = (at(cu, su, ct - e * st, st + e * ct) - here) / e
  add(out, here, 0, 0, byPsi, byTheta, 0)
}

/** Adds a margin by hand, as the goal's are. */
export function add(
  out: Margins,
  value: number,
  byX: number,
  byY: number,
  byPsi: number,
  byTheta: number,
  clears: 0 | 1,
): void {
  if (out.count >= most) return
  const at = out.count++
  out.value[at] = value
  out.slope[at * 4] = byX
  out.slope[at * 4 + 1] = byY
  out.slope[at * 4 + 2] = byPsi
  out.slope[at * 4 + 3] = byTheta
  out.clears[at] = clears
}
