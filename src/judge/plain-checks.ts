import { allowed } from './checks/allowed.ts'
import { crossFall } from './checks/cross-fall.ts'
import { crowd } from './checks/crowd.ts'
import { doorForce } from './checks/door-force.ts'
import { doorRoom } from './checks/door-room.ts'
import { edge } from './checks/edge.ts'
import { gap } from './checks/gap.ts'
import { level } from './checks/level.ts'
import { noise } from './checks/noise.ts'
import { overhead } from './checks/overhead.ts'
import { protrusion } from './checks/protrusion.ts'
import { sensing } from './checks/sensing.ts'
import { slip } from './checks/slip.ts'
import { slope } from './checks/slope.ts'
import { stopItem } from './checks/stop-item.ts'
import { straightWidth } from './checks/straight-width.ts'
import { traction } from './checks/traction.ts'
import type { Finding } from './finding.ts'
import type { Site } from './site.ts'

/** Checks that depend on neither leash nor pace and need no planner. Adding one is adding it here. */
const checks: readonly ((site: Site) => Finding[])[] = [
  stopItem,
  straightWidth,
  overhead,
  protrusion,
  level,
  slope,
  crossFall,
  traction,
  slip,
  gap,
  edge,
  doorForce,
  doorRoom,
  sensing,
  crowd,
  noise,
  allowed,
]

export function plainFindings(site: Site): Finding[] {
  const found: Finding[] = []
  for (const check of checks) found.push(...check(site))
  return found
}
