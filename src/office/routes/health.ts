import { sql } from 'kysely'
import { type Hello, spoken } from '../../sync/messages.ts'
import type { FastifyInstance } from '../fastify.ts'
import type { Office } from '../office.ts'
import { Refusal } from '../refusal.ts'
import { anyone } from '../rules.ts'

/** Alive, ready to work, and what version this is: for whoever watches the office, and for a phone before it signs in. */
export function healthRoutes(app: FastifyInstance, office: Office): void {
  const config = { rule: anyone }
  app.get('/health', { config, logLevel: 'warn' }, async () => ({ alive: true }))
  app.get('/ready', { config, logLevel: 'warn' }, async () => {
    try {
      await sql`select 1`.execute(office.db)
    } catch {
      throw new Refusal(503, 'database', 'The database does not answer.', 'Look at the database, then try again.')
    }
    return { ready: true }
  })
  app.get('/api/hello', { config }, async (): Promise<Hello> => {
    return { office: 'tautline', version: office.version, protocol: spoken }
  })
}
