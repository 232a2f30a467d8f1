import { effortWords, markWords, metresWords, turnAngle, turnWords } from './directions.ts'
import { the } from './help.ts'
import { own } from './own.ts'
import type { Scope } from './scope.ts'
import { type Stretch, stretchesOf } from './stretches.ts'
import { cautionsOf, severe, stopLine, type ToldCaution } from './told-cautions.ts'
import { gap, type Line, line, list, type Section } from './tree.ts'
import { capital, sentences, stopped } from './words.ts'

/** Start, facts (four at most) and name of one part, before the parts are numbered. */
interface Draft {
  name: string
  start: Line[]
  facts: Line[]
}

/** The parts of a client's sheet: "Part 2 of 5: Past the lockers". */
export function partSections(scope: Scope): Section[] {
  const stretches = stretchesOf(scope)
  const drafts = stretches.flatMap((stretch, i) => draftsOf(scope, stretch, stretches[i - 1]))
  return drafts.map(({ name, start, facts }, i) => ({
    heading: `Part ${i + 1} of ${drafts.length}: ${name}`,
    part: true,
    blocks: [...start.map((one) => ({ kind: 'paragraph', line: one }) as const), list(facts)],
    sections: [],
  }))
}

function draftsOf(scope: Scope, stretch: Stretch, before: Stretch | undefined): Draft[] {
  const name = own(stretch.segments[0]?.name ?? '')
  const start = startLines(scope, stretch, before)
  return stretch.ledBy === 'robot' ? robotParts(scope, stretch, name, start) : [otherPart(stretch, name, start)]
}

function startLines(scope: Scope, stretch: Stretch, before: Stretch | undefined): Line[] {
  const change = scope.result.changes.find(({ segment }) => stretch.segments.some((one) => one.id === segment))
  const mark = change && before ? [line(`Change the leash to the ${markWords(change.leash)}.`)] : []
  return [startSign(scope, before), ...facing(scope, before), ...mark]
}

function startSign(scope: Scope, before: Stretch | undefined): Line {
  if (!before) {
    const from = 'start sign of the walk'
    return scope.walk.startSign
      ? line(`Start sign: ${stopped(own(scope.walk.startSign, 200))}`, from)
      : gap('Start sign', from)
  }
  if (before.ledBy !== 'robot' && before.role) return line(`Start sign: ${the(before.role)} hands you the leash.`)
  const last = before.segments.at(-1)
  return endSign('Start sign', last?.words['end-sign']?.says, last?.name ?? '')
}

function endSign(label: string, says: string | undefined, segment: string): Line {
  const from = `end sign of "${own(segment)}"`
  return says ? line(`${label}: ${stopped(own(says, 200))}`, from) : gap(label, from)
}

function facing(scope: Scope, before: Stretch | undefined): Line[] {
  if (!before) {
    const says = scope.walk.words.facing?.says
    return says ? [line(`Facing: ${stopped(own(says, 200))}`, 'facing of the walk')] : []
  }
  if (before.ledBy !== 'robot' && before.role) return [line(`Facing: ${the(before.role)} sets it.`)]
  const turn = before.segments.at(-1)?.turn
  if (!turn) return [line("Facing: straight on, 12 o'clock.")]
  const angle = turnAngle(turn)
  return [
    angle === null
      ? gap('Facing', `angle of the turn after "${own(before.segments.at(-1)?.name ?? '')}"`)
      : line(`Facing: ${turnWords(angle).phrase}.`),
  ]
}

/**
 * A part holds one caution about a fall, the head or a trap, and two facts besides the way and its end. What is too much
 * comes before it in parts of its own in which nobody walks, so that no part ends in the middle of nowhere and the
 * worst caution is the last one heard before walking.
 */
function robotParts(scope: Scope, stretch: Stretch, name: string, start: Line[]): Draft[] {
  const segment = stretch.segments[0]
  const result = stretch.results[0]
  if (!segment || !result) return []
  const cautions = cautionsOf(segment, result)
  const landmark = segment.words.landmark?.says
  const notes = [
    shoreline(segment.words.shoreline?.says, own(segment.name)),
    ...(landmark ? [line(`Landmark: ${stopped(own(landmark, 200))}`, `landmark of "${own(segment.name)}"`)] : []),
  ]
  const groups = grouped(cautions, notes.length)
  return groups.map((group, i) => {
    const told = group.map(cautionLine)
    if (i < groups.length - 1)
      return { name: `${name}, caution first`, start, facts: [...told, line('You do not walk in this part.')] }
    const facts = [
      walkLine(scope, stretch, result.pace),
      ...notes,
      ...told,
      endSign('End sign', segment.words['end-sign']?.says, segment.name),
    ]
    return { name, start, facts }
  })
}

/** The last group goes with the walking part: the worst caution, and what else has room. */
function grouped(cautions: readonly ToldCaution[], notes: number): ToldCaution[][] {
  const groups: ToldCaution[][] = [[]]
  let room = Math.max(1, 2 - notes)
  for (const caution of cautions) {
    const last = groups[0] as ToldCaution[]
    const second = severe.includes(caution.harm) && last.some((one) => severe.includes(one.harm))
    if (second || last.length >= room) {
      groups.unshift([caution])
      room = 3
    } else last.push(caution)
  }
  return groups
}

function cautionLine(caution: ToldCaution): Line {
  return line(caution.stop ? caution.text : `Caution: ${caution.text}`, caution.from)
}

function walkLine(scope: Scope, stretch: Stretch, pace: number | null): Line {
  if (stretch.length === null) return gap('Length', `length of "${own(stretch.segments[0]?.name ?? '')}"`)
  const effort = effortWords(
    stretch.length,
    scope.team.handler.step,
    scope.result.pace ?? pace ?? scope.team.handler.pace,
  )
  return line(`Cue the robot, then walk ${metresWords(stretch.length)}, ${effort}.`)
}

function shoreline(says: string | undefined, segment: string): Line {
  if (says === 'left' || says === 'right') return line(`Shoreline on your ${says}.`)
  return says === 'none' ? line('No shoreline.') : gap('Shoreline', `shoreline of "${segment}"`)
}

/** Led by a person: one caution, who does what, and who gives the leash back. */
function otherPart(stretch: Stretch, name: string, start: Line[]): Draft {
  const help = stretch.segments.find((segment) => segment.help)?.help
  const where = `help at "${name}"`
  const stop = stretch.role
    ? line(stopLine(stretch.role), where)
    : { ...line(stopLine(null), where), missing: true as const }
  const act = help?.act
    ? line(
        `${capital(the(stretch.role ?? 'helper'))} ${sentences(own(help.act, 400))
          .join(' ')
          .replace(/^./u, (first) => first.toLowerCase())}`,
        where,
      )
    : gap('What happens', where)
  const length = stretch.length === null ? [] : [line(`It is ${metresWords(stretch.length)} long.`)]
  return { name, start, facts: [stop, act, ...length] }
}
