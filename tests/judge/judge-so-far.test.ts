import { describe, expect, test } from 'vitest'
import { judgeSurvey, runToEnd } from '../../src/judge/judge.ts'
import { beforeYouLeave } from '../../src/judge/leaving.ts'
import { soFar } from '../../src/judge/so-far.ts'
import type { Segment, Survey } from '../../src/record/survey.ts'
import { pack } from '../../src/standards/packs.ts'
import { card, doublePlanner, feature, on, reading, says, stretch, survey, walkOf } from './build.ts'

describe('so far', () => {
  const of = (segment: Segment) => soFar(segment, survey([walkOf([segment])]).view, card(), pack())
  test('a whole plain stretch lacks nothing and nothing stands against it', () => {
    expect(of(stretch())).toEqual({ missing: [], against: null })
  })
  test('an empty one lacks every answer, each with its holder', () => {
    const empty: Segment = {
      id: 's',
      name: 'new',
      ledBy: 'robot',
      readings: {},
      words: {},
      features: [feature('stairs')],
    }
    const { missing, against } = of(empty)
    expect(missing.filter((one) => one.holder === 's').map((one) => one.item)).toEqual([
      'length',
      'width',
      'overhead',
      'step',
      'edge',
      'finish',
      'wetness',
      'slots',
      'door',
      'sensing',
      'shoreline',
      'end-sign',
    ])
    expect(missing.filter((one) => one.holder !== 's').map((one) => one.item)).toEqual([
      'risers',
      'direction',
      'wayRound',
    ])
    expect(against).toMatchObject({ id: 'stop-item', state: 'stop-item' })
  })
  test('what stands against it already is the worst, fails before unsure', () => {
    const two = stretch({ readings: { width: [reading(0.8)], overhead: [reading(1.92, 'rod')] } })
    expect(of(two).against?.id).toBe('straight-width')
    expect(of(stretch({ readings: { overhead: [reading(1.92, 'rod')] } })).against).toMatchObject({
      id: 'overhead',
      state: 'unsure',
    })
  })
})

describe('before you leave', () => {
  const list = (made: Survey) =>
    beforeYouLeave(made, runToEnd(judgeSurvey(made, { planner: doublePlanner, on, team: card() })))
  test('a walk that two people measured whole, and its way back, leaves nothing', () => {
    const both = (segment: Segment): Segment => ({
      ...segment,
      readings: Object.fromEntries(
        Object.entries(segment.readings).map(([key, [one]]) => [
          key,
          one ? [one, { ...one, id: `${one.id}b`, person: 'B' }] : [],
        ]),
      ),
    })
    const there = walkOf([both(stretch())], { from: 'a', to: 'b' })
    const back = walkOf([both(stretch())], { id: 'back', from: 'b', to: 'a' })
    expect(list(survey([there, back]))).toEqual([])
  })
  test('each finding leads to its entry, worst harm first', () => {
    const whole = stretch()
    const { 'end-sign': gone, ...words } = whole.words
    expect(gone).toBeDefined()
    const segment: Segment = {
      ...whole,
      words: { ...words, edge: says('none', 'told'), step: { ...says('none'), tooQuick: true } },
      readings: {
        ...whole.readings,
        length: [reading(8, 'paces')],
        width: [reading(0.911), reading(0.95, 'tape', { person: 'B' })],
      },
    }
    const found = list(survey([walkOf([segment], { from: 'a', to: 'b' })]))
    const at = (kind: string) =>
      found.filter((one) => one.kind === kind).map((one) => [one.segment, one.holder, one.quantity])
    expect(at('no-end-sign')).toEqual([[segment.id, segment.id, 'end-sign']])
    expect(at('told')).toContainEqual([segment.id, segment.id, 'edge'])
    expect(at('too-quick')).toContainEqual([segment.id, segment.id, 'step'])
    expect(at('estimated')).toContainEqual([segment.id, segment.id, 'length'])
    expect(at('disputed')).toContainEqual([segment.id, segment.id, 'width'])
    expect(at('measured-once')).toContainEqual([segment.id, segment.id, 'overhead'])
    expect(at('return-walk')).toHaveLength(1)
    const order = ['fall', 'head', 'trap', 'road', 'comfort']
    const ranks = found.map((one) => order.indexOf(one.harm))
    expect(ranks).toEqual([...ranks].sort((a, b) => a - b))
  })
  test('too close to call, and a loop that does not close', () => {
    const turn = () => feature('turn', { angle: reading(Math.PI / 2, 'square') })
    const side = (length: number, more: Partial<Segment> = {}) =>
      stretch({ readings: { length: [reading(length)], ...more.readings }, turn: turn() })
    const loop = walkOf([side(6), side(4), side(6.5), side(4, { readings: { width: [reading(0.911)] } })], {
      loop: true,
    })
    const found = list(survey([loop]))
    expect(found.filter((one) => one.kind === 'misclosure').length).toBeGreaterThan(0)
    expect(found.find((one) => one.kind === 'too-close')).toMatchObject({ quantity: 'width', harm: 'trap' })
  })
})
