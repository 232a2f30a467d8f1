import type { FastifyError } from 'fastify'
import type { OfficeRefusal } from '../sync/messages.ts'
import type { FastifyInstance } from './fastify.ts'
import { Refusal } from './refusal.ts'

/** Every error leaves as a refusal in words; what the office itself did wrong is written to its log and not told. */
export function answerErrors(app: FastifyInstance): void {
  app.setErrorHandler<FastifyError | Refusal>((error, request, reply) => {
    reply.header('cache-control', 'no-store')
    if (error instanceof Refusal) return reply.code(error.status).send(error.body)
    const status = error.statusCode ?? 500
    if (status === 429) return reply.code(429).send(withoutStatus(error))
    if (status >= 400 && status < 500) return reply.code(status).send(refusalOf(status, error))
    request.log.error({ err: error, id: request.id, route: request.routeOptions.url }, 'request failed')
    const refusal: OfficeRefusal = {
      error: 'office',
      what: 'The office could not do this. Nothing of it was stored.',
      whatToDo: `Try again in a minute; if it stays so, tell the administrator: request ${request.id}.`,
    }
    return reply.code(status === 503 ? 503 : 500).send(refusal)
  })
}

export function answerUnknown(app: FastifyInstance): void {
  app.setNotFoundHandler((_request, reply) => {
    const refusal: OfficeRefusal = {
      error: 'not-found',
      what: 'There is no such address at this office.',
      whatToDo: 'Check the address, or renew the app.',
    }
    return reply.code(404).header('cache-control', 'no-store').send(refusal)
  })
}

function refusalOf(status: number, error: FastifyError): OfficeRefusal {
  if (status === 413)
    return {
      error: 'too-large',
      what: 'The message is larger than the office takes.',
      whatToDo: 'Send it in smaller parts.',
    }
  if (status === 415)
    return {
      error: 'type',
      what: 'The office does not read this kind of message.',
      whatToDo: 'Send JSON, plain or gzip; a photo as application/octet-stream.',
    }
  if (error.validation)
    return {
      error: 'shape',
      what: `The message has another shape: ${error.message.slice(0, 300)}.`,
      whatToDo: 'Renew the app, or send what is named.',
    }
  return { error: 'request', what: 'The message could not be read.', whatToDo: 'Send it again.' }
}

function withoutStatus(error: unknown): object {
  const { error: name, what, whatToDo } = error as OfficeRefusal
  return {
    error: name ?? 'too-many',
    what: what ?? 'Too many requests from here.',
    whatToDo: whatToDo ?? 'Wait a minute.',
  }
}
