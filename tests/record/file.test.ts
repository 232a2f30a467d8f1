import { describe, expect, it } from 'vitest'
import {
  jsonSchema,
  readSurveyFile,
  readTeamFile,
  writeSurveyFile,
  writeTeamFile,
} from '../../src/record/file/index.ts'
import { foldSurvey } from '../../src/record/fold.ts'
import { allFacts, mergeFacts } from '../../src/record/log.ts'
import { setWord } from '../../src/record/operations/index.ts'
import { defaultTeamCard } from '../../src/record/team-card.ts'
import type { Field } from '../../src/units/parse.ts'
import { act, copyOf, exchange, smallVenue } from './build.ts'

/** What a catalogue would say of the two kinds used here. */
const attributes: Record<string, Field> = {
  'turn/angle': { quantity: 'angle', unit: 'deg' },
  'ridge/height': { quantity: 'length', unit: 'mm' },
}
const attributeOf = (kind: string, attribute: string) => attributes[`${kind}/${attribute}`]

/** As a person would write it: no ids of readings, no values, nothing that is empty. */
const byHand = {
  kind: 'tautline-survey',
  version: 1,
  survey: 'hall',
  madeWith: { pencil: true },
  view: {
    name: 'Linden Hall (invented)',
    colour: 'green',
    team: { name: 'Team L', revision: '2', date: '2026-02-01', handler: { opensDoors: true } },
    zones: [
      {
        id: 'z',
        name: 'Foyer',
        observations: [
          { from: '09:00', to: '17:00', readings: { noise: [{ raw: '48 dB(A)', instrument: 'sound-meter' }] } },
        ],
      },
    ],
    walks: [
      {
        id: 'w',
        name: 'Door to desk',
        states: [{ state: 'surveyed', name: 'Ada', date: '2026-02-02' }],
        segments: [
          {
            id: 's1',
            name: 'Foyer',
            zone: 'z',
            ledBy: 'robot',
            readings: {
              length: [{ raw: '12.4 m', instrument: 'tape-in-lays' }],
              width: [
                { raw: `4' 0 3/8"`, instrument: 'tape', at: 'lockers' },
                { raw: '>2.10 m', instrument: 'stick' },
              ],
            },
            words: {
              edge: {
                says: 'none',
                how: 'swept',
                person: 'Ada',
                rivals: [{ says: 'listed', how: 'swept', person: 'Ben' }],
              },
            },
            features: [{ kind: 'ridge', along: 2, readings: { height: [{ raw: '13', instrument: 'steel-rule' }] } }],
            turn: { kind: 'turn', side: 'left', readings: { angle: [{ raw: '90°', instrument: 'square' }] } },
          },
        ],
      },
    ],
  },
}

function read(file: unknown) {
  const result = readSurveyFile(typeof file === 'string' ? file : JSON.stringify(file), attributeOf)
  if (!result.ok) throw new Error(JSON.stringify(result.problems))
  return result
}

function problemsOf(file: unknown) {
  const result = readSurveyFile(typeof file === 'string' ? file : JSON.stringify(file), attributeOf)
  return result.ok ? [] : result.problems
}

/** The hand-written file with one thing changed. */
function changed(change: (file: typeof byHand) => void): unknown {
  const copy = structuredClone(byHand)
  change(copy)
  return copy
}

const segment = (file: typeof byHand) => {
  const found = file.view.walks[0]?.segments[0]
  if (!found) throw new Error('the fixture has a segment')
  return found
}

