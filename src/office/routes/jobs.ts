import { readTeamFile } from '../../record/file/team-file.ts'
import { type FastifyInstance, Type } from '../fastify.ts'
import { callerOn } from '../guard.ts'
import type { Office } from '../office.ts'
import { notFound, Refusal } from '../refusal.ts'
import { note } from '../repositories/audit.ts'
import { addJob, jobOf, resultsOf } from '../repositories/jobs.ts'
import { desk } from '../rules.ts'
import { digits, idText, text } from '../shape.ts'

const params = Type.Object({ job: idText })

/** A new team card tried on every venue: begun here, worked through in the background, read off page by page. */
export function jobRoutes(app: FastifyInstance, office: Office): void {
  app.post(
    '/api/jobs/team-trial',
    {
      config: { rule: { who: desk } },
      // The file of a team card as it was exported.
      schema: { body: Type.Object({ team: Type.Object({}) }) },
    },
    async (request, reply) => {
      const caller = callerOn(request)
      const read = readTeamFile(JSON.stringify(request.body.team))
      if (!read.ok) {
        const problem = read.problems[0]
        throw new Refusal(
          422,
          'team',
          `The team card cannot be read, at "${problem?.path}": expected ${problem?.expected}, found ${problem?.found}.`,
          problem?.whatToDo ?? 'Export the team card again.',
        )
      }
      if (!office.judge) throw new Refusal(501, 'no-judge', 'This office cannot judge.', 'Start the full program.')
      const now = office.now()
      const job = await addJob(office.db, caller, 'team-trial', { team: read.team }, now)
      await note(office.db, caller, now, 'team card tried on every venue', null, { job: job.job, team: read.team.name })
      reply.code(202)
      return job
    },
  )

  app.get('/api/jobs/:job', { config: { rule: { who: desk } }, schema: { params } }, async (request) => {
    const job = await jobOf(office.db, callerOn(request).branch, request.params.job)
    if (!job) throw notFound('This job')
    return job
  })

  app.get(
    '/api/jobs/:job/results',
    {
      config: { rule: { who: desk } },
      schema: {
        params,
        querystring: Type.Object({ after: Type.Optional(text(400, 0)), most: Type.Optional(digits) }),
      },
    },
    async (request) => {
      const { job } = request.params
      const { after = '', most } = request.query
      if (!(await jobOf(office.db, callerOn(request).branch, job))) throw notFound('This job')
      const results = await resultsOf(office.db, job, after, Math.max(1, Math.min(Number(most ?? 200), 1000)))
      return { results, next: results.at(-1)?.survey ?? null }
    },
  )
}
