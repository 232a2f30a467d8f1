import { Solver } from 'odex'
import { describe, expect, it } from 'vitest'
import { boundaryOf } from '../../src/geometry/boundary.ts'
import { certify } from '../../src/leash/certify.ts'
import { clearance } from '../../src/leash/clearance.ts'
import { arcFrom, motionOf, type Node, nodesOf } from '../../src/leash/nodes.ts'
import { reachOf, referenceBodies } from '../../src/leash/team.ts'
import { closedTurn } from '../../src/leash/turn.ts'
import { sceneOf, turn } from '../leash/cases.ts'

const point = { a: 1e-3, b: 1e-3, d: 0, r: 1e-3, g: 0, phiMax: Math.PI, sideways: true }

describe('a team without size at a right angle', () => {
  // The attachment runs up the far wall, the handler starts on the near one: the tractrix must pass the corner.
  it('passes 1 by 1 taut up to S = 2.073: S (ln cot(q/2) - cos q) <= w1 with sin q = w2/S', () => {
    const passes = (S: number) => {
      const q = Math.asin(1 / S)
      return S * (Math.log(1 / Math.tan(q / 2)) - Math.cos(q)) <= 1
    }
    expect(passes(2.0725)).toBe(true)
    expect(passes(2.0735)).toBe(false)
    const form = turn(1, 1, 90)
    if (form.kind !== 'turn') throw new Error('no turn')
    expect(closedTurn(form, point, 2.06)).toBeGreaterThan(0)
    expect(closedTurn(form, point, 2.085)).toBeLessThan(0)
  })

  it('the same condition at other widths', () => {
    for (const [w1, w2] of [
      [1, 1.5],
      [1.4, 1],
      [0.8, 0.9],
    ] as const) {
      let low = w2 * 1.0001
      let high = 20
      while (high - low > 1e-9) {
        const S = (low + high) / 2
        const q = Math.asin(w2 / S)
        if (S * (Math.log(1 / Math.tan(q / 2)) - Math.cos(q)) <= w1) low = S
        else high = S
      }
      const form = turn(w1, w2, 90)
      if (form.kind !== 'turn') throw new Error('no turn')
      expect(closedTurn(form, point, low * 0.99)).toBeGreaterThan(0)
      expect(closedTurn(form, point, low * 1.01)).toBeLessThan(0)
    }
  })

  it('taut passes only where a rod as long would: S <= (w1^(2/3) + w2^(2/3))^(3/2) (moving ladder, 1 by 1: 2.8284271)', () => {
    const rod = (a: number, b: number) => (a ** (2 / 3) + b ** (2 / 3)) ** 1.5
    expect(rod(1, 1)).toBeCloseTo(2.8284271, 7)
    expect(rod(2, 3)).toBeCloseTo(7.0234824, 7)
    for (const [a, b] of [
      [1, 1],
      [1, 2],
      [2, 1.2],
    ] as const) {
      const form = turn(a, b, 90)
      if (form.kind !== 'turn') throw new Error('no turn')
      expect(closedTurn(form, point, rod(a, b) * 1.001)).toBeLessThan(0)
    }
  })
})

describe('straight ways: (w - max(b, 2r))/2', () => {
  it('an opening in line', () => {
    const form = { kind: 'indoor', w: 1.6, p: 0.85, t: 0.1, o: 0, lead: 0.5, reverse: false } as const
    const scene = sceneOf(form, referenceBodies, 1.2)
    const { mTaut } = clearance(scene, referenceBodies, 1.2)
    expect(mTaut).toBeLessThanOrEqual((0.85 - 0.54) / 2)
    expect(mTaut).toBeGreaterThanOrEqual((0.85 - 0.54) / 2 - 0.002)
  })

  it('a robot wider than the handler is what counts', () => {
    const wide = { ...referenceBodies, b: 0.6 }
    const form = { kind: 'indoor', w: 1.6, p: 0.85, t: 0.1, o: 0, lead: 0.5, reverse: false } as const
    const { mTaut } = clearance(sceneOf(form, wide, 1.2), wide, 1.2)
    expect(mTaut).toBeLessThanOrEqual((0.85 - 0.6) / 2)
    expect(mTaut).toBeGreaterThanOrEqual((0.85 - 0.6) / 2 - 0.003)
  })
})