describe('a view written by hand', () => {
  it('is read with values from the raw texts, ids from the place, and empty lists filled in', () => {
    const { survey } = read(byHand)
    const [first] = survey.view.walks[0]?.segments ?? []
    expect(survey.survey).toBe('hall')
    expect(first?.readings.length).toEqual([
      { id: 's1/readings/length/0', raw: '12.4 m', instrument: 'tape-in-lays', value: 12.4, bound: 'exact' },
    ])
    expect(first?.readings.width).toMatchObject([
      // 48.375 in x 0.0254
      { value: 1.228725, bound: 'exact', at: 'lockers' },
      { value: 2.1, bound: 'above' },
    ])
    expect(first?.features[0]).toMatchObject({
      id: 's1/features/0',
      kind: 'ridge',
      readings: { height: [{ value: 0.013 }] },
    })
    expect(first?.turn).toMatchObject({ id: 's1/turn', readings: { angle: [{ value: Math.PI / 2 }] } })
    expect(survey.view.zones[0]?.observations[0]).toMatchObject({ from: '09:00', readings: { noise: [{ value: 48 }] } })
    expect(survey.view).toMatchObject({ floors: [], places: [], colour: 'green' })
    expect(survey.view.team?.handler).toEqual({ ...defaultTeamCard.handler, opensDoors: true })
    expect(survey.view.team?.robot).toEqual(defaultTeamCard.robot)
  })

  it('gives nobody and no time where it names none', () => {
    const [first] = read(byHand).survey.view.walks[0]?.segments ?? []
    expect(first?.readings.length?.[0]).not.toHaveProperty('time')
    expect(first?.words.edge).not.toHaveProperty('time')
  })

  it('keeps a dispute that it states', () => {
    const { survey } = read(byHand)
    expect(survey.view.walks[0]?.segments[0]?.words.edge).toMatchObject({
      says: 'none',
      rivals: [{ says: 'listed', person: 'Ben' }],
    })
    expect(survey.conflicts).toMatchObject([{ entity: 's1', field: 'word/edge' }])
  })

  it('gives the same facts on two phones, and other devices once it was changed', () => {
    const [one, two] = [read(byHand), read(byHand)]
    expect(allFacts(two.log)).toEqual(allFacts(one.log))
    expect(mergeFacts(one.log, allFacts(two.log))).toEqual({ added: [], refused: [] })
    const other = read(changed((file) => (file.view.name = 'Linden Hall II')))
    expect(mergeFacts(one.log, allFacts(other.log)).refused).toEqual([])
  })
})

describe('a file of facts', () => {
  it('is what is written, and reads back to the same facts and view, unknown fields and all', () => {
    const { log, survey } = read(byHand)
    const text = writeSurveyFile(log)
    expect(JSON.parse(text)).toMatchObject({
      kind: 'tautline-survey',
      version: 1,
      survey: 'hall',
      madeWith: { pencil: true },
    })
    expect(JSON.parse(text)).not.toHaveProperty('view')
    const again = read(text)
    expect(allFacts(again.log)).toEqual(allFacts(log))
    expect(again.survey).toEqual(survey)
    expect(writeSurveyFile(again.log)).toBe(text)
  })

  it('carries everything of two people, disputes and removed things too', () => {
    const ada = smallVenue()
    const ben = copyOf(ada, 'b', 'Ben')
    act(ada, (log) => setWord(log, 's1', 'edge', { says: 'none', how: 'swept' }))
    act(ben, (log) => setWord(log, 's1', 'edge', { says: 'listed', how: 'swept' }))
    act(ben, () => [{ entity: 's2', field: 'later/version', value: [1, { deep: null }], replaces: [] }])
    exchange(ada, ben)
    const again = read(writeSurveyFile(ada.log))
    expect(allFacts(again.log)).toEqual(allFacts(ada.log))
    expect(again.survey).toEqual(foldSurvey(ben.log))
  })

  it('keeps keys of a fact that it does not know', () => {
    const file = JSON.parse(writeSurveyFile(smallVenue().log))
    file.facts[0].signature = 'abc'
    expect(JSON.parse(writeSurveyFile(read(file).log)).facts[0].signature).toBe('abc')
  })
})

