import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Fact } from '../../src/record/facts.ts'
import { foldSurvey } from '../../src/record/fold.ts'
import { allFacts, appendDrafts, emptyLog, type FactLog, headsOf, mergeFacts } from '../../src/record/log.ts'
import * as operations from '../../src/record/operations/index.ts'
import type { Survey } from '../../src/record/survey.ts'
import { act, copyOf, exchange, smallVenue, tape } from './build.ts'

const seed = 20_260_302
const long = process.env.TAUTLINE_LONG === '1'
const numRuns = long ? 2000 : 200

const devices = ['a', 'b', 'c'] as const
type Device = (typeof devices)[number]
const kinds = ['reading', 'word', 'field', 'segment', 'feature', 'remove', 'restore', 'turn', 'move', 'settle'] as const
const segments = ['s1', 's2', 'new-a', 'new-b', 'new-c'] as const

const deed = fc.oneof(
  {
    weight: 4,
    arbitrary: fc.record({
      by: fc.constantFrom(...devices),
      kind: fc.constantFrom(...kinds),
      on: fc.constantFrom(...segments),
      n: fc.nat(3),
    }),
  },
  { weight: 1, arbitrary: fc.record({ by: fc.constantFrom(...devices), takesFrom: fc.constantFrom(...devices) }) },
)
type Deed = typeof deed extends fc.Arbitrary<infer T> ? T : never

/** What happened, kept apart from the log: which readings and removals there were, and what each device knew. */
interface Witness {
  readings: { id: string; segment: string }[]
  removals: { segment: string; knew: Set<string> }[]
  words: { segment: string; item: string; says: string }[]
}

function play(deeds: readonly Deed[]): { logs: Record<Device, FactLog>; witness: Witness } {
  const start = allFacts(smallVenue('start').log)
  const logs = Object.fromEntries(devices.map((device) => [device, emptyLog('venue-1', device)])) as Record<
    Device,
    FactLog
  >
  const knew = Object.fromEntries(devices.map((device) => [device, new Set<string>()])) as Record<Device, Set<string>>
  for (const log of Object.values(logs)) mergeFacts(log, start)
  const witness: Witness = { readings: [], removals: [], words: [] }
  deeds.forEach((one, i) => {
    const log = logs[one.by]
    if ('takesFrom' in one) {
      mergeFacts(log, allFacts(logs[one.takesFrom]))
      for (const id of knew[one.takesFrom]) knew[one.by].add(id)
      return
    }
    const { kind, on, n, by } = one
    const known = log.entities.has(on)
    const made = (): ReturnType<typeof operations.remove> => {
      if (kind === 'segment')
        return log.entities.has(`new-${by}`)
          ? []
          : operations.addSegment(log, 'w', { id: `new-${by}`, name: 'new', ledBy: 'robot' })
      if (!known) return []
      if (kind === 'reading') {
        witness.readings.push({ id: `r${i}`, segment: on })
        knew[by].add(`r${i}`)
        return operations.addReading(log, on, 'width', tape(`r${i}`, 1 + n / 10))
      }
      if (kind === 'word') {
        witness.words.push({ segment: on, item: 'edge', says: `says ${i}` })
        return operations.setWord(log, on, 'edge', { says: `says ${i}`, how: 'swept', person: by })
      }
      if (kind === 'settle')
        return operations.settleAnswer(log, on, 'edge', { says: `settled ${i}`, how: 'swept', person: by })
      if (kind === 'field') return operations.setSegmentField(log, on, n > 1 ? 'note' : 'name', `text ${i}`)
      if (kind === 'feature') return operations.addFeature(log, on, { id: `f${i}`, kind: 'mat', along: n })
      if (kind === 'turn') return operations.setTurn(log, on, { id: `turn-${on}-${by}`, kind: 'turn' })
      if (kind === 'move') return operations.moveSegment(log, 'w', on, on === 's1' ? 's2' : 's1')
      if (kind === 'restore') return operations.restore(log, on)
      witness.removals.push({ segment: on, knew: new Set(knew[by]) })
      return operations.remove(log, on)
    }
    appendDrafts(log, made(), { device: by, clock: `2026-03-01T10:00:00.${String(i).padStart(3, '0')}Z`, person: by })
  })
  return { logs, witness }
}

