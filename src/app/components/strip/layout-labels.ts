import type { Point } from './layout-part.ts'

/** Words that want to stand beside a point of the drawing. */
export interface Wish {
  key: string
  anchor: Point
  /** Height of the words with their leading, px. */
  height: number
  /** Small numbers are kept first when there is no room for all. */
  rank: number
}

export interface PlacedLabel {
  key: string
  top: number
  height: number
  anchor: Point
}

const gap = 4

/**
 * Puts words in one column between `top` and `bottom`, each as near its anchor as the others let it, in the anchors'
 * order, so that no words overlap and no leader lines cross. What has no room is left out, highest rank first:
 * `left` says how many.
 */
export function spreadLabels(
  wishes: readonly Wish[],
  top: number,
  bottom: number,
): { labels: PlacedLabel[]; left: number } {
  const kept: Wish[] = []
  let used = 0
  for (const wish of [...wishes].sort((a, b) => a.rank - b.rank)) {
    if (used + wish.height + gap > bottom - top + gap) continue
    used += wish.height + gap
    kept.push(wish)
  }
  kept.sort((a, b) => a.anchor.y - b.anchor.y || a.rank - b.rank)
  const labels = kept.map((wish) => ({
    key: wish.key,
    top: wish.anchor.y - wish.height / 2,
    height: wish.height,
    anchor: wish.anchor,
  }))
  let free = top
  for (const label of labels) {
    label.top = Math.max(label.top, free)
    free = label.top + label.height + gap
  }
  let ceiling = bottom
  for (const label of [...labels].reverse()) {
    label.top = Math.min(label.top, ceiling - label.height)
    ceiling = label.top - gap
  }
  return { labels, left: wishes.length - kept.length }
}