describe('a wrong file is refused whole, with path, expected and found', () => {
  it.each([
    ['no JSON', '{"kind": "tautline-survey",', '', 'JSON'],
    ['a list', [], 'kind', '"kind"'],
    [
      'answers that are a list',
      changed((file) => Object.assign(segment(file), { words: [] })),
      'view/walks/0/segments/0/words',
      'by name',
    ],
    [
      'readings that are a list',
      changed((file) => Object.assign(segment(file), { readings: [] })),
      'view/walks/0/segments/0/readings',
      'by name',
    ],
    ['another kind', changed((file) => (file.kind = 'tautline-team')), 'kind', '"tautline-survey"'],
    ['another version', changed((file) => (file.version = 2)), 'version', '1'],
    ['neither facts nor view', { kind: 'tautline-survey', version: 1, survey: 'x' }, '', 'either'],
    ['both', { ...byHand, facts: [] }, '', 'either'],
    ['a view that is no object', { ...byHand, view: [] }, 'view', 'a venue'],
    ['a name that is no text', changed((file) => Object.assign(file.view, { name: 7 })), 'view/name', 'string'],
    ['walks that are no list', changed((file) => Object.assign(file.view, { walks: {} })), 'view/walks', 'Array'],
    [
      'a segment that is none',
      changed((file) => Object.assign(file.view.walks[0] ?? {}, { segments: ['x'] })),
      'view/walks/0/segments/0',
      'Object',
    ],
    [
      'nobody who leads',
      changed((file) => Object.assign(segment(file), { ledBy: undefined })),
      'view/walks/0/segments/0/ledBy',
      '"ledBy"',
    ],
    ['an unknown leader', changed((file) => (segment(file).ledBy = 'dog')), 'view/walks/0/segments/0/ledBy', '"robot"'],
    [
      'an unknown instrument',
      changed((file) => Object.assign(segment(file).readings.length[0] ?? {}, { instrument: 'x' })),
      'view/walks/0/segments/0/readings/length/0/instrument',
      '"tape"',
    ],
    [
      'a date that is none',
      changed((file) => Object.assign(file.view, { asOn: '30 Nov' })),
      'view/asOn',
      'a date like',
    ],
    [
      'a word that the item does not take',
      changed((file) => (segment(file).words.edge.says = 'no')),
      'view/walks/w/segments/s1/words/edge/says',
      'none | listed',
    ],
  ])('%s', (_, file, path, expected) => {
    const [problem] = problemsOf(file)
    expect(problem?.path).toBe(path)
    expect(problem?.expected).toContain(expected)
    expect(problem?.found).not.toBe('')
    expect(problem?.whatToDo).not.toBe('')
  })

  const lengthPath = 'view/walks/0/segments/0/readings/length/0'

  it.each([
    ['that disagrees with the raw text', { value: 1.24 }, lengthPath],
    ['whose bound disagrees with the raw text', { value: 12.4, bound: 'above' }, lengthPath],
    ['without a value and with a text that is no length', { raw: 'about twelve' }, `${lengthPath}/raw`],
    ['without a value and with a text that reads two ways', { raw: '1,240' }, `${lengthPath}/raw`],
    ['without a value and with another bound than its text', { bound: 'below' }, `${lengthPath}/bound`],
  ])('a reading %s', (_, more, path) => {
    const file = changed((file) => Object.assign(segment(file).readings.length[0] ?? {}, more))
    expect(problemsOf(file)[0]).toMatchObject({ path })
  })

  it('but a value rounded by hand agrees with its raw text', () => {
    const rounded = changed((file) => {
      Object.assign(segment(file).turn.readings.angle[0] ?? {}, { value: 1.5708 })
      Object.assign(segment(file).readings.width[0] ?? {}, { value: 1.2287 })
    })
    expect(problemsOf(rounded)).toEqual([])
  })

  it('an id that stands twice, or is the record’s own', () => {
    for (const id of ['w', '@venue', '@file'])
      expect(problemsOf(changed((file) => (segment(file).id = id)))[0]?.found).toBe(`"${id}" again`)
  })

  it.each(['1e999', '-1e999'])('the endless number %s', (number) => {
    const text = JSON.stringify(byHand).replace('"along":2', `"along":${number}`)
    expect(problemsOf(text)[0]).toMatchObject({
      path: 'view/walks/0/segments/0/features/0/along',
      expected: 'a finite number',
    })
  })

  it.each(['__proto__', 'constructor', 'prototype'])('the reserved key %s, which touches no object', (key) => {
    const text = JSON.stringify(byHand).replace('"colour"', `"${key}"`)
    expect(problemsOf(text)[0]).toMatchObject({ path: `view/${key}`, expected: 'another name' })
    const deep = JSON.stringify(byHand).replace('"pencil"', `"${key}"`)
    expect(problemsOf(deep)[0]).toMatchObject({ path: `madeWith/${key}` })
    expect(Object.keys(Object.prototype)).toEqual([])
  })

  it.each([
    ['lists', '['.repeat(5_000_000)],
    ['objects', '{"a":'.repeat(1_000_000)],
    ['lists that close', `${'['.repeat(200)}${']'.repeat(200)}`],
  ])('nesting without end: %s', (_, text) => {
    expect(problemsOf(text)).toMatchObject([{ path: '', expected: 'nesting of 60 levels at most' }])
  })

  it('brackets inside texts are no nesting', () => {
    expect(problemsOf(changed((file) => (file.view.name = '[{"\\"['.repeat(100))))).toEqual([])
  })

  it('more than 20 million characters, without parsing them', () => {
    const text = `{"kind":"tautline-survey","junk":"${'x'.repeat(21 * 1024 * 1024)}"}`
    expect(problemsOf(text)).toMatchObject([{ path: '', expected: '20 million characters at most' }])
  })

  it('facts with a gap, a fork, another survey, no list, or a value of the wrong type', () => {
    const good = JSON.parse(writeSurveyFile(smallVenue().log))
    const bad = (change: (facts: { n: number; value: unknown; survey: string; field: string }[]) => void) => {
      const file = structuredClone(good)
      change(file.facts)
      return problemsOf(file)[0]
    }
    const at = (field: string) => good.facts.findIndex((fact: { field: string }) => fact.field === field)
    expect(problemsOf({ ...good, facts: {} })[0]).toMatchObject({ path: 'facts' })
    expect(bad((facts) => facts.splice(1, 1))).toMatchObject({ path: 'facts/1/n', found: 'fact 3' })
    expect(bad((facts) => facts.push({ ...(facts[0] as (typeof facts)[0]), value: 'other' }))?.path).toBe(
      `facts/${good.facts.length}`,
    )
    expect(bad((facts) => Object.assign(facts[2] ?? {}, { survey: 'x' }))?.path).toBe('facts/2/survey')
    const ledBy = at('ledBy')
    expect(bad((facts) => Object.assign(facts[ledBy] ?? {}, { value: 'dog' }))).toMatchObject({
      path: `facts/${ledBy}/value`,
      found: '"dog"',
    })
    const reading = at('reading')
    const tampered = { ...good.facts[reading].value, value: 21 }
    expect(bad((facts) => Object.assign(facts[reading] ?? {}, { value: tampered }))).toMatchObject({
      path: `facts/${reading}/value`,
      found: '21',
    })
    expect(bad((facts) => Object.assign(facts[reading] ?? {}, { value: { ...tampered, value: '12' } }))).toMatchObject({
      path: `facts/${reading}/value`,
      found: '"12"',
    })
  })
})

