import { type FastifyInstance, Type } from '../fastify.ts'
import { callerOn } from '../guard.ts'
import { isoOf, type Office } from '../office.ts'
import { note } from '../repositories/audit.ts'
import { desk, staff } from '../rules.ts'
import { dayText, idText, text } from '../shape.ts'
import { transact } from '../sql/transact.ts'

/** How far a fix at a venue is. "Confirmed" is a person's look on foot; only new readings change a verdict. */
const status = Type.Union(['asked', 'agreed', 'done', 'confirmed', 'declined'].map((one) => Type.Literal(one)))

/** Fixes asked of venues: what, by whom, until when, how far. */
export function fixRoutes(app: FastifyInstance, office: Office): void {
  app.get('/api/fixes', { config: { rule: { who: staff } } }, async (request) => ({
    fixes: await office.db
      .selectFrom('fixes')
      .innerJoin('surveys', 'surveys.survey', 'fixes.survey')
      .select([
        'fixes.survey',
        'surveys.name',
        'fixes.fix',
        'fixes.text',
        'fixes.owner',
        'fixes.due',
        'fixes.status',
        'fixes.note',
        'fixes.changed_by',
        'fixes.changed_at',
      ])
      .where('surveys.branch', '=', callerOn(request).branch)
      .orderBy('fixes.due')
      .orderBy('fixes.survey')
      .orderBy('fixes.fix')
      .execute(),
  }))

  app.put(
    '/api/surveys/:survey/fixes/:fix',
    {
      config: { rule: { who: desk, survey: 'own' } },
      schema: {
        params: Type.Object({ survey: idText, fix: idText }),
        body: Type.Object({
          text: text(2000),
          owner: text(200, 0),
          due: Type.Union([dayText, Type.Null()]),
          status,
          note: text(2000, 0),
        }),
      },
    },
    async (request) => {
      const caller = callerOn(request)
      const { survey, fix } = request.params
      const { text, owner, due, status, note: remark } = request.body
      const now = office.now()
      const row = { text, owner, due, status, note: remark, changed_by: caller.account, changed_at: isoOf(now) }
      await transact(office.db, async (tx) => {
        await tx
          .insertInto('fixes')
          .values({ survey, fix, ...row })
          .onConflict((conflict) => conflict.columns(['survey', 'fix']).doUpdateSet(row))
          .execute()
        await note(tx, caller, now, 'fix changed', survey, { fix, status, owner, due })
      })
      return { kept: true }
    },
  )
}
