import type { Point, StripPart } from './layout-part.ts'
import { drawnLength, drawnWidth, type StripScale } from './layout-scale.ts'

/** A part laid on the drawing: pixels, y down, the walk's start at y = 0 and every part further up (less y). */
export interface PlacedPart {
  part: StripPart
  index: number
  start: Point
  end: Point
  /** Radians from straight up, left positive; never past 60 degrees. */
  heading: number
  /** Corners: left and right at the start, right and left at the end. */
  corners: [Point, Point, Point, Point]
  halfWidth: number
  /** The words of a turn that the drawing does not bend by: it is broken before this part. */
  broken: string | null
}

/** The drawing bends by a turn up to this much; beyond, it is broken and the angle written. */
export const greatestBend = Math.PI / 3
/** Height of a break, for one line of words. */
export const breakHeight = 36

/** Unit vector of travel for a heading. */
export function ahead(heading: number): Point {
  return { x: -Math.sin(heading), y: -Math.cos(heading) }
}

/** Unit vector to the left of a heading. */
export function leftOf(heading: number): Point {
  return { x: -Math.cos(heading), y: Math.sin(heading) }
}

function moved(from: Point, along: Point, by: number): Point {
  return { x: from.x + along.x * by, y: from.y + along.y * by }
}

/**
 * Lays all parts from the start of the walk. A turn bends the strip by its own angle; where that would pass 60 degrees
 * from straight up or leave the band, the strip is broken, the turn's words stand in the gap and it goes on straight up.
 */
export function placeParts(parts: readonly StripPart[], scale: StripScale): PlacedPart[] {
  const placed: PlacedPart[] = []
  const room = scale.band.right - scale.band.left
  let chain: PlacedPart[] = []
  let at: Point = { x: 0, y: 0 }
  let heading = 0
  let least = 0
  let greatest = 0

  const endChain = () => {
    const shift = (scale.band.left + scale.band.right - least - greatest) / 2
    for (const one of chain) {
      one.start.x += shift
      one.end.x += shift
    }
    mitre(chain)
    chain = []
  }

  parts.forEach((part, index) => {
    const turn = parts[index - 1]?.turn ?? 0
    const length = drawnLength(part) * scale.along
    const halfWidth = (drawnWidth(part) * scale.across) / 2
    const bent = heading + turn
    const end = moved(at, ahead(bent), length)
    const left = Math.min(least, at.x - halfWidth, end.x - halfWidth)
    const right = Math.max(greatest, at.x + halfWidth, end.x + halfWidth)
    const breaks = index > 0 && (Math.abs(turn) > greatestBend || Math.abs(bent) > greatestBend || right - left > room)
    if (breaks) {
      endChain()
      at = { x: 0, y: at.y - breakHeight }
      heading = 0
      least = -halfWidth
      greatest = halfWidth
    } else {
      heading = bent
      least = left
      greatest = right
    }
    const start = { ...at }
    const to = moved(start, ahead(heading), length)
    const one: PlacedPart = {
      part,
      index,
      start,
      end: to,
      heading,
      corners: [start, start, to, to],
      halfWidth,
      broken: breaks ? (parts[index - 1]?.turnText ?? 'goes on') : null,
    }
    chain.push(one)
    placed.push(one)
    at = { ...to }
  })
  endChain()
  return placed
}

/** Corners of every part of an unbroken run; neighbours share the bisector at a bend unless one is too short for it. */
function mitre(chain: readonly PlacedPart[]) {
  chain.forEach((one, i) => {
    const [startLeft, startRight] = cut(one, one.start, chain[i - 1])
    const [endLeft, endRight] = cut(one, one.end, chain[i + 1])
    one.corners = [startLeft, startRight, endRight, endLeft]
  })
}

function cut(one: PlacedPart, at: Point, neighbour: PlacedPart | undefined): [Point, Point] {
  const bend = neighbour ? neighbour.heading - one.heading : 0
  const length = Math.hypot(one.end.x - one.start.x, one.end.y - one.start.y)
  const fits = Math.abs(Math.tan(bend / 2)) * one.halfWidth < length / 2
  const normal = leftOf(one.heading + (fits ? bend / 2 : 0))
  const reach = one.halfWidth / (fits ? Math.cos(bend / 2) : 1)
  return [moved(at, normal, reach), moved(at, normal, -reach)]
}
