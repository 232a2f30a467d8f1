/** How a command ends: what it says and the files it would have written, or one line on what is wrong. */
export type Ended = Done | Complaint

export interface Done {
  ok: true
  /** For standard output, as it is. */
  out: string
  /** Notes for standard error that change nothing. */
  notes: string[]
  files: OutFile[]
}

export interface OutFile {
  path: string
  content: string | Uint8Array
}

export interface Complaint {
  ok: false
  /** What is wrong, where, and what to do. */
  line: string
}

/** What a command may ask of the machine. */
export interface Machine {
  /** The text of a file, or why it cannot be read. */
  read(path: string): { ok: true; text: string } | { ok: false; why: string; missing: boolean }
  /** Today, YYYY-MM-DD. */
  today(): string
}

export function done(out: string, files: OutFile[] = [], notes: string[] = []): Done {
  return { ok: true, out, notes, files }
}

/** "survey.json: walks/0/id: expected a text, found nothing. Write one." */
export function complaint(what: string, whatToDo: string): Complaint {
  return { ok: false, line: `${what.replace(/[.\s]+$/, '')}: ${whatToDo}` }
}

/** One printable line: whatever stands in a file or an argument cannot steer a terminal. */
export function oneLine(text: string): string {
  const plain = text.replace(/\s+/gu, ' ').replace(/[\p{Cc}\p{Cf}\p{Surrogate}]/gu, '?')
  return plain.length > 600 ? `${plain.slice(0, 599)}…` : plain
}
