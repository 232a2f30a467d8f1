import { readTeamFile, writeTeamFile } from '../../../record/file/index.ts'
import type { TeamCard } from '../../../record/team-card.ts'
import { formatGradient } from '../../../units/format.ts'
import { parseQuantity } from '../../../units/parse.ts'
import { nameOf } from './field-names.ts'
import { type CardField, cardFields } from './schema-fields.ts'

/** What stands in each field of the form, by path. '' : not answered. */
export type Texts = Readonly<Record<string, string>>

export type Troubles = Readonly<Record<string, string>>

export function textsOf(card: TeamCard): Texts {
  return Object.fromEntries(cardFields.map((field) => [field.path, textOf(field, at(card, field.path))]))
}

function textOf({ path, kind }: CardField, value: unknown): string {
  if (value === undefined || value === null) return kind === 'shown' ? 'no' : ''
  if (kind === 'shown') {
    const { name, date } = value as { name: string; date: string }
    return `${date} ${name}`
  }
  if (kind === 'flag') return value === true ? 'yes' : 'no'
  if (kind === 'numbers') return (value as number[]).join('; ')
  if (kind === 'number' && nameOf(path).quantity === 'gradient')
    return formatGradient(value as number, { unit: '1:n', towards: 'gentler' })
  return String(value)
}

/** The card that the form says, with a new revision of today; or what is wrong, by path. */
export function cardOf(
  texts: Texts,
  before: TeamCard,
  day: string,
): { ok: true; card: TeamCard } | { ok: false; troubles: Troubles } {
  const card = structuredClone(before) as unknown as Record<string, unknown>
  const was = textsOf(before)
  const troubles: Record<string, string> = {}
  for (const field of cardFields) {
    const text = (texts[field.path] ?? '').trim()
    // An untouched figure keeps every digit it had.
    if (text === was[field.path] && !(field.path === 'handler.opensDoors' && text === '')) continue
    const read = readField(field, text)
    if (!read.ok) troubles[field.path] = read.trouble
    else put(card, field.path, read.value)
  }
  card.revision = nextRevision(before.revision)
  card.date = day
  if (Object.keys(troubles).length > 0) return { ok: false, troubles }
  const checked = readTeamFile(writeTeamFile(card as unknown as TeamCard))
  if (checked.ok) return { ok: true, card: checked.team }
  return {
    ok: false,
    troubles: Object.fromEntries(
      checked.problems.map(({ path, expected, found }) => [
        path.replaceAll('/', '.'),
        `Expected ${expected}, found ${found}.`,
      ]),
    ),
  }
}

type Read = { ok: true; value: unknown } | { ok: false; trouble: string }

function readField(field: CardField, text: string): Read {
  const { quantity, unit } = nameOf(field.path)
  if (field.path === 'handler.opensDoors' && text === '')
    return { ok: false, trouble: 'Ask the handler: it decides about every door.' }
  if (text === '' && field.optional) return { ok: true, value: undefined }
  if (text === '') return { ok: false, trouble: 'This needs an answer.' }
  switch (field.kind) {
    case 'text':
    case 'choice':
      return { ok: true, value: text }
    case 'flag':
      return { ok: true, value: text === 'yes' }
    case 'shown':
      return shownOf(text)
    case 'number':
      return numberOf(text, quantity ?? 'number', unit ?? '')
    case 'numbers': {
      const each = text.split(';').map((one) => numberOf(one, quantity ?? 'number', unit ?? ''))
      return each.find((one) => !one.ok) ?? { ok: true, value: each.map((one) => (one.ok ? one.value : 0)) }
    }
  }
}

function numberOf(text: string, quantity: Parameters<typeof parseQuantity>[1]['quantity'], unit: string): Read {
  const read = parseQuantity(text, {
    quantity,
    unit: unit === 'm/s²' || unit === 'degrees' || unit === 'minutes' ? '' : unit,
  })
  if (!read.ok || read.bound !== 'exact')
    return { ok: false, trouble: `A figure is wanted${unit ? `, in ${unit}` : ''}.` }
  return { ok: true, value: read.value }
}

/** "no", or a day and the name of whoever was shown. */
function shownOf(text: string): Read {
  if (text === 'no') return { ok: true, value: null }
  const [, date, name] = /^(\d{4}-\d{2}-\d{2}) (.+)$/.exec(text) ?? []
  return date && name
    ? { ok: true, value: { name, date } }
    : { ok: false, trouble: 'Say to whom it was shown, and when.' }
}

/** 4 after 3; a revision that is no number gets one behind it. */
function nextRevision(revision: string): string {
  const [, words = '', number = ''] = /^(.*?)(\d*)$/.exec(revision) ?? []
  return `${words}${number === '' ? ' 2' : Number(number) + 1}`
}

function at(card: unknown, path: string): unknown {
  return path.split('.').reduce<unknown>((node, key) => (node as Record<string, unknown> | undefined)?.[key], card)
}

function put(card: Record<string, unknown>, path: string, value: unknown): void {
  const keys = path.split('.')
  const last = keys.pop() as string
  const node = keys.reduce<Record<string, unknown>>((one, key) => one[key] as Record<string, unknown>, card)
  if (value === undefined) delete node[last]
  else node[last] = value
}
