// Serves the built app from dist/ to this machine alone, and prints its address. PORT chooses the port; 0 any free one.
import { createReadStream, existsSync, statSync } from 'node:fs'
import { createServer } from 'node:http'
import { dirname, extname, join, normalize, sep } from 'node:path'
import { fileURLToPath } from 'node:url'
import { createGzip } from 'node:zlib'

const root = join(dirname(fileURLToPath(import.meta.url)), '..', 'dist')
const port = Number(process.env.PORT ?? 4173)

const types = {
  '.css': 'text/css; charset=utf-8',
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.png': 'image/png',
  '.svg': 'image/svg+xml',
  '.txt': 'text/plain; charset=utf-8',
  '.wasm': 'application/wasm',
  '.webmanifest': 'application/manifest+json; charset=utf-8',
}

if (!existsSync(join(root, 'index.html'))) {
  console.error('Nothing is built in dist/. Run `npm run build:app` first.')
  process.exit(1)
}

const server = createServer((request, response) => {
  const file = fileFor(request.url ?? '/')
  if (!file || (request.method !== 'GET' && request.method !== 'HEAD')) {
    response.writeHead(file ? 405 : 404, { 'content-type': 'text/plain; charset=utf-8' })
    response.end(file ? 'Only GET and HEAD.\n' : 'No such file.\n')
    return
  }
  const zips = /\bgzip\b/.test(request.headers['accept-encoding'] ?? '') && extname(file) !== '.png'
  response.writeHead(200, {
    'content-type': types[extname(file)] ?? 'application/octet-stream',
    ...(zips ? { 'content-encoding': 'gzip', vary: 'accept-encoding' } : { 'content-length': statSync(file).size }),
    // Files under assets/ carry a hash of their content in their names; everything else is asked for anew.
    'cache-control': file.startsWith(join(root, 'assets') + sep) ? 'public, max-age=31536000, immutable' : 'no-store',
    'x-content-type-options': 'nosniff',
    'referrer-policy': 'no-referrer',
  })
  if (request.method === 'HEAD') response.end()
  else if (zips) createReadStream(file).pipe(createGzip()).pipe(response)
  else createReadStream(file).pipe(response)
})

server.on('error', (error) => {
  console.error(
    error.code === 'EADDRINUSE'
      ? `Port ${port} is taken. Choose another: PORT=4174 npm start`
      : `No server: ${error.message}`,
  )
  process.exit(1)
})
server.listen(port, '127.0.0.1', () => {
  console.log(`Tautline is at http://localhost:${server.address().port}  (this machine alone; Ctrl-C stops it)`)
})

/** The file an address stands for: itself, or the page for an address without an extension. Null: none, or outside dist/. */
function fileFor(url) {
  let path
  try {
    path = decodeURIComponent(new URL(url, 'http://localhost').pathname)
  } catch {
    return null
  }
  const file = normalize(join(root, path))
  if (file !== root && !file.startsWith(root + sep)) return null
  if (existsSync(file) && statSync(file).isFile()) return file
  return extname(path) === '' ? join(root, 'index.html') : null
}
