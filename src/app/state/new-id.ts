let count = 0

/**
 * A new id: its kind, the time, a count, and 40 random bits against another phone at the same millisecond. Ids made one
 * after the other sort in that order.
 */
export function newId(kind: string): string {
  count += 1
  const random = crypto.getRandomValues(new Uint8Array(5))
  const tail = [...random].map((byte) => byte.toString(16).padStart(2, '0')).join('')
  return `${kind}-${Date.now().toString(36)}${count.toString(36).padStart(4, '0')}-${tail}`
}
