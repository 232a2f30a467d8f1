import { largestPhoto } from '../../sync/messages.ts'
import { type FastifyInstance, Type } from '../fastify.ts'
import { callerOn } from '../guard.ts'
import { isoOf, type Office } from '../office.ts'
import { checkPhoto } from '../photo-check.ts'
import { notFound, Refusal } from '../refusal.ts'
import { holdSurvey } from '../repositories/surveys.ts'
import { staff } from '../rules.ts'
import { idText, surveyParams } from '../shape.ts'
import { transact } from '../sql/transact.ts'

const params = Type.Object({ survey: idText, photo: Type.String({ pattern: '^[0-9a-f]{64}$' }) })

/** Photos by the hash of their bytes: sent as often as need be, kept once, looked at before they are kept. */
export function photoRoutes(app: FastifyInstance, office: Office): void {
  app.addContentTypeParser(
    'application/octet-stream',
    { parseAs: 'buffer', bodyLimit: largestPhoto },
    async (_request: unknown, body: Buffer) => body,
  )

  app.put(
    '/api/surveys/:survey/photos/:photo',
    { config: { rule: { who: staff, survey: 'own-or-new' } }, bodyLimit: largestPhoto, schema: { params } },
    async (request, reply) => {
      const caller = callerOn(request)
      const { survey, photo } = request.params
      if (!Buffer.isBuffer(request.body))
        throw new Refusal(415, 'type', 'A photo comes as bytes.', 'Send it as application/octet-stream.')
      const bytes = request.body
      const checked = checkPhoto(photo, bytes)
      if (!checked.ok)
        throw new Refusal(422, 'photo', checked.what, 'Take the photo again in the app: it leaves such notes out.')
      // The bytes first: a row never names a photo that is not on the disk.
      if (!(await office.photos.has(photo))) await office.photos.put(photo, bytes)
      const now = office.now()
      const added = await transact(office.db, async (tx) => {
        await holdSurvey(tx, caller, survey, now)
        return tx
          .insertInto('photos')
          .values({
            survey,
            photo,
            type: checked.type,
            bytes: bytes.length,
            author: caller.account,
            at: isoOf(now),
          })
          .onConflict((conflict) => conflict.columns(['survey', 'photo']).doNothing())
          .returning('photo')
          .executeTakeFirst()
      })
      reply.code(added ? 201 : 200)
      return { photo, kept: true }
    },
  )

  app.get(
    '/api/surveys/:survey/photos/:photo',
    { config: { rule: { who: staff, survey: 'own' } }, schema: { params } },
    async (request, reply) => {
      const { survey, photo } = request.params
      const row = await office.db
        .selectFrom('photos')
        .select('type')
        .where('survey', '=', survey)
        .where('photo', '=', photo)
        .executeTakeFirst()
      const bytes = row && (await office.photos.get(photo))
      if (!row || !bytes) throw notFound('This photo')
      return reply
        .type(row.type)
        .header('cache-control', 'private, no-store')
        .header('content-security-policy', "default-src 'none'; sandbox")
        .send(bytes)
    },
  )

  app.get(
    '/api/surveys/:survey/photos',
    { config: { rule: { who: staff, survey: 'own' } }, schema: { params: surveyParams } },
    async (request) => ({
      photos: await office.db
        .selectFrom('photos')
        .select(['photo', 'type', 'bytes', 'author', 'at'])
        .where('survey', '=', request.params.survey)
        .orderBy('photo')
        .execute(),
    }),
  )
}
