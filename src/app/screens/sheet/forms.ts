import type { Assessment } from '../../../judge/result.ts'
import type { Survey } from '../../../record/survey.ts'
import type { Outline, Reader } from '../../../sheets/content/tree.ts'
import { toHtml } from '../../../sheets/html/to-html.ts'
import { toText } from '../../../sheets/text/to-text.ts'

export interface Source {
  survey: Survey
  assessment: Assessment
  walk: string
}

export interface SheetForm {
  id: string
  label: string
  /** How its file's name ends. */
  ending: string
  /** MIME type. */
  type: string
  /** Who may have it; absent: everybody. */
  readers?: readonly Reader[]
  write(outline: Outline, source: Source): Promise<string>
}

/** Files of readings and drawings go to those who work with them, never to a client. */
const working: readonly Reader[] = ['venue', 'file']

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