describe('a team card’s file', () => {
  it('has the default card’s figures where it says nothing', () => {
    const read = readTeamFile('{"kind":"tautline-team","version":1,"handler":{"stature":1.7,"opensDoors":false}}')
    expect(read).toEqual({
      ok: true,
      team: { ...defaultTeamCard, handler: { ...defaultTeamCard.handler, stature: 1.7, opensDoors: false } },
    })
  })

  it('reads back what was written', () => {
    const team = { ...defaultTeamCard, name: 'Team L', motto: 'slow' }
    expect(readTeamFile(writeTeamFile(team))).toEqual({ ok: true, team })
  })

  it.each([
    ['another kind', '{"kind":"tautline-survey","version":1}', 'kind'],
    [
      'a stature that is no number',
      '{"kind":"tautline-team","version":1,"handler":{"stature":"tall"}}',
      'handler/stature',
    ],
    ['a handler that is none', '{"kind":"tautline-team","version":1,"handler":"x"}', 'handler'],
    ['no leash length', '{"kind":"tautline-team","version":1,"leash":{"lengths":[]}}', 'leash/lengths'],
    ['no object', '7', ''],
  ])('is refused for %s', (_, text, path) => {
    expect(readTeamFile(text)).toMatchObject({ ok: false, problems: [{ path }] })
  })
})

describe('the JSON Schema', () => {
  it('asks of a hand-written view only what reading does not fill in', () => {
    const survey = JSON.stringify(jsonSchema('survey'))
    expect(survey).toContain('"required":["raw","instrument"]')
    expect(survey).toContain('"const":"tautline-survey"')
    expect(survey).toContain('"tape-in-lays"')
    expect(jsonSchema('team')).toMatchObject({
      required: ['kind', 'version'],
      properties: { robot: { type: 'object' } },
    })
  })
})
