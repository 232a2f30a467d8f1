import { mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs'
import { dirname } from 'node:path'
import { type Done, type Machine, type OutFile, oneLine } from './ended.ts'
import { run } from './run.ts'

const badInput = 2
const programFault = 1

const machine: Machine = {
  read(path) {
    try {
      return { ok: true, text: readFileSync(path, 'utf8') }
    } catch (error) {
      const code = (error as NodeJS.ErrnoException).code
      return { ok: false, missing: code === 'ENOENT', why: why(code) }
    }
  },
  today: () => new Date().toISOString().slice(0, 10),
}

function why(code: string | undefined): string {
  const words: Record<string, string> = {
    ENOENT: 'no such file',
    EISDIR: 'it is a folder',
    EACCES: 'reading is not allowed',
    ENOTDIR: 'part of the path is a file',
  }
  return words[code ?? ''] ?? `it cannot be read (${code ?? 'unknown'})`
}

/** Whole or not at all: a reader never meets half a file. */
function write({ path, content }: OutFile): void {
  mkdirSync(dirname(path), { recursive: true })
  const draft = `${path}.${process.pid}.part`
  writeFileSync(draft, content)
  renameSync(draft, path)
}

function say(line: string): void {
  process.stderr.write(`${oneLine(line)}\n`)
}

try {
  const ended = await run(process.argv.slice(2), machine)
  if (ended.ok) finish(ended)
  else {
    say(ended.line)
    process.exitCode = badInput
  }
} catch (error) {
  say(`a fault of this program: ${error instanceof Error ? error.message : error}: please report it with the file`)
  process.exitCode = programFault
}

function finish({ files, notes, out }: Done): void {
  try {
    for (const file of files) write(file)
  } catch (error) {
    say(`${error instanceof Error ? error.message : error}: give another place to write to`)
    process.exitCode = badInput
    return
  }
  for (const note of notes) say(note)
  process.stdout.write(out)
}
