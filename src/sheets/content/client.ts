import { basis, conditionsOf } from './basis.ts'
import { clientRefusal } from './gate.ts'
import { leadOf } from './lead.ts'
import { overview, shortVersion } from './overview.ts'
import { own } from './own.ts'
import { partSections } from './parts.ts'
import type { Scope } from './scope.ts'
import { alwaysLines, troubleSection } from './standing.ts'
import { line, list, type Outline, paragraph, type Refusal, type Section, section } from './tree.ts'
import { capital, dayWords, distinct, sentences, verdictWords } from './words.ts'

/** The client's sheet, "you" throughout: no figure finer than half a metre, no clause, ratio or score. */
export function clientOutline(scope: Scope, goodUntil: string | null): Outline | Refusal {
  const { verdict } = scope.result
  if (verdict === 'do-not-use' || verdict === 'not-known') return doNotUse(scope)
  const refusal = clientRefusal(scope)
  if (refusal) return refusal
  const parts = partSections(scope)
  const lead = leadOf(scope, goodUntil, cautionsIn(parts))
  const contact = contactOf(scope)
  const always = section('Always', [list(alwaysLines(scope))])
  return {
    ...shell(scope, lead.heading),
    blocks: [
      paragraph(lead.rest),
      { kind: 'verdict', verdict, text: verdictText(scope, lead.heading) },
      paragraph(`Walk: ${own(scope.result.name)}.`, 'name of the walk'),
    ],
    sections: [
      always,
      troubleSection(scope),
      ...overrideSection(scope),
      overview(scope, parts),
      section('Parts of the walk', [], parts),
      shortVersion(scope, lead, parts, contact),
      basis(scope, goodUntil),
      limits(contact),
    ],
  }
}

/** The one form of a walk that nobody may be sent on. */
function doNotUse(scope: Scope): Outline {
  return {
    ...shell(scope, `Do not use this walk. Ask ${contactOf(scope)}.`),
    sections: [basisWithoutWay(scope)],
  }
}

/** Which walk, which team, which day: nothing that could be walked by. */
function basisWithoutWay(scope: Scope): Section {
  const kept = basis(scope, null)
  const block = kept.blocks.at(-1)
  const items =
    block?.kind === 'list' ? block.items.filter(({ text }) => !/^(Leash|Good until|Conditions)/.test(text)) : []
  return {
    ...kept,
    heading: 'Which walk this is',
    blocks: [...kept.blocks.slice(0, -1), list(items), list(limitLines)],
  }
}

function shell(scope: Scope, heading: string): Outline {
  return {
    kind: 'outline',
    lang: 'en',
    reader: 'client',
    draft: false,
    title: `${heading} ${own(scope.result.name)}, ${own(scope.view.name)}`,
    heading,
    blocks: [],
    sections: [],
  }
}

function contactOf(scope: Scope): string {
  const contact = scope.view.contact?.trim()
  return contact ? own(contact).replace(/\.$/, '') : 'the person who gave you this sheet'
}

/** "Only with help: the porter at the lift. Dry floor only.": as short as the heading had to be. */
function verdictText(scope: Scope, heading: string): string {
  const { verdict } = scope.result
  const who = heading.replace(/^Use this walk only with (?:help)? ?/, '')
  const base = verdict === 'with-help' && who !== '.' ? `${verdictWords[verdict]}: ${who}` : `${verdictWords[verdict]}.`
  return [base, ...conditionsOf(scope).map((condition) => `${capital(condition)}.`)].join(' ')
}

function cautionsIn(parts: readonly Section[]): number {
  const items = parts.flatMap((part) => part.blocks.flatMap((block) => (block.kind === 'list' ? block.items : [])))
  return items.filter(({ text }) => /^(Caution: |Stop\. Leash off\.)/.test(text)).length
}

/** A practitioner's last word is never hidden from the person who walks by it. */
function overrideSection(scope: Scope): Section[] {
  const lines = scope.stretches.flatMap(({ segment, result }) => {
    const spoken = result.override
    if (!spoken) return []
    const from = `override of "${own(segment.name)}"`
    return [
      line(`At "${own(segment.name)}" a person decided, not the measurements.`, from),
      line(
        `Measured: ${verdictWords[spoken.machine].toLowerCase()}. Decided: ${verdictWords[spoken.verdict].toLowerCase()}.`,
        from,
      ),
      line(`By ${own(spoken.name)}, ${own(spoken.role)}, until ${dayWords(spoken.until)}.`, from),
      line(`Reason: ${sentences(own(spoken.reason, 400)).join(' ')}`, from),
    ]
  })
  return lines.length > 0 ? [section('Decided by a person', [list(lines)])] : []
}

const limitLines = [
  'Local codes and licensed O&M practice come first.',
  'A qualified person must walk this route.',
  'This sheet certifies nothing. The robot can fail.',
]

function limits(contact: string): Section {
  return section('Limits and contact', [
    list(
      distinct([
        ...limitLines,
        'Walk it with a helper before you rely on it.',
        'Places change: after the end date, do not use this sheet.',
      ]),
    ),
    paragraph(`Contact: ${contact}.`, 'contact of the venue'),
  ])
}
