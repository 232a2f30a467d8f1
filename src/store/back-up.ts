import type { Fact } from '../record/facts.ts'
import { parseJson } from '../record/file/parse-json.ts'
import { emptyLog, mergeFacts } from '../record/log.ts'
import { type Database, openWriting, type Photo, type Writing } from './database.ts'
import { newFacts, writeFacts } from './facts.ts'
import { readSettings } from './settings.ts'
import { type Trouble, troubleOf } from './trouble.ts'

/** Everything on the phone but the planner's memo and the phone's own id. Photos in base 64. */
interface Body {
  facts: Fact[]
  drafts: [key: string, value: unknown][]
  settings: [key: string, value: unknown][]
  photos: { id: string; type: string; bytes: string }[]
}

export type Restored = { saved: true; surveys: number; facts: number } | Trouble

/** Longest back-up read, in characters. */
const longest = 400 * 1024 * 1024

/** Everything on this phone as one JSON text, with a checksum of its body. */
export async function backUp(database: Database): Promise<string> {
  const tx = database.transaction(['facts', 'drafts', 'photos'])
  const [facts, draftKeys, drafts, photos] = await Promise.all([
    tx.objectStore('facts').getAll(),
    tx.objectStore('drafts').getAllKeys(),
    tx.objectStore('drafts').getAll(),
    tx.objectStore('photos').getAll(),
  ])
  const body: Body = {
    facts,
    drafts: draftKeys.map((key, i): [string, unknown] => [key, drafts[i]]),
    settings: Object.entries(await readSettings(database)),
    photos: photos.map(({ id, type, bytes }) => ({ id, type, bytes: toBase64(bytes) })),
  }
  const text = JSON.stringify(body)
  const head = { kind: 'tautline-backup', version: 1, made: new Date().toISOString(), sha256: await sha256(text) }
  return `${JSON.stringify(head).slice(0, -1)},"body":${text}}\n`
}

/**
 * Brings a back-up's content back beside what is on the phone, in one transaction: all of it or nothing. Facts only add;
 * a setting or a half-typed entry that is here stays. The phone keeps its own id, so a copied phone never shares one.
 */
export async function restore(database: Database, text: string): Promise<Restored> {
  const body = await readBody(text)
  if ('saved' in body) return body
  let tx: Writing | undefined
  try {
    tx = openWriting(database, ['facts', 'marks', 'surveys', 'drafts', 'settings', 'photos'])
    const added = await newFacts(tx, body.facts)
    if ('saved' in added) {
      tx.abort()
      return added
    }
    await writeFacts(tx, added, new Date().toISOString())
    for (const [key, value] of body.drafts)
      if ((await tx.objectStore('drafts').getKey(key)) === undefined) await tx.objectStore('drafts').put(value, key)
    for (const [key, value] of body.settings)
      if ((await tx.objectStore('settings').getKey(key)) === undefined) await tx.objectStore('settings').put(value, key)
    for (const { id, type, bytes } of body.photos)
      await tx.objectStore('photos').put({ id, type, bytes: fromBase64(bytes) } satisfies Photo)
    await tx.done
    return { saved: true, surveys: new Set(body.facts.map((fact) => fact.survey)).size, facts: added.length }
  } catch (error) {
    return troubleOf(tx?.error ?? error)
  }
}

async function readBody(text: string): Promise<Body | Trouble> {
  const parsed = parseJson(text, longest)
  if (!parsed.ok) return refused(parsed.problems[0]?.found ?? 'no JSON')
  const file = parsed.value as { kind?: unknown; version?: unknown; sha256?: unknown; body?: unknown } | null
  if (file?.kind !== 'tautline-backup' || file.version !== 1) return refused('it is no back-up of this app')
  if (file.sha256 !== (await sha256(JSON.stringify(file.body)))) return refused('it is damaged: the checksum differs')
  const body = file.body as Partial<Body>
  const { facts, drafts, settings, photos } = body
  if (![facts, drafts, settings, photos].every(Array.isArray)) return refused('parts of it are missing')
  const bad = firstRefusal(facts as Fact[])
  return bad ? refused(bad) : (body as Body)
}

/** Facts go through the record's own gate, survey by survey. */
function firstRefusal(facts: readonly Fact[]): string | undefined {
  const bySurvey = new Map<string, Fact[]>()
  for (const fact of facts) {
    if (typeof fact?.survey !== 'string') return 'an entry names no survey'
    const own = bySurvey.get(fact.survey) ?? []
    own.push(fact)
    bySurvey.set(fact.survey, own)
  }
  for (const [survey, own] of bySurvey) {
    const refusal = mergeFacts(emptyLog(survey), own).refused[0]
    if (refusal) return `${refusal.path}: expected ${refusal.expected}, found ${refusal.found}`
  }
  return undefined
}

function refused(why: string): Trouble {
  return {
    saved: false,
    what: `Not restored: ${why}. Nothing on this phone was changed.`,
    whatToDo: 'Choose another back-up, or make a new one on the phone it came from.',
  }
}

async function sha256(text: string): Promise<string> {
  const hash = await crypto.subtle.digest('SHA-256', new TextEncoder().encode(text))
  return [...new Uint8Array(hash)].map((byte) => byte.toString(16).padStart(2, '0')).join('')
}

function toBase64(bytes: ArrayBuffer): string {
  let text = ''
  const view = new Uint8Array(bytes)
  // In pieces: a call takes only so many arguments.
  for (let i = 0; i < view.length; i += 0x8000) text += String.fromCharCode(...view.subarray(i, i + 0x8000))
  return btoa(text)
}

function fromBase64(text: string): ArrayBuffer {
  return Uint8Array.from(atob(text), (char) => char.charCodeAt(0)).buffer
}
