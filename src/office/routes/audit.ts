import { type FastifyInstance, Type } from '../fastify.ts'
import { callerOn } from '../guard.ts'
import type { Office } from '../office.ts'
import { auditAfter } from '../repositories/audit.ts'
import { administrators } from '../rules.ts'
import { digits, text } from '../shape.ts'

/** Who did what, a page at a time, oldest first: what an export is made of. */
export function auditRoutes(app: FastifyInstance, office: Office): void {
  app.get(
    '/api/audit',
    {
      config: { rule: { who: administrators } },
      schema: { querystring: Type.Object({ after: Type.Optional(text(100, 0)), most: Type.Optional(digits) }) },
    },
    async (request) => {
      const { after = '', most } = request.query
      const entries = await auditAfter(
        office.db,
        callerOn(request).branch,
        after,
        Math.max(1, Math.min(Number(most ?? 500), 5000)),
      )
      return { entries, next: entries.at(-1)?.entry ?? null }
    },
  )
}
