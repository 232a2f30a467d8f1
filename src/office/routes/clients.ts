import { type FastifyInstance, Type } from '../fastify.ts'
import { callerOn } from '../guard.ts'
import type { Office } from '../office.ts'
import { notFound } from '../refusal.ts'
import { note } from '../repositories/audit.ts'
import { eraseClient, exportClient } from '../repositories/clients.ts'
import { administrators, desk } from '../rules.ts'
import { surveyParams, text } from '../shape.ts'
import { transact } from '../sql/transact.ts'

const ofClient = Type.Object({ client: text(200) })

/** Whose a survey is; all that is held of one client, to hand over or to erase. */
export function clientRoutes(app: FastifyInstance, office: Office): void {
  app.put(
    '/api/surveys/:survey/client',
    {
      config: { rule: { who: desk, survey: 'own' } },
      schema: { params: surveyParams, body: Type.Object({ client: Type.Union([text(200), Type.Null()]) }) },
    },
    async (request) => {
      const caller = callerOn(request)
      const { survey } = request.params
      const { client } = request.body
      await transact(office.db, async (tx) => {
        await tx.updateTable('surveys').set({ client }).where('survey', '=', survey).execute()
        await note(tx, caller, office.now(), 'client of a survey named', survey, { client })
      })
      return { kept: true }
    },
  )

  app.get(
    '/api/clients/:client',
    { config: { rule: { who: administrators } }, schema: { params: ofClient } },
    async (request, reply) => {
      const caller = callerOn(request)
      const { client } = request.params
      const all = await exportClient(office.db, caller.branch, client)
      if (all.surveys.length === 0) throw notFound('This client')
      await note(office.db, caller, office.now(), 'client exported', null, { surveys: all.surveys.length })
      reply.header('cache-control', 'no-store')
      return all
    },
  )

  app.delete(
    '/api/clients/:client',
    { config: { rule: { who: administrators } }, schema: { params: ofClient } },
    async (request) => {
      const caller = callerOn(request)
      const { surveys, photos } = await transact(office.db, (tx) =>
        eraseClient(tx, caller, request.params.client, office.now()),
      )
      if (surveys.length === 0) throw notFound('This client')
      for (const photo of photos) await office.photos.remove(photo)
      return { erased: surveys.length }
    },
  )
}
