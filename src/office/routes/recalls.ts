import { type FastifyInstance, Type } from '../fastify.ts'
import { callerOn } from '../guard.ts'
import { dayOf, isoOf, type Office } from '../office.ts'
import { notFound, Refusal } from '../refusal.ts'
import { note } from '../repositories/audit.ts'
import { sheetOf } from '../repositories/sheets.ts'
import { desk } from '../rules.ts'
import { newId } from '../secrets.ts'
import { digits, idText, text } from '../shape.ts'
import { transact } from '../sql/transact.ts'

/** Every form given to somebody, and which of them must be called back: closed by the client's own reply alone. */
export function recallRoutes(app: FastifyInstance, office: Office): void {
  app.post(
    '/api/surveys/:survey/sheets/:number/givings',
    {
      config: { rule: { who: desk, survey: 'own' } },
      schema: {
        params: Type.Object({ survey: idText, number: digits }),
        body: Type.Object({ form: text(100), to: text(200) }),
      },
    },
    async (request, reply) => {
      const caller = callerOn(request)
      const { survey, number } = request.params
      const { form, to } = request.body
      const now = office.now()
      if (!(await sheetOf(office.db, survey, Number(number)))) throw notFound('This sheet')
      const giving = newId('giving')
      await transact(office.db, async (tx) => {
        await tx
          .insertInto('givings')
          .values({
            survey,
            giving,
            number: Number(number),
            form,
            given_to: to,
            given_by: caller.account,
            given_at: isoOf(now),
            told_at: null,
            reply: null,
            replied_at: null,
          })
          .execute()
        await note(tx, caller, now, 'sheet given', survey, { number: Number(number), form, to })
      })
      reply.code(201)
      return { giving }
    },
  )

  app.get('/api/recalls', { config: { rule: { who: desk } } }, async (request) => {
    const { branch } = callerOn(request)
    const rows = await office.db
      .selectFrom('givings')
      .innerJoin('sheets', (join) =>
        join.onRef('sheets.survey', '=', 'givings.survey').onRef('sheets.number', '=', 'givings.number'),
      )
      .innerJoin('surveys', 'surveys.survey', 'givings.survey')
      .select([
        'givings.survey',
        'surveys.name',
        'givings.giving',
        'givings.number',
        'givings.form',
        'givings.given_to',
        'givings.given_at',
        'givings.told_at',
        'sheets.good_until',
        'sheets.replaced_by',
        'sheets.withdrawn_at',
      ])
      .where('surveys.branch', '=', branch)
      .where('givings.replied_at', 'is', null)
      .where((eb) =>
        eb.or([
          eb('sheets.withdrawn_at', 'is not', null),
          eb('sheets.replaced_by', 'is not', null),
          eb('sheets.good_until', '<', dayOf(office.now())),
        ]),
      )
      .orderBy('givings.survey')
      .orderBy('givings.giving')
      .execute()
    return { recalls: rows }
  })

  const ofGiving = Type.Object({ survey: idText, giving: idText })

  app.post(
    '/api/surveys/:survey/givings/:giving/told',
    { config: { rule: { who: desk, survey: 'own' } }, schema: { params: ofGiving } },
    async (request) => {
      await change(request.params, { told_at: isoOf(office.now()) }, 'recipient told', callerOn(request))
      return { told: true }
    },
  )

  app.post(
    '/api/surveys/:survey/givings/:giving/reply',
    {
      config: { rule: { who: desk, survey: 'own' } },
      schema: { params: ofGiving, body: Type.Object({ reply: text(2000, 2) }) },
    },
    async (request) => {
      const { reply } = request.body
      await change(request.params, { reply, replied_at: isoOf(office.now()) }, 'recipient replied', callerOn(request))
      return { closed: true }
    },
  )

  async function change(
    { survey, giving }: { survey: string; giving: string },
    to: { told_at: string } | { reply: string; replied_at: string },
    act: string,
    caller: ReturnType<typeof callerOn>,
  ): Promise<void> {
    await transact(office.db, async (tx) => {
      const done = await tx
        .updateTable('givings')
        .set(to)
        .where('survey', '=', survey)
        .where('giving', '=', giving)
        .where('replied_at', 'is', null)
        .returning('giving')
        .executeTakeFirst()
      if (!done)
        throw new Refusal(409, 'no-giving', 'Nothing of that name waits for a reply.', 'Look at the list again.')
      await note(tx, caller, office.now(), act, survey, { giving, ...to })
    })
  }
}
