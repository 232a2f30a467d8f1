import { describe, expect, it } from 'vitest'
import { audioTracks, toAudio } from '../../src/sheets/audio/to-audio.ts'
import { own, ownWhole } from '../../src/sheets/content/own.ts'
import { hostile } from '../fixtures/sheets/hostile.ts'
import { clientSheet, sentencesOf, sheetOf, venueSheet } from '../fixtures/sheets/outlines.ts'

describe('the script of a client’s sheet', () => {
  const tracks = audioTracks(clientSheet)

  it('begins with the verdict, and with who must be with you', () => {
    expect(tracks[0]?.lines[0]).toBe('Use this walk only with the porter at the desk.')
    expect(toAudio(clientSheet).startsWith('Track 1 of 7, about ')).toBe(true)
  })

  it('has each part of the walk in a track of its own: number first, end sign last', () => {
    const parts = tracks.filter(({ lines }) => lines.some((line) => /^Part \d of/.test(line)))
    expect(parts.map(({ lines }) => lines)).toEqual([
      [
        'Parts of the walk.',
        'Part 1 of 2: Past the lockers.',
        'Start sign: mat under your feet.',
        'Facing: your back to the street door.',
        'Cue the robot, then walk 10 metres, about 17 paces.',
        'Shoreline on your left.',
        'Caution: Head height sign at 1 o’clock. Hand up, slow.',
        'End sign: the floor turns from carpet to tile.',
      ],
      [
        'Part 2 of 2: To the desk.',
        'Start sign: the floor turns from carpet to tile.',
        'Facing: turn left, 9 o’clock.',
        'Stop. Leash off. Wait for the porter.',
        'The porter offers an arm.',
        'It is 5.5 metres long.',
      ],
    ])
  })

  it('moves an end sign that is not last, and nothing else', () => {
    const sheet = structuredClone(clientSheet)
    const facts = sheet.sections[3]?.sections[0]?.blocks.at(-1)
    if (facts?.kind === 'list') facts.items.reverse()
    const lines = audioTracks(sheet).find((track) => track.lines.includes('Shoreline on your left.'))?.lines
    expect(lines?.at(-1)).toBe('End sign: the floor turns from carpet to tile.')
    expect(lines).toHaveLength(8)
  })
})

it('keeps the order of the outline', () => {
  const script = toAudio(clientSheet)
  let from = 0
  for (const words of sentencesOf(clientSheet)) {
    const at = script.indexOf(words, from)
    expect(at, words).toBeGreaterThanOrEqual(from)
    from = at + words.length
  }
})

describe.each([
  ['client', clientSheet],
  ['venue, draft', venueSheet],
])('%s', (_name, sheet) => {
  it('says every word of the outline', () => {
    const script = toAudio(sheet)
    for (const words of sentencesOf(sheet)) expect(script).toContain(words)
  })

  it('keeps every track within 90 seconds at 150 words a minute, its announcement counted', () => {
    for (const track of toAudio(sheet).split('\n\n')) {
      const words = track.split(/\s+/).filter(Boolean).length
      expect(words / 150).toBeLessThanOrEqual(1.5)
      const [, said] = /about (\d+) seconds/.exec(track) ?? []
      expect(Number(said)).toBeGreaterThanOrEqual(Math.floor((words / 150) * 60))
    }
  })
})

it('reads a table row by row, each cell with its heading, an empty one too', () => {
  const script = toAudio(venueSheet)
  expect(script).toContain('Row 1 of 42.\nWhere: Past the lockers.\nWhat: Width 820 mm for 913 mm.\n')
  expect(script).toContain('Clause: blank.\nOwner: not named.\n')
})

it('a draft says so first', () => {
  expect(audioTracks(venueSheet)[0]?.lines[0]).toBe('DRAFT.')
  expect(audioTracks(clientSheet)[0]?.lines[0]).not.toMatch(/DRAFT/)
})

it.each(Object.entries(hostile))('%s stays text, and tracks stay short', (_what, typed) => {
  for (const text of [own(typed), ownWhole(typed)]) {
    const script = toAudio(sheetOf(text))
    expect(script.replaceAll(/\s+/g, ' ')).toContain(`Name: ${text}`.slice(0, 60).trim())
    expect(script).toContain('The words after it stand.')
    for (const track of script.split('\n\n')) expect(track.split(/\s+/).filter(Boolean).length).toBeLessThanOrEqual(225)
  }
})
