import { basis, standingCautions } from './basis.ts'
import { fixesOf, hazardsOf } from './fixes.ts'
import { helpsOf, meetings, roleOf, verdictLine } from './help.ts'
import { own, ownWhole } from './own.ts'
import type { Scope } from './scope.ts'
import { list, type Outline, paragraph, type Section, section } from './tree.ts'
import { capital, count, dayWords, distinct, stopped } from './words.ts'

/** The venue manager's sheet: what is good, what is a hazard today, what to fix first and by how much. */
export function venueOutline(scope: Scope, goodUntil: string | null): Outline {
  const fixes = fixesOf(scope)
  return {
    kind: 'outline',
    lang: 'en',
    reader: 'venue',
    draft: false,
    title: `For the venue: ${own(scope.result.name)}, ${own(scope.view.name)}`,
    heading: `For the venue: ${own(scope.result.name)}`,
    blocks: [
      { kind: 'verdict', verdict: scope.result.verdict, text: verdictLine(scope) },
      paragraph(summary(scope, fixes.length)),
    ],
    sections: [
      section('Good points', [list(goodPoints(scope))]),
      section('Hazards today', [list(hazards(scope))]),
      ...notKnown(scope),
      section('Fixes, most pressing first', [
        fixes.length === 0
          ? paragraph('No fix is asked of the venue.')
          : {
              kind: 'table',
              caption: 'Fixes with place, clause and what would turn the verdict; owner and date to be filled in',
              head: ['Priority', 'Place', 'What to do', 'What turns it', 'Clause', 'Owner', 'Date'],
              rows: fixes.map((fix) => [
                priorities[fix.priority],
                fix.place,
                ownWhole(fix.what),
                fix.turns || 'no single figure',
                fix.clause,
                '',
                '',
              ]),
            },
        paragraph(
          'A fire door is never propped: a person holds it, or a hold-open device released by the alarm; ask your fire adviser.',
        ),
      ]),
      section('On the day', [list(onTheDay(scope))]),
      section('Changes', [
        paragraph('Tell the surveyor before works, a new layout or an event on this walk: the verdict then ends.'),
        paragraph(
          goodUntil
            ? `To be surveyed again by ${dayWords(goodUntil)}.`
            : 'To be surveyed again: no date, no reading is dated.',
        ),
      ]),
      basis(scope, goodUntil),
      standingCautions(scope),
    ],
  }
}

const priorities = { 1: '1, now', 2: '2, soon', 3: '3, later' } as const

function summary({ result, stretches }: Scope, fixes: number): string {
  const governing = stretches.find(({ result: one }) => one.verdict === result.verdict)?.result.sentence
  const why = governing ? ` ${stopped(ownWhole(governing))}` : ''
  return `${count(stretches.length, 'part')}, ${count(fixes, 'fix', 'fixes')} asked.${why}`
}

const praised: Readonly<Record<string, string>> = {
  'straight-width': 'The clear width holds',
  turn: 'The turns give room',
  overhead: 'The headroom holds',
  level: 'Steps and lips are within the limit',
  slope: 'Slopes are within the limit',
  traction: 'The floor gives the robot its grip',
  'door-force': 'Doors are light enough',
  'door-time': 'Doors stay open long enough',
  'door-room': 'Doors have room beside them',
  'lift-fit': 'The lift has room',
  edge: 'Edges are guarded',
}

function goodPoints({ stretches }: Scope): string[] {
  const checks = stretches.flatMap(({ result }) => result.checks)
  const points = Object.entries(praised).flatMap(([id, words]) => {
    const all = checks.filter((check) => check.id === id)
    const good = all.filter((check) => check.state === 'passes' && check.caution === null).length
    if (good === 0) return []
    return [good === all.length ? `${words} everywhere it was judged.` : `${words} at ${good} of ${all.length} places.`]
  })
  const clean = stretches.filter(({ segment }) => segment.words.edge?.says === 'none').length
  if (clean > 0) points.push(`No edge within 3 m on ${clean} of ${stretches.length} parts.`)
  const usable = stretches.filter(({ result }) => result.verdict === 'usable').map(({ segment }) => own(segment.name))
  if (usable.length > 0) points.push(`Usable as they are: ${usable.join('; ')}.`)
  return points.length > 0 ? points : ['None could be shown from the readings so far.']
}

function hazards(scope: Scope): string[] {
  const lines = hazardsOf(scope).map(({ check }) => stopped(ownWhole(check.sentence)))
  for (const { segment, result } of scope.stretches)
    for (const caution of result.cautions)
      if (!result.checks.some((check) => check.feature === caution.feature && check.state !== 'passes'))
        lines.push(`${own(segment.name)}: ${stopped(ownWhole(caution.text))}`)
  return lines.length > 0 ? distinct(lines) : ['None was found at the hours judged.']
}

/** What stands between the walk and a verdict, and is the surveyor's to settle. */
function notKnown(scope: Scope): Section[] {
  const whys = [...scope.result.why, ...scope.stretches.flatMap(({ result }) => result.why)]
  const lines = distinct(whys.map(({ text }) => stopped(ownWhole(text))))
  return lines.length > 0 ? [section('Not known yet', [list(lines)])] : []
}

function onTheDay(scope: Scope): string[] {
  return [
    'Keep the walk clear as it was surveyed.',
    ...meetings(helpsOf(scope)).flatMap(({ help, place }) => {
      const role = roleOf(help)
      return role && help.act ? [`${capital(role)} at ${place}: ${stopped(ownWhole(help.act))}`] : []
    }),
    'Speak to the handler, by name, and say who you are.',
    'Do not touch the leash or the robot, and do not call the robot.',
    'Tell visitors that a robot with sensors is about.',
  ]
}
