import type { Help } from '../record/survey.ts'

/** 'complete' only with every field; 'begun' with any. */
export type HelpState = 'none' | 'begun' | 'complete'

const fields = ['role', 'call', 'act', 'confirmedBy', 'confirmedOn', 'ifNobody'] as const

export function helpState(help: Help | undefined): HelpState {
  const given = fields.filter((field) => (help?.[field] ?? '').trim() !== '')
  if (given.length === 0) return 'none'
  return given.length === fields.length ? 'complete' : 'begun'
}

const names: Record<(typeof fields)[number], string> = {
  role: 'role',
  call: 'how it is called',
  act: 'what is done',
  confirmedBy: 'who confirmed it',
  confirmedOn: 'when it was confirmed',
  ifNobody: 'what to do if nobody comes',
}

/** What is missing from help that was begun, in words. */
export function helpMissing(help: Help | undefined): string[] {
  return fields.filter((field) => (help?.[field] ?? '').trim() === '').map((field) => names[field])
}
