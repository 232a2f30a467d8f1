import type {} from 'fastify'
import type { Role } from '../sync/messages.ts'

/**
 * Who may use a route. Every route declares one; a route without one stops the start. `survey`: the address names a survey,
 * which must be the caller's branch's own, or may be new.
 */
export type Rule = { who: 'anyone' } | { who: readonly Role[]; survey?: 'own' | 'own-or-new' }

export const anyone: Rule = { who: 'anyone' }
export const staff: readonly Role[] = ['surveyor', 'reviewer', 'administrator']
export const desk: readonly Role[] = ['reviewer', 'administrator']
export const administrators: readonly Role[] = ['administrator']
/** A signature is a practitioner's act: an administrator who only keeps the machine running cannot give it. */
export const reviewers: readonly Role[] = ['reviewer']

declare module 'fastify' {
  interface FastifyContextConfig {
    rule?: Rule
  }
}
