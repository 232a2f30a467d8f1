import { describe, expect, it } from 'vitest'
import type { Harm } from '../../src/judge/result.ts'
import { lint } from '../../src/sheets/content/lint.ts'
import { outline } from '../../src/sheets/content/outline.ts'
import type { Outline } from '../../src/sheets/content/tree.ts'
import {
  cautions,
  feature,
  judgedPart,
  library,
  libraryAssessment,
  libraryResult,
  libraryWalk,
  porter,
  says,
} from '../fixtures/sheets/library.ts'
import { given, itemsOf, partsOf, textsOf } from '../fixtures/sheets/words-of.ts'

const on = '2026-11-01'
function client(result = libraryResult(), walk = libraryWalk()): Outline {
  return given(outline(library(walk), result, libraryAssessment(result), 'client', { on }))
}

/** The first 200 characters that a reader meets: heading and what follows it, joined by a blank. */
function opening(sheet: Outline): string {
  return textsOf(sheet).join(' ').slice(0, 200)
}

/** A sheet of one sentence, for the linter. */
function sheetOf(text: string, from = 'end sign of "Hall"'): Outline {
  return { ...client(), blocks: [{ kind: 'paragraph', line: { text, from } }], sections: [] }
}

describe("the client's sheet", () => {
  it('opens with who must be there, whether it was walked, and until when, in 200 characters', () => {
    expect(opening(client())).toMatch(
      /^Use this walk only with the porter at the four steps\. You have not yet walked it with an instructor\. Good until 3 April 2027, 10:00 to 16:00\. Dry floor only\. /,
    )
    const walked = libraryWalk()
    walked.states.push({ state: 'walked', name: 'Cy Dale', date: '2026-10-25', team: '4' })
    expect(opening(client(libraryResult(), walked))).toContain('You have walked it with Cy Dale. Good until')
  })

  it.each([1, 4, 30])('keeps the opening in 200 characters and 15 words with %i helpers of long names', (helpers) => {
    const walk = libraryWalk()
    const segments = Array.from({ length: helpers }, (_, i) => ({
      ...(walk.segments[2] as (typeof walk.segments)[number]),
      id: `s${i}`,
      ledBy: 'robot' as const,
      features: [
        feature(`heavy oak door number ${i} of the long north range`, 'hinged-door', {
          help: { ...porter, role: `deputy keeper of the north range ${i}` },
        }),
      ],
    }))
    const result = libraryResult({
      segments: segments.map(({ id, features }) =>
        judgedPart(id, {
          verdict: 'with-help',
          checks: [
            {
              ...(libraryResult().segments[2]?.checks[0] as never as object),
              id: 'door-force',
              feature: features[0]?.id,
              state: 'helped',
            } as never,
          ],
        }),
      ),
    })
    const sheet = client(result, { ...walk, segments })
    const [first, second] = textsOf(sheet) as [string, string]
    expect(`${first} ${second}`.length).toBeLessThanOrEqual(200)
    expect(first).toMatch(/^Use this walk only with /)
    expect(lint({ ...sheet, sections: [] }).filter(({ problem }) => problem.includes('words'))).toEqual([])
  })

  it('says the standing lines', () => {
    const texts = textsOf(client())
    for (const line of [
      'Carry your cane.',
      'Leash at the 1.0 metre mark.',
      'When the leash goes slack, stand still. Do not step forward: the leash may be on the floor.',
      'If the robot stops, stop.',
      'If it pulls hard, let go: open your hand.',
      'Do not lean on the robot.',
      'If the alarm sounds: let go, hand on the wall, stand, call out.',
      'The porter comes to you.',
      'To call help: ring 0, the porter answers.',
    ])
      expect(texts).toContain(line)
  })

  it('has a start and at most four facts a part', () => {
    const parts = partsOf(client())
    expect(parts).toHaveLength(5)
    for (const part of parts) {
      expect(part.heading).toMatch(/^Part \d of 5: /)
      expect(part.blocks[0]).toMatchObject({
        kind: 'paragraph',
        line: { text: expect.stringMatching(/^Start sign: /) },
      })
      expect(itemsOf(part).length).toBeLessThanOrEqual(4)
    }
  })

  it('has no millimetre, clause, ratio or score, and nothing to correct', () => {
    const sheet = client()
    expect(textsOf(sheet).join('\n')).not.toMatch(/\bmm\b|millimet|clause|ratio|score|0\.9|\b12 of 100/i)
    expect(lint(sheet)).toEqual([])
  })

  it.each([
    ['two of fall and head', ['fall', 'head']],
    ['two falls', ['fall', 'fall']],
    ['fall, head, trap and three of comfort', ['fall', 'head', 'trap', 'comfort', 'comfort', 'comfort']],
    ['seven traps', ['trap', 'trap', 'trap', 'trap', 'trap', 'trap', 'trap']],
  ] as [string, Harm[]][])('drops no caution and keeps one fall, head or trap a part: %s', (_, harms) => {
    const told = harms.map((harm, i) => ({ feature: `f${i}`, harm, text: `Mind the ${harm}, number ${i}.` }))
    const result = libraryResult({
      segments: libraryResult().segments.map((one) => (one.id === 'bay' ? { ...one, cautions: told } : one)),
    })
    const parts = partsOf(client(result))
    for (const { text } of told)
      expect(parts.flatMap(itemsOf).filter((item) => item === `Caution: ${text}`)).toHaveLength(1)
    for (const part of parts) {
      expect(itemsOf(part).length).toBeLessThanOrEqual(4)
      expect(itemsOf(part).filter((item) => /Mind the (fall|head|trap)/.test(item)).length).toBeLessThanOrEqual(1)
    }
    // The worst is the last heard before walking.
    const walking = parts.filter((part) => part.heading.endsWith(': Into the bay')).flatMap(itemsOf)
    expect(walking).toContain(`Caution: Mind the ${harms[0]}, number 0.`)
  })

  it('says one thing only where somebody else leads', () => {
    const steps = partsOf(client()).find((part) => part.heading.includes('Up the steps'))
    const items = steps ? itemsOf(steps) : []
    expect(items[0]).toBe('Stop. Leash off. Wait for the porter.')
    expect(items.filter((item) => item.startsWith('Caution'))).toEqual([])
  })

  it('says one thing only at a stop item and an unguarded edge on a part that the robot leads', () => {
    const walk = libraryWalk()
    const bay = walk.segments[1] as (typeof walk.segments)[number]
    bay.features = [feature('pool', 'water-edge', { help: porter })]
    const result = libraryResult({
      segments: libraryResult().segments.map((one) =>
        one.id === 'bay'
          ? judgedPart('bay', {
              verdict: 'with-help',
              checks: [
                {
                  ...(one.checks[0] ?? libraryResult().checks[0]),
                  id: 'edge',
                  feature: 'pool',
                  state: 'helped',
                  harm: 'fall',
                } as never,
              ],
              cautions: [{ feature: 'pool', harm: 'fall', text: 'Water on the right. Keep to the left rail.' }],
            })
          : one,
      ),
    })
    const items = partsOf(client(result, walk))
      .filter((part) => part.heading.includes('bay'))
      .flatMap(itemsOf)
    expect(items).toContain('Stop. Leash off. Wait for the porter.')
    expect(items.join(' ')).not.toMatch(/keep|carry on|water/i)
  })

  it('names turns above 45 degrees and no others', () => {
    const turned = (degrees: number, side: 'left' | 'right') => {
      const walk = libraryWalk()
      const bay = walk.segments[1] as (typeof walk.segments)[number]
      const reading = bay.turn?.readings.angle?.[0]
      if (!bay.turn || !reading) throw new Error('no turn in the fixture')
      bay.turn = { ...bay.turn, side, readings: { angle: [{ ...reading, value: (degrees * Math.PI) / 180 }] } }
      return textsOf(client(libraryResult(), walk))
    }
    expect(turned(90, 'right')).toContain("Part 4 begins with a turn: turn right to 3 o'clock.")
    expect(turned(120, 'left')).toContain("Part 4 begins with a turn: turn sharp left to 8 o'clock.")
    expect(turned(180, 'left')).toContain("Facing: turn back, by the left to 6 o'clock.")
    expect(turned(30, 'right')).toContain("Facing: bear right to 1 o'clock.")
    expect(turned(45, 'left').some((text) => text.includes('begins with a turn'))).toBe(false)
  })

  it('says where the leash is changed, and only on the part that begins there', () => {
    const parts = partsOf(client(libraryResult({ changes: [{ segment: 'aisle', leash: 0.8 }] })))
    const said = parts.map(({ blocks }) => JSON.stringify(blocks).includes('Change the leash to the 0.8 metre mark.'))
    expect(said).toEqual([false, false, false, false, true])
  })

  it('says where to turn back when the battery is only just enough', () => {
    // 117 s counted on, less the reserve of 1.3, there and back: 45 s a way. At 0.5 m/s the hall takes 24.4 s, the bay
    // 8 s and the steps 6 s: 38.4 s; the aisle's 18 s go past it.
    const battery = { ...libraryResult().checks[0], state: 'tight', caution: 'Just enough.', capacity: 117 } as never
    expect(textsOf(client(libraryResult({ checks: [battery] })))).toContain(
      'Battery: just enough. Turn back before "Down the aisle" if it runs low.',
    )
    expect(textsOf(client()).some((text) => text.startsWith('Battery:'))).toBe(false)
  })

  it('has a short version of four sentences', () => {
    const short = client().sections.find(({ heading }) => heading === 'Short version')
    expect(
      short
        ? itemsOf(short)
            .join(' ')
            .match(/[.!?](?= |$)/g)
        : null,
    ).toHaveLength(4)
  })

  it("prints a practitioner's override with machine verdict, name, role, reason and end", () => {
    const result = libraryResult({
      segments: libraryResult().segments.map((one) =>
        one.id === 'hall'
          ? {
              ...one,
              override: {
                verdict: 'with-cautions',
                machine: 'do-not-use',
                reason: 'walked twice with a wider team',
                name: 'Ida Moss',
                role: 'O&M specialist',
                until: '2026-12-24',
              },
            }
          : one,
      ),
    })
    const texts = textsOf(client(result))
    expect(texts).toContain('Measured: do not use. Decided: with cautions.')
    expect(texts).toContain('By Ida Moss, O&M specialist, until 24 December 2026.')
    expect(texts).toContain('Reason: Walked twice with a wider team.')
    expect(opening(client(result))).toContain('Good until 24 December 2026')
  })

  it('asks for what is missing instead of guessing', () => {
    const { startSign: _, alarm: __, ...walk } = libraryWalk()
    const hall = walk.segments[0] as (typeof walk.segments)[number]
    hall.words = { shoreline: says('left') }
    const asked = lint(client(libraryResult(), { ...walk, words: {} })).map(({ whatToDo }) => whatToDo)
    expect(asked).toEqual(
      expect.arrayContaining([
        'add the start sign of the walk',
        'add the alarm role of the walk',
        'add the help call of the walk',
        'add the end sign of "Along the hall"',
      ]),
    )
  })
})

