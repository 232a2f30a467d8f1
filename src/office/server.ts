import { createHash } from 'node:crypto'
import compress from '@fastify/compress'
import helmet from '@fastify/helmet'
import rateLimit from '@fastify/rate-limit'
import type { TypeBoxTypeProvider } from '@fastify/type-provider-typebox'
import Fastify, { type FastifyBaseLogger, LogController } from 'fastify'
import { style } from '../sheets/html/style.ts'
import { largestBody } from '../sync/messages.ts'
import { answerErrors, answerUnknown } from './answers.ts'
import { readBody } from './body.ts'
import type { FastifyInstance } from './fastify.ts'
import { type DeclaredRoute, guard } from './guard.ts'
import type { Office } from './office.ts'
import { appRoutes } from './routes/app.ts'
import { auditRoutes } from './routes/audit.ts'
import { clientRoutes } from './routes/clients.ts'
import { fixRoutes } from './routes/fixes.ts'
import { healthRoutes } from './routes/health.ts'
import { jobRoutes } from './routes/jobs.ts'
import { peopleRoutes } from './routes/people.ts'
import { photoRoutes } from './routes/photos.ts'
import { recallRoutes } from './routes/recalls.ts'
import { reviewRoutes } from './routes/review.ts'
import { shareRoutes } from './routes/shares.ts'
import { sheetRoutes } from './routes/sheets.ts'
import { surveyRoutes } from './routes/surveys.ts'
import { syncRoutes } from './routes/sync.ts'

export interface ServerSettings {
  /** Requests a minute from one address; a whole office may stand behind one. */
  requestsAMinute: number
  /** Addresses of proxies whose X-Forwarded-For is believed; none by default. */
  trustProxy: string[]
  /** The built app to serve, or null. */
  dist: string | null
  /** 'silent' for none. */
  logLevel: string
  /** Where log lines go; standard output unless given. */
  logTo?: { write(line: string): void }
}

export interface Server {
  app: FastifyInstance
  routes: readonly DeclaredRoute[]
}

const routeFiles = [
  healthRoutes,
  peopleRoutes,
  surveyRoutes,
  syncRoutes,
  photoRoutes,
  reviewRoutes,
  sheetRoutes,
  shareRoutes,
  recallRoutes,
  fixRoutes,
  clientRoutes,
  auditRoutes,
  jobRoutes,
]

/** Builds the server, ready to listen or to be asked directly. `more` adds routes (tests plant one without a rule). */
export async function buildServer(
  office: Office,
  settings: ServerSettings,
  more: (app: FastifyInstance) => void = () => undefined,
): Promise<Server> {
  const app: FastifyInstance = Fastify({
    logger: {
      level: settings.logLevel,
      // Addresses may hold a share's secret: only the route's pattern is written down.
      serializers: { req: (request) => ({ method: request.method, route: request.routeOptions?.url ?? '(none)' }) },
      ...(settings.logTo ? { stream: settings.logTo } : {}),
    },
    logController: new LogController({ disableRequestLogging: true }),
    bodyLimit: largestBody,
    trustProxy: settings.trustProxy.length > 0 ? settings.trustProxy : false,
    requestTimeout: 60_000,
    forceCloseConnections: 'idle',
    routerOptions: { maxParamLength: 1600 },
    ajv: { customOptions: { coerceTypes: false, removeAdditional: false, useDefaults: false } },
  }).withTypeProvider<TypeBoxTypeProvider>() as FastifyInstance
  logAnswers(app)
  answerErrors(app)
  await app.register(rateLimit, {
    global: true,
    max: settings.requestsAMinute,
    timeWindow: 60_000,
    errorResponseBuilder: (_request, { after }) => ({
      statusCode: 429,
      error: 'too-many',
      what: 'Too many requests from here.',
      whatToDo: `Wait ${after}.`,
    }),
  })
  await app.register(helmet, headers)
  await app.register(compress, {
    encodings: ['gzip', 'identity'],
    requestEncodings: ['gzip', 'identity'],
    threshold: 1024,
  })
  app.removeAllContentTypeParsers()
  app.addContentTypeParser('application/json', { parseAs: 'string' }, async (_request: unknown, body: string) =>
    readBody(body),
  )
  const routes = guard(app, office)
  for (const file of routeFiles) file(app, office)
  if (settings.dist) await appRoutes(app, settings.dist)
  answerUnknown(app)
  more(app)
  await app.ready()
  return { app, routes }
}

// A previewed sheet carries its one style inside and stands under the page's policy: its hash lets it through.
const sheetStyle = `'sha256-${createHash('sha256').update(style).digest('base64')}'`

const headers = {
  contentSecurityPolicy: {
    useDefaults: false,
    directives: {
      defaultSrc: ["'none'"],
      scriptSrc: ["'self'", "'wasm-unsafe-eval'"],
      styleSrc: ["'self'", sheetStyle],
      imgSrc: ["'self'", 'blob:', 'data:'],
      connectSrc: ["'self'"],
      workerSrc: ["'self'"],
      manifestSrc: ["'self'"],
      baseUri: ["'none'"],
      formAction: ["'none'"],
      frameAncestors: ["'none'"],
    },
  },
  referrerPolicy: { policy: 'no-referrer' as const },
  crossOriginEmbedderPolicy: false,
}

/** One line an answer: who asked for which route and how it went; no address, no body, no name. */
function logAnswers(app: FastifyInstance): void {
  const log: FastifyBaseLogger = app.log
  app.addHook('onResponse', async (request, reply) => {
    log.info({
      id: request.id,
      method: request.method,
      route: request.routeOptions.url ?? '(none)',
      status: reply.statusCode,
      ms: Math.round(reply.elapsedTime),
      account: request.caller?.account,
      device: request.caller?.device,
    })
  })
}
