import type { OfficeRefusal } from './messages.ts'

/** The part of `fetch` that is used: pass the browser's own, with a time limit of the caller's choice. */
export type Fetch = (
  address: string,
  init: { method: string; headers: Record<string, string>; body?: string | ArrayBuffer },
) => Promise<{ status: number; text(): Promise<string> }>

/** The line to one office. `token` is absent before the phone has enrolled. */
export interface Line {
  address: string
  token?: string
  fetch: Fetch
}

export type Answer<T> =
  | { ok: true; body: T }
  /** The office said no: trying the same again changes nothing. */
  | { ok: false; again: false; status: number; refusal: OfficeRefusal }
  /** No answer, or one that may be another in a while: try again later. */
  | { ok: false; again: true; what: string }

/** Asks the office one thing. Every failure is a value. */
export async function ask<T>(
  line: Line,
  method: 'GET' | 'POST' | 'PUT',
  path: string,
  body?: object | ArrayBuffer,
): Promise<Answer<T>> {
  const headers: Record<string, string> = {}
  if (line.token !== undefined) headers.authorization = `Bearer ${line.token}`
  const isBytes = body instanceof ArrayBuffer
  if (body) headers['content-type'] = isBytes ? 'application/octet-stream' : 'application/json'
  let status: number
  let text: string
  try {
    const sent = body === undefined ? {} : { body: isBytes ? body : JSON.stringify(body) }
    const reply = await line.fetch(`${line.address}${path}`, { method, headers, ...sent })
    status = reply.status
    text = await reply.text()
  } catch {
    return { ok: false, again: true, what: 'The office does not answer.' }
  }
  const parsed = parse(text)
  if (status >= 200 && status < 300)
    return parsed === undefined
      ? { ok: false, again: true, what: "The office's answer was cut short." }
      : { ok: true, body: parsed as T }
  if (status === 429 || status >= 500 || !isRefusal(parsed))
    return { ok: false, again: true, what: isRefusal(parsed) ? parsed.what : `The office answered ${status}.` }
  return { ok: false, again: false, status, refusal: parsed }
}

function parse(text: string): unknown {
  try {
    return JSON.parse(text)
  } catch {
    return undefined
  }
}

function isRefusal(value: unknown): value is OfficeRefusal {
  if (typeof value !== 'object' || value === null) return false
  const { error, what, whatToDo } = value as Record<string, unknown>
  return [error, what, whatToDo].every((one) => typeof one === 'string')
}