describe('cautions of one thing', () => {
  const door = feature('oak-door', 'hinged-door', { help: porter })
  const walk = libraryWalk()
  const bay = walk.segments[1] as (typeof walk.segments)[number]
  bay.features = [door]
  const told = (more: object) => {
    const result = libraryResult({
      segments: libraryResult().segments.map((one) =>
        one.id === 'bay' ? judgedPart('bay', { verdict: 'with-help', ...more }) : one,
      ),
    })
    const parts = partsOf(client(result, walk)).filter((part) => part.heading.includes('bay'))
    return parts.map((part) => itemsOf(part).filter((item) => item.startsWith('Caution')))
  }
  const row = { feature: 'oak-door', harm: 'trap', text: "Door, at 12 o'clock, push. Stop and find the handle first." }
  const heavy = { feature: 'oak-door', harm: 'trap', text: 'Heavy door.' }
  const tight = { feature: 'oak-door', harm: 'comfort', text: 'Tight here. Arms in.' }
  const lip = { feature: 'oak-door', harm: 'fall', text: 'Small lip. Slow.' }
  const force = (state: string) => ({ ...libraryResult().checks[0], id: 'door-force', feature: 'oak-door', state })

  it('are one, of its worst harm', () => {
    expect(told({ cautions: [row, heavy, tight] })).toEqual([
      ["Caution: Door, at 12 o'clock, push. Stop and find the handle first. Heavy door. Tight. Arms in."],
    ])
  })

  it('are two where it can both trip and trap', () => {
    expect(told({ cautions: [lip, row] })).toEqual([
      ["Caution: Door, at 12 o'clock, push. Stop and find the handle first."],
      ['Caution: Small lip. Slow.'],
    ])
  })

  it('wait for whoever helps, who finds the handle', () => {
    expect(told({ cautions: [row, heavy], checks: [force('helped')] })).toEqual([
      ["Caution: Stop. Wait for the porter. Door, at 12 o'clock, push. Heavy door."],
    ])
    expect(told({ cautions: [], checks: [force('helped')] })).toEqual([['Caution: Stop. Wait for the porter.']])
    expect(
      told({ cautions: [{ ...row, text: 'Lift. Stop, and wait for porter.' }], checks: [force('helped')] }),
    ).toEqual([['Caution: Lift. Stop, and wait for the porter.']])
  })

  it('say two things of the part itself apart', () => {
    const crowd = { feature: 'bay', harm: 'fall', text: 'People may cross the leash. Slow.' }
    const loud = { feature: 'bay', harm: 'fall', text: 'Loud here. Feel the leash; expect no speech.' }
    expect(told({ cautions: [crowd, loud] })).toEqual([
      ['Caution: Loud. Feel the leash. Expect no speech.'],
      ['Caution: People may cross the leash. Slow.'],
    ])
  })
})

