import type { Feature } from '../record/survey.ts'
import type { Lacking, Pinch, PinchSite } from './pinch.ts'
import { framed, inLine } from './pinch-lead.ts'
import { ofChicane, ofFrame, ofObstruction, ofSqueeze } from './pinch-openings.ts'
import { ofDeadEnd } from './pinch-rooms.ts'
import { isThroughDoor, ofTurn } from './pinch-turn.ts'

/** Every pinch of a robot-led segment: its features and the turn at its end. */
export function pinchesOf(site: PinchSite): (Pinch | Lacking)[] {
  const { segment } = site
  const found: (Pinch | Lacking)[] = []
  for (const feature of segment.features) {
    const one = ofFeature(site, feature)
    if (one) found.push(one)
  }
  const { turn } = segment
  const end = turn ? ofEnd(site, turn) : null
  return end ? [...found, end] : found
}

/** What stands at the segment's end: a change of direction, unless a door in the side wall makes it, or any other thing. */
function ofEnd(site: PinchSite, turn: Feature): Pinch | Lacking | null {
  if (turn.kind !== 'turn' && turn.kind !== 'u-turn') return ofFeature(site, turn)
  return isThroughDoor(site.segment, turn, site.read) ? null : ofTurn(site, turn)
}

function ofFeature(site: PinchSite, feature: Feature): Pinch | Lacking | null {
  if (framed.has(feature.kind)) return ofFrame(site, feature)
  if (feature.kind in inLine) return ofSqueeze(site, feature)
  if (feature.kind === 'obstruction') return ofObstruction(site, feature)
  if (feature.kind === 'chicane') return ofChicane(site, feature)
  if (feature.kind === 'dead-end') return ofDeadEnd(site, feature)
  return null
}
