import Flatten from '@flatten-js/core'
import { describe, expect, it } from 'vitest'
import { boundaryOf, distanceToBoundary } from '../../src/geometry/boundary.ts'
import { rectangleClearance } from '../../src/geometry/rectangle.ts'
import { segmentToBoundary } from '../../src/geometry/segment.ts'
import { rectangleSweepClearance } from '../../src/geometry/sweep.ts'
import { randomFrom } from '../leash/cases.ts'

/** A room 4 by 3 with a thin wall from its floor and a post: thin enough to mistake one side for the other. */
const scene = {
  polygon: [
    { x: 0, y: 0 },
    { x: 1.95, y: 0 },
    { x: 1.95, y: 2 },
    { x: 2.05, y: 2 },
    { x: 2.05, y: 0 },
    { x: 4, y: 0 },
    { x: 4, y: 3 },
    { x: 0, y: 3 },
  ],
  holes: [
    [
      { x: 3, y: 1 },
      { x: 3, y: 1.4 },
      { x: 3.3, y: 1.4 },
      { x: 3.3, y: 1 },
    ],
  ],
}
const walls = boundaryOf(scene)
const segments = [scene.polygon, ...scene.holes].flatMap((ring) =>
  ring.map((p, i) => {
    const q = ring[(i + 1) % ring.length] as typeof p
    return new Flatten.Segment(new Flatten.Point(p.x, p.y), new Flatten.Point(q.x, q.y))
  }),
)

function isFree(x: number, y: number): boolean {
  const inRoom = x > 0 && x < 4 && y > 0 && y < 3
  const inWall = x >= 1.95 && x <= 2.05 && y <= 2
  const inPost = x >= 3 && x <= 3.3 && y >= 1 && y <= 1.4
  return inRoom && !inWall && !inPost
}

function corners(cx: number, cy: number, angle: number, half: number, side: number) {
  return [
    [1, 1],
    [-1, 1],
    [-1, -1],
    [1, -1],
  ].map(([along, left]) => {
    const x = (along as number) * half
    const y = (left as number) * side
    return { x: cx + x * Math.cos(angle) - y * Math.sin(angle), y: cy + x * Math.sin(angle) + y * Math.cos(angle) }
  })
}

function outline(points: { x: number; y: number }[]): Flatten.Segment[] {
  return points.map((p, i) => {
    const q = points[(i + 1) % points.length] as typeof p
    return new Flatten.Segment(new Flatten.Point(p.x, p.y), new Flatten.Point(q.x, q.y))
  })
}

describe('signed distance of a point, against another geometry library', () => {
  it('2000 random points: value and sign', () => {
    const random = randomFrom(1)
    for (let i = 0; i < 2000; i++) {
      const [x, y] = [random(-0.5, 4.5), random(-0.5, 3.5)]
      const point = new Flatten.Point(x, y)
      const away = Math.min(...segments.map((segment) => point.distanceTo(segment)[0]))
      expect(distanceToBoundary(walls, x, y), `${x} ${y}`).toBeCloseTo(isFree(x, y) ? away : -away, 9)
    }
  })

  it('both sides of a thin wall, its inside, its tip', () => {
    expect(distanceToBoundary(walls, 1.9, 1)).toBeCloseTo(0.05, 12)
    expect(distanceToBoundary(walls, 2.1, 1)).toBeCloseTo(0.05, 12)
    expect(distanceToBoundary(walls, 2, 1)).toBeCloseTo(-0.05, 12)
    expect(distanceToBoundary(walls, 2, 2.2)).toBeCloseTo(0.2, 12)
    expect(distanceToBoundary(walls, 2.15, 2.1)).toBeCloseTo(Math.hypot(0.1, 0.1), 12)
  })

  it('on a wall: zero', () => expect(Math.abs(distanceToBoundary(walls, 0, 1))).toBe(0))
})

describe('clearance of a rectangle, against another geometry library', () => {
  it('3000 random rectangles: exact when free, negative when not', () => {
    const random = randomFrom(2)
    let free = 0
    for (let i = 0; i < 3000; i++) {
      const [cx, cy, angle] = [random(0, 4), random(0, 3), random(-4, 4)]
      const [half, side] = [random(0.05, 0.4), random(0.05, 0.3)]
      const sides = outline(corners(cx, cy, angle, half, side))
      const away = Math.min(...sides.flatMap((one) => segments.map((segment) => one.distanceTo(segment)[0])))
      const got = rectangleClearance(walls, cx, cy, Math.cos(angle), Math.sin(angle), half, side)
      const inside = isFree(cx, cy) && away > 0 && !holdsPost(cx, cy, angle, half, side)
      if (inside) {
        free++
        // The other library takes points within 1e-6 for one.
        expect(got, `${cx} ${cy} ${angle} ${half} ${side}`).toBeCloseTo(away, 6)
      } else expect(got, `${cx} ${cy} ${angle} ${half} ${side}`).toBeLessThanOrEqual(1e-12)
    }
    expect(free).toBeGreaterThan(300)
  })

  it('pressed into a straight wall by 30 mm: minus 30 mm', () =>
    expect(rectangleClearance(walls, 0.8, 0.17, 1, 0, 0.3, 0.2)).toBeCloseTo(-0.03, 12))
})

/** Whether the rectangle covers the post or the wall's tip whole. */
function holdsPost(cx: number, cy: number, angle: number, half: number, side: number): boolean {
  return [
    { x: 3, y: 1 },
    { x: 1.95, y: 2 },
  ].some(({ x, y }) => {
    const dx = x - cx
    const dy = y - cy
    return (
      Math.abs(dx * Math.cos(angle) + dy * Math.sin(angle)) <= half &&
      Math.abs(dy * Math.cos(angle) - dx * Math.sin(angle)) <= side
    )
  })
}

describe('a segment and the walls', () => {
  it('through a thin wall: 0; past its tip: the distance to it', () => {
    expect(segmentToBoundary(walls, 1.5, 1, 2.5, 1)).toBe(0)
    expect(segmentToBoundary(walls, 1.5, 2.3, 2.5, 2.3)).toBeCloseTo(0.3, 12)
    expect(segmentToBoundary(walls, 1.5, 1.5, 1.5, 1.5)).toBeCloseTo(0.45, 12)
  })
})

describe('a rectangle that shifts without turning', () => {
  it('is never clearer than at any place between, and as clear as the least of 400 within 1e-4', () => {
    const random = randomFrom(3)
    let seen = 0
    for (let i = 0; i < 400; i++) {
      const [x0, y0, angle] = [random(0.4, 3.6), random(0.4, 2.6), random(-4, 4)]
      const [x1, y1] = [x0 + random(-0.02, 0.02), y0 + random(-0.02, 0.02)]
      const [c, s] = [Math.cos(angle), Math.sin(angle)]
      const at = (t: number) => rectangleClearance(walls, x0 + (x1 - x0) * t, y0 + (y1 - y0) * t, c, s, 0.2, 0.1)
      if (at(0) + at(1) <= Math.hypot(x1 - x0, y1 - y0)) continue
      seen++
      let least = Number.POSITIVE_INFINITY
      for (let k = 0; k <= 400; k++) least = Math.min(least, at(k / 400))
      const swept = rectangleSweepClearance(walls, x0, y0, x1, y1, c, s, 0.2, 0.1)
      expect(swept).toBeLessThanOrEqual(least + 1e-9)
      expect(swept).toBeGreaterThan(least - 1e-4)
    }
    expect(seen).toBeGreaterThan(100)
  })
})