/** Every fact of every log, shuffled by the numbers given, taken into a new log. */
function gathered(logs: Record<Device, FactLog>, shuffle: readonly number[]): FactLog {
  const facts = devices.flatMap((device) => allFacts(logs[device]))
  const mixed = facts
    .map((fact, i) => ({ fact, key: shuffle[i % shuffle.length] ?? 0 }))
    .sort((one, other) => one.key - other.key)
    .map(({ fact }) => fact)
  const log = emptyLog('venue-1', 'reader')
  expect(mergeFacts(log, mixed).refused).toEqual([])
  return log
}

function readingsInView(survey: Survey): Set<string> {
  return new Set(
    survey.view.walks.flatMap((walk) =>
      walk.segments.flatMap((segment) =>
        Object.values(segment.readings).flatMap((taken) => taken.map((one) => one.id)),
      ),
    ),
  )
}

describe('three phones that change one walk in any order', () => {
  it('show the same once they have the same facts, however those came', () => {
    fc.assert(
      fc.property(
        fc.array(deed, { maxLength: 60 }),
        fc.array(fc.nat(), { minLength: 1, maxLength: 50 }),
        fc.array(fc.nat(), { minLength: 1, maxLength: 50 }),
        (deeds, one, other) => {
          const { logs } = play(deeds)
          const first = foldSurvey(gathered(logs, one))
          expect(foldSurvey(gathered(logs, other))).toEqual(first)
          // Phones that folded on the way agree with a reader who starts from nothing.
          for (const device of devices) foldSurvey(logs[device])
          for (const device of devices) for (const from of devices) mergeFacts(logs[device], allFacts(logs[from]))
          for (const device of devices) expect(foldSurvey(logs[device])).toEqual(first)
        },
      ),
      { seed, numRuns },
    )
  })

  it('lose no reading: one is out of view only where a removal knew it', () => {
    fc.assert(
      fc.property(fc.array(deed, { minLength: 10, maxLength: 80 }), (deeds) => {
        const { logs, witness } = play(deeds)
        const survey = foldSurvey(gathered(logs, [0]))
        const shown = readingsInView(survey)
        for (const { id, segment } of witness.readings) {
          const removedKnowingly = witness.removals.some(
            (removal) => removal.segment === segment && removal.knew.has(id),
          )
          if (!removedKnowingly) expect([...shown], `reading ${id} on ${segment}`).toContain(id)
        }
      }),
      { seed, numRuns },
    )
  })

  it('lose no answer: each is a head, a rival, or replaced by a fact that names it', () => {
    fc.assert(
      fc.property(fc.array(deed, { minLength: 10, maxLength: 80 }), (deeds) => {
        const { logs, witness } = play(deeds)
        const log = gathered(logs, [0])
        for (const { segment, item, says } of witness.words) {
          const facts = log.entities.get(segment)?.get(`word/${item}`)?.facts ?? []
          const fact = facts.find((one) => (one.value as { says: string }).says === says) as Fact
          const isHead = headsOf(log, segment, `word/${item}`).includes(fact)
          const isReplaced = facts.some((one) => one.replaces.includes(`${fact.device}:${fact.n}`))
          expect(isHead).not.toBe(isReplaced)
        }
      }),
      { seed, numRuns },
    )
  })

  it('fold step by step to what folding once gives', () => {
    fc.assert(
      fc.property(fc.array(deed, { maxLength: 60 }), (deeds) => {
        const { logs } = play(deeds)
        const facts = devices.flatMap((device) => allFacts(logs[device]))
        const stepwise = emptyLog('venue-1', 'reader')
        for (const fact of facts) {
          mergeFacts(stepwise, [fact])
          foldSurvey(stepwise)
        }
        expect(foldSurvey(stepwise)).toEqual(foldSurvey(gathered(logs, [0])))
      }),
      { seed, numRuns: long ? 500 : 60 },
    )
  })
})

