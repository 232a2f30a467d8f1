/** Milliseconds before the next try after `failures` in a row: doubling from two seconds, five minutes at most, spread so that phones do not come all at once. `random`: 0 to 1. */
export function waitBefore(failures: number, random: number): number {
  const whole = Math.min(5 * 60_000, 1000 * 2 ** Math.min(failures, 12))
  return Math.round(whole * (0.5 + random / 2))
}

export interface Retrying {
  /** Something to send, or the network is back: try now. One that is under way is followed by another. */
  nudge(): void
  stop(): void
}

/**
 * Runs `run` when nudged, one at a time, and again by itself while it says `later`.
 * `after`: calls back in so many milliseconds and returns how to call it off.
 */
export function startRetrying(
  run: () => Promise<'done' | 'later'>,
  after: (milliseconds: number, call: () => void) => () => void,
  random: () => number = Math.random,
): Retrying {
  let failures = 0
  let running = false
  let nudged = false
  let stopped = false
  let callOff: () => void = () => undefined
  const attempt = async () => {
    callOff()
    running = true
    nudged = false
    const ended = await run().catch(() => 'later' as const)
    running = false
    if (stopped) return
    failures = ended === 'later' ? failures + 1 : 0
    if (nudged) void attempt()
    else if (ended === 'later') callOff = after(waitBefore(failures, random()), () => void attempt())
  }
  return {
    nudge() {
      nudged = true
      if (!running && !stopped) void attempt()
    },
    stop() {
      stopped = true
      callOff()
    },
  }
}
