import { kind } from '../../catalogue/kinds.ts'
import { isGuarded } from '../../judge/checks/edge.ts'
import { type Check, harms } from '../../judge/result.ts'
import type { Feature, Segment } from '../../record/survey.ts'
import { formatForce, formatGradient, formatMm, formatTime } from '../../units/format.ts'
import { featureName, featuresOf } from './help.ts'
import { own } from './own.ts'
import type { Scope } from './scope.ts'
import { distinct } from './words.ts'

/** What a venue can change, and by how much a check's verdict would turn. */
export interface Fix {
  /** 1 now, 2 soon, 3 later. */
  priority: 1 | 2 | 3
  place: string
  what: string
  clause: string
  /** "93 mm more turns it"; '' where no figure would. */
  turns: string
  check: Check
}

type Grows = { grows: 'mm' | 's' | 'N' | 'points'; of: string; room?: number }
type Falls = { falls: 'mm' | 'N' | 'gradient'; of: string }

/** What would turn a check: more of what there is, or less of what is asked. Room checks keep a band a side, metres. */
const levers: Readonly<Record<string, Grows | Falls>> = {
  'straight-width': { grows: 'mm', of: 'clear width', room: 0.1 },
  turn: { grows: 'mm', of: 'room for the team', room: 0.1 },
  overhead: { grows: 'mm', of: 'headroom', room: 0.1 },
  'door-room': { grows: 'mm', of: 'room at the door' },
  'lift-fit': { grows: 'mm', of: 'room in the car' },
  crowd: { grows: 'mm', of: 'clear width' },
  'door-time': { grows: 's', of: 'time the door stays open' },
  'lift-time': { grows: 's', of: 'time the lift stays open' },
  traction: { grows: 'N', of: 'grip' },
  slip: { grows: 'points', of: 'on the pendulum' },
  'door-force': { falls: 'N', of: 'force' },
  level: { falls: 'mm', of: 'height' },
  gap: { falls: 'mm', of: 'gap' },
  protrusion: { falls: 'mm', of: 'projection' },
  slope: { falls: 'gradient', of: 'slope' },
  'cross-fall': { falls: 'gradient', of: 'cross-fall' },
}

/** Asked where no feature of the catalogue carries the check. */
const asks: Readonly<Record<string, string>> = {
  'straight-width': 'Clear both sides to the agreed width.',
  turn: 'Move what stands at the corner, or widen the way.',
  overhead: 'Raise or trim what hangs low.',
  traction: 'Keep the floor dry, or lay a fixed mat.',
  slip: 'Keep the floor dry, or lay a fixed mat.',
  edge: 'Set a rail, wall or barrier between the way and the edge.',
  crowd: 'Offer a quiet hour, or somebody to walk with the team.',
  noise: 'Turn the source down, or offer a quiet hour.',
  sensing: 'Mark or cover what the robot cannot sense.',
  emergency: 'Name who comes when the alarm sounds, and a way out without a lift.',
  allowed: 'Say who allows the robot here, and from when.',
  'stop-item': 'Name who leads here, and keep the step-free way unlocked.',
}

/** The team's own business, not the venue's. */
const teams: readonly string[] = ['stop', 'stop-at-edge', 'slack-leash', 'battery']

/** Fixes asked of the venue: worst first, then by harm, then the least room left. */
export function fixesOf(scope: Scope): Fix[] {
  return together(hazardsOf(scope)).sort(worstFirst)
}

/** The same, one for each check. */
export function hazardsOf(scope: Scope): Fix[] {
  const fixes = [
    ...scope.stretches.flatMap(({ segment, result }) => result.checks.map((check) => fixOf(check, segment))),
    ...scope.result.checks.map((check) => fixOf(check, null)),
  ].filter((fix) => fix !== null)
  return fixes.sort(worstFirst)
}

function worstFirst(one: Fix, other: Fix): number {
  return (
    one.priority - other.priority ||
    harms.indexOf(one.check.harm) - harms.indexOf(other.check.harm) ||
    highOf(other.check) - highOf(one.check)
  )
}

