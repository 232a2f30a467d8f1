import type { LadderCell, SegmentResult, WalkResult } from '../../../judge/result.ts'
import { verdictWord } from '../../components/verdict-word.ts'

/** The ladder in sentences: the same as the table says, for whoever does not read tables. */
export function ladderWords(walk: WalkResult, mark: (leash: number) => string): string[] {
  const led = walk.segments.filter((segment) => segment.ledBy === 'robot')
  if (led.length === 0) return ['No part of this walk is led by the robot.']
  const numberOf = (id: string) => walk.segments.findIndex((segment) => segment.id === id) + 1
  return [
    ...advice(walk, mark, numberOf),
    ...led.map((segment) => `Part ${numberOf(segment.id)}, ${segment.name}: ${partWords(segment, mark)}.`),
  ]
}

function advice(walk: WalkResult, mark: (leash: number) => string, numberOf: (id: string) => number): string[] {
  if (walk.leash === null) return ['No length is recommended while the walk is not known or not to be used.']
  if (walk.changes.length === 0) return [`${mark(walk.leash)} serves the whole walk.`]
  return [
    `No one length serves the whole walk. Start with ${mark(walk.leash)}.`,
    ...walk.changes.map(
      ({ segment, leash }) => `Change to ${mark(leash)} before part ${numberOf(segment)}, with the robot at a stand.`,
    ),
  ]
}

/** "with cautions at 0.60 m, usable from 0.80 m to 1.80 m" */
function partWords(segment: SegmentResult, mark: (leash: number) => string): string {
  const runs: LadderCell[][] = []
  for (const cell of segment.ladder) {
    const run = runs.at(-1)
    if (run?.[0]?.verdict === cell.verdict) run.push(cell)
    else runs.push([cell])
  }
  const words = runs.map((run) => {
    const [first, last] = [run[0], run.at(-1)]
    if (!first || !last) return ''
    const at = first === last ? `at ${mark(first.leash)}` : `from ${mark(first.leash)} to ${mark(last.leash)}`
    return `${verdictWord(first.verdict)} ${at}`
  })
  const closed = segment.window
    ? [`no length holds, between ${segment.window.closedBy.map((id) => id.replaceAll('-', ' ')).join(' and ')}`]
    : []
  return [...closed, ...words].join(', ')
}
