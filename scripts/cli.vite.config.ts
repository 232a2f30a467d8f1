import { createHash } from 'node:crypto'
import { readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { defineConfig } from 'vite'

/** Everything a planner's answer comes from: a memo of other sources is not read. */
const planner = ['src/leash', 'src/geometry', 'src/plan']
const root = join(import.meta.dirname, '..')

/** The terminal's program: one file, beside the app's in dist; packages stay outside it. */
export default defineConfig({
  root,
  publicDir: false,
  define: {
    __VERSION__: JSON.stringify(JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')).version),
    __PLANNER__: JSON.stringify(hashOf(planner)),
  },
  build: {
    ssr: 'src/cli/main.ts',
    target: 'node20',
    outDir: 'dist',
    emptyOutDir: false,
    rolldownOptions: {
      output: {
        entryFileNames: 'cli.js',
        codeSplitting: false,
        banner: '#!/usr/bin/env node',
      },
    },
  },
})

function hashOf(folders: readonly string[]): string {
  const hash = createHash('sha256')
  for (const folder of folders)
    for (const name of readdirSync(join(root, folder), { recursive: true, encoding: 'utf8' }).sort())
      if (name.endsWith('.ts')) hash.update(name).update(readFileSync(join(root, folder, name)))
  return hash.digest('hex').slice(0, 16)
}
