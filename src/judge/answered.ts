import type { Attribute } from '../catalogue/kind.ts'
import { kind } from '../catalogue/kinds.ts'
import { type Aspect, aspects, aspectsLedOtherwise, type Item, items, neverInherited } from '../record/answers.ts'
import type { Answer, Feature } from '../record/survey.ts'
import { doorWays } from './checks/doors.ts'
import type { Gap } from './gap.ts'
import type { Harm } from './result.ts'
import { featuresOf, nameOf, type Site } from './site.ts'

/** What nobody answered, or answered by hearsay: unknown is never a pass. */
export function answered(site: Site): Gap[] {
  return [...aspectGaps(site), ...featureGaps(site), ...zoneGaps(site), ...cardGaps(site)]
}

export const aspectHarm: Readonly<Record<Aspect, Harm>> = {
  length: 'comfort',
  width: 'trap',
  overhead: 'head',
  step: 'fall',
  edge: 'fall',
  surface: 'fall',
  door: 'trap',
  sensing: 'trap',
  shoreline: 'comfort',
  'end-sign': 'comfort',
}

const aspectNames: Readonly<Record<Aspect, string>> = {
  length: 'length',
  width: 'clear width',
  overhead: 'overhead',
  step: 'step, slope or cross-fall',
  edge: 'edge within 3 m',
  surface: 'surface',
  door: 'door or gate',
  sensing: 'what the robot senses',
  shoreline: 'shoreline',
  'end-sign': 'end sign',
}

const itemNames: Readonly<Record<Item, string>> = {
  overhead: 'overhead',
  step: 'step, slope or cross-fall',
  edge: 'edge within 3 m',
  finish: 'finish of the floor',
  wetness: 'wet or dry',
  slots: 'slots over 13 mm',
  door: 'door or gate',
  sensing: 'what the robot senses',
  shoreline: 'shoreline',
  'end-sign': 'end sign',
}

/** Aspects asked of a segment: all of a robot-led one, three of any other. */
export function asked({ led }: Pick<Site, 'led'>): readonly Aspect[] {
  return led ? aspects : aspectsLedOtherwise
}

/** Aspects without a whole answer. */
export function missingAspects(gaps: readonly Gap[]): Aspect[] {
  return aspects.filter((aspect) => gaps.some((one) => one.kind === 'unanswered' && one.aspect === aspect))
}

function aspectGaps(site: Site): Gap[] {
  const { segment } = site
  const found: Gap[] = []
  for (const aspect of asked(site)) {
    if (aspect === 'length' || aspect === 'width') {
      if (!site[aspect]) found.push(unanswered(aspect, `${segment.name}: nobody measured the ${aspectNames[aspect]}.`))
      continue
    }
    for (const item of Object.keys(items) as Item[]) {
      if (items[item].aspect === aspect) found.push(...itemGaps(site, item, aspect))
    }
  }
  return found
}

function itemGaps({ segment }: Site, item: Item, aspect: Aspect): Gap[] {
  const answer = segment.words[item]
  const name = itemNames[item]
  if (!answer) return [unanswered(aspect, `${segment.name}: nobody answered ${name}.`)]
  const found: Gap[] = []
  const known: readonly string[] | null = items[item].says
  if (known && !known.includes(answer.says))
    found.push(unanswered(aspect, `${segment.name}: ${name} says "${answer.says}", which is no answer to it.`))
  if (answer.says === 'listed' && !featuresOf({ segment }).some((one) => kind(one.kind)?.aspect === aspect))
    found.push(unanswered(aspect, `${segment.name}: ${name} is said to be listed, and nothing is.`))
  if (item === 'overhead' && answer.says === 'none' && !(segment.readings.overhead ?? []).length)
    found.push(unanswered(aspect, `${segment.name}: nobody said to what height overhead was swept.`))
  if (neverInherited.includes(item)) {
    if (answer.how === 'inherited')
      found.push(unanswered(aspect, `${segment.name}: ${name} is never taken over from the stretch before.`))
    if (answer.tooQuick) found.push(unanswered(aspect, `${segment.name}: ${name} was swept too quickly.`))
    if (isHearsay(answer)) found.push(told(aspect, `${segment.name}: ${name} was ${heard(answer)}, nobody looked.`))
  }
  if (differs(answer)) found.push(differ(aspect, `${segment.name}: answers to ${name} differ.`))
  return found
}

