import type { Pinch } from '../../plan/pinch.ts'
import { liftCar } from '../../plan/pinch-rooms.ts'
import { type Finding, finding, ratioOf, roomState, stateOf } from '../finding.ts'
import type { RoomSolver } from '../rooms.ts'
import { read } from '../setting.ts'
import { helpAt, nameOf, type Site } from '../site.ts'
import { metresNeeded, metresThere } from '../words.ts'
import { frameBand, pinchSite } from './turn.ts'

/** Kept free behind and before the gathered team. */
const spare = 0.2

/**
 * The gathered team in the car's depth, and the way out of the car solved as a scene with the leash gathered. A team
 * that backs out must be shown to do so with this robot.
 */
export function liftFit(site: Site, rooms: RoomSolver): Finding[] {
  const { setting, segment } = site
  const { team } = setting
  return segment.features
    .filter((one) => one.kind === 'lift')
    .flatMap((feature) => {
      const depth = read(setting, feature, 'carDepth', 'low')
      if (!depth) return []
      const demand = team.gathered + spare
      const ratio = ratioOf({ low: demand, high: demand }, depth)
      const help = helpAt(site, feature)
      const shown = team.card.handler.ownWayThroughLifts !== null
      const fits = stateOf(ratio)
      const found = [
        finding({
          id: 'lift-fit',
          feature: feature.id,
          subject: `Fit in ${nameOf(feature)}`,
          detail: () => `${metresNeeded(demand)} gathered for ${metresThere(depth.low)}`,
          harm: 'trap',
          source: 'common practice',
          // A car too short for the gathered team is nothing that a held door settles.
          raw: fits === 'passes' && !shown ? 'needs-help' : fits,
          demand,
          capacity: depth.low,
          ratio,
          caution: fits === 'tight' ? 'Short lift. Gather the leash close.' : null,
          from: [depth],
          strict: true,
          ...(fits === 'fails' || fits === 'unsure' ? {} : { help }),
        }),
      ]
      const car = liftCar(pinchSite(site), feature)
      if (car) found.push(wayOut(site, feature.id, nameOf(feature), car, rooms))
      return found
    })
}

function wayOut({ setting, segment }: Site, id: string, name: string, car: Pinch, rooms: RoomSolver): Finding {
  const { team } = setting
  const need = team.card.leash.clearancePinch
  const feature = segment.features.find((one) => one.id === id)
  const backs = feature?.words.wayOut?.says === 'backs-out'
  const shown = feature?.words.backsOutShown?.says === 'yes'
  const { taut: room } = rooms.room(car, [team.gatheredSeparation], {
    slack: false,
    need,
    band: frameBand,
    back: false,
  })
  const demand = team.envelope + 2 * need
  const side = (end: number | null) => (end === null ? 0 : team.envelope + 2 * end)
  const fits = roomState(room, need, frameBand)
  const unshown = backs && !shown && fits !== 'fails'
  const raw = unshown ? 'unsure' : fits
  return finding({
    id: 'lift-fit',
    feature: id,
    subject: `Way out of ${name}`,
    detail: () =>
      unshown ? 'backing out is not shown' : `${metresThere(room.low ?? 0)} a side for ${metresNeeded(need)}`,
    harm: 'trap',
    source: 'common practice',
    raw,
    demand,
    capacity: side(room.low),
    ratio: ratioOf({ low: demand, high: demand }, { low: side(room.low), high: side(room.high) }),
    caution: raw === 'tight' ? 'Little room in the lift. Gather the leash close.' : null,
    from: car.from,
    strict: true,
  })
}
