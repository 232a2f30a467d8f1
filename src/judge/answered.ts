import type { Attribute } from '../catalogue/kind.ts'
import { kind } from '../catalogue/kinds.ts'
import { type Aspect, aspects, aspectsLedOtherwise, type Item, items, neverInherited } from '../record/answers.ts'
import { root } from '../record/placement.ts'
import type { Answer, Conflict, Feature, Reading } from '../record/survey.ts'
import { doorWays } from './checks/doors.ts'
import type { Gap } from './gap.ts'
import type { Harm } from './result.ts'
import { read, type Setting } from './setting.ts'
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

function itemGaps({ segment, setting }: Site, item: Item, aspect: Aspect): Gap[] {
  const answer = segment.words[item]
  const name = itemNames[item]
  if (!answer) return [unanswered(aspect, `${segment.name}: nobody answered ${name}.`)]
  const found: Gap[] = []
  const known: readonly string[] | null = items[item].says
  if (known && !known.includes(answer.says))
    found.push(unanswered(aspect, `${segment.name}: ${name} says "${answer.says}", which is no answer to it.`))
  if (answer.says === 'listed' && !segment.features.some((one) => lists(item, aspect, one)))
    found.push(unanswered(aspect, `${segment.name}: ${name} is said to be listed, and nothing is.`))
  // A thing on a wall says nothing of what hangs above the way.
  const heightListed = answer.says === 'listed' && segment.features.some((one) => hasHeight(one))
  if (item === 'overhead' && !heightListed && !read(setting, segment, 'overhead', 'low'))
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
    const turning = feature === site.segment.turn
    if (row && turning !== turnKinds.has(row.id) && !(turning && row.id === 'dead-end'))
      found.push(
        unanswered(
          undefined,
          turning
            ? `${nameOf(feature)}: entered as the turn at the end, where nothing judges it.`
            : `${nameOf(feature)}: entered along the way; a turn ends its part.`,
          'trap',
        ),
      )
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
        if (isRequired(attribute, feature) && !read(site.setting, feature, attribute.id, 'both'))
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
      if (!strict || !attribute.says || !isRequired(attribute, feature)) continue
      if (isHearsay(answer)) found.push(told(aspect, `${name} was ${heard(answer)}, nobody looked.`, row.harm))
      if (answer.how === 'inherited')
        found.push(unanswered(aspect, `${name} is never taken over from the stretch before.`, row.harm))
      if (answer.tooQuick) found.push(unanswered(aspect, `${name} was swept too quickly.`, row.harm))
    }
  }
  return found
}

const turnKinds = new Set(['turn', 'u-turn'])

/** Whether a feature is an answer to an item that says "listed". */
function lists(item: Item, aspect: Aspect, { kind: id }: Feature): boolean {
  return item === 'slots' ? id === 'grating' || id === 'gap' : kind(id)?.aspect === aspect
}

function hasHeight({ kind: id }: Feature): boolean {
  const row = kind(id)
  return row?.aspect === 'overhead' && row.feeds.includes('overhead')
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
  const magnet = zone?.words.magnet?.says
  if (zone && magnet !== 'yes' && magnet !== 'no')
    found.push(unanswered(undefined, `${name}: nobody answered whether a strong magnet is near.`, 'trap'))
  for (const { words } of [...(zone ? [zone] : []), ...around.seen])
    for (const [item, answer] of Object.entries(words))
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

/** What of the survey itself every judgement is made with. */
const ofAll = new Set(['team', 'hours', 'code', 'instruments'])

/** Versions of things on this segment, or of what all is judged with, that nobody has settled or this version cannot read. */
export function conflicts({ segment, zone, around, setting }: Site): Gap[] {
  const holders = [segment, ...featuresOf({ segment }), ...around.seen]
  const own = new Set([...holders.flatMap(idsOf), ...(zone ? [zone.id] : [])])
  const concerns = ({ entity, field }: { entity: string; field: string }) =>
    own.has(entity) || (entity === root && ofAll.has(field))
  return [
    ...unsettled(setting, concerns).map((one) =>
      differ(undefined, `${segment.name}: two versions of ${one.field}.`, 'fall'),
    ),
    ...setting.setAside
      .filter((one) => concerns(one) && !idle.has(one.field))
      .map((one) =>
        unanswered(undefined, `${segment.name}: ${one.field} is recorded in a way that this version cannot read.`),
      ),
  ]
}

/** Versions that move what is judged; answers in words carry theirs themselves. */
export function unsettled({ conflicts }: Setting, concerns: (one: Conflict) => boolean): Conflict[] {
  return conflicts.filter(
    (one) => concerns(one) && !idle.has(one.field) && !one.field.startsWith('photo') && !one.field.startsWith('word/'),
  )
}

function idsOf({ id, readings }: { id: string; readings: Readonly<Record<string, readonly Reading[]>> }): string[] {
  return [id, ...Object.values(readings).flatMap((all) => all.map((one) => one.id))]
}

function isHearsay(answer: Answer): boolean {
  return answer.how === 'told' || answer.how === 'by-eye'
}

function heard(answer: Answer): string {
  return answer.how === 'told' ? 'told' : 'judged by eye'
}

export function differs(answer: Answer): boolean {
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
