import type { WalkResult } from '../../../judge/result.ts'

/** The ladder in sentences: the same as the table says, for whoever does not read tables. */
export function ladderWords(walk: WalkResult, mark: (leash: number) => string): string[] {
  const led = walk.segments.filter((segment) => segment.ledBy === 'robot')
  if (led.length === 0) return ['No part of this walk is led by the robot.']
  const numberOf = (id: string) => walk.segments.findIndex((segment) => segment.id === id) + 1
  const words: string[] = []
  if (walk.leash !== null && walk.changes.length === 0) words.push(`${mark(walk.leash)} serves the whole walk.`)
  else if (walk.leash !== null)
    words.push(
      `No one length serves the whole walk. Start with ${mark(walk.leash)}.`,
      ...walk.changes.map(
        ({ segment, leash }) => `Change to ${mark(leash)} before part ${numberOf(segment)}, with the robot at a stand.`,
      ),
    )
  else words.push('No length is recommended while the walk is not known or not to be used.')
  for (const segment of led) {
    const at = `Part ${numberOf(segment.id)}, ${segment.name}`
    if (segment.window)
      words.push(
        `${at}: no length holds, between ${segment.window.closedBy.map((id) => id.replaceAll('-', ' ')).join(' and ')}.`,
      )
    else if (segment.leash)
      words.push(
        segment.leash.least === segment.leash.greatest
          ? `${at}: ${mark(segment.leash.least)} alone.`
          : `${at}: ${mark(segment.leash.least)} to ${mark(segment.leash.greatest)}.`,
      )
    else words.push(`${at}: ${segment.sentence}`)
  }
  return words
}
