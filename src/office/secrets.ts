import { createHash, randomBytes, randomInt, timingSafeEqual } from 'node:crypto'

/** A 256-bit secret for a header or an address. */
export function newToken(): string {
  return randomBytes(32).toString('base64url')
}

/** Letters that are not mistaken for one another when read out. */
const letters = 'ABCDEFGHJKMNPQRSTVWXYZ23456789'

/** Twelve letters, 58 bits, for ten minutes and one use. */
export function newCode(): string {
  return Array.from({ length: 12 }, () => letters[randomInt(letters.length)]).join('')
}

/** A code as a person may type it: lower case, in groups. */
export function plainCode(typed: string): string {
  return typed.toUpperCase().replace(/[\s-]/g, '')
}

/** All that the office keeps of a secret. */
export function hashOf(secret: string): string {
  return createHash('sha256').update(secret).digest('hex')
}

/** Compares two hashes in a time that does not tell where they differ. */
export function sameHash(a: string, b: string): boolean {
  const [one, other] = [Buffer.from(a), Buffer.from(b)]
  return one.length === other.length && timingSafeEqual(one, other)
}

export function newId(kind: string): string {
  return `${kind}-${randomBytes(10).toString('hex')}`
}

/** An id that sorts by time, for lists that are read in order. */
export function timedId(now: number): string {
  return `${now.toString(36).padStart(9, '0')}-${randomBytes(6).toString('hex')}`
}
