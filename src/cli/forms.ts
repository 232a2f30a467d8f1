import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import type { Assessment } from '../judge/result.ts'
import type { Survey } from '../record/survey.ts'
import { toAudio } from '../sheets/audio/to-audio.ts'
import { type LouisModule, louis, type TableFile, tableFiles } from '../sheets/braille/louis.ts'
import { toBraille } from '../sheets/braille/to-braille.ts'
import type { Outline, Refusal } from '../sheets/content/tree.ts'
import { toCsv } from '../sheets/csv/to-csv.ts'
import { toGeoJson } from '../sheets/geo/to-geojson.ts'
import { toHtml } from '../sheets/html/to-html.ts'
import { toPdf } from '../sheets/pdf/to-pdf.ts'
import { toText } from '../sheets/text/to-text.ts'
import { toWord } from '../sheets/word/to-word.ts'

type Written = string | Uint8Array | Refusal

export interface Form {
  /** How its file's name ends. */
  ending: string
  /** Readings and drawings rather than a sheet: a client has none of a walk that nobody may be sent on. */
  data?: true
  write(outline: Outline, of: Source): Written | Promise<Written>
}

/** What the forms that are no document are written from. */
export interface Source {
  survey: Survey
  assessment: Assessment
  walk: string
  draft: boolean
}

export const forms: Readonly<Record<string, Form>> = {
  html: { ending: 'html', write: (outline) => toHtml(outline) },
  text: { ending: 'txt', write: (outline) => toText(outline) },
  pdf: { ending: 'pdf', write: (outline) => toPdf(outline, faces()) },
  braille: { ending: 'brf', write: (outline) => toBraille(outline, braille()) },
  word: { ending: 'docx', write: (outline) => toWord(outline) },
  geojson: {
    ending: 'geojson',
    data: true,
    write: (_, { survey, assessment, ...options }) => toGeoJson(survey, assessment, options),
  },
  csv: {
    ending: 'csv',
    data: true,
    write: (_, { survey, assessment, ...options }) => toCsv(survey, assessment, options),
  },
  audio: { ending: 'txt', write: (outline) => toAudio(outline) },
}

const require = createRequire(import.meta.url)

function faces() {
  const folder = require.resolve('dejavu-fonts-ttf/package.json').replace(/package\.json$/, 'ttf/')
  const face = (name: string) => new Uint8Array(readFileSync(folder + name))
  return { font: face('DejaVuSans.ttf'), boldFont: face('DejaVuSans-Bold.ttf'), made: new Date() }
}

/** Contracted English braille: what most readers of a BRF file expect. */
function braille() {
  const folder = `${require.resolve('liblouis-build').replace(/[^/]+$/, '')}tables/`
  const tables = Object.fromEntries(tableFiles.map((name) => [name, readFileSync(folder + name, 'utf8')]))
  return louis(require('liblouis-build') as LouisModule, tables as Record<TableFile, string>)(2)
}
