import type { Kysely } from 'kysely'
import type { Survey } from '../record/survey.ts'
import type { TeamCard } from '../record/team-card.ts'
import type { Role } from '../sync/messages.ts'
import type { PhotoStore } from './photo-store.ts'
import type { Tables } from './sql/tables.ts'

/** All that a route may reach. */
export interface Office {
  db: Kysely<Tables>
  photos: PhotoStore
  /** Milliseconds since 1970. */
  now(): number
  /** Judges a survey for a team card, the day given; null: this office cannot. */
  judge: Judge | null
  /** Makes a walk's sheet; null: this office cannot. */
  makeSheet: SheetMaker | null
  version: string
  /** This process's name in leases. */
  process: string
}

/** Who asks, by the token. */
export interface Caller {
  account: string
  name: string
  role: Role
  branch: string
  device: string
}

export interface Judged {
  walks: readonly { id: string; name: string; verdict: string; sentence: string }[]
  /** The day from which the earliest of them no longer holds, or null where none says. */
  goodUntil: string | null
}

export type Judge = (survey: Survey, team: TeamCard, on: string) => Promise<Judged>

/** Who a sheet is for. */
export const forms = ['client', 'venue', 'file', 'reception'] as const
export type Form = (typeof forms)[number]

export interface SheetOrder {
  survey: Survey
  walk: string
  form: Form
  number: number
  on: string
}

export type MadeSheet =
  /** `goodUntil`: the last day it holds, by what it rests on; null where nothing in it is dated. */
  | { ok: true; title: string; verdict: string; html: string; goodUntil: string | null }
  | { ok: false; why: string; whatToDo: string }

export type SheetMaker = (order: SheetOrder) => Promise<MadeSheet>

export function isoOf(now: number): string {
  return new Date(now).toISOString()
}

export function dayOf(now: number): string {
  return isoOf(now).slice(0, 10)
}
