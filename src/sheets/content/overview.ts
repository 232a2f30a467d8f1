import { markWords, metresWords } from './directions.ts'
import { featureName, helpsOf, meetings, roleOf, the } from './help.ts'
import type { Lead } from './lead.ts'
import { own } from './own.ts'
import type { Scope } from './scope.ts'
import { stretchesOf } from './stretches.ts'
import { severe } from './told-cautions.ts'
import { type Line, line, list, type Section, section } from './tree.ts'
import { capital, count, distinct, joined, sentences, stopped } from './words.ts'

/** Parts, metres, minutes, who leads, turns above 45 degrees. `parts`: the sections that follow. */
export function overview(scope: Scope, parts: readonly Section[]): Section {
  const lines: Line[] = [line(`${capital(count(parts.length, 'part'))}${wayWords(scope)}.`), ...turnLines(parts)]
  lines.push(line(levelWords(scope)))
  const rest = scope.walk.words.rest?.says
  if (rest)
    lines.push(
      line(
        rest === 'none' ? 'No rest place on this walk.' : `Rest: ${stopped(own(rest, 200))}`,
        'rest places of the walk',
      ),
    )
  const dead = scope.walk.words.deadEnd?.says
  if (dead) lines.push(line(`At the dead end: ${sentences(own(dead, 400)).join(' ')}`, 'dead end of the walk'))
  for (const { help, place } of meetings(helpsOf(scope).filter(({ needed }) => needed))) {
    const role = roleOf(help)
    if (role) lines.push(line(`With you at ${place}: ${the(role)}.`, `help at ${place}`))
  }
  return section('Overview', [list(lines)])
}

const levels: readonly string[] = ['single-step', 'kerb', 'stairs', 'escalator', 'moving-walk', 'ramp', 'lift']

/** Steps, slopes and lifts, by name, in walking order. */
function levelWords({ walk }: Scope): string {
  const names = walk.segments.flatMap((segment) =>
    segment.features.filter((feature) => levels.includes(feature.kind)).map(featureName),
  )
  return names.length > 0 ? `Level changes: ${joined(distinct(names))}.` : 'No step, slope or lift.'
}

/** ", 28 metres, about 1 minute"; nothing while a length is missing. */
function wayWords(scope: Scope): string {
  let length = 0
  let seconds = 0
  for (const stretch of stretchesOf(scope)) {
    if (stretch.length === null) return ''
    length += stretch.length
    seconds += stretch.length / (scope.result.pace ?? scope.team.handler.pace)
  }
  return `, ${metresWords(length)}, about ${count(Math.max(1, Math.ceil(seconds / 60)), 'minute')}`
}

/** The parts that begin with a turn say so in their facing; those above 45 degrees are gathered. */
function turnLines(parts: readonly Section[]): Line[] {
  return parts.flatMap((part, i) => {
    const facing = part.blocks.find(
      (block) => block.kind === 'paragraph' && /^Facing: (turn|bear)/.test(block.line.text),
    )
    const phrase = facing?.kind === 'paragraph' ? facing.line.text.slice('Facing: '.length) : ''
    const repeat = parts[i - 1]?.heading.includes(', caution first')
    return phrase.startsWith('turn') && !repeat ? [line(`Part ${i + 1} begins with a turn: ${phrase}`)] : []
  })
}

/** Four sentences for a phone, or for somebody to read aloud. */
export function shortVersion(scope: Scope, lead: Lead, parts: readonly Section[], contact: string): Section {
  const leash = scope.result.leash === null ? 'leash length not known' : `leash at the ${markWords(scope.result.leash)}`
  return section('Short version', [
    list([
      line(lead.heading),
      line(`${capital(count(parts.length, 'part'))}${wayWords(scope)}, ${leash}.`),
      line(mainCaution(scope, parts)),
      line(`Questions: ${contact}.`, 'contact of the venue'),
    ]),
  ])
}

/** The worst harm of the walk and the parts it is told in. */
function mainCaution(scope: Scope, parts: readonly Section[]): string {
  const stop = partsWith(parts, /^Stop\. Leash off\./)
  if (stop.length > 0) return `Leash off and wait in ${partList(stop)}.`
  const harms = scope.result.segments.flatMap((segment) => segment.cautions.map(({ harm }) => harm))
  const worst = [...severe, 'road' as const, 'comfort' as const].find((harm) => harms.includes(harm))
  if (!worst) return 'No caution on this walk.'
  return `Caution in ${partList(partsWith(parts, /^Caution: /))}.`
}

function partsWith(parts: readonly Section[], pattern: RegExp): number[] {
  return parts.flatMap((part, i) =>
    part.blocks.some((block) => block.kind === 'list' && block.items.some((item) => pattern.test(item.text)))
      ? [i + 1]
      : [],
  )
}

function partList(numbers: readonly number[]): string {
  return numbers.length === 1 ? `part ${numbers[0]}` : `parts ${numbers.join(', ')}`
}
