import type { Verdict } from '../../../judge/result.ts'
import { spreadLabels, type Wish } from './layout-labels.ts'
import type { Point, StripItem, StripPart, StripView } from './layout-part.ts'
import { ahead, breakHeight, leftOf, type PlacedPart, placeParts } from './layout-place.ts'
import { drawnLength, drawnWidth, type StripScale, stripScale, widestDrawn } from './layout-scale.ts'
import { wrap } from './layout-words.ts'

/** Everything the strip map draws, in the view's pixels. At most `mostNodes` SVG elements. */
export interface StripScene {
  scale: StripScale
  you: { at: Point; heading: number } | null
  parts: ScenePart[]
  marks: SceneMark[]
  breaks: { at: Point; text: string }[]
  labels: SceneLabel[]
  /** Words of visible things for which there was no room. */
  unsaid: number
  nodes: number
}

export interface ScenePart {
  id: string
  index: number
  current: boolean
  verdict: Verdict | null
  /** 'open': no length yet; its far end is not drawn. */
  open: boolean
  /** No width measured, or wider than can be drawn: its sides are dashed. */
  sidesUnsure: boolean
  corners: [Point, Point, Point, Point]
  /** The tape along the left side, from start to end. */
  tape: [Point, Point]
  ticks: { from: Point; to: Point }[]
  /** Metre figures beside the tape, the part you stand at only. */
  figures: { at: Point; text: string }[]
}

export interface SceneMark {
  key: string
  at: Point
  mark: StripItem['mark']
  /** A line right across the strip, for doors, steps and kerbs. */
  across: [Point, Point] | null
}

export interface SceneLabel {
  key: string
  lines: string[]
  /** Left end of the first baseline's line box. */
  x: number
  top: number
  leader: Point[]
  strong: boolean
  verdict: Verdict | null
}

export const mostNodes = 200

/** Bold words take this much more room. */
export const boldIsWider = 1.12

/** Where the dot stands, as a share of the height: the lower third. */
const youAt = 0.78

/** The scene for a box. `parts` is the whole walk; what lies outside the box is not drawn. */
export function layoutStrip(parts: readonly StripPart[], view: StripView): StripScene {
  const scale = stripScale(view, parts)
  const placed = placeParts(parts, scale)
  const here = placed[view.current]
  const shift = here ? view.height * youAt - here.start.y : 0
  const inView = placed
    .map((one) => movedDown(one, shift))
    .filter((one) => one.end.y < view.height && one.start.y > 0)
    .sort((a, b) => Math.abs(a.index - view.current) - Math.abs(b.index - view.current))

  const scene: StripScene = {
    scale,
    you: null,
    parts: [],
    marks: [],
    breaks: [],
    labels: [],
    unsaid: 0,
    nodes: 12,
  }
  const wishes: (Wish & { label: Omit<SceneLabel, 'top' | 'leader' | 'x'> })[] = []
  const wide = scale.words.right - scale.words.left
  const leading = Math.round(view.text * 1.3)
  const ask = (key: string, text: string, anchor: Point, rank: number, strong: boolean, verdict: Verdict | null) => {
    if (anchor.y < 0 || anchor.y > view.height) return
    const room = (wide - (verdict ? view.text + 4 : 0)) / (strong ? boldIsWider : 1)
    const lines = wrap(text, room, view.text, strong ? 6 : 4)
    wishes.push({ key, anchor, height: lines.length * leading, rank, label: { key, lines, strong, verdict } })
  }

  for (const one of inView) {
    const current = one.index === view.current
    const cost = 5 + one.part.items.length * 2 + (one.broken ? 2 : 0) + (current ? 8 : 0)
    if (scene.nodes + cost > mostNodes * 0.6) {
      scene.unsaid += 1 + one.part.items.length
      continue
    }
    scene.nodes += cost
    const away = Math.abs(one.index - view.current) * 100
    scene.parts.push(scenePart(one, current))
    if (one.broken) scene.breaks.push({ at: { x: one.start.x, y: one.start.y + breakHeight / 2 }, text: one.broken })
    ask(`part ${one.part.id}`, one.part.title, middleInView(one, view), away, current, one.part.verdict)
    const next = placed[one.index + 1]
    if (one.part.turnText && next && next.broken === null)
      ask(`turn ${one.part.id}`, one.part.turnText, one.corners[2], away + 40, false, null)
    one.part.items.forEach((item, i) => {
      const { at, across } = itemPlace(one, item, scale)
      if (at.y < 0 || at.y > view.height) return
      scene.marks.push({ key: item.id, at, mark: item.mark, across })
      ask(`item ${item.id}`, item.text, at, away + 1 + i + (item.mark === 'note' ? 20 : 0), false, null)
    })
    if (current) scene.you = { at: one.start, heading: one.heading }
  }

  const affordable = wishes
    .sort((a, b) => a.rank - b.rank)
    .filter((wish) => {
      const cost = wish.label.lines.length + 2 + (wish.label.verdict ? 1 : 0)
      if (scene.nodes + cost > mostNodes) return false
      scene.nodes += cost
      return true
    })
  const { labels, left } = spreadLabels(affordable, 6, view.height - 26)
  scene.unsaid += wishes.length - affordable.length + left
  for (const { key, top, anchor } of labels) {
    const wish = affordable.find((one) => one.key === key)
    if (!wish) continue
    const x = scale.words.left
    const knee = { x: Math.max(scale.band.right + 4, anchor.x), y: anchor.y }
    scene.labels.push({ ...wish.label, x, top, leader: [anchor, knee, { x: x - 4, y: top + leading / 2 }] })
  }
  return scene
}

