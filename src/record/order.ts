/**
 * Where an entity stands in its list. A key is a path of steps (fraction, device, count), compared step by step, a
 * shorter path first. A device that goes on behind its own last entry only counts up, so that two people's runs, made
 * at once behind the same entry, stay together instead of interleaving.
 */
export type OrderStep = readonly [fraction: string, device: string, count: number]
export type OrderKey = readonly OrderStep[]

const digits = '0123456789abcdefghijklmnopqrstuvwxyz'

/** Negative: `a` comes first; 0: the same key. */
export function compareOrder(a: OrderKey, b: OrderKey): number {
  for (let i = 0; i < a.length && i < b.length; i++) {
    const difference = compareStep(a[i] as OrderStep, b[i] as OrderStep)
    if (difference !== 0) return difference
  }
  return a.length - b.length
}

/** A key between two neighbours (null: the list's end on that side), made by `device`. */
export function orderBetween(before: OrderKey | null, after: OrderKey | null, device: string): OrderKey {
  const next = before && continued(before, device)
  if (next && (after === null || compareOrder(next, after) < 0)) return next
  const low = before?.[0]
  const high = after?.[0]
  if (!low || !high) return [[fractionBetween(low?.[0] ?? '', high?.[0] ?? null), device, 0]]
  if (low[0] < high[0]) return [[fractionBetween(low[0], high[0]), device, 0]]
  const rest = before.slice(1)
  // Same fraction: go one step deeper, under the entry before.
  const limit = compareStep(low, high) === 0 ? after.slice(1) : null
  return [low, ...orderBetween(rest.length > 0 ? rest : null, limit, device)]
}

/** The key as kept in a fact, or null where a fact carries none that can be read. */
export function readOrderKey(value: unknown): OrderKey | null {
  if (!Array.isArray(value) || value.length === 0) return null
  const readable = value.every(
    (step) =>
      Array.isArray(step) &&
      step.length === 3 &&
      typeof step[0] === 'string' &&
      /^[0-9a-z]*[1-9a-z]$/.test(step[0]) &&
      typeof step[1] === 'string' &&
      Number.isSafeInteger(step[2]),
  )
  return readable ? (value as unknown as OrderKey) : null
}

function continued(key: OrderKey, device: string): OrderKey | null {
  const last = key.at(-1)
  return last && last[1] === device ? [...key.slice(0, -1), [last[0], device, last[2] + 1]] : null
}

function compareStep(a: OrderStep, b: OrderStep): number {
  return compareText(a[0], b[0]) || compareText(a[1], b[1]) || a[2] - b[2]
}

function compareText(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0
}

/** A base-36 fraction strictly between two others; `high` null stands for 1. Never ends in 0, so there is always room below. */
function fractionBetween(low: string, high: string | null): string {
  let shared = ''
  for (let i = 0; ; i++) {
    const from = digits.indexOf(low[i] ?? '0')
    const to = high === null ? digits.length : digits.indexOf(high[i] ?? '0')
    if (from === to) {
      shared += digits[from]
      continue
    }
    if (to - from > 1) return shared + digits[Math.floor((from + to) / 2)]
    // Neighbouring digits: keep the lower one, and what follows is bounded by 1.
    return shared + digits[from] + fractionBetween(low.slice(i + 1), null)
  }
}
