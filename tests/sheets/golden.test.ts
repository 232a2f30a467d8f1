import { readFileSync } from 'node:fs'
import { expect, it } from 'vitest'
import { outline } from '../../src/sheets/content/outline.ts'
import { toText } from '../../src/sheets/text/to-text.ts'
import { library, libraryAssessment, libraryResult } from '../fixtures/sheets/library.ts'

const path = new URL('../fixtures/sheets/golden-client.txt', import.meta.url)

it("is word for word the client's sheet that was written by hand for the library", () => {
  const sheet = outline(library(), libraryResult(), libraryAssessment(), 'client', { on: '2026-11-01' })
  if (sheet.kind === 'refusal') throw new Error(sheet.why)
  expect(toText(sheet).split('\n')).toEqual(readFileSync(path, 'utf8').split('\n'))
})
