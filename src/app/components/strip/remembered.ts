/** The last choice made for a name (the instrument of a quantity, the unit of a quantity) on this phone. */
const prefix = 'tautline.remembered.'

/** Null when nothing was remembered or the browser keeps nothing. */
export function remembered(name: string): string | null {
  try {
    return localStorage.getItem(prefix + name)
  } catch {
    return null
  }
}

/** A browser that refuses storage only forgets a convenience: nothing typed depends on it. */
export function remember(name: string, value: string) {
  try {
    localStorage.setItem(prefix + name, value)
  } catch {
    // Private windows refuse; the choice is then asked again.
  }
}
