import { type Fact, factId } from '../../record/facts.ts'
import { writeSurveyFile } from '../../record/file/write-survey-file.ts'
import { foldSurvey } from '../../record/fold.ts'
import { signed } from '../../record/fold-answer.ts'
import { currentValue, factOf, headsOf } from '../../record/log.ts'
import { root } from '../../record/placement.ts'
import { type FastifyInstance, Type } from '../fastify.ts'
import { callerOn } from '../guard.ts'
import type { Office } from '../office.ts'
import { Refusal } from '../refusal.ts'
import { note } from '../repositories/audit.ts'
import { authorsOf, logOf } from '../repositories/facts.ts'
import { addOwnEntries } from '../repositories/own-entries.ts'
import { surveysOf } from '../repositories/surveys.ts'
import { desk, reviewers, staff } from '../rules.ts'
import { dayText, digits, idText, surveyParams, text } from '../shape.ts'
import { transact } from '../sql/transact.ts'

const filter = Type.Object({
  name: Type.Optional(text(200)),
  verdict: Type.Optional(text(40)),
  client: Type.Optional(text(200)),
  expiredBy: Type.Optional(dayText),
  afterName: Type.Optional(text(400, 0)),
  afterSurvey: Type.Optional(idText),
  most: Type.Optional(digits),
})

/** Venues of everyone in the branch; what people do not agree on, and the settling of it. */
export function surveyRoutes(app: FastifyInstance, office: Office): void {
  app.get('/api/surveys', { config: { rule: { who: staff } }, schema: { querystring: filter } }, async (request) => {
    const { afterName, afterSurvey, most, ...rest } = request.query
    const after = afterName !== undefined && afterSurvey ? { name: afterName, survey: afterSurvey } : undefined
    const { branch } = callerOn(request)
    return {
      surveys: await surveysOf(office.db, branch, { ...rest, after, most: Math.min(Number(most ?? 100), 500) }),
    }
  })

  app.get(
    '/api/surveys/:survey/file',
    { config: { rule: { who: staff, survey: 'own' } }, schema: { params: surveyParams } },
    async (request, reply) =>
      reply
        .type('application/json; charset=utf-8')
        .header('cache-control', 'no-store')
        .send(writeSurveyFile(await logOf(office.db, request.params.survey))),
  )

  app.get(
    '/api/surveys/:survey/disputes',
    { config: { rule: { who: desk, survey: 'own' } }, schema: { params: surveyParams } },
    async (request) => {
      const log = await logOf(office.db, request.params.survey)
      const { conflicts = [], setAside = [] } = foldSurvey(log)
      return {
        name: currentValue(log, root, 'name') ?? '',
        disputes: conflicts.map((conflict) => ({
          ...conflict,
          versions: conflict.versions.map((version) => ({ ...version, device: factOf(log, version.fact)?.device })),
        })),
        setAside,
        // Whose token brought it: the name in an entry is what its phone said.
        broughtBy: await authorsOf(office.db, request.params.survey),
      }
    },
  )

  app.post(
    '/api/surveys/:survey/settle',
    {
      config: { rule: { who: reviewers, survey: 'own' } },
      schema: {
        params: surveyParams,
        body: Type.Object({ entity: idText, field: idText, keep: idText, reason: text(2000, 3) }),
      },
    },
    async (request) => {
      const caller = callerOn(request)
      const { survey } = request.params
      const { entity, field, keep, reason } = request.body
      const now = office.now()
      await transact(office.db, async (tx) => {
        await addOwnEntries(tx, caller, survey, now, (log) => {
          const heads = headsOf(log, entity, field)
          const kept = heads.find((head) => factId(head) === keep)
          if (heads.length < 2 || !kept)
            throw new Refusal(
              409,
              'settled',
              'These versions no longer stand side by side.',
              'Look at the disputes again.',
            )
          return [
            { entity, field, value: asKept(kept), replaces: heads.map(factId) },
            {
              entity: `settled/${entity}/${field}`.slice(0, 400),
              field: 'why',
              value: { reason, by: caller.name, kept: keep, instead: heads.map(factId).filter((id) => id !== keep) },
              replaces: [],
            },
          ]
        })
        await note(tx, caller, now, 'dispute settled', survey, { entity, field, keep, reason })
      })
      return { settled: true }
    },
  )
}

/** An answer in words that is kept stays under the name and time it was given. */
function asKept(kept: Fact): unknown {
  const isAnswer = kept.field.startsWith('word/') && typeof kept.value === 'object' && kept.value !== null
  return isAnswer ? signed(kept.value as object, kept) : kept.value
}
