import { basis, standingCautions } from './basis.ts'
import { helpsOf, meetings, type PlaceHelp, roleOf, the, verdictLine } from './help.ts'
import { own, ownWhole } from './own.ts'
import type { Scope } from './scope.ts'
import { list, type Outline, paragraph, type Section, section } from './tree.ts'
import { capital, hoursWords, sentences, stopped } from './words.ts'

/** Reception's card for the day: who is where, what they do, what they say. */
export function receptionOutline(scope: Scope, goodUntil: string | null): Outline {
  const { result, view } = scope
  const off = result.verdict === 'do-not-use' || result.verdict === 'not-known'
  const helps = meetings(helpsOf(scope))
  return {
    kind: 'outline',
    lang: 'en',
    reader: 'reception',
    draft: false,
    title: `Day card: ${own(result.name)}, ${own(view.name)}`,
    heading: off ? `Nobody goes on this walk: ${own(result.name)}` : `Day card: ${own(result.name)}`,
    blocks: [
      { kind: 'verdict', verdict: result.verdict, text: verdictLine(scope) },
      paragraph(
        off ? `Send nobody on this walk with the robot. Ask ${contactOf(scope)}.` : `Hours: ${hoursWords(view.hours)}.`,
      ),
    ],
    sections: [
      ...(off ? [] : [whoIsWhere(helps), whatTheySay(scope, helps)]),
      alarm(scope),
      section('Always', [
        list([
          'Speak to the handler, not to the robot.',
          'Say your name and your task first.',
          'Do not touch the leash or the robot. Do not call the robot.',
          'Offer an arm; do not take hold.',
          'Tell the handler when you go.',
        ]),
      ]),
      section('Questions', [paragraph(`Ask ${contactOf(scope)}.`)]),
      basis(scope, goodUntil),
      standingCautions(scope),
    ],
  }
}

function whoIsWhere(helps: readonly PlaceHelp[]): Section {
  if (helps.length === 0) return section('Who is where', [paragraph('Nobody is needed on this walk.')])
  return section('Who is where', [
    {
      kind: 'table',
      caption: 'Who is where, how they are called and what they do',
      head: ['Place', 'Who', 'How they are called', 'What they do', 'If nobody comes in 3 minutes'],
      rows: helps.map(({ place, help }) => [
        capital(place),
        roleOf(help) ?? 'not named yet',
        help.call ? ownWhole(help.call) : 'not said yet',
        help.act ? sentences(ownWhole(help.act)).join(' ') : 'not said yet',
        help.ifNobody ? sentences(ownWhole(help.ifNobody)).join(' ') : 'not said yet',
      ]),
    },
  ])
}

function whatTheySay({ walk }: Scope, helps: readonly PlaceHelp[]): Section {
  const lines = helps.flatMap(({ help, place, segment, holder }) => {
    const role = roleOf(help)
    const offer =
      segment.ledBy !== 'robot' || holder === walk.id ? 'Would you like my arm?' : 'I stay until you are through.'
    return role ? [`${capital(the(role))} at ${place}: "Hello, I am [name], ${role}. ${offer}"`] : []
  })
  const rest = walk.words.rest?.says
  if (rest && rest !== 'none') lines.push(`When asked for a seat: "${capital(stopped(own(rest, 200)))}"`)
  return section('What they say', [list(lines.length > 0 ? lines : ['"Hello, I am [name]. Do you need anything?"'])])
}

function alarm({ walk }: Scope): Section {
  const role = roleOf(walk.alarm)
  const lines = ['The handler lets the leash go, puts a hand on the wall, stands and calls out.']
  lines.push(role ? `${capital(the(role))} goes to the handler.` : 'Who goes to the handler: not named yet.')
  if (walk.alarm?.act) lines.push(...sentences(ownWhole(walk.alarm.act)))
  if (walk.alarm?.ifNobody) lines.push(`The handler, if nobody comes: ${ownWhole(walk.alarm.ifNobody)}.`)
  return section('If the alarm sounds', [list(lines.map(stopped))])
}

function contactOf({ view }: Scope): string {
  return view.contact ? own(view.contact).replace(/\.$/, '') : 'the person who gave you this card'
}
