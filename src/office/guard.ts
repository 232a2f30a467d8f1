import type { FastifyRequest } from 'fastify'
import type { FastifyInstance } from './fastify.ts'
import type { Caller, Office } from './office.ts'
import { notFound, Refusal } from './refusal.ts'
import { callerOf } from './repositories/people.ts'
import { expectOwnOrNew, expectSurvey } from './repositories/surveys.ts'

declare module 'fastify' {
  interface FastifyRequest {
    caller: Caller | null
  }
}

/** The route table as it was declared: what the tests walk through. */
export interface DeclaredRoute {
  method: string
  url: string
}

/**
 * Holds every request to its route's rule before its body is read, and stops the start of a server with a route that
 * declares none. Must be called before any route is added. Returns the table, filled as routes come.
 */
export function guard(app: FastifyInstance, office: Office): DeclaredRoute[] {
  const table: DeclaredRoute[] = []
  app.addHook('onRoute', (route) => {
    if (!route.config?.rule) throw new Error(`office/no-rule: ${String(route.method)} ${route.url} declares no rule`)
    for (const method of [route.method].flat()) table.push({ method, url: route.url })
  })
  app.decorateRequest('caller', null)
  const wrongTokens = app.createRateLimit({ max: 60, timeWindow: 60_000 })
  app.addHook('onRequest', async (request) => {
    const rule = request.routeOptions.config.rule
    if (!rule || rule.who === 'anyone') return
    try {
      request.caller = await identify(office, request)
    } catch (error) {
      const limit = await wrongTokens(request)
      if (!limit.isAllowed && limit.isExceeded)
        throw new Refusal(429, 'too-many', 'Too many attempts from here.', 'Wait a minute.')
      throw error
    }
    const { role, branch } = request.caller
    if (!rule.who.includes(role))
      throw new Refusal(
        403,
        'role',
        `This needs the role ${rule.who.join(' or ')}; you are ${role}.`,
        'Ask an administrator.',
      )
    const { survey } = request.params as { survey?: string }
    // Looked up before the schema is: no database keeps an id with a NUL.
    if (survey?.includes('\0')) throw notFound('This survey')
    if (rule.survey && survey === undefined) throw new Error('office/no-survey: the route names no survey')
    if (rule.survey === 'own') await expectSurvey(office.db, branch, survey as string)
    if (rule.survey === 'own-or-new') await expectOwnOrNew(office.db, branch, survey as string)
  })
  return table
}

/** The caller of a request that its rule let in. */
export function callerOn(request: FastifyRequest): Caller {
  if (!request.caller) throw new Error('office/no-caller: the route is for anyone')
  return request.caller
}

async function identify(office: Office, request: FastifyRequest): Promise<Caller> {
  const [scheme, token, ...rest] = (request.headers.authorization ?? '').split(' ')
  if (scheme !== 'Bearer' || !token || rest.length > 0)
    throw new Refusal(
      401,
      'no-token',
      'Nobody is signed in here.',
      'Enrol this device with a code from an administrator.',
    )
  const caller = await callerOf(office.db, token)
  if (!caller)
    throw new Refusal(
      401,
      'token',
      'This office does not know this device.',
      'Enrol it with a code from an administrator.',
    )
  if ('revokedAt' in caller)
    throw new Refusal(
      401,
      'revoked',
      `The office signed this device out on ${caller.revokedAt.slice(0, 10)}. It can no longer read or send.`,
      'What is on this phone stays on it: share it as a file, or ask the administrator.',
    )
  return caller
}
