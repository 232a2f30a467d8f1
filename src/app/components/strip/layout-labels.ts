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
  // Height of all words above each: with it taken off, "no overlap" means only "never less than the one before".
  let above = 0
  const offsets = kept.map((wish) => {
    const own = above
    above += wish.height + gap
    return own
  })
  const wanted = kept.map((wish, i) => wish.anchor.y - wish.height / 2 - (offsets[i] ?? 0))
  const greatest = bottom - above + gap
  const labels = nearestRising(wanted).map((value, i) => {
    const { key, anchor, height } = kept[i] as Wish
    return { key, anchor, height, top: Math.max(Math.min(value, greatest), top) + (offsets[i] ?? 0) }
  })
  return { labels, left: wishes.length - kept.length }
}

/** The rising sequence nearest to `values` (least squares): neighbours in the wrong order share their mean. */
function nearestRising(values: readonly number[]): number[] {
  const pools: { sum: number; count: number }[] = []
  for (const value of values) {
    let pool = { sum: value, count: 1 }
    for (let last = pools.at(-1); last && last.sum / last.count > pool.sum / pool.count; last = pools.at(-1)) {
      pool = { sum: last.sum + pool.sum, count: last.count + pool.count }
      pools.pop()
    }
    pools.push(pool)
  }
  return pools.flatMap(({ sum, count }) => Array.from({ length: count }, () => sum / count))
}
