import { join } from 'node:path'
import type { WalkResult } from '../judge/result.ts'
import { lint } from '../sheets/content/lint.ts'
import { outline } from '../sheets/content/outline.ts'
import type { Outline } from '../sheets/content/tree.ts'
import { oneOf, readArgs } from './args.ts'
import { type Complaint, complaint, done, type Ended, type Machine, type OutFile } from './ended.ts'
import { fileNames } from './file-name.ts'
import { type Form, forms } from './forms.ts'
import { type Judged, judgedFile, judgingOptions } from './judged.ts'

const readers = ['client', 'venue', 'file', 'reception'] as const

/**
 * `sheet FILE --for READER --form FORM --out DIR`: one file a walk; prints their paths. A walk whose sheet may not be given
 * is left out with a note; where none may, or the one asked for may not, nothing is written.
 */
export async function sheet(args: readonly string[], machine: Machine): Promise<Ended> {
  const read = readArgs(args, {
    values: [...judgingOptions, 'for', 'form', 'out'],
    flags: ['draft'],
    places: 1,
    place: 'FILE',
  })
  if (!read.ok) return read
  const { values, flags } = read.args
  const reader = oneOf('for', values.for, readers)
  if (!reader.ok) return reader
  const form = values.form === undefined || !Object.hasOwn(forms, values.form) ? undefined : forms[values.form]
  if (!form) {
    const asked = values.form === undefined ? '--form is not given' : `form ${values.form} is not in this version`
    return { ok: false, line: `${asked}; forms: ${Object.keys(forms).join(', ')}` }
  }
  if (values.out === undefined) return complaint('--out is not given', 'write --out DIR')
  const judged = judgedFile(read.args, machine)
  if (!judged.ok) return judged
  const names = fileNames(judged.survey.view.walks.map((walk) => walk.id))
  const files: OutFile[] = []
  const refused: Complaint[] = []
  for (const walk of judged.assessment.walks) {
    const content = await written(judged, walk, reader.word, form, flags.has('draft'))
    if (content && typeof content === 'object' && 'ok' in content) refused.push(content)
    else files.push({ path: join(values.out, `${names.get(walk.id)}-${reader.word}.${form.ending}`), content })
  }
  const [first] = refused
  if (first && files.length === 0) return first
  if (files.length === 0) return complaint(`${read.args.places[0]} has no walk`, 'add one to the survey')
  const notes = [...judged.notes, ...refused.map(({ line }) => line)]
  return done(files.map(({ path }) => `${path}\n`).join(''), [...judged.files, ...files], notes)
}

async function written(
  { survey, team, assessment }: Judged,
  walk: WalkResult,
  reader: (typeof readers)[number],
  form: Form,
  draft: boolean,
): Promise<string | Uint8Array | Complaint> {
  const tree = outline(survey, walk, assessment, reader, { on: assessment.on, draft }, team)
  if (tree.kind === 'refusal') return complaint(`${tree.why} (missing: ${tree.missing.join(', ')})`, tree.whatToDo)
  if (reader === 'client' && form.data && (walk.verdict === 'do-not-use' || walk.verdict === 'not-known'))
    return complaint(
      `${walk.name} is ${walk.verdict}: a client has no ${form.ending} of it`,
      'write --form html or text',
    )
  const unfit = draft || reader !== 'client' ? null : unfitWords(walk, tree)
  if (unfit) return unfit
  const content = await form.write(tree, { survey, assessment, walk: walk.id, draft })
  if (typeof content === 'string' || content instanceof Uint8Array) return content
  return complaint(`${content.why} (missing: ${content.missing.join(', ')})`, content.whatToDo)
}

/** A client's sheet with words that a client cannot use is a draft, and has to say so. */
function unfitWords(walk: WalkResult, tree: Outline): Complaint | null {
  const [first, ...more] = lint(tree)
  if (!first) return null
  const others = more.length > 0 ? ` (${more.length} more)` : ''
  return complaint(
    `${walk.name} has no client sheet yet: ${first.where}: "${first.text}": ${first.problem}${others}`,
    `${first.whatToDo}, or write --draft`,
  )
}
