// The size budget: script before the strip can be used; the shell with the HTML and text forms; all that is kept on the
// phone beforehand, which adds the plan's map, the demo venues and the builders of the other forms.
import { readdirSync, readFileSync, statSync } from 'node:fs'
import { join } from 'node:path'
import { gzipSync } from 'node:zlib'

const stripBudget = 90
const precacheBudget = 600
const dist = 'dist'

const manifest = JSON.parse(readFileSync(join(dist, '.vite/manifest.json'), 'utf8'))
const kB = (bytes) => bytes / 1000
const gzipped = (file) => kB(gzipSync(readFileSync(join(dist, file)), { level: 9 }).length)

/** A chunk and what it imports statically: what must arrive before it runs. */
function closure(key, seen = new Set()) {
  const chunk = manifest[key]
  if (!chunk || seen.has(chunk.file)) return seen
  seen.add(chunk.file)
  for (const next of chunk.imports ?? []) closure(next, seen)
  return seen
}

const keyOf = (suffix) => {
  const key = Object.keys(manifest).find((name) => name.endsWith(suffix))
  if (!key) throw new Error(`the build has no ${suffix}: correct scripts/size.mjs`)
  return key
}
const start = new Set([...closure(keyOf('index.html')), ...closure(keyOf('screens/strip/strip-screen.tsx'))])
const strip = [...start].filter((file) => file.endsWith('.js')).reduce((sum, file) => sum + gzipped(file), 0)

const worker = readFileSync(join(dist, 'sw.js'), 'utf8')
const precached = [
  ...new Set([...worker.matchAll(/["']?url["']?\s*:\s*["'`]([^"'`]+)["'`]/g)].map((match) => match[1])),
]
const kept = precached.reduce((sum, file) => sum + gzipped(file), 0)

const demos = readdirSync('demo-venues').filter((name) => name.endsWith('.json'))
const besides = new RegExp(`/(plan-map|to-pdf|to-word|${demos.map((name) => name.slice(0, -5)).join('|')})-`)
const shell = precached
  .filter((file) => !besides.test(file))
  .reduce((sum, file) => sum + kB(statSync(join(dist, file)).size), 0)

const rows = [
  { what: 'script before the strip can be used, gzip', kB: strip, budget: stripBudget },
  { what: 'shell, judge, HTML and text forms, as kept', kB: shell, budget: precacheBudget },
  { what: `kept on the phone beforehand, as sent (gzip), ${precached.length} files`, kB: kept, budget: precacheBudget },
]
for (const row of rows) console.log(`${row.kB.toFixed(1).padStart(7)} kB of ${row.budget}  ${row.what}`)
if (precached.length === 0 || rows.some((row) => row.kB > row.budget)) process.exit(1)
