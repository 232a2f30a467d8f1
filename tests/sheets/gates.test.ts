import { describe, expect, it } from 'vitest'
import type { Verdict } from '../../src/judge/result.ts'
import type { StateMark } from '../../src/record/survey.ts'
import { outline } from '../../src/sheets/content/outline.ts'
import type { Reader } from '../../src/sheets/content/tree.ts'
import { library, libraryAssessment, libraryResult, libraryWalk, tried } from '../fixtures/sheets/library.ts'
import { given, headingsOf, partsOf, textsOf } from '../fixtures/sheets/words-of.ts'

const on = '2026-11-01'
const mark = (state: StateMark['state'], more: Partial<StateMark> = {}): StateMark => ({
  state,
  name: 'Cy Dale',
  date: '2026-10-20',
  ...more,
})

function sheet(
  reader: Reader,
  verdict: Verdict,
  states: StateMark[],
  options: { draft?: boolean; number?: string } = {},
) {
  const result = libraryResult({ verdict })
  return outline(library(libraryWalk({ states })), result, libraryAssessment(result), reader, { on, ...options })
}

describe('a tape survey alone never reaches a client', () => {
  it.each([
    ['nobody has signed', []],
    ['surveyed and judged', [mark('surveyed'), mark('judged')]],
    ['tried with another version of the card', [mark('tried', { team: '3' })]],
    ['tried, card not said', [mark('tried')]],
    ['tried after the day of the sheet', [mark('tried', { date: '2026-11-02', team: '4' })]],
    ['reviewed and issued without a trial', [mark('reviewed'), mark('issued')]],
  ])('refuses: %s', (_, states) => {
    for (const verdict of ['usable', 'with-cautions', 'with-help'] as const)
      for (const draft of [false, true])
        expect(sheet('client', verdict, states, { draft })).toEqual({
          kind: 'refusal',
          why: expect.stringContaining('has no client sheet yet'),
          missing: ['tried by staff with this robot (Plover team, version 4)'],
          whatToDo: expect.stringContaining('mark the walk "tried"'),
        })
  })

  it.each([
    ['tried with this card', [tried]],
    ['tried on the day itself', [mark('tried', { date: on, team: '4' })]],
    ['tried with the old card, then with this', [mark('tried', { team: '3' }), tried]],
  ])('gives one: %s', (_, states) => {
    expect(sheet('client', 'with-cautions', states).kind).toBe('outline')
  })
})

describe.each(['do-not-use', 'not-known'] as const)('a walk that is %s', (verdict) => {
  it.each([[[]], [[tried]], [[tried, mark('issued')]]])(
    'has one form for the client, whatever was signed',
    (states) => {
      const texts = textsOf(given(sheet('client', verdict, states)))
      expect(texts[0]).toBe('Do not use this walk. Ask Issue desk, telephone 12.')
      expect(partsOf(given(sheet('client', verdict, states)))).toEqual([])
      expect(texts.join(' ')).not.toMatch(/cue the robot|metres|leash at|shoreline|turn left/i)
    },
  )

  it('sends nobody from reception', () => {
    const texts = textsOf(given(sheet('reception', verdict, [tried])))
    expect(texts[0]).toBe('Nobody goes on this walk: Street door to the issue desk')
    expect(texts).not.toContain('Who is where')
  })
})

it('gives venue, file and reception theirs before anybody has signed', () => {
  for (const reader of ['venue', 'file', 'reception'] as const)
    expect(sheet(reader, 'usable', []).kind, reader).toBe('outline')
})

it('says DRAFT in every heading of a draft and in none of another', () => {
  for (const reader of ['client', 'venue', 'file', 'reception'] as const) {
    const drafted = headingsOf(given(sheet(reader, 'with-help', [tried], { draft: true })))
    expect(drafted.length).toBeGreaterThan(3)
    for (const [, heading] of drafted) expect(heading, reader).toMatch(/^DRAFT: /)
    for (const [, heading] of headingsOf(given(sheet(reader, 'with-help', [tried]))))
      expect(heading).not.toContain('DRAFT')
  }
})

it('says on every form for whom, with what and when it holds', () => {
  for (const reader of ['client', 'venue', 'file', 'reception'] as const) {
    const texts = textsOf(given(sheet(reader, 'with-help', [tried], { number: '0042' })))
    for (const line of [
      'Team: Plover team.',
      'Team card: version 4.',
      'Leash: 1.0 metre mark.',
      'Date of this sheet: 1 November 2026.',
      'Hours: 10:00 to 16:00.',
      'Conditions: dry floor only.',
      'Code pack: 2010 ADA Standards.',
      'Good until 3 April 2027.',
      'Sheet number: 0042.',
    ])
      expect(texts, reader).toContain(line)
    expect(texts.join(' '), reader).toMatch(/Local codes and licensed (O&M|orientation and mobility) practice/)
    expect(texts.join(' '), reader).not.toMatch(/\b(safe|cleared|approved|passed|sighted|command)\b/i)
  }
})

it('says of an invented venue that it is', () => {
  const survey = library()
  survey.view.demo = true
  for (const reader of ['client', 'venue', 'file', 'reception'] as const)
    expect(textsOf(given(outline(survey, libraryResult(), libraryAssessment(), reader, { on }))), reader).toContain(
      'This venue and its people are invented, for trying the tool.',
    )
})
