import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { defineConfig } from 'vite'

const root = join(import.meta.dirname, '..')

/** The office's program: one file, beside the app's in dist, started in a second; the database's binary stays outside it. */
export default defineConfig({
  root,
  publicDir: false,
  define: {
    __VERSION__: JSON.stringify(JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')).version),
  },
  ssr: { noExternal: true, external: ['libsql', 'pg-native'] },
  build: {
    ssr: 'src/office/main.ts',
    target: 'node20',
    outDir: process.env.TAUTLINE_OFFICE_OUT ?? 'dist',
    emptyOutDir: false,
    rolldownOptions: {
      output: {
        entryFileNames: 'office.js',
        codeSplitting: false,
        // Packages of the older module kind inside this file ask for `require`.
        banner:
          "import { createRequire as madeRequire } from 'node:module'\nconst require = madeRequire(import.meta.url)",
      },
    },
  },
})
