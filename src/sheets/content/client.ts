import { basis, conditionWords } from './basis.ts'
import { clientRefusal } from './gate.ts'
import { helpsOf, whoOnly } from './help.ts'
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
  const lead = leadOf(scope, goodUntil)
  const parts = partSections(scope)
  const contact = contactOf(scope)
  const always = section('Always', [list(alwaysLines(scope))])
  return {
    ...shell(scope, lead.heading),
    blocks: [
      paragraph(lead.rest),
      { kind: 'verdict', verdict, text: verdictText(scope) },
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
  const contact = contactOf(scope)
  const outline = shell(scope, 'Do not use this walk.')
  return {
    ...outline,
    blocks: [paragraph(`Ask ${contact}.`, 'contact of the venue')],
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

function verdictText(scope: Scope): string {
  const who = whoOnly(helpsOf(scope).filter((help) => help.needed))
  const words = verdictWords[scope.result.verdict]
  const base = scope.result.verdict === 'with-help' && who ? `${words}: ${who}.` : `${words}.`
  const conditions = conditionWords(scope)
  return conditions === 'as surveyed' ? base : `${base} ${capital(conditions)}.`
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