describe('the linter', () => {
  it.each([
    ['Turn at the shelf over there.', 'vague: "over there"'],
    ['See the sign.', 'vague: "see"'],
    ['The desk is a bit further.', 'vague: "a bit"'],
    ['You cannot miss the door.', 'vague: "cannot miss"'],
    ['Stop at the red sign.', 'colour alone: "red"'],
    ['Leave 40 mm at the door.', 'millimetres'],
    ['As clause 404.2 asks.', 'a clause'],
    ['The ramp is 1:12.', 'a ratio'],
    ['It scored 12.', 'a score'],
    [
      'One two three four five six seven eight nine ten eleven twelve thirteen fourteen fifteen sixteen.',
      '16 words in one sentence',
    ],
  ])('refuses %s', (text, problem) => {
    expect(lint(sheetOf(text))).toEqual([
      expect.objectContaining({ text, problem, whatToDo: expect.stringContaining('in the end sign of "Hall"') }),
    ])
  })

  it.each([
    'Stop at the red mat, rough under your feet.',
    'Go to the Green Room.',
    'The shelf is theirs, therefore stop.',
    'One two three four five six seven eight nine ten eleven twelve thirteen fourteen fifteen.',
    'Listen for the seesaw.',
  ])('lets pass %s', (text) => {
    expect(lint(sheetOf(text))).toEqual([])
  })

  it('counts five facts in a part', () => {
    const items = ['a', 'b', 'c', 'd', 'e'].map((text) => ({ text }))
    const sheet: Outline = {
      ...sheetOf('Walk.'),
      sections: [{ heading: 'Part 1 of 1: Hall', part: true, blocks: [{ kind: 'list', items }], sections: [] }],
    }
    expect(lint(sheet)).toEqual([
      expect.objectContaining({ where: 'Part 1 of 1: Hall', problem: '5 facts in one part' }),
    ])
  })
})

it('ranks by harm, whatever the order they come in', () => {
  const bay = libraryResult().segments.find(({ id }) => id === 'bay')
  expect(bay?.cautions).toEqual(cautions)
  const reversed = libraryResult({
    segments: libraryResult().segments.map((one) =>
      one.id === 'bay' ? { ...one, cautions: [...cautions].reverse() } : one,
    ),
  })
  expect(textsOf(client(reversed))).toEqual(textsOf(client()))
})
