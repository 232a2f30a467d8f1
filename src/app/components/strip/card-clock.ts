/** When the plain stretch card of a part was first opened, kept over a restart of the app on this phone. */
const prefix = 'tautline.card.'

/** Milliseconds; `now` the first time. */
export function openedAt(part: string, now: number): number {
  try {
    const kept = Number(sessionStorage.getItem(prefix + part))
    if (kept > 0 && kept <= now) return kept
    sessionStorage.setItem(prefix + part, String(now))
  } catch {
    // A browser that keeps nothing starts the clock anew: the sweep is then marked too quick, never too slow.
  }
  return now
}
