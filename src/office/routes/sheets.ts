import { writeSurveyFile } from '../../record/file/write-survey-file.ts'
import { sameJson } from '../../record/json.ts'
import { markState } from '../../record/operations/index.ts'
import { defaultTeamCard } from '../../record/team-card.ts'
import type { Have } from '../../sync/messages.ts'
import { type FastifyInstance, Type } from '../fastify.ts'
import { callerOn } from '../guard.ts'
import { dayOf, forms, isoOf, type Office } from '../office.ts'
import { notFound, Refusal } from '../refusal.ts'
import { note } from '../repositories/audit.ts'
import { haveOf, logOf } from '../repositories/facts.ts'
import { addOwnEntries } from '../repositories/own-entries.ts'
import { sheetOf, sheetsOf, signaturesOf, standingSheet, takeNumber } from '../repositories/sheets.ts'
import { holdSurvey } from '../repositories/surveys.ts'
import { desk, reviewers, staff } from '../rules.ts'
import { digits, idText, surveyParams, text } from '../shape.ts'
import { transact } from '../sql/transact.ts'
import { obstacles, trustedSurvey } from '../standing.ts'
import { whatChanged } from '../what-changed.ts'

const numbered = Type.Object({ survey: idText, number: digits })
const form = Type.Union(forms.map((one) => Type.Literal(one)))

/** Numbered, frozen sheets: with each the exact entries and the team card it was made from. */
export function sheetRoutes(app: FastifyInstance, office: Office): void {
  app.post(
    '/api/surveys/:survey/walks/:walk/issue',
    {
      config: { rule: { who: reviewers, survey: 'own' } },
      schema: {
        params: Type.Object({ survey: idText, walk: idText }),
        body: Type.Object({ form, changes: text(2000, 0) }),
      },
    },
    async (request, reply) => {
      const caller = callerOn(request)
      const { survey, walk } = request.params
      const { form, changes } = request.body
      if (!office.makeSheet)
        throw new Refusal(501, 'no-sheets', 'This office cannot make sheets.', 'Start the full program.')
      const have = await haveOf(office.db, survey)
      const log = await logOf(office.db, survey, 'office', have)
      const seen = trustedSurvey(log)
      const found = seen.view.walks.find((one) => one.id === walk)
      if (!found) throw notFound('This walk')
      const inTheWay = obstacles(seen, log, found, form, await signaturesOf(office.db, survey))
      if (inTheWay.length > 0)
        throw new Refusal(409, 'not-ready', `No sheet yet: ${inTheWay.join('; ')}.`, 'See to it, then issue.')
      const before = await standingSheet(office.db, survey, walk, form)
      if (before && changes.trim() === '')
        throw new Refusal(
          409,
          'say-what-changed',
          `Sheet ${before.number} stands: the new one must say what changed.`,
          'Say in a sentence what changed for the reader.',
        )
      const number = await takeNumber(office.db, caller.branch)
      const now = office.now()
      const made = await office.makeSheet({ survey: seen, walk, form, number, on: dayOf(now) })
      if (!made.ok) {
        await note(office.db, caller, now, 'sheet refused, number not used', survey, {
          walk,
          form,
          number,
          why: made.why,
        })
        throw new Refusal(409, 'no-sheet', made.why, made.whatToDo)
      }
      const { goodUntil } = made
      if (goodUntil === null || goodUntil < dayOf(now)) {
        await note(office.db, caller, now, 'sheet stale, number not used', survey, { walk, form, number })
        throw new Refusal(409, 'stale', 'What this walk rests on no longer holds, or is not dated.', 'Survey it again.')
      }
      await transact(office.db, async (tx) => {
        await holdSurvey(tx, caller, survey, now)
        if (!sameJson(await haveOf(tx, survey), have))
          throw new Refusal(409, 'changed', 'Entries came in while the sheet was made.', 'Review again, then issue.')
        await tx
          .insertInto('sheets')
          .values({
            survey,
            number,
            walk,
            form,
            title: made.title,
            verdict: made.verdict,
            body: made.html,
            facts: writeSurveyFile(log),
            team: JSON.stringify(seen.view.team ?? defaultTeamCard),
            have: JSON.stringify(have),
            changes: before ? `${changes.trim()} (${whatChanged(log, JSON.parse(before.have) as Have)})` : '',
            issued_by: caller.account,
            issued_at: isoOf(now),
            good_until: goodUntil,
            replaced_by: null,
            withdrawn_at: null,
            withdrawn_why: null,
          })
          .execute()
        await tx
          .updateTable('sheets')
          .set({ replaced_by: number })
          .where('survey', '=', survey)
          .where('walk', '=', walk)
          .where('form', '=', form)
          .where('number', '!=', number)
          .where('replaced_by', 'is', null)
          .execute()
        await addOwnEntries(tx, caller, survey, now, (own) =>
          markState(own, walk, {
            state: 'issued',
            name: caller.name,
            role: caller.role,
            date: dayOf(now),
            note: `sheet ${number}, ${form}`,
          }),
        )
        await note(tx, caller, now, 'sheet issued', survey, { walk, form, number, goodUntil, replaces: before?.number })
      })
      reply.code(201)
      return { number, goodUntil, replaces: before?.number ?? null }
    },
  )

  app.get(
    '/api/surveys/:survey/sheets',
    { config: { rule: { who: staff, survey: 'own' } }, schema: { params: surveyParams } },
    async (request) => ({ sheets: await sheetsOf(office.db, request.params.survey) }),
  )

  app.get(
    '/api/surveys/:survey/sheets/:number',
    { config: { rule: { who: staff, survey: 'own' } }, schema: { params: numbered } },
    async (request) => {
      const { survey, number } = request.params
      const sheet = await sheetOf(office.db, survey, Number(number))
      if (!sheet) throw notFound('This sheet')
      return { ...sheet, team: JSON.parse(sheet.team) as unknown, have: JSON.parse(sheet.have) as unknown }
    },
  )

  app.post(
    '/api/surveys/:survey/sheets/:number/withdraw',
    {
      config: { rule: { who: desk, survey: 'own' } },
      schema: { params: numbered, body: Type.Object({ reason: text(2000, 3) }) },
    },
    async (request) => {
      const caller = callerOn(request)
      const { survey, number } = request.params
      const now = office.now()
      await transact(office.db, async (tx) => {
        const done = await tx
          .updateTable('sheets')
          .set({ withdrawn_at: isoOf(now), withdrawn_why: request.body.reason })
          .where('survey', '=', survey)
          .where('number', '=', Number(number))
          .where('withdrawn_at', 'is', null)
          .returning('number')
          .executeTakeFirst()
        if (!done && !(await sheetOf(tx, survey, Number(number)))) throw notFound('This sheet')
        if (done)
          await note(tx, caller, now, 'sheet withdrawn', survey, { number: done.number, reason: request.body.reason })
      })
      return { withdrawn: true }
    },
  )
}
