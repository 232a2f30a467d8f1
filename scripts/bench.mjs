// Builds and runs the benches of tests/bench one after the other; each prints JSON lines. With --keep the figures are
// written to tests/bench/figures.json; without, they are set beside the ones kept there.
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { join, resolve } from 'node:path'
import { pathToFileURL } from 'node:url'
import { build } from 'vite'

const keep = process.argv.includes('--keep')
const only = process.argv.slice(2).find((argument) => !argument.startsWith('--'))
const kept = 'tests/bench/figures.json'
const before = JSON.parse(readFileSync(kept, 'utf8'))

const outDir = mkdtempSync(resolve('node_modules/.bench-'))
const rows = []
try {
  const names = readdirSync('tests/bench').filter(
    (name) => name.endsWith('.bench.ts') && (!only || name.includes(only)),
  )
  for (const name of names) {
    const out = join(outDir, name.replace('.ts', ''))
    await build({
      configFile: false,
      logLevel: 'error',
      build: {
        ssr: resolve('tests/bench', name),
        outDir: out,
        minify: false,
        rollupOptions: { output: { entryFileNames: 'bench.mjs' } },
      },
    })
    const { bench } = await import(pathToFileURL(join(out, 'bench.mjs')).href)
    for await (const row of bench()) {
      const was = before.find((one) => one.what === row.what)
      const ratio = was?.units && row.units ? Number((row.units / was.units).toFixed(2)) : undefined
      console.log(JSON.stringify(ratio === undefined ? row : { ...row, againstKept: ratio }))
      rows.push(row)
    }
  }
} finally {
  rmSync(outDir, { recursive: true, force: true })
}
if (keep)
  writeFileSync(
    kept,
    `${JSON.stringify([...before.filter((one) => !rows.some((row) => row.what === one.what)), ...rows], null, 2)}\n`,
  )