function featureGaps(site: Site): Gap[] {
  const found: Gap[] = []
  for (const feature of featuresOf(site)) {
    const row = kind(feature.kind)
    if (!row) {
      found.push(unanswered(undefined, `${feature.name ?? feature.kind}: no kind that this catalogue knows.`, 'fall'))
      continue
    }
    // A part led otherwise asks only its own aspects.
    if (!site.led && !row.stopItem && !(row.aspect && asked(site).includes(row.aspect))) continue
    const strict = row.aspect !== null && ['overhead', 'edge', 'step', 'door'].includes(row.aspect)
    for (const attribute of row.attributes) {
      const name = `${nameOf(feature)}: ${attribute.name}`
      const aspect = row.aspect ?? undefined
      if (attribute.type === 'quantity') {
        if (isRequired(attribute, feature) && !(feature.readings[attribute.id] ?? []).length)
          found.push(unanswered(aspect, `${name}: nobody measured it.`, row.harm))
        continue
      }
      const answer = feature.words[attribute.id]
      if (!answer) {
        if (isRequired(attribute, feature)) found.push(unanswered(aspect, `${name}: nobody answered it.`, row.harm))
        continue
      }
      if (attribute.says && !attribute.says.includes(answer.says))
        found.push(unanswered(aspect, `${name} says "${answer.says}", which is no answer to it.`, row.harm))
      if (differs(answer)) found.push(differ(aspect, `${name}: answers differ.`, row.harm))
      if (strict && attribute.says && isRequired(attribute, feature) && isHearsay(answer))
        found.push(told(aspect, `${name} was ${heard(answer)}, nobody looked.`, row.harm))
    }
  }
  return found
}

/** Asked of this feature: always, or where another answer of it says so. A door fixed open is not handled at all. */
export function isRequired(attribute: Attribute, feature: Feature): boolean {
  const { required } = attribute
  if (required === 'optional') return false
  if (['force', 'closedRoom', 'robotPlace', 'action'].includes(attribute.id) && !doorWays(feature).manual) return false
  if (required === 'always') return true
  const says = feature.words[required.item]?.says
  // Until the other answer is there, nobody knows that this one is not needed: the other is named as missing.
  return says !== undefined && required.says.includes(says)
}

function zoneGaps({ segment, zone, around, led }: Site): Gap[] {
  const found: Gap[] = []
  const name = zone?.name ?? segment.name
  const says = zone?.words.allowed?.says
  if (led && says !== 'allowed' && says !== 'forbidden')
    found.push({
      kind: 'not-asked',
      text: `${name}: nobody asked whether the robot is allowed.`,
      readings: [],
      harm: 'comfort',
      blocks: true,
    })
  if (!led) return found
  if (around.crowd === null) found.push(hours(`${name}: nobody observed the crowd at these hours.`, 'road'))
  if (around.noise === null) found.push(hours(`${name}: nobody observed the noise at these hours.`, 'comfort'))
  if (around.unseen) found.push(hours(`${name}: part of these hours was not observed.`, 'road'))
  for (const [item, answer] of Object.entries(zone?.words ?? {}))
    if (differs(answer)) found.push(differ(undefined, `${name}: answers to ${item} differ.`, 'comfort'))
  return found
}

/** The card must say who opens doors: compulsory, no default. */
function cardGaps({ setting, segment }: Site): Gap[] {
  if (setting.team.card.handler.opensDoors !== null || setting.team.card.robot.opensDoors) return []
  if (!segment.features.some((one) => doorWays(one).manual)) return []
  return [
    {
      kind: 'card',
      text: 'The team card does not say whether the handler opens doors.',
      readings: [],
      harm: 'trap',
      blocks: true,
    },
  ]
}

/** Fields of a record whose versions move nothing that is judged. */
const idle = new Set(['name', 'note', 'photos', 'startSign', 'what'])

/** Versions of things on this segment that nobody has settled. */
export function conflicts(site: Site): Gap[] {
  const own = new Set([site.segment.id, ...featuresOf(site).map((one) => one.id), ...(site.zone ? [site.zone.id] : [])])
  return site.setting.conflicts
    .filter((one) => own.has(one.entity) && !idle.has(one.field) && !one.field.startsWith('photo'))
    .filter((one) => !one.field.startsWith('word/'))
    .map((one) => differ(undefined, `${site.segment.name}: two versions of ${one.field}.`, 'fall'))
}

function isHearsay(answer: Answer): boolean {
  return answer.how === 'told' || answer.how === 'by-eye'
}

function heard(answer: Answer): string {
  return answer.how === 'told' ? 'told' : 'judged by eye'
}

function differs(answer: Answer): boolean {
  return (answer.rivals ?? []).some((one) => one.says !== answer.says)
}

function gap(kind: Gap['kind'], aspect: Aspect | undefined, text: string, harm: Harm | undefined): Gap {
  return {
    kind,
    text,
    readings: [],
    harm: harm ?? (aspect ? aspectHarm[aspect] : 'fall'),
    blocks: true,
    ...(aspect ? { aspect } : {}),
  }
}

const unanswered = (aspect: Aspect | undefined, text: string, harm?: Harm) => gap('unanswered', aspect, text, harm)
const told = (aspect: Aspect | undefined, text: string, harm?: Harm) => gap('told', aspect, text, harm)
const differ = (aspect: Aspect | undefined, text: string, harm?: Harm) => gap('differs', aspect, text, harm)
const hours = (text: string, harm: Harm) => gap('hours', undefined, text, harm)