function movedDown(one: PlacedPart, by: number): PlacedPart {
  const move = (p: Point): Point => ({ x: p.x, y: p.y + by })
  const [a, b, c, d] = one.corners
  return { ...one, start: move(one.start), end: move(one.end), corners: [move(a), move(b), move(c), move(d)] }
}

function between(a: Point, b: Point, share: number): Point {
  return { x: a.x + (b.x - a.x) * share, y: a.y + (b.y - a.y) * share }
}

/** The part's words point at the middle of what can be seen of it, at its right side. */
function middleInView(one: PlacedPart, view: StripView): Point {
  const top = Math.max(one.end.y, 0)
  const bottom = Math.min(one.start.y, view.height)
  const share = (one.start.y - (top + bottom) / 2) / (one.start.y - one.end.y)
  return between(one.corners[1], one.corners[2], share)
}

function scenePart(one: PlacedPart, current: boolean): ScenePart {
  const [startLeft, , , endLeft] = one.corners
  const length = drawnLength(one.part)
  const left = leftOf(one.heading)
  const ticks: ScenePart['ticks'] = []
  const figures: ScenePart['figures'] = []
  for (let metre = 0; metre <= length; metre++) {
    const at = between(startLeft, endLeft, metre / length)
    const reach = metre % 5 === 0 ? 9 : 5
    ticks.push({ from: at, to: { x: at.x + left.x * reach, y: at.y + left.y * reach } })
    if (current && metre > 0 && metre % 5 === 0 && figures.length < 6)
      figures.push({ at: { x: at.x + left.x * 13, y: at.y + left.y * 13 }, text: String(metre) })
  }
  return {
    id: one.part.id,
    index: one.index,
    current,
    verdict: one.part.verdict,
    open: one.part.length === null,
    sidesUnsure: one.part.width === null || one.part.width > widestDrawn,
    corners: one.corners,
    tape: [
      { x: startLeft.x + left.x * 4.5, y: startLeft.y + left.y * 4.5 },
      { x: endLeft.x + left.x * 4.5, y: endLeft.y + left.y * 4.5 },
    ],
    ticks,
    figures,
  }
}

/** At its distance along and its offset to its side; a thing whose place is not said stands at the middle or the side. */
function itemPlace(one: PlacedPart, item: StripItem, scale: StripScale): { at: Point; across: [Point, Point] | null } {
  const length = drawnLength(one.part)
  const share = Math.min(Math.max((item.along ?? length / 2) / length, 0), 1)
  const [startLeft, startRight, endRight, endLeft] = one.corners
  const centre = between(one.start, one.end, share)
  if (item.side === 'across')
    return {
      at: between(startRight, endRight, share),
      across: [between(startLeft, endLeft, share), between(startRight, endRight, share)],
    }
  if (item.side === 'centre') return { at: centre, across: null }
  const half = drawnWidth(one.part) / 2
  const off = Math.min(item.offset ?? half, half + 0.6) * scale.across
  const left = leftOf(one.heading)
  const sign = item.side === 'left' ? 1 : -1
  const x = Math.min(Math.max(centre.x + left.x * off * sign, 8), scale.band.right + 8)
  return { at: { x, y: centre.y + left.y * off * sign }, across: null }
}

/** Corners of the nose ahead of the dot. */
export function nose(you: { at: Point; heading: number }): [Point, Point, Point] {
  const along = ahead(you.heading)
  const left = leftOf(you.heading)
  const place = (a: number, l: number): Point => ({
    x: you.at.x + along.x * a + left.x * l,
    y: you.at.y + along.y * a + left.y * l,
  })
  return [place(20, 0), place(8, 7), place(8, -7)]
}
