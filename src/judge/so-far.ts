import { kind } from '../catalogue/kinds.ts'
import { type Item, items } from '../record/answers.ts'
import type { Segment, SurveyView } from '../record/survey.ts'
import { defaultTeamCard, type TeamCard } from '../record/team-card.ts'
import type { CodePack } from '../standards/pack.ts'
import { asked, isRequired } from './answered.ts'
import { type Finding, high, toCheck } from './finding.ts'
import { plainFindings } from './plain-checks.ts'
import type { Check } from './result.ts'
import type { Setting } from './setting.ts'
import { featuresOf, nameOf, siteOf } from './site.ts'
import { teamOf } from './team.ts'

/** An answer left open while a segment is recorded. */
export interface Missing {
  /** The segment, or the feature that lacks it. */
  holder: string
  /** The item in words or the quantity. */
  item: string
  name: string
}

export interface SoFar {
  missing: Missing[]
  /** The worst that stands against the segment already, without leash and pace; null: nothing so far. */
  against: Check | null
}

/**
 * What the recording screen says while a segment is not complete: never a verdict. Fast: no planner, no other segment
 * but the walk it is on.
 */
export function soFar(segment: Segment, view: SurveyView, team: TeamCard | undefined, pack: CodePack): SoFar {
  const walk = view.walks.find((one) => one.segments.some((other) => other.id === segment.id))
  const whole = walk
    ? { ...walk, segments: walk.segments.map((one) => (one.id === segment.id ? segment : one)) }
    : { id: 'walk', name: 'walk', words: {}, segments: [segment], states: [] }
  const setting: Setting = {
    view,
    conflicts: [],
    setAside: [],
    team: teamOf(team ?? view.team ?? defaultTeamCard),
    pack,
    on: '',
    hours: view.hours ?? null,
  }
  const index = whole.segments.findIndex((one) => one.id === segment.id)
  const site = siteOf(setting, whole, index, false)
  return { missing: missingOf(site), against: worst(plainFindings(site)) }
}

function missingOf(site: ReturnType<typeof siteOf>): Missing[] {
  const { segment } = site
  const found: Missing[] = []
  for (const aspect of asked(site)) {
    if (aspect === 'length' || aspect === 'width') {
      if (!site[aspect]) found.push({ holder: segment.id, item: aspect, name: aspect })
      continue
    }
    for (const item of Object.keys(items) as Item[])
      if (items[item].aspect === aspect && !segment.words[item])
        found.push({ holder: segment.id, item, name: item.replace('-', ' ') })
  }
  for (const feature of featuresOf(site)) {
    for (const attribute of kind(feature.kind)?.attributes ?? []) {
      const given =
        attribute.type === 'quantity'
          ? (feature.readings[attribute.id] ?? []).length > 0
          : feature.words[attribute.id] !== undefined
      if (!given && isRequired(attribute, feature))
        found.push({ holder: feature.id, item: attribute.id, name: `${nameOf(feature)}: ${attribute.name}` })
    }
  }
  return found
}

const rank: Readonly<Record<string, number>> = { 'stop-item': 4, fails: 3, unsure: 2, 'needs-help': 1 }

function worst(findings: readonly Finding[]): Check | null {
  let found: Finding | null = null
  // Whether the robot is allowed is the zone's, not yet the segment's.
  for (const one of findings.filter((finding) => finding.id !== 'allowed')) {
    const at = rank[one.state] ?? 0
    const best = found ? (rank[found.state] ?? 0) : 0
    if (at > best || (at > 0 && at === best && found && high(one.ratio) > high(found.ratio))) found = one
  }
  return found ? toCheck(found) : null
}
