import type { Fact } from '../../record/facts.ts'
import { malformedFact } from '../../record/log.ts'
import { isOfficeDevice, page, type SyncReply, spoken } from '../../sync/messages.ts'
import { type FastifyInstance, Type } from '../fastify.ts'
import { callerOn } from '../guard.ts'
import { isoOf, type Office } from '../office.ts'
import { Refusal } from '../refusal.ts'
import { addFacts, factsBeyond, haveOf } from '../repositories/facts.ts'
import { seen } from '../repositories/people.ts'
import { expectOwnOrNew } from '../repositories/surveys.ts'
import { staff } from '../rules.ts'
import { idText, surveyParams } from '../shape.ts'
import { transact } from '../sql/transact.ts'

/** Device to number. Keys that a client of a later version adds to the message beside these are passed over. */
const message = Type.Object({
  protocol: Type.Integer(),
  have: Type.Record(idText, Type.Integer({ minimum: 0 }), { maxProperties: 5000 }),
  facts: Type.Array(Type.Unknown(), { maxItems: 2 * page.facts }),
})

/** One exchange by difference: stores what is new, answers with what the office holds and what the phone lacks. */
export function syncRoutes(app: FastifyInstance, office: Office): void {
  app.post(
    '/api/surveys/:survey/sync',
    {
      config: { rule: { who: staff, survey: 'own-or-new' } },
      schema: { params: surveyParams, body: message },
    },
    async (request): Promise<SyncReply> => {
      const caller = callerOn(request)
      const { survey } = request.params
      const { protocol, have, facts } = request.body
      expectSpoken(protocol)
      expectFacts(survey, facts)
      // The office's own entries (settlements, signatures) are made here: brought back by a phone they are passed over.
      const phones = facts.filter((fact) => !isOfficeDevice(fact.device))
      const now = office.now()
      const reply = await transact(office.db, async (tx) => {
        const added = await addFacts(tx, caller, survey, phones, now)
        // Nothing to add holds no lock: a survey nobody has sent is no error, it is empty here.
        if (added === 0) await expectOwnOrNew(tx, caller.branch, survey)
        const ack = await haveOf(tx, survey)
        return { ack, ...(await factsBeyond(tx, survey, ack, have)), at: isoOf(now) }
      })
      await seen(office.db, caller.device, now)
      return reply
    },
  )
}

function expectSpoken(protocol: number): void {
  if (protocol >= spoken.least && protocol <= spoken.greatest) return
  const older = protocol < spoken.least
  throw new Refusal(
    426,
    older ? 'app-too-old' : 'app-too-new',
    older ? 'This app is too old for the office.' : 'This app is newer than the office.',
    older
      ? 'Renew the app; what is on the phone stays. Until then share the survey as a file.'
      : 'Ask the administrator to renew the office. Until then share the survey as a file.',
  )
}

function expectFacts(survey: string, facts: readonly unknown[]): asserts facts is Fact[] {
  for (const [i, fact] of facts.entries()) {
    const refusal = malformedFact(survey, fact) ?? unfit(fact as Fact)
    if (!refusal) continue
    throw new Refusal(
      refusal.why === 'other-survey' ? 409 : 400,
      refusal.why,
      `Entry ${i} of the message, at "${refusal.path.slice(0, 200)}": expected ${refusal.expected.slice(0, 300)}, found ${refusal.found.slice(0, 300)}. Nothing of it was stored.`,
      refusal.whatToDo,
    )
  }
}

/** A device's id goes into a column of its own: no control characters, no half of a surrogate pair. */
function unfit(fact: Fact) {
  // biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is refused
  if (!/[\u0000-\u001f\u007f\ud800-\udfff]/.test(fact.device)) return null
  return {
    why: 'malformed',
    path: 'device',
    expected: 'a device id in printable characters',
    found: 'others',
    whatToDo: 'Share the survey as a file.',
  }
}