describe('the taut handler as a tractrix', () => {
  it('straight pull, leash at first square to it: y/S = sech(s/S) (0.8868 at 0.5, 0.6481 at 1, 0.2658 at 2, 0.0993 at 3)', () => {
    const S = 1
    const step = 0.01
    let node: Node = { x: 0, y: 0, psi: 0, length: S, heading: 0, slack: false }
    let q = Math.PI / 2
    const seen: number[] = []
    // The attachment at (1, 0) runs along +y.
    for (let i = 1; i <= 300; i++) {
      const next = 2 * Math.atan(Math.tan(q / 2) * Math.exp(-step / S))
      node = arcFrom(node, S * Math.log(Math.sin(q) / Math.sin(next)), q - next, 0)
      q = next
      if ([50, 100, 200, 300].includes(i)) seen.push(1 - node.x)
    }
    for (const [i, published] of [0.8868, 0.6481, 0.2658, 0.0993].entries()) expect(seen[i]).toBeCloseTo(published, 3)
  })

  it('an integrator of ordinary differential equations agrees with a whole motion within 0.1 mm', () => {
    const S = 1
    const form = turn(1, 1, 90)
    const scene = sceneOf(form, referenceBodies, S)
    const { motion } = clearance(scene, referenceBodies, S)
    const nodes = motion ? nodesOf(motion) : []
    expect(nodes.length).toBeGreaterThan(100)
    // d psi / dt = (dA x u) / S; the handler is the attachment less S u. Fed with the attachment's own way.
    const solver = new Solver(1)
    solver.absoluteTolerance = 1e-12
    solver.relativeTolerance = 1e-12
    let psi = (nodes[0] as Node).psi
    let worst = 0
    for (let k = 1; k < nodes.length; k++) {
      const from = nodes[k - 1] as Node
      const to = nodes[k] as Node
      const ax = (n: Node) => n.x + n.length * Math.cos(n.psi)
      const ay = (n: Node) => n.y + n.length * Math.sin(n.psi)
      const vx = ax(to) - ax(from)
      const vy = ay(to) - ay(from)
      psi = solver.solve((_, [p = 0]) => [(vy * Math.cos(p) - vx * Math.sin(p)) / S], 0, [psi], 1).y[0] as number
      worst = Math.max(worst, Math.hypot(ax(to) - S * Math.cos(psi) - to.x, ay(to) - S * Math.sin(psi) - to.y))
    }
    expect(worst).toBeLessThan(1e-4)
  })

  it('steady circle: the handler walks at sqrt(R^2 - S^2) (R 3.0, S 1.5: 2.5981)', () => {
    const S = 1.5
    let node: Node = { x: 0, y: 0, psi: 0, length: S, heading: 0, slack: false }
    // Pull and turn in the ratio of the circle: the handler's curve has radius pull / turn, the attachment's hypot with S.
    const radius = Math.sqrt(3 * 3 - S * S)
    expect(radius).toBeCloseTo(2.5981, 4)
    const centre = { x: 0, y: radius }
    for (let i = 0; i < 1000; i++) {
      node = arcFrom(node, 0.01 * radius, 0.01, 0)
      expect(Math.hypot(node.x - centre.x, node.y - centre.y)).toBeCloseTo(radius, 9)
      const ax = node.x + S * Math.cos(node.psi)
      const ay = node.y + S * Math.sin(node.psi)
      expect(Math.hypot(ax - centre.x, ay - centre.y)).toBeCloseTo(3, 9)
    }
  })

  it('a turn on the spot draws the handler in by 0.482 S at 90 degrees', () => {
    const S = 1
    let q = Math.PI / 2
    let node: Node = { x: -S, y: 0, psi: 0, length: S, heading: 0, slack: false }
    let worst = 0
    for (let i = 0; i < 400; i++) {
      const next = 2 * Math.atan(Math.tan(q / 2) * Math.exp(-0.01 / S))
      node = arcFrom(node, S * Math.log(Math.sin(q) / Math.sin(next)), q - next, 0)
      q = next
      // The attachment's bent path: along the x axis to the origin, then up the y axis.
      worst = Math.max(worst, Math.min(Math.abs(node.y), Math.abs(node.x)))
    }
    expect(worst).toBeGreaterThan(0.47)
    expect(worst).toBeLessThan(0.49)
  })
})

describe('the certificate against a motion whose clearance is known by hand', () => {
  it('straight on in a corridor: half the width less the handler, to 0.1 mm below', () => {
    const S = 1
    const form = turn(1.3, 1.3, 90)
    const built = sceneOf(form, referenceBodies, S)
    const scene = { ...built, goal: { polygon: box(-1.6, -1.3, -1.2, 0) } }
    const start: Node = { ...built.start, psi: 0, length: S, slack: false }
    const nodes = [start, arcFrom(start, 0.75, 0, 0)]
    const certificate = certify(scene, boundaryOf(scene), referenceBodies, S, motionOf(nodes, reachOf(referenceBodies)))
    expect(certificate.broken).toBeNull()
    expect(certificate.clearance).toBeLessThanOrEqual(0.65 - 0.27)
    expect(certificate.clearance).toBeGreaterThan(0.65 - 0.27 - 1e-4)
  })
})

function box(x0: number, y0: number, x1: number, y1: number) {
  return [
    { x: x0, y: y0 },
    { x: x1, y: y0 },
    { x: x1, y: y1 },
    { x: x0, y: y1 },
  ]
}