describe('taking in facts', () => {
  const facts = allFacts(smallVenue('a').log)

  it('twice changes nothing', () => {
    const log = emptyLog('venue-1')
    expect(mergeFacts(log, facts).added).toHaveLength(facts.length)
    const view = foldSurvey(log)
    expect(mergeFacts(log, facts)).toEqual({ added: [], refused: [] })
    expect(foldSurvey(log)).toBe(view)
  })

  it('refuses what comes after a gap, and takes it once the gap is filled', () => {
    const log = emptyLog('venue-1')
    const { added, refused } = mergeFacts(log, [...facts.slice(0, 2), ...facts.slice(3)])
    expect(added).toHaveLength(2)
    expect(refused[0]).toMatchObject({ why: 'gap', path: 'n', expected: 'fact 3 of a', found: 'fact 4' })
    expect(mergeFacts(log, facts).refused).toEqual([])
  })

  it('refuses another content under a number that is here, and keeps what was here', () => {
    const log = emptyLog('venue-1')
    mergeFacts(log, facts)
    const forged = { ...(facts[0] as Fact), value: 'Another Hall' }
    expect(mergeFacts(log, [forged]).refused).toMatchObject([{ why: 'fork', fact: forged }])
    expect(allFacts(log)).toEqual(facts)
  })

  it.each([
    ['no object', 7, ''],
    ['of another survey', { ...facts[0], survey: 'other' }, 'survey'],
    ['without a number', { ...facts[0], n: 0 }, 'n'],
    ['with half a number', { ...facts[0], n: 1.5 }, 'n'],
    ['with a clock that is none', { ...facts[0], clock: 'noon' }, 'clock'],
    ['that replaces no list', { ...facts[0], replaces: 'all' }, 'replaces'],
    ['with a value that is no number', { ...facts[0], value: { x: Number.NaN } }, 'value/x'],
    ['with a reserved key', { ...facts[0], value: JSON.parse('{"__proto__": {"x": 1}}') }, 'value/__proto__'],
  ])('refuses a fact %s, and takes the others', (_, bad, path) => {
    const log = emptyLog('venue-1')
    const { added, refused } = mergeFacts(log, [bad, ...facts])
    expect(refused).toMatchObject([{ path, fact: bad }])
    expect(added).toEqual(facts)
  })

  it('keeps both of two facts that claim to replace one another, and one that claims to replace itself', () => {
    const fact = (device: string, n: number, field: string, replaces: string[]): Fact => ({
      survey: 'v',
      device,
      n,
      clock: '2026-03-01T10:00:00Z',
      entity: 'e',
      field,
      value: device,
      replaces,
    })
    const log = emptyLog('v')
    mergeFacts(log, [fact('x', 1, 'name', ['y:1']), fact('y', 1, 'name', ['x:1']), fact('z', 1, 'note', ['z:1'])])
    expect(headsOf(log, 'e', 'name').map((head) => head.value)).toEqual(['x', 'y'])
    expect(headsOf(log, 'e', 'note').map((head) => head.value)).toEqual(['z'])
  })

  it('never lets a fact of one field replace one of another', () => {
    const ada = smallVenue()
    act(ada, () => [
      { entity: 's1', field: 'note', value: 'x', replaces: facts.map((fact) => `${fact.device}:${fact.n}`) },
    ])
    expect(foldSurvey(ada.log).view.walks[0]?.segments[0]).toMatchObject({ name: 'Foyer', note: 'x' })
  })

  it('tells of two readings under one id instead of dropping one', () => {
    const ada = smallVenue()
    const ben = copyOf(ada, 'b', 'Ben')
    act(ada, (log) => operations.addReading(log, 's1', 'width', tape('same', 1.1)))
    act(ben, (log) => operations.addReading(log, 's1', 'width', tape('same', 0.9)))
    exchange(ada, ben)
    const told = foldSurvey(ada.log).conflicts?.find(({ field }) => field === 'reading')
    expect(told?.versions.map(({ value }) => (value as { value: number }).value).sort()).toEqual([0.9, 1.1])
  })
})
