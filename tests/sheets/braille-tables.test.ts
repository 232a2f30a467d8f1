import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { dirname, join } from 'node:path'
import { expect, test } from 'vitest'
import { tableFiles } from '../../src/sheets/braille/louis.ts'

const tables = join(dirname(createRequire(import.meta.url).resolve('liblouis-build')), 'tables')

/** A table and all that it includes, and these in turn. */
function closure(name: string, found = new Set<string>()): Set<string> {
  if (found.has(name)) return found
  found.add(name)
  const text = readFileSync(join(tables, name), 'utf8')
  for (const [, included = ''] of text.matchAll(/^[ \t]*include[ \t]+(\S+)/gm)) closure(included, found)
  return found
}

test('the tables handed out are those of both grades with all they include, and no others', () => {
  const needed = new Set<string>()
  for (const name of ['en-ueb-g1.ctb', 'en-ueb-g2.ctb', 'unicode.dis']) closure(name, needed)
  expect(needed.size).toBeGreaterThan(3)
  expect([...tableFiles].sort()).toEqual([...needed].sort())
})
