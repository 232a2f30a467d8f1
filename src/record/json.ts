/** Any JSON value. NaN, infinities, undefined and functions are none. */
export type Json = null | boolean | number | string | readonly Json[] | { readonly [key: string]: Json }

/** Deepest nesting of a fact's value and of a file. Honest ones need under 20. */
export const deepest = 60

/** Names that reach into every object when copied carelessly: no file and no fact may use them as keys. */
const reserved: ReadonlySet<string> = new Set(['__proto__', 'constructor', 'prototype'])

export function isReservedKey(key: string): boolean {
  return reserved.has(key)
}

export interface JsonFault {
  /** Keys and indexes from the value's root, joined by '/'; '' is the value itself. */
  path: string
  expected: string
  found: string
}

/** What makes `value` no plain JSON, or null. The gate that keeps NaN out of the record. */
export function jsonFault(value: unknown, path = '', depth = 0): JsonFault | null {
  if (value === null || typeof value === 'boolean' || typeof value === 'string') return null
  if (typeof value === 'number')
    return Number.isFinite(value) ? null : { path, expected: 'a finite number', found: String(value) }
  if (typeof value !== 'object') return { path, expected: 'a JSON value', found: typeof value }
  if (depth >= deepest) return { path, expected: `nesting of ${deepest} levels at most`, found: 'deeper nesting' }
  if (Array.isArray(value)) {
    for (let i = 0; i < value.length; i++) {
      const fault = jsonFault(value[i], join(path, String(i)), depth + 1)
      if (fault) return fault
    }
    return null
  }
  const prototype = Object.getPrototypeOf(value)
  if (prototype !== null && Object.getPrototypeOf(prototype) !== null)
    return { path, expected: 'a plain object', found: 'an object of a class' }
  for (const key of Object.keys(value)) {
    if (isReservedKey(key)) return { path: join(path, key), expected: 'another name', found: `the key "${key}"` }
    const fault = jsonFault((value as Record<string, unknown>)[key], join(path, key), depth + 1)
    if (fault) return fault
  }
  return null
}

/** Whether two JSON values are the same, whatever the order of their keys. */
export function sameJson(a: unknown, b: unknown): boolean {
  if (a === b) return true
  if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return false
  if (Array.isArray(a) || Array.isArray(b))
    return Array.isArray(a) && Array.isArray(b) && a.length === b.length && a.every((item, i) => sameJson(item, b[i]))
  const keys = Object.keys(a)
  return (
    keys.length === Object.keys(b).length &&
    keys.every((key) => Object.hasOwn(b, key) && sameJson(a[key as keyof typeof a], b[key as keyof typeof b]))
  )
}

/** The value as a text that does not depend on the order of keys. */
export function canonical(value: unknown): string {
  if (typeof value !== 'object' || value === null) return JSON.stringify(value) ?? 'null'
  if (Array.isArray(value)) return `[${value.map(canonical).join(',')}]`
  const entries = Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1))
  return `{${entries.map(([key, one]) => `${JSON.stringify(key)}:${canonical(one)}`).join(',')}}`
}

function join(path: string, key: string): string {
  return path === '' ? key : `${path}/${key}`
}
