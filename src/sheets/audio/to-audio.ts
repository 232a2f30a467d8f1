import type { Block, Outline, Section } from '../content/tree.ts'

/** Speech at 150 words a minute, and no track over 90 seconds (common practice, no source). */
const wordsPerMinute = 150
const mostSeconds = 90
/** Left for "Track 12 of 20, about 85 seconds." and for a heading said again. */
const announcement = 7
const mostWords = (mostSeconds * wordsPerMinute) / 60 - announcement

export interface Track {
  /** Rounded up. */
  seconds: number
  /** What is said, one breath a line; the track's number is not among them. */
  lines: string[]
}

/** The script of a sheet as one text: each track's number first, a blank line between tracks, LF line ends. */
export function toAudio(outline: Outline): string {
  const tracks = audioTracks(outline)
  return tracks
    .map(({ seconds, lines }, i) => [`Track ${i + 1} of ${tracks.length}, about ${seconds} seconds.`, ...lines])
    .map((lines) => `${lines.join('\n')}\n`)
    .join('\n')
}

/**
 * A sheet for speech, in the same words and order as its text. A part of the walk is a track of its own that begins with
 * its number and ends with its end sign; other sections have tracks of their own, cut between lines where they are long.
 */
export function audioTracks(outline: Outline): Track[] {
  const open = outline.draft ? ['DRAFT.'] : []
  const first = { heading: [...open, outline.heading], lines: linesOf(outline.blocks) }
  return [first, ...outline.sections.flatMap((section) => passages(section, []))].flatMap(cut).map((lines) => ({
    seconds: Math.ceil((wordCount(lines) + announcement) * (60 / wordsPerMinute)),
    lines,
  }))
}

interface Passage {
  heading: string[]
  lines: string[]
}

/** A heading without words of its own is said before the first that has some. */
function passages(section: Section, above: readonly string[]): Passage[] {
  const heading = [...above, sentence(section.heading)]
  const lines = section.part ? endSignLast(linesOf(section.blocks)) : linesOf(section.blocks)
  if (section.sections.length === 0) return [{ heading, lines }]
  const rest = section.sections.flatMap((one, i) => passages(one, i === 0 && lines.length === 0 ? heading : []))
  return lines.length === 0 ? rest : [{ heading, lines }, ...rest]
}

function linesOf(blocks: readonly Block[]): string[] {
  return blocks.flatMap((block) => {
    if (block.kind === 'paragraph') return [block.line.text]
    if (block.kind === 'verdict') return [`Verdict: ${block.text}`]
    if (block.kind === 'list') return block.items.map(({ text }) => text)
    const rows = block.rows.flatMap((cells, i) => [
      `Row ${i + 1} of ${block.rows.length}.`,
      ...cells.map((cell, column) => sentence(`${block.head[column] ?? ''}: ${cell === '' ? 'blank' : cell}`)),
    ])
    return [sentence(block.caption), ...rows]
  })
}

/** What the hand, foot or ear meets at the end is the last thing heard. */
function endSignLast(lines: readonly string[]): string[] {
  const isEnd = (line: string) => line.startsWith('End sign:')
  return [...lines.filter((line) => !isEnd(line)), ...lines.filter(isEnd)]
}

/** Tracks no longer than `mostWords`, cut between lines; a line longer than that is cut between words. */
function cut({ heading, lines }: Passage): string[][] {
  const tracks: string[][] = []
  let track: string[] = []
  for (const line of [...heading, ...lines].flatMap(pieces)) {
    if (wordCount(track) + wordCount([line]) > mostWords) {
      tracks.push(track)
      track = []
    }
    track.push(line)
  }
  return [...tracks, track]
}

function pieces(line: string): string[] {
  const words = line.split(' ')
  if (words.length <= mostWords) return [line]
  return Array.from({ length: Math.ceil(words.length / mostWords) }, (_, i) =>
    words.slice(i * mostWords, (i + 1) * mostWords).join(' '),
  )
}

function wordCount(lines: readonly string[]): number {
  return lines.reduce((sum, line) => sum + line.split(/\s+/).filter(Boolean).length, 0)
}

function sentence(text: string): string {
  return /[.!?…]\u2069?$/.test(text) ? text : `${text}.`
}
