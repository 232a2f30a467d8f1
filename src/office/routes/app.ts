import { extname } from 'node:path'
import fastifyStatic from '@fastify/static'
import type { FastifyInstance } from '../fastify.ts'
import { anyone } from '../rules.ts'

/** The app itself, from the folder it was built into: any address without an extension is the page. */
export async function appRoutes(app: FastifyInstance, dist: string): Promise<void> {
  await app.register(fastifyStatic, { root: dist, serve: false, dotfiles: 'ignore' })
  app.get('/*', { config: { rule: anyone } }, (request, reply) => {
    const path = (request.params as { '*': string })['*']
    if (path.startsWith('api/') || path.startsWith('sheet/') || serverFiles.has(path)) return reply.callNotFound()
    const file = extname(path) === '' ? 'index.html' : path
    // Files under assets/ carry a hash of their content in their names.
    const kept = file.startsWith('assets/') ? { maxAge: '1y', immutable: true } : { maxAge: 0 }
    return reply.sendFile(file, kept)
  })
}

/** Built beside the app, for the machine and not for a browser. */
const serverFiles = new Set(['office.js', 'cli.js'])
