import { expect, test } from 'vitest'
import { ladderWords } from '../../src/app/screens/ladder/ladder-words.ts'
import type { LadderCell, SegmentResult, Verdict, WalkResult } from '../../src/judge/result.ts'

const mark = (leash: number) => `${leash.toFixed(2)} m`

function cells(...verdicts: [leash: number, verdict: Verdict][]): LadderCell[] {
  return verdicts.map(([leash, verdict]) => ({ leash, verdict, room: null, check: null, pace: null }))
}

function part(id: string, ladder: LadderCell[], more: Partial<SegmentResult> = {}): SegmentResult {
  return {
    id,
    name: `stretch ${id}`,
    ledBy: 'robot',
    verdict: 'usable',
    score: null,
    governing: null,
    sentence: '',
    checks: [],
    why: [],
    window: null,
    leash: null,
    pace: null,
    pauses: 0,
    cautions: [],
    missing: [],
    conditions: [],
    retakes: [],
    ladder,
    ...more,
  }
}

function walk(segments: SegmentResult[], more: Partial<WalkResult> = {}): WalkResult {
  return {
    id: 'w',
    name: 'walk',
    verdict: 'usable',
    score: null,
    governing: null,
    leash: 1,
    pace: null,
    pauses: 0,
    cautions: [],
    changes: [],
    checks: [],
    missing: [],
    why: [],
    conditions: [],
    segments,
    ladder: { lengths: [0.6, 1, 1.5], best: 1 },
    ...more,
  }
}

test('one length for the whole walk, and the runs of each part', () => {
  const said = ladderWords(walk([part('a', cells([0.6, 'with-cautions'], [1, 'usable'], [1.5, 'usable']))]), mark)
  expect(said).toEqual([
    '1.00 m serves the whole walk.',
    'Part 1, stretch a: with cautions at 0.60 m, usable from 1.00 m to 1.50 m.',
  ])
})

test('where no one length serves, it says before which part to change, at a stand', () => {
  const said = ladderWords(
    walk([part('a', cells([1, 'usable'])), part('b', cells([1, 'do-not-use']))], {
      leash: 1.5,
      changes: [{ segment: 'b', leash: 0.6 }],
    }),
    mark,
  )
  expect(said.slice(0, 2)).toEqual([
    'No one length serves the whole walk. Start with 1.50 m.',
    'Change to 0.60 m before part 2, with the robot at a stand.',
  ])
})

test('no length is recommended without a verdict for it, and a closed window names what closes it', () => {
  const closed = part('a', cells([1, 'do-not-use']), {
    window: { closedBy: ['turn', 'stop'], opens: null },
  })
  expect(ladderWords(walk([closed], { leash: null }), mark)).toEqual([
    'No length is recommended while the walk is not known or not to be used.',
    'Part 1, stretch a: no length holds, between turn and stop, do not use at 1.00 m.',
  ])
})

test('a part led by somebody else keeps its number and has no line', () => {
  const said = ladderWords(walk([part('a', [], { ledBy: 'staff' }), part('b', cells([1, 'usable']))]), mark)
  expect(said).toEqual(['1.00 m serves the whole walk.', 'Part 2, stretch b: usable at 1.00 m.'])
})
