import { createHash } from 'node:crypto'
import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { dirname, join } from 'node:path'
import type { Plugin } from 'vite'
import { tableFiles } from '../src/sheets/braille/louis.ts'

const require = createRequire(import.meta.url)
const dejavu = dirname(require.resolve('dejavu-fonts-ttf/package.json'))
const liblouis = dirname(require.resolve('liblouis-build'))
const licences = join(import.meta.dirname, '..', 'licences')

/** What a phone may keep besides the app, unchanged, each part with its licence: path under extras/ -> file. */
const sources: Readonly<Record<string, string>> = {
  'fonts/DejaVuSans.ttf': join(dejavu, 'ttf/DejaVuSans.ttf'),
  'fonts/DejaVuSans-Bold.ttf': join(dejavu, 'ttf/DejaVuSans-Bold.ttf'),
  'fonts/licence.txt': join(dejavu, 'LICENSE'),
  'braille/build-no-tables-utf16.js': join(liblouis, 'build-no-tables-utf16.js'),
  ...Object.fromEntries(tableFiles.map((name) => [`braille/tables/${name}`, join(liblouis, 'tables', name)])),
  'braille/licence.txt': join(licences, 'liblouis.txt'),
  'braille/lgpl-2.1.txt': join(licences, 'lgpl-2.1.txt'),
}

/**
 * Puts the extras into the build as files of their own, outside what is kept beforehand, and tells the app as `__EXTRAS__`
 * where they are, how large, and how to know them. The folder carries a hash of them all: a newer set is another address.
 */
export function extras(): Plugin {
  const files = Object.entries(sources).map(([path, source]) => {
    const content = readFileSync(source)
    return { path, content, integrity: `sha256-${createHash('sha256').update(content).digest('base64')}` }
  })
  const all = createHash('sha256').update(files.map(({ path, integrity }) => `${path} ${integrity}\n`).join(''))
  const folder = `extras/${all.digest('hex').slice(0, 12)}/`
  const told = {
    folder: `/${folder}`,
    files: files.map(({ path, content, integrity }) => ({ path, bytes: content.length, integrity })),
  }
  return {
    name: 'extras',
    config: () => ({ define: { __EXTRAS__: JSON.stringify(told) } }),
    configureServer(server) {
      server.middlewares.use(`/${folder}`, (request, response, next) => {
        const file = files.find(({ path }) => request.url === `/${path}`)
        if (!file) return next()
        if (file.path.endsWith('.js')) response.setHeader('content-type', 'text/javascript')
        response.end(file.content)
      })
    },
    generateBundle() {
      for (const { path, content } of files) this.emitFile({ type: 'asset', fileName: folder + path, source: content })
    },
  }
}
