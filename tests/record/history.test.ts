import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { FactDraft } from '../../src/record/facts.ts'
import { foldSurvey } from '../../src/record/fold.ts'
import {
  emptyHistory,
  type History,
  nextStep,
  recordReversal,
  recordStep,
  reverseStep,
} from '../../src/record/history.ts'
import { allFacts, type FactLog, headsOf } from '../../src/record/log.ts'
import {
  addFeature,
  addReading,
  addSegment,
  joinSegments,
  moveSegment,
  remove,
  setSegmentField,
  setTurn,
  settleAnswer,
  setWord,
  splitSegment,
} from '../../src/record/operations/index.ts'
import { act, copyOf, exchange, type Phone, segmentsOf, smallVenue, tape } from './build.ts'

/** A phone with its history, as the app keeps it. */
interface Desk {
  on: Phone
  history: History
}

function desk(on = smallVenue()): Desk {
  return { on, history: emptyHistory }
}

function commit(at: Desk, label: string, operation: (log: FactLog) => FactDraft[]): void {
  at.history = recordStep(at.history, act(at.on, operation), label, at.on.person)
}

/** Takes back (or brings again) the person's last act; the label, or why not. */
function turnBack(at: Desk, way: 'undo' | 'redo'): string | null {
  const step = nextStep(at.history, way, at.on.person)
  if (!step) return null
  const reversal = reverseStep(at.on.log, step)
  if (!reversal.ok) return reversal.what
  at.history = recordReversal(
    at.history,
    way,
    step,
    act(at.on, () => reversal.drafts),
  )
  return reversal.label
}

const view = (at: Desk) => foldSurvey(at.on.log).view

/** Acts of every kind, number `i` of them, on the segments `s1` and `s2`. */
const acts: Record<string, (log: FactLog, i: number) => FactDraft[]> = {
  reading: (log, i) => addReading(log, 's1', 'width', tape(`r${i}`, 1.1)),
  word: (log, i) => setWord(log, 's1', 'edge', { says: `says ${i}`, how: 'swept', person: 'Ada' }),
  settle: (log, i) => settleAnswer(log, 's1', 'edge', { says: `settled ${i}`, how: 'swept' }),
  field: (log, i) => setSegmentField(log, 's2', 'note', `note ${i}`),
  segment: (log, i) => addSegment(log, 'w', { id: `n${i}`, name: 'new', ledBy: 'robot' }, 's1'),
  feature: (log, i) => addFeature(log, 's2', { id: `f${i}`, kind: 'mat', along: i }),
  turn: (log, i) => setTurn(log, 's1', { id: `t${i}`, kind: 'turn' }),
  move: (log) => moveSegment(log, 'w', 's2', null),
  remove: (log) => remove(log, 's2'),
  split: (log, i) => splitSegment(log, 's1', { id: `half${i}`, name: 'half', ledBy: 'robot', at: 3 }),
  join: (log) => joinSegments(log, 's1', 's2', 12),
}

const onFirst = new Set(['reading', 'word', 'settle', 'segment', 'turn', 'split'])

