import { markWords } from './directions.ts'
import { helpsOf, roleOf, the } from './help.ts'
import { own } from './own.ts'
import type { Scope } from './scope.ts'
import { lengthOf } from './stretches.ts'
import { gap, type Line, line, list, type Section, section } from './tree.ts'
import { capital, sentences, stopped } from './words.ts'

/** What holds on every walk, in the same words every time. Nothing here names a part. */
export function alwaysLines(scope: Scope): Line[] {
  const { result } = scope
  const leash =
    result.leash === null
      ? gap('Leash', 'leash length that serves this walk')
      : line(`Leash at the ${markWords(result.leash)}.`)
  return [
    line('Carry your cane.'),
    leash,
    line('Hold the leash in your hand only: never looped, wrapped or clipped.'),
    line('When the leash goes slack, stand still. Do not step forward: the leash may be on the floor.'),
    line('If the robot stops, stop.'),
    line('If it pulls hard, let go: open your hand.'),
    line('Do not lean on the robot.'),
  ]
}

/** Stops, battery, alarm, help: what to do when something goes wrong. */
export function troubleSection(scope: Scope): Section {
  const { walk } = scope
  const call = walk.words.helpCall?.says
  const help = call
    ? line(`To call help: ${stopped(own(call))}`, 'help call of the walk')
    : gap('Help call', 'help call of the walk')
  return section('If something goes wrong', [
    list([
      line('If the robot stops and stays: stand, open your hand, call help.'),
      line('If its battery runs low: stop, stand, call help.'),
      ...turnBackLines(scope),
      ...alarmLines(scope),
      help,
      signalLine(scope),
      ...nobodyLines(scope),
    ]),
  ])
}

/** Where the battery is only just enough: the last place from which it also reaches back. */
function turnBackLines(scope: Scope): Line[] {
  const battery = scope.result.checks.find((check) => check.id === 'battery')
  if (!battery || battery.caution === null || battery.capacity === null) return []
  const there = battery.capacity / reserve / 2
  let seconds = 0
  for (const { segment } of scope.stretches) {
    seconds += (lengthOf(segment) ?? longest) / (scope.result.pace ?? scope.team.handler.pace)
    if (seconds > there) return [line(`Battery: just enough. Turn back before "${own(segment.name)}" if it runs low.`)]
  }
  return [line('Battery: just enough for this walk, not for the way back.')]
}

/** The judge's reserve on the battery's time, and the length of a segment that nobody measured. */
const reserve = 1.3
const longest = 25

/** "If the alarm sounds: let go, hand on the wall, stand, call out, [role] comes to [place]." */
export function alarmLines({ walk }: Pick<Scope, 'walk'>): Line[] {
  const role = roleOf(walk.alarm)
  const place = typeof walk.alarm?.place === 'string' ? the(own(walk.alarm.place)) : 'you'
  return [
    line('If the alarm sounds: let go, hand on the wall, stand, call out.'),
    role
      ? line(`${capital(the(role))} comes to ${place}.`, 'alarm role of the walk')
      : gap('Who comes', 'alarm role of the walk'),
  ]
}

/** Where a phone does not work, by zone name. */
function signalLine(scope: Scope): Line {
  const zoneIds = new Set(scope.walk.segments.map((segment) => segment.zone))
  const zones = scope.view.zones.filter((zone) => zoneIds.has(zone.id))
  const none = zones.filter((zone) => zone.words.signal?.says === 'none').map((zone) => own(zone.name))
  if (none.length > 0 || scope.walk.words.signal?.says === 'none')
    return line(`No phone signal: ${none.length > 0 ? none.join(', ') : 'on this whole walk'}.`)
  const known = scope.walk.words.signal ?? (zones.length > 0 && zones.every((zone) => zone.words.signal))
  return line(known ? 'Phone signal was found on the whole walk.' : 'Phone signal: nobody has tried it.')
}

function nobodyLines(scope: Scope): Line[] {
  const said = new Map<string, string>()
  for (const { help, place, needed } of helpsOf(scope))
    if (needed && help.ifNobody && ![...said.values()].includes(help.ifNobody)) said.set(place, help.ifNobody)
  return [...said].map(([place, act]) =>
    line(`Nobody comes in 3 minutes at ${place}? ${sentences(own(act, 400)).join(' ')}`, `help at ${place}`),
  )
}
