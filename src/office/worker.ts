import { foldSurvey } from '../record/fold.ts'
import { defaultTeamCard, type TeamCard } from '../record/team-card.ts'
import { dayOf, type Judge, type Office } from './office.ts'
import { logOf } from './repositories/facts.ts'
import { finish, type Leased, lease, leaseHolds, renew } from './repositories/jobs.ts'
import { tryTeam } from './team-trial.ts'

export interface Worker {
  /** Resolves when the item under way is done; no other is begun. */
  stop(): Promise<void>
}

/** Works through jobs and freshens the verdicts of changed venues, one at a time, until stopped. */
export function startWorker(office: Office, tell: (error: unknown) => void, idle = 2000): Worker {
  let running = true
  let wake: () => void = () => undefined
  const work = async () => {
    while (running) {
      const worked = await workOnce(office).catch((error: unknown) => {
        tell(error)
        return false
      })
      if (!worked && running)
        await new Promise<void>((resolve) => {
          const timer = setTimeout(resolve, idle)
          wake = () => {
            clearTimeout(timer)
            resolve()
          }
        })
    }
  }
  const ended = work()
  return {
    async stop() {
      running = false
      wake()
      await ended
    },
  }
}

/** Does one piece of work; false where there is none. */
export async function workOnce(office: Office): Promise<boolean> {
  const { judge } = office
  if (!judge) return false
  const item = await lease(office.db, office.process, office.now())
  if (item) {
    await workOn(office, judge, item)
    return true
  }
  return freshen(office, judge)
}

async function workOn(office: Office, judge: Judge, item: Leased): Promise<void> {
  const { db } = office
  // A large venue may take longer than a lease: it is renewed while the work goes on.
  const renewing = setInterval(
    () => void renew(db, item, office.process, office.now()).catch(() => undefined),
    renewEvery,
  )
  try {
    const survey = foldSurvey(await logOf(db, item.survey))
    const { team } = item.detail as { team: TeamCard }
    await finish(db, item, office.process, 'done', await tryTeam(judge, survey, team, dayOf(office.now())))
  } catch (error) {
    if (isEnding(error)) return
    await finish(db, item, office.process, 'failed', { why: error instanceof Error ? error.message : String(error) })
  } finally {
    clearInterval(renewing)
  }
}

const renewEvery = leaseHolds / 5

/** The judge was stopped with the office: nothing is said of the venue, and it is taken up again after the next start. */
function isEnding(error: unknown): boolean {
  return error instanceof Error && error.message.startsWith('office/core-ended')
}

/** From best to worst, for the one word that a line of the list has room for. */
const order = ['usable', 'with-cautions', 'with-help', 'not-known', 'do-not-use']

/** Judges one venue that has grown since it was last judged. Two processes may do the same one: the answers are the same. */
async function freshen(office: Office, judge: Judge): Promise<boolean> {
  const { db } = office
  const row = await db
    .selectFrom('surveys')
    .select(['survey', 'size'])
    .where((eb) => eb('judged_size', '<', eb.ref('size')))
    .where('erased_at', 'is', null)
    .orderBy('changed_at')
    .limit(1)
    .executeTakeFirst()
  if (!row) return false
  const survey = foldSurvey(await logOf(db, row.survey))
  const judged = await judge(survey, survey.view.team ?? defaultTeamCard, dayOf(office.now())).catch(
    (error: unknown) => {
      if (isEnding(error)) throw error
      return null
    },
  )
  const worst = judged?.walks.map((walk) => order.indexOf(walk.verdict)).sort((a, b) => b - a)[0]
  await db
    .updateTable('surveys')
    .set({
      judged_size: row.size,
      // What cannot be judged is not known; a venue without walks has nothing to say yet.
      verdict: worst === undefined ? (judged ? null : 'not-known') : (order[worst] ?? 'not-known'),
      good_until: judged?.goodUntil ?? null,
    })
    .where('survey', '=', row.survey)
    .where('size', '>=', row.size)
    .where('erased_at', 'is', null)
    .execute()
  return true
}