describe('undo and redo', () => {
  it('go back through any acts to the start, and forward again, one view at a time', () => {
    fc.assert(
      fc.property(fc.array(fc.constantFrom(...Object.keys(acts)), { minLength: 1, maxLength: 25 }), (wanted) => {
        const at = desk()
        const views = [view(at)]
        // A person acts on what is in view: once `s2` is removed or joined, only acts on `s1` go on.
        const gone = wanted.findIndex((name) => name === 'remove' || name === 'join')
        const names = wanted.filter((name, i) => gone < 0 || i <= gone || onFirst.has(name))
        names.forEach((name, i) => {
          commit(at, name, (log) => acts[name]?.(log, i) ?? [])
          views.push(view(at))
        })
        for (let i = names.length; i > 0; i--) {
          expect(turnBack(at, 'undo')).toBe(names[i - 1])
          expect(view(at)).toEqual(views[i - 1])
        }
        expect(turnBack(at, 'undo')).toBeNull()
        for (let i = 1; i <= names.length; i++) {
          expect(turnBack(at, 'redo')).toBe(names[i - 1])
          expect(view(at)).toEqual(views[i])
        }
        expect(turnBack(at, 'redo')).toBeNull()
      }),
      { seed: 20_260_303, numRuns: process.env.TAUTLINE_LONG === '1' ? 1000 : 100 },
    )
  })

  it('add facts and rewrite none', () => {
    const at = desk()
    commit(at, 'note', (log) => setSegmentField(log, 's1', 'note', 'x'))
    const before = allFacts(at.on.log)
    turnBack(at, 'undo')
    expect(allFacts(at.on.log).slice(0, before.length)).toEqual(before)
    expect(allFacts(at.on.log)).toHaveLength(before.length + 1)
  })

  it('bring rivals back as rivals after a settlement is undone', () => {
    const ada = smallVenue()
    const ben = copyOf(ada, 'b', 'Ben')
    act(ada, (log) => setWord(log, 's1', 'edge', { says: 'none', how: 'swept', person: 'Ada' }))
    act(ben, (log) => setWord(log, 's1', 'edge', { says: 'listed', how: 'swept', person: 'Ben' }))
    exchange(ada, ben)
    const at = desk(ada)
    const before = segmentsOf(ada)[0]?.words.edge
    commit(at, 'settle', (log) => settleAnswer(log, 's1', 'edge', { says: 'listed', how: 'swept' }))
    turnBack(at, 'undo')
    expect(headsOf(ada.log, 's1', 'word/edge')).toHaveLength(2)
    expect(segmentsOf(ada)[0]?.words.edge).toEqual(before)
  })

  it('are refused where somebody else has replaced the value since, and change nothing', () => {
    const at = desk()
    commit(at, 'note', (log) => setSegmentField(log, 's1', 'note', 'mine'))
    const ben = copyOf(at.on, 'b', 'Ben')
    act(ben, (log) => setSegmentField(log, 's1', 'note', 'theirs'))
    exchange(at.on, ben)
    const before = allFacts(at.on.log)
    expect(turnBack(at, 'undo')).toMatch(/“note” cannot be taken back: changed since by Ben/)
    expect(allFacts(at.on.log)).toEqual(before)
  })

  it('are refused where somebody else has added to what was made', () => {
    const at = desk()
    commit(at, 'segment', (log) => addSegment(log, 'w', { id: 'n', name: 'new', ledBy: 'robot' }))
    const ben = copyOf(at.on, 'b', 'Ben')
    act(ben, (log) => addReading(log, 'n', 'width', tape('bens', 1)))
    exchange(at.on, ben)
    expect(turnBack(at, 'undo')).toMatch(/changed since by Ben/)
    expect(segmentsOf(at.on).map((segment) => segment.id)).toContain('n')
  })

  it('leave a rival of somebody else where it is', () => {
    const at = desk()
    const ben = copyOf(at.on, 'b', 'Ben')
    commit(at, 'note', (log) => setSegmentField(log, 's1', 'note', 'mine'))
    act(ben, (log) => setSegmentField(log, 's1', 'note', 'theirs'))
    exchange(at.on, ben)
    turnBack(at, 'undo')
    expect(
      headsOf(at.on.log, 's1', 'note')
        .map((head) => head.value)
        .sort(),
    ).toEqual([null, 'theirs'].sort())
  })

  it('take back a person’s own acts only, past those of the other', () => {
    const at = desk()
    commit(at, 'mine', (log) => setSegmentField(log, 's1', 'note', 'Ada’s'))
    at.on.person = 'Ben'
    commit(at, 'theirs', (log) => setSegmentField(log, 's2', 'note', 'Ben’s'))
    at.on.person = 'Ada'
    expect(turnBack(at, 'undo')).toBe('mine')
    expect(turnBack(at, 'undo')).toBeNull()
    expect(segmentsOf(at.on).map((segment) => segment.note)).toEqual([undefined, 'Ben’s'])
  })

  it('forget what could be redone once the person does something new', () => {
    const at = desk()
    commit(at, 'one', (log) => setSegmentField(log, 's1', 'note', '1'))
    turnBack(at, 'undo')
    commit(at, 'two', (log) => setSegmentField(log, 's1', 'note', '2'))
    expect(turnBack(at, 'redo')).toBeNull()
    expect(JSON.parse(JSON.stringify(at.history))).toEqual(at.history)
  })
})
