import { createHash } from 'node:crypto'
import type { FastifyReply } from 'fastify'
import { type FastifyInstance, Type } from '../fastify.ts'
import { callerOn } from '../guard.ts'
import { dayOf, isoOf, type Office } from '../office.ts'
import { notFound } from '../refusal.ts'
import { note } from '../repositories/audit.ts'
import { addShare, countOpening, sharedSheet, sheetOf } from '../repositories/sheets.ts'
import { anyone, desk, reviewers } from '../rules.ts'
import { hashOf, sameHash } from '../secrets.ts'
import { digits, idText } from '../shape.ts'
import { transact } from '../sql/transact.ts'

const numbered = Type.Object({ survey: idText, number: digits })
const day = 24 * 60 * 60 * 1000

/** Links by which a client or a venue reads one sheet without signing in; each can be ended, and says so when it has. */
export function shareRoutes(app: FastifyInstance, office: Office): void {
  app.post(
    '/api/surveys/:survey/sheets/:number/shares',
    {
      config: { rule: { who: reviewers, survey: 'own' } },
      schema: { params: numbered, body: Type.Object({ days: Type.Integer({ minimum: 1, maximum: 366 }) }) },
    },
    async (request, reply) => {
      const caller = callerOn(request)
      const { survey, number } = request.params
      const now = office.now()
      const sheet = await sheetOf(office.db, survey, Number(number))
      if (!sheet) throw notFound('This sheet')
      // A link never outlives its sheet.
      const expires = Math.min(now + request.body.days * day, Date.parse(`${sheet.good_until}T00:00:00Z`) + day)
      const { share, token } = await transact(office.db, async (tx) => {
        const made = await addShare(tx, survey, sheet.number, caller.account, expires, now)
        await note(tx, caller, now, 'link made', survey, { number: sheet.number, share: made.share })
        return made
      })
      reply.code(201).header('cache-control', 'no-store')
      return { share, path: `/sheet/${token}`, expires: isoOf(expires) }
    },
  )

  app.get(
    '/api/surveys/:survey/sheets/:number/shares',
    { config: { rule: { who: desk, survey: 'own' } }, schema: { params: numbered } },
    async (request) => ({
      shares: await office.db
        .selectFrom('shares')
        .select(['share', 'number', 'made_by', 'made_at', 'expires', 'revoked_at', 'opened', 'opened_at'])
        .where('survey', '=', request.params.survey)
        .where('number', '=', Number(request.params.number))
        .orderBy('made_at')
        .orderBy('share')
        .execute(),
    }),
  )

  app.post(
    '/api/surveys/:survey/shares/:share/revoke',
    {
      config: { rule: { who: desk, survey: 'own' } },
      schema: { params: Type.Object({ survey: idText, share: idText }) },
    },
    async (request) => {
      const caller = callerOn(request)
      const { survey, share } = request.params
      const now = office.now()
      await transact(office.db, async (tx) => {
        const found = await tx
          .updateTable('shares')
          .set((eb) => ({ revoked_at: eb.fn.coalesce('revoked_at', eb.val(isoOf(now))) }))
          .where('survey', '=', survey)
          .where('share', '=', share)
          .returning('share')
          .executeTakeFirst()
        if (!found) throw notFound('This link')
        await note(tx, caller, now, 'link withdrawn', survey, { share })
      })
      return { revoked: true }
    },
  )

  app.get(
    '/sheet/:token',
    {
      config: { rule: anyone, rateLimit: { max: 120, timeWindow: 60_000 } },
      schema: { params: Type.Object({ token: Type.String({ minLength: 1, maxLength: 200 }) }) },
    },
    async (request, reply) => {
      const { token } = request.params
      const found = await sharedSheet(office.db, token)
      if (!found || !sameHash(found.token_hash, hashOf(token)))
        return page(
          reply.code(404),
          notice('This link leads nowhere', 'Check that you have the whole link, or ask whoever sent it.'),
        )
      const now = office.now()
      const ended = endOf(found, now)
      if (ended) return page(reply.code(410), notice(ended, 'Ask whoever gave you this link before you set out.'))
      await countOpening(office.db, found.survey, found.share, now)
      return page(reply, found.body)
    },
  )
}

interface Ends {
  number: number
  expires: number
  revoked_at: string | null
  good_until: string
  replaced_by: number | null
  withdrawn_at: string | null
}

/** Why a link no longer shows its sheet, in the words the reader gets; null: it does. */
function endOf(share: Ends, now: number): string | null {
  const withdrawn = share.withdrawn_at ?? share.revoked_at
  const saved = 'Do not use your saved, printed or audio copy.'
  if (withdrawn) return `Withdrawn on ${dayWords(withdrawn)}. ${saved}`
  if (share.replaced_by !== null) return `Sheet ${share.number} was replaced by sheet ${share.replaced_by}. ${saved}`
  if (share.good_until < dayOf(now)) return `This sheet was good until ${dayWords(share.good_until)}. ${saved}`
  if (share.expires <= now) return `This link ended on ${dayWords(isoOf(share.expires))}. ${saved}`
  return null
}

const months = 'January February March April May June July August September October November December'.split(' ')

function dayWords(iso: string): string {
  const [year, month, date] = iso.slice(0, 10).split('-').map(Number)
  return `${date} ${months[(month ?? 1) - 1]} ${year}`
}

/** Both texts are ours: nothing from a survey stands in them. */
function notice(what: string, whatToDo: string): string {
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${what}</title>
<style>body{font:1.25rem/1.6 sans-serif;max-width:36rem;margin:2rem auto;padding:0 1rem}</style>
</head>
<body>
<main>
<h1>${what}</h1>
<p>${whatToDo}</p>
</main>
</body>
</html>
`
}

/** A page that loads nothing, runs nothing and is kept by nobody; only its own style is let in, by its hash. */
function page(reply: FastifyReply, html: string): FastifyReply {
  const styles = [...html.matchAll(/<style>([\s\S]*?)<\/style>/g)].map(
    ([, style = '']) => `'sha256-${createHash('sha256').update(style).digest('base64')}'`,
  )
  return reply
    .type('text/html; charset=utf-8')
    .header('cache-control', 'no-store')
    .header('x-robots-tag', 'noindex, nofollow, noarchive')
    .header(
      'content-security-policy',
      `default-src 'none'; style-src ${styles.join(' ') || "'none'"}; img-src data:; base-uri 'none'; form-action 'none'; frame-ancestors 'none'; sandbox`,
    )
    .send(html)
}
