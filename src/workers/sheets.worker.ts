import type { Grade, LouisModule, TableFile, Translate } from '../sheets/braille/louis.ts'
import type { Refusal } from '../sheets/content/tree.ts'
import type { FromSheets, SheetAnswer, SheetOrder, ToSheets } from './sheet-messages.ts'

// A classic script, and everything it needs is loaded when first asked for: the braille translator is a classic script too,
// and is taken as it came.

/** A part of the offline extras that is not to be had. */
class ExtrasMissing extends Error {}

/** Writes one order. `begin` is called when all is loaded. */
type Write = (order: SheetOrder, begin: () => void) => Promise<Uint8Array | string | Refusal>

const writers: Readonly<Record<SheetOrder['as'], Write>> = {
  async pdf({ outline, extras }, begin) {
    const [{ toPdf }, font, boldFont] = await Promise.all([
      import('../sheets/pdf/to-pdf.ts'),
      bytesOf(`${extras}fonts/DejaVuSans.ttf`),
      bytesOf(`${extras}fonts/DejaVuSans-Bold.ttf`),
    ])
    begin()
    return toPdf(outline, { font, boldFont, made: new Date() })
  },
  async word({ outline }, begin) {
    const { toWord } = await import('../sheets/word/to-word.ts')
    begin()
    return toWord(outline)
  },
  'braille-contracted': (order, begin) => writeBraille(order, 2, begin),
  'braille-uncontracted': (order, begin) => writeBraille(order, 1, begin),
}

async function writeBraille({ outline, extras }: SheetOrder, grade: Grade, begin: () => void) {
  const { toBraille } = await import('../sheets/braille/to-braille.ts')
  translators ??= await loadLouis(`${extras}braille/`)
  begin()
  return toBraille(outline, translators(grade))
}

let translators: ((grade: Grade) => Translate) | null = null

async function loadLouis(folder: string): Promise<(grade: Grade) => Translate> {
  const { louis, tableFiles } = await import('../sheets/braille/louis.ts')
  const texts = await Promise.all(
    tableFiles.map(async (name) => [name, new TextDecoder().decode(await bytesOf(`${folder}tables/${name}`))] as const),
  )
  try {
    importScripts(`${folder}build-no-tables-utf16.js`)
  } catch (error) {
    throw new ExtrasMissing(error instanceof Error ? error.message : String(error))
  }
  const { liblouisBuild } = self as unknown as { liblouisBuild: LouisModule }
  return louis(liblouisBuild, Object.fromEntries(texts) as Record<TableFile, string>)
}

async function bytesOf(address: string): Promise<Uint8Array<ArrayBuffer>> {
  const response = await fetch(address).catch((error: unknown) => {
    throw new ExtrasMissing(String(error))
  })
  if (!response.ok) throw new ExtrasMissing(`${response.status} for ${address}`)
  return new Uint8Array(await response.arrayBuffer())
}

addEventListener('message', ({ data: order }: MessageEvent<ToSheets>) => void answer(order))

async function answer({ number, ...order }: ToSheets) {
  tell({ kind: 'stage', number, stage: 'loading' })
  const begin = () => tell({ kind: 'stage', number, stage: 'writing' })
  tell({ kind: 'answer', number, answer: await writers[order.as](order, begin).then(written, problem) })
}

function written(content: Uint8Array | string | Refusal): SheetAnswer {
  if (typeof content === 'string') return { kind: 'written', bytes: new TextEncoder().encode(content) }
  return content instanceof Uint8Array ? { kind: 'written', bytes: new Uint8Array(content) } : content
}

function problem(error: unknown): SheetAnswer {
  if (error instanceof ExtrasMissing)
    return {
      kind: 'problem',
      problem: `A part of the offline extras could not be read (${error.message}).`,
      whatToDo: 'Remove the offline extras and get them again, with a network.',
    }
  return {
    kind: 'problem',
    problem: `This form could not be written: ${error instanceof Error ? error.message : error}.`,
    whatToDo: 'Give the sheet as a page or as plain text: they say the same.',
  }
}

function tell(message: FromSheets) {
  postMessage(message)
}
