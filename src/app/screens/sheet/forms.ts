import type { Assessment } from '../../../judge/result.ts'
import type { Survey } from '../../../record/survey.ts'
import type { Outline, Reader } from '../../../sheets/content/tree.ts'
import { toHtml } from '../../../sheets/html/to-html.ts'
import { toText } from '../../../sheets/text/to-text.ts'
import type { SheetOrder } from '../../../workers/bridge.ts'

export interface Source {
  survey: Survey
  assessment: Assessment
  walk: string
}

interface Named {
  id: string
  label: string
  /** How its file's name ends. */
  ending: string
  /** MIME type. */
  type: string
  /** Who may have it; absent: everybody. */
  readers?: readonly Reader[]
}

/** Shown as it is handed over. */
export interface TextForm extends Named {
  write(outline: Outline, source: Source): Promise<string>
}

/** Written by the worker, and opened by another app. */
export interface FileForm extends Named {
  order: SheetOrder['as']
  needsExtras: boolean
  /** Stands in the file's name where the ending does not tell two forms apart. */
  suffix?: string
}

export type SheetForm = TextForm | FileForm

/** Files of readings and drawings go to those who work with them, never to a client. */
const working: readonly Reader[] = ['venue', 'file']

/** Braille files are plain ASCII, but for no eye: the type keeps phones from opening them as text. */
const brf = { ending: 'brf', type: 'application/octet-stream', needsExtras: true }

export const sheetForms: readonly SheetForm[] = [
  { id: 'html', label: 'Page', ending: 'html', type: 'text/html', write: async (outline) => toHtml(outline) },
  { id: 'text', label: 'Plain text', ending: 'txt', type: 'text/plain', write: async (outline) => toText(outline) },
  {
    id: 'audio',
    label: 'Script to read aloud',
    ending: 'txt',
    type: 'text/plain',
    write: async (outline) => (await import('../../../sheets/audio/to-audio.ts')).toAudio(outline),
  },
  { id: 'pdf', label: 'PDF', ending: 'pdf', type: 'application/pdf', order: 'pdf', needsExtras: true },
  {
    id: 'word',
    label: 'Word-processor file',
    ending: 'docx',
    type: 'application/vnd.openxmlformats-officedocument.wordprocessingml.document',
    order: 'word',
    needsExtras: false,
  },
  { id: 'braille', label: 'Braille, contracted', ...brf, order: 'braille-contracted' },
  {
    id: 'braille-uncontracted',
    label: 'Braille, uncontracted',
    ...brf,
    order: 'braille-uncontracted',
    suffix: 'uncontracted',
  },
  {
    id: 'csv',
    label: 'Table of readings',
    ending: 'csv',
    type: 'text/csv',
    readers: working,
    write: async (_, { survey, assessment, walk }) =>
      (await import('../../../sheets/csv/to-csv.ts')).toCsv(survey, assessment, { walk }),
  },
  {
    id: 'geojson',
    label: 'Map',
    ending: 'geojson',
    type: 'application/geo+json',
    readers: working,
    write: async (_, { survey, assessment, walk }) =>
      (await import('../../../sheets/geo/to-geojson.ts')).toGeoJson(survey, assessment, { walk }),
  },
]