/** What is asked at one place in the same words is asked once, for its worst check, with all its clauses and figures. */
function together(fixes: readonly Fix[]): Fix[] {
  const asked = new Map<string, Fix[]>()
  for (const fix of fixes) {
    const key = JSON.stringify([fix.place, fix.what])
    asked.set(key, [...(asked.get(key) ?? []), fix])
  }
  return [...asked.values()].map((same) => {
    const worst = same.reduce((one, other) => (other.priority < one.priority ? other : one))
    return {
      ...worst,
      clause: distinct(same.flatMap(({ clause }) => clause.split('; '))).join('; '),
      turns: distinct(same.map(({ turns }) => turns).filter((turns) => turns !== '')).join('; '),
    }
  })
}

function fixOf(check: Check, segment: Segment | null): Fix | null {
  if (teams.includes(check.id)) return null
  const priority = priorityOf(check)
  if (priority === null) return null
  const feature = segment ? featuresOf(segment).find((one) => one.id === check.feature) : undefined
  // A guarded edge is only walked past by somebody else: nothing is asked of the venue.
  if (check.id === 'edge' && feature && isGuarded(feature)) return null
  return {
    priority,
    place: placeOf(feature, segment),
    what: whatToDo(check, feature),
    clause: own(check.source),
    turns: turnsWith(check),
    check,
  }
}

/** A thing without a name of its own is told by its part: "turn, Down the narrow passage". */
function placeOf(feature: Feature | undefined, segment: Segment | null): string {
  const part = own(segment?.name ?? 'whole walk')
  if (!feature) return part
  return feature.name ? featureName(feature) : `${featureName(feature)}, ${part}`
}

function priorityOf(check: Check): Fix['priority'] | null {
  if (check.state === 'fails' || check.state === 'stop-item') return 1
  if (check.state === 'unsure' || check.state === 'needs-help' || check.state === 'helped') return 2
  return check.state === 'tight' || check.caution !== null ? 3 : null
}

function whatToDo(check: Check, feature: Feature | undefined): string {
  const row = feature ? kind(feature.kind)?.fix : undefined
  return (row?.trim() || asks[check.id]) ?? 'Ask the surveyor what would help here.'
}

/** How much would turn the check, at the unsafe end of its readings, rounded so that it is enough. */
function turnsWith(check: Check): string {
  const lever = levers[check.id]
  const { demand, capacity, ratio, state } = check
  if (!lever || demand === null || capacity === null || ratio === null) return ''
  const high = ratio[1]
  const tight = state === 'tight'
  if ('grows' in lever) {
    const there = high === null || high <= 0 ? capacity : demand / high
    const aim = !tight ? demand : lever.room === undefined ? demand / tightFrom : demand + lever.room
    return aim > there ? `${amount(aim - there, lever.grows)} more ${lever.of}${effect(tight)}` : ''
  }
  const asked = high === null ? demand : high * capacity
  const aim = tight ? capacity * tightFrom : capacity
  if (lever.falls === 'gradient')
    return aim > 0 && asked > aim
      ? `${lever.of} ${formatGradient(aim, { unit: '1:n', towards: 'gentler' })} or gentler${effect(tight)}`
      : ''
  return asked > aim ? `${amount(asked - aim, lever.falls)} less ${lever.of}${effect(tight)}` : ''
}

const tightFrom = 0.85

function effect(tight: boolean): string {
  return tight ? ' ends the caution' : ' turns it'
}

function amount(value: number, unit: 'mm' | 's' | 'N' | 'points'): string {
  if (unit === 'mm') return formatMm(value, { towards: 'up' })
  if (unit === 's') return formatTime(value, { towards: 'up' })
  return unit === 'N' ? formatForce(value, { towards: 'up' }) : `${Math.ceil(value)} points`
}

function highOf(check: Check): number {
  return check.ratio === null ? -1 : (check.ratio[1] ?? Number.MAX_VALUE)
}
