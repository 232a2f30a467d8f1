import { sameJson } from '../../record/json.ts'
import { markState } from '../../record/operations/index.ts'
import { type FastifyInstance, Type } from '../fastify.ts'
import { callerOn } from '../guard.ts'
import { dayOf, forms, isoOf, type Office } from '../office.ts'
import { notFound, Refusal } from '../refusal.ts'
import { note } from '../repositories/audit.ts'
import { authorsOf, haveOf, logOf } from '../repositories/facts.ts'
import { addOwnEntries } from '../repositories/own-entries.ts'
import { signaturesOf } from '../repositories/sheets.ts'
import { holdSurvey } from '../repositories/surveys.ts'
import { desk, reviewers } from '../rules.ts'
import { timedId } from '../secrets.ts'
import { idText, surveyParams, text } from '../shape.ts'
import { transact } from '../sql/transact.ts'
import { obstacles, trustedSurvey } from '../standing.ts'

/** What a reviewer sees before signing, and the signature: by a second person, for exactly the entries they saw. */
export function reviewRoutes(app: FastifyInstance, office: Office): void {
  app.get(
    '/api/surveys/:survey/review',
    { config: { rule: { who: desk, survey: 'own' } }, schema: { params: surveyParams } },
    async (request) => {
      const { survey } = request.params
      const log = await logOf(office.db, survey)
      const seen = trustedSurvey(log)
      const signatures = await signaturesOf(office.db, survey)
      return {
        // Send this back with the signature: it says what was looked at.
        have: await haveOf(office.db, survey),
        signatures,
        broughtBy: await authorsOf(office.db, survey),
        walks: seen.view.walks.map((walk) => ({
          id: walk.id,
          name: walk.name,
          states: walk.states,
          standsInTheWay: Object.fromEntries(forms.map((form) => [form, obstacles(seen, log, walk, form, signatures)])),
        })),
      }
    },
  )

  app.post(
    '/api/surveys/:survey/walks/:walk/sign',
    {
      config: { rule: { who: reviewers, survey: 'own' } },
      schema: {
        params: Type.Object({ survey: idText, walk: idText }),
        body: Type.Object({ statement: text(2000, 3), have: Type.Record(idText, Type.Integer({ minimum: 0 })) }),
      },
    },
    async (request) => {
      const caller = callerOn(request)
      const { survey, walk } = request.params
      const { statement, have } = request.body
      const now = office.now()
      await transact(office.db, async (tx) => {
        await holdSurvey(tx, caller, survey, now)
        if (!sameJson(await haveOf(tx, survey), have))
          throw new Refusal(
            409,
            'changed',
            'Entries have come in since you looked.',
            'Look at the review again, then sign.',
          )
        const log = await logOf(tx, survey)
        if (!trustedSurvey(log).view.walks.some((one) => one.id === walk)) throw notFound('This walk')
        const others = (await authorsOf(tx, survey)).some(({ author }) => author !== caller.account)
        if (!others)
          throw new Refusal(
            409,
            'own-work',
            'You brought every entry of this survey yourself: a second person reviews.',
            'Ask a colleague to review and sign.',
          )
        await addOwnEntries(tx, caller, survey, now, (own) =>
          markState(own, walk, {
            state: 'reviewed',
            name: caller.name,
            role: caller.role,
            date: dayOf(now),
            note: statement,
          }),
        )
        await tx
          .insertInto('signatures')
          .values({
            survey,
            signature: timedId(now),
            walk,
            account: caller.account,
            name: caller.name,
            statement,
            have: JSON.stringify(await haveOf(tx, survey)),
            at: isoOf(now),
          })
          .execute()
        await note(tx, caller, now, 'walk reviewed and signed', survey, { walk, statement })
      })
      return { signed: true }
    },
  )
}
